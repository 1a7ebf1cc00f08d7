/** Cell addresses in words: letters and numbers to zero-based areas and back. No host, no state. */
import type { Area } from './port';

export const MAX_ROWS = 1048576;
export const MAX_COLUMNS = 16384;

/** 0 -> "A", 25 -> "Z", 26 -> "AA" */
export function columnLetters(column: number): string {
  let rest = column + 1;
  let letters = '';
  while (rest > 0) {
    const digit = (rest - 1) % 26;
    letters = String.fromCharCode(65 + digit) + letters;
    rest = (rest - 1 - digit) / 26;
  }
  return letters;
}

/** "AA" -> 26; null when it is no column of a sheet */
export function columnNumber(letters: string): number | null {
  if (!/^[A-Za-z]{1,3}$/.test(letters)) return null;
  let value = 0;
  for (const letter of letters.toUpperCase()) value = value * 26 + letter.charCodeAt(0) - 64;
  return value <= MAX_COLUMNS ? value - 1 : null;
}

const CELL = /^\$?([A-Za-z]{1,3})\$?([0-9]{1,7})$/;
const COLUMN = /^\$?([A-Za-z]{1,3})$/;
const ROW = /^\$?([0-9]{1,7})$/;

interface Corner {
  readonly row: number | null;
  readonly column: number | null;
}

function corner(text: string): Corner | null {
  const cell = CELL.exec(text);
  if (cell) {
    const column = columnNumber(cell[1] ?? '');
    const row = Number(cell[2]) - 1;
    return column === null || row < 0 || row >= MAX_ROWS ? null : { row, column };
  }
  const letters = COLUMN.exec(text);
  if (letters) {
    const column = columnNumber(letters[1] ?? '');
    return column === null ? null : { row: null, column };
  }
  const number = ROW.exec(text);
  if (number) {
    const row = Number(number[1]) - 1;
    return row < 0 || row >= MAX_ROWS ? null : { row, column: null };
  }
  return null;
}

/** "B4", "$B$4:I11", "B:I", "4:11" -> area on the given sheet; null when it is no address. */
export function parseArea(text: string, sheet: string): Area | null {
  const parts = text.split(':');
  if (parts.length > 2) return null;
  const first = corner(parts[0] ?? '');
  const last = parts.length === 2 ? corner(parts[1] ?? '') : first;
  if (!first || !last) return null;
  // one whole row or column must be written as a pair ("B:B"), else it is a name or a number
  if (parts.length === 1 && (first.row === null || first.column === null)) return null;
  if ((first.row === null) !== (last.row === null) || (first.column === null) !== (last.column === null)) {
    return null;
  }
  const top = Math.min(first.row ?? 0, last.row ?? 0);
  const bottom = first.row === null ? MAX_ROWS - 1 : Math.max(first.row, last.row ?? 0);
  const left = Math.min(first.column ?? 0, last.column ?? 0);
  const right = first.column === null ? MAX_COLUMNS - 1 : Math.max(first.column, last.column ?? 0);
  return { sheet, row: top, column: left, rows: bottom - top + 1, columns: right - left + 1 };
}

/** A sheet name as a formula needs it: quoted unless it is a plain word. */
export function quoteSheet(sheet: string): string {
  const plain =
    /^[\p{L}_][\p{L}\p{N}_.]*$/u.test(sheet) && !CELL.test(sheet) && !/^[Rr]([0-9]|[Cc]|$)/.test(sheet);
  return plain ? sheet : `'${sheet.replace(/'/g, "''")}'`;
}

/** "B4" or "B4:I11", without the sheet; whole columns and rows as "B:I", "4:11". */
export function shortAddress(area: Area): string {
  const right = area.column + area.columns - 1;
  const bottom = area.row + area.rows - 1;
  if (area.rows >= MAX_ROWS) return `${columnLetters(area.column)}:${columnLetters(right)}`;
  if (area.columns >= MAX_COLUMNS) return `${area.row + 1}:${bottom + 1}`;
  const first = `${columnLetters(area.column)}${area.row + 1}`;
  return area.rows === 1 && area.columns === 1 ? first : `${first}:${columnLetters(right)}${bottom + 1}`;
}

/** The address as a formula on sheet `home` would write it. */
export function addressFrom(area: Area, home: string | null): string {
  return area.sheet === home ? shortAddress(area) : `${quoteSheet(area.sheet)}!${shortAddress(area)}`;
}

export function cellOf(area: Area, row: number, column: number): Area {
  return { sheet: area.sheet, row: area.row + row, column: area.column + column, rows: 1, columns: 1 };
}

export function overlaps(a: Area, b: Area): boolean {
  return (
    a.sheet === b.sheet &&
    a.row < b.row + b.rows &&
    b.row < a.row + a.rows &&
    a.column < b.column + b.columns &&
    b.column < a.column + a.columns
  );
}

export function contains(outer: Area, inner: Area): boolean {
  return (
    outer.sheet === inner.sheet &&
    inner.row >= outer.row &&
    inner.column >= outer.column &&
    inner.row + inner.rows <= outer.row + outer.rows &&
    inner.column + inner.columns <= outer.column + outer.columns
  );
}

/** The common part of two areas of one sheet; null when there is none. */
export function intersect(a: Area, b: Area): Area | null {
  if (!overlaps(a, b)) return null;
  const row = Math.max(a.row, b.row);
  const column = Math.max(a.column, b.column);
  return {
    sheet: a.sheet,
    row,
    column,
    rows: Math.min(a.row + a.rows, b.row + b.rows) - row,
    columns: Math.min(a.column + a.columns, b.column + b.columns) - column,
  };
}

/**
 * Shortens a list of short addresses for a sentence: neighbours in one row join ("B4:D4"), equal stretches in
 * consecutive rows join ("B4:D6"), and a long list ends with a count.
 */
export function nameCells(addresses: readonly string[], most = 6): string {
  interface Run {
    row: number;
    column: number;
    rows: number;
    columns: number;
    sheet: string;
  }
  const runs: Run[] = [];
  for (const address of addresses) {
    const bang = address.lastIndexOf('!');
    const sheet = bang < 0 ? '' : address.slice(0, bang + 1);
    const area = parseArea(address.slice(bang + 1), sheet);
    if (!area) continue;
    const last = runs[runs.length - 1];
    if (last && last.sheet === sheet && last.row === area.row && last.column + last.columns === area.column) {
      last.columns += area.columns;
    } else {
      runs.push({ row: area.row, column: area.column, rows: 1, columns: area.columns, sheet });
    }
  }
  const joined: Run[] = [];
  for (const run of runs) {
    const above = joined.find(
      (other) =>
        other.sheet === run.sheet &&
        other.column === run.column &&
        other.columns === run.columns &&
        other.row + other.rows === run.row,
    );
    if (above) above.rows += 1;
    else joined.push({ ...run });
  }
  const words = joined.slice(0, most).map((run) => run.sheet + shortAddress(run));
  const rest = joined.length - words.length;
  return rest > 0 ? `${words.join(', ')} and ${rest} more` : words.join(', ');
}
