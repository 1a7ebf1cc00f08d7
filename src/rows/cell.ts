/**
 * One cell as the row language sees it. Hosts deliver cells in several dresses (numbers, texts, null, 0 or "" for
 * blanks, rich values, error values); this is the one place that knows them.
 */

/** A number is always finite. A text is never empty and has no blanks around it. null is a blank cell. */
export type Cell = number | string | boolean | null | { readonly error: string };

/** The error texts a worksheet shows. They are listed because "#" also begins a remark, and an error is no remark. */
const ERROR_TEXT =
  /^#(?:NULL!|DIV\/0!|VALUE!|REF!|NAME\?|NUM!|N\/A|GETTING_DATA|SPILL!|CALC!|FIELD!|BLOCKED!|CONNECT!|BUSY!|UNKNOWN!|EXTERNAL!|PYTHON!|TIMEOUT!)$/i;

/** Rich cell -> basic value. Never throws; what cannot be a cell (a function, a date object) reads as #VALUE!. */
export function normaliseCell(raw: unknown): Cell {
  switch (typeof raw) {
    case 'number':
      return Number.isFinite(raw) ? raw : { error: '#NUM!' };
    case 'string': {
      const text = raw.trim();
      if (text === '') return null;
      return text.charCodeAt(0) === 35 && ERROR_TEXT.test(text) ? { error: text.toUpperCase() } : text;
    }
    case 'boolean':
      return raw;
    case 'undefined':
      return null;
    case 'bigint':
      return normaliseCell(Number(raw));
    case 'object':
      return raw === null ? null : normaliseRich(raw as Readonly<Record<string, unknown>>);
    default:
      return { error: '#VALUE!' };
  }
}

/**
 * Rich cells look like {type, basicType, basicValue, ...}; error cells may come as {type: 'Error', basicValue: '#REF!'},
 * as our own {error: '#REF!'}, or as a thrown-error object with a `code`.
 */
function normaliseRich(raw: Readonly<Record<string, unknown>>): Cell {
  if (typeof raw.error === 'string') return { error: raw.error };
  if ('basicValue' in raw) {
    const basic = raw.basicValue;
    if (raw.type === 'Error' || raw.basicType === 'Error') {
      return { error: typeof basic === 'string' && basic.startsWith('#') ? basic : '#VALUE!' };
    }
    return typeof basic === 'object' && basic !== null ? { error: '#VALUE!' } : normaliseCell(basic);
  }
  if (raw.type === 'Empty') return null;
  if (typeof raw.code === 'string' && raw.code.startsWith('#')) return { error: raw.code };
  return { error: '#VALUE!' };
}

export function isErrorCell(cell: Cell): cell is { readonly error: string } {
  return typeof cell === 'object' && cell !== null;
}

/** Blank and 0 are one and the same: hosts deliver an empty cell as either. */
export function isBlank(cell: Cell | undefined): cell is null | undefined | 0 {
  return cell === null || cell === undefined || cell === 0;
}

/** A cell as text for a message. */
export function showCell(cell: Cell | undefined): string {
  if (cell === null || cell === undefined) return 'a blank cell';
  if (typeof cell === 'object') return cell.error;
  if (typeof cell === 'boolean') return cell ? 'TRUE' : 'FALSE';
  return typeof cell === 'number' ? String(cell) : `"${cell.length > 60 ? cell.slice(0, 57) + '...' : cell}"`;
}
