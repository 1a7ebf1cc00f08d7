/** Rows to the one-cell text form: cells in column order as long as none is blank, the later ones by their key. */
import type { ColumnName } from '../engine';
import { textOf } from '../values';
import { COLUMNS } from './guide';

const KEYS: Readonly<Partial<Record<ColumnName, string>>> = {
  To: 'to',
  Value: 'value',
  'End value': 'end',
  Unit: 'unit',
  Case: 'case',
  Note: 'note',
};

/** A quote inside quotes is doubled; the inch mark of 12'-6" needs none when it does not begin the cell. */
function quoted(text: string): string {
  return /[\s;=]|^"/.test(text) ? `"${text.replace(/"/g, '""')}"` : text;
}

/** One row: `uniform 0 6 "12 kN/m" case=Q`. Cells by column name; blank ones may be left out. */
export function rowText(cells: Readonly<Partial<Record<ColumnName, unknown>>>): string {
  const words: string[] = [];
  let inOrder = true;
  for (const column of COLUMNS) {
    const text = textOf(cells[column]).trim();
    if (text === '') {
      inOrder = false;
      continue;
    }
    const key = KEYS[column];
    words.push(inOrder || key === undefined ? quoted(text) : `${key}=${quoted(text)}`);
  }
  return words.join(' ');
}

export function rowsText(
  rows: readonly Readonly<Partial<Record<ColumnName, unknown>>>[],
  separator = '; ',
): string {
  return rows
    .map(rowText)
    .filter((text) => text !== '')
    .join(separator);
}
