/**
 * A beam in one cell of text (contract 2.6): rows separated by `;` or line breaks, cells by blanks, in column order, quoted
 * where a cell has blanks; `case=`, `to=`, `end=`, `unit=`, `note=`, `value=`, `at=` name their column.
 */
import type { Issue } from '../issue';
import type { Cell } from './cell';
import { COLUMNS, columnOf, itemOf, type ColumnName } from './words';

export type TextRow = Partial<Record<ColumnName, Cell>>;

export interface TextRows {
  readonly rows: readonly TextRow[];
  readonly issues: readonly Issue[];
}

interface Token {
  readonly key: ColumnName | null;
  readonly text: string;
  readonly quoted: boolean;
}

/** One row per `;` or line break; rows are numbered from 1, blank ones included. */
export function readTextRows(text: string): TextRows {
  const issues: Issue[] = [];
  const rows = splitRows(text).map((line, i) => readRow(line, i + 1, issues));
  return { rows, issues };
}

/** A remark may hold a quotation mark that never closes; it must not swallow the rows after it. */
const REMARK = /^\s*(?:#|\/\/)/;

/** A separator inside quotes separates nothing. Quotes only open where a cell begins, so the inch mark of 12'-6" opens none. */
function splitRows(text: string): string[] {
  const rows: string[] = [];
  let row = '';
  let quoted = false;
  for (let i = 0; i < text.length; i += 1) {
    const sign = text[i]!;
    if (quoted) {
      if (isQuote(sign)) {
        if (isQuote(text[i + 1] ?? '')) {
          row += '""';
          i += 1;
          continue;
        }
        quoted = false;
      }
    } else if (isQuote(sign) && /(?:^|[\s=])$/.test(row) && !REMARK.test(row)) {
      quoted = true;
    } else if (sign === ';' || sign === '\n' || sign === '\r') {
      if (!(sign === '\n' && text[i - 1] === '\r')) rows.push(row);
      row = '';
      continue;
    }
    row += isQuote(sign) ? '"' : sign;
  }
  rows.push(row);
  return rows;
}

function isQuote(sign: string): boolean {
  return sign === '"' || sign === '\u201c' || sign === '\u201d';
}

const KEY = /^(item|at|to|value|end|endvalue|unit|case|note)=/i;

function tokens(line: string, row: number, issues: Issue[]): Token[] {
  const found: Token[] = [];
  let i = 0;
  while (i < line.length) {
    if (/\s/.test(line[i]!)) {
      i += 1;
      continue;
    }
    let key: ColumnName | null = null;
    const named = KEY.exec(line.slice(i, i + 12));
    if (named !== null) {
      const word = named[1]!.toLowerCase();
      key = word === 'end' ? 'End value' : columnOf(word);
      i += named[0].length;
    }
    if (line[i] === '"') {
      const close = closing(line, i + 1);
      if (close < 0) {
        issues.push({ code: 'unclosed-quote', kind: 'invalid', row, found: line.slice(i) });
        return found;
      }
      found.push({ key, text: line.slice(i + 1, close).replace(/""/g, '"'), quoted: true });
      i = close + 1;
    } else {
      const word = /^\S*/.exec(line.slice(i))![0];
      found.push({ key, text: word, quoted: false });
      i += word.length;
    }
  }
  return found;
}

function closing(line: string, from: number): number {
  for (let i = from; i < line.length; i += 1) {
    if (line[i] !== '"') continue;
    if (line[i + 1] !== '"') return i;
    i += 1;
  }
  return -1;
}

function readRow(line: string, row: number, issues: Issue[]): TextRow {
  if (REMARK.test(line)) return { Item: line.trim() };
  let parts = tokens(line, row, issues);
  // "rotational spring", "shear release" and "point load" are one cell even without quotes.
  const [first, second] = parts;
  if (first && second && !first.key && !second.key && !first.quoted && !second.quoted) {
    const pair = `${first.text} ${second.text}`;
    if (itemOf(pair) !== null) parts = [{ key: null, text: pair, quoted: true }, ...parts.slice(2)];
  }
  const cells: TextRow = {};
  let place = 0;
  for (const { key, text, quoted } of parts) {
    const column = key ?? COLUMNS[place];
    if (key === null) place += 1;
    if (column === undefined) {
      issues.push({ code: 'too-many-cells', kind: 'invalid', row, found: text });
      break;
    }
    if (cells[column] !== undefined) {
      issues.push({ code: 'cell-twice', kind: 'invalid', row, column, found: text });
      continue;
    }
    cells[column] = cellOf(text.trim(), column, quoted);
  }
  return cells;
}

/** In a text every number is text, so a plain one is simply a number here. A written 0 stays text: it is no blank. */
function cellOf(text: string, column: ColumnName, quoted: boolean): Cell {
  if (text === '') return null;
  const wordy = column === 'Item' || column === 'Unit' || column === 'Case' || column === 'Note';
  if (!wordy && !quoted && /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/.test(text)) {
    const value = Number(text);
    return Number.isFinite(value) && value !== 0 ? value : text;
  }
  return text;
}
