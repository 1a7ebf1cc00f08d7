/**
 * Tables of a file become plain cells, and formulas that name them (`Joists[Span]`, `Joists[@Span]`) come to hold the cells' addresses,
 * so that they follow inserted rows like any reference. Formulas that cannot be turned are listed.
 */
import { quoteSheet } from '../../taskpane/address';
import { cellName, parseRange } from './address';
import { columnLetters } from '../../taskpane/address';
import type { Rectangle } from '../book';
import { decode, tags } from './xml';

export interface FileTable {
  readonly name: string;
  readonly sheet: string;
  readonly range: Rectangle;
  readonly columns: readonly string[];
  readonly headerRows: number;
  readonly totalRows: number;
}

/** Reads one `xl/tables/tableN.xml`; null when it is not readable. */
export function readTable(part: Uint8Array | undefined, sheet: string): FileTable | null {
  let table: FileTable | null = null;
  const columns: string[] = [];
  for (const { name, attributes, closing } of tags(decode(part))) {
    if (closing) continue;
    if (name === 'table') {
      const range = parseRange(attributes.ref ?? '');
      const word = attributes.displayName ?? attributes.name;
      if (range === null || word === undefined) return null;
      table = {
        name: word,
        sheet,
        range,
        columns,
        headerRows: Number(attributes.headerRowCount ?? 1),
        totalRows: Number(attributes.totalsRowCount ?? 0),
      };
    } else if (name === 'tableColumn') columns.push((attributes.name ?? '').replace(/_x000a_/gi, '\n'));
  }
  return table;
}

/** Turns structured references into addresses, as seen from one cell. `failed` is true when some reference could not be turned. */
export function withoutTables(
  formula: string,
  tables: readonly FileTable[],
  from: { readonly sheet: string; readonly row: number },
): { formula: string; failed: boolean; changed: boolean } {
  let failed = false;
  let changed = false;
  const names = tables.map((one) => one.name.replace(/[.\\]/g, '\\$&')).sort((a, b) => b.length - a.length);
  if (names.length === 0) return { formula, failed, changed };
  const pattern = new RegExp(
    `"(?:[^"]|"")*"|'(?:[^']|'')*'|(?<![\\w.!])(${names.join('|')})(?![\\w.(])(\\[(?:[^\\[\\]']|'.|\\[(?:[^\\[\\]']|'.)*\\])*\\])?`,
    'gi',
  );
  const turned = formula.replace(pattern, (whole, name?: string, specifier?: string) => {
    if (name === undefined) return whole;
    const table = tables.find((one) => one.name.toLowerCase() === name.toLowerCase());
    const range = table === undefined ? null : resolve(table, specifier ?? '', from.row);
    if (table === undefined || range === null) {
      failed = true;
      return whole;
    }
    changed = true;
    const sheet = table.sheet === from.sheet ? '' : `${quoteSheet(table.sheet)}!`;
    return sheet + absolute(range);
  });
  return { formula: turned, failed, changed };
}

function absolute({ startRow, startColumn, endRow, endColumn }: Rectangle): string {
  const cell = (row: number, column: number) => `$${columnLetters(column)}$${row + 1}`;
  const first = cell(startRow, startColumn);
  return cellName(startRow, startColumn) === cellName(endRow, endColumn)
    ? first
    : `${first}:${cell(endRow, endColumn)}`;
}

/** "[#All]", "[Span]", "[[#Headers],[Span]:[Load]]", "[@Span]", "" -> cells of the table; null when not understood. */
function resolve(table: FileTable, specifier: string, row: number): Rectangle | null {
  const { range } = table;
  const data = {
    ...range,
    startRow: range.startRow + table.headerRows,
    endRow: range.endRow - table.totalRows,
  };
  if (specifier === '' || specifier === '[]') return data;
  let inside = specifier.slice(1, -1).trim();
  let rows: Rectangle | null = data;
  const here = row < data.startRow || row > data.endRow ? null : { ...data, startRow: row, endRow: row };
  if (inside.startsWith('@')) {
    rows = here;
    inside = inside.slice(1).trim();
    if (inside === '') return rows;
  }
  const pieces = inside.startsWith('[')
    ? [...inside.matchAll(/\[((?:[^[\]']|'.)*)\]|:/g)]
    : [[`[${inside}]`, inside]];
  let from: number | null = null;
  let to: number | null = null;
  let joining = false;
  for (const [whole, text] of pieces) {
    if (whole === ':') {
      joining = true;
      continue;
    }
    const word = (text ?? '').trim();
    if (word.startsWith('#')) {
      rows = special(word.toLowerCase(), table, data, here);
      if (rows === null) return null;
      continue;
    }
    const column = table.columns.findIndex(
      (one) => one.toLowerCase() === word.replace(/'(.)/g, '$1').toLowerCase(),
    );
    if (column < 0) return null;
    if (joining) to = column;
    else from = to = column;
  }
  if (rows === null) return null;
  if (from === null || to === null) return rows;
  return {
    ...rows,
    startColumn: range.startColumn + Math.min(from, to),
    endColumn: range.startColumn + Math.max(from, to),
  };
}

function special(
  word: string,
  { range, headerRows, totalRows }: FileTable,
  data: Rectangle,
  here: Rectangle | null,
): Rectangle | null {
  switch (word) {
    case '#all':
      return range;
    case '#data':
      return data;
    case '#headers':
      return headerRows > 0 ? { ...range, endRow: range.startRow + headerRows - 1 } : null;
    case '#totals':
      return totalRows > 0 ? { ...range, startRow: range.endRow - totalRows + 1 } : null;
    case '#this row':
      return here;
    default:
      return null;
  }
}
