/** Cell addresses of a file: zero-based row and column to letters and numbers, and back. */
import { columnLetters, parseArea } from '../../taskpane/address';
import type { Rectangle } from '../book';

/** (0, 0) -> "A1" */
export function cellName(row: number, column: number): string {
  return `${columnLetters(column)}${row + 1}`;
}

export function rangeName({ startRow, startColumn, endRow, endColumn }: Rectangle): string {
  return `${cellName(startRow, startColumn)}:${cellName(endRow, endColumn)}`;
}

/** "A1:C3" or "$A$1" -> rectangle; null when it is neither. */
export function parseRange(text: string): Rectangle | null {
  const area = parseArea(text, '');
  if (area === null) return null;
  return {
    startRow: area.row,
    startColumn: area.column,
    endRow: area.row + area.rows - 1,
    endColumn: area.column + area.columns - 1,
  };
}
