/** Recognises headings and item words through the engine's own reading of them. */
import { compileTable, normaliseCell, type ColumnName } from './engine';

const HEADINGS: readonly ColumnName[] = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'];

export function columnOf(value: unknown): ColumnName | null {
  const cell = normaliseCell(value);
  if (typeof cell !== 'string') return null;
  const word = cell.toLowerCase().replace(/\s+/g, '');
  return HEADINGS.find((name) => name.toLowerCase().replace(/\s+/g, '') === word) ?? null;
}

/** Whether cells read as one beam row: a known item, or a remark. */
export function isItemRow(cells: readonly unknown[]): boolean {
  if (typeof normaliseCell(cells[0]) !== 'string') return false;
  const kind = compileTable([cells]).rows[0]?.kind;
  return kind === 'item' || kind === 'remark';
}
