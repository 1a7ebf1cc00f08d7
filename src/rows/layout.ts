/**
 * Which column is which, and the rows with their cells by name. A header is recognised because the first row that is
 * neither blank nor a remark holds at least `Item` and `At`; without one the eight columns stand in their fixed order.
 */
import type { Issue } from '../issue';
import { isBlank, isErrorCell, normaliseCell, showCell, type Cell } from './cell';
import { readTextRows } from './text';
import { columnMeant, columnOf, COLUMNS, itemMeant, itemOf, type ColumnName, type ItemName } from './words';

export interface RowInfo {
  /** 1-based in the range (or in the text) */
  readonly row: number;
  readonly kind: 'header' | 'blank' | 'remark' | 'item' | 'unknown';
  readonly item: ItemName | null;
  readonly cells: Readonly<Partial<Record<ColumnName, Cell>>>;
}

export interface Layout {
  readonly header: boolean;
  /** by column of the range; null = a column of the user's own */
  readonly columns: readonly (ColumnName | null)[];
  /** headings of the user's own columns */
  readonly ignored: readonly string[];
}

export interface LaidOut {
  readonly rows: RowInfo[];
  readonly layout: Layout;
  readonly issues: Issue[];
  readonly cautions: Issue[];
  /** the beam was one cell of text */
  readonly text: boolean;
}

export function layOut(raw: readonly (readonly unknown[])[]): LaidOut {
  const issues: Issue[] = [];
  const cautions: Issue[] = [];
  const only = raw.length === 1 && raw[0]?.length === 1 ? normaliseCell(raw[0][0]) : null;
  if (typeof only === 'string') {
    const read = readTextRows(only);
    issues.push(...read.issues);
    const rows = read.rows.map((cells, i) => classify(cells, i + 1, issues));
    return { rows, layout: { header: false, columns: COLUMNS, ignored: [] }, issues, cautions, text: true };
  }

  const cells = raw.map((row) => (Array.isArray(row) ? row : [row]).map(normaliseCell));
  const top = cells.findIndex((row) => !row.every(isBlank) && !isRemark(row.find((cell) => !isBlank(cell))));
  const layout = readHeader(top < 0 ? [] : cells[top]!, top + 1, widest(cells), issues, cautions);
  const spoilt = issues.some(({ code }) => code === 'header-incomplete');
  const rows = cells.map((row, i): RowInfo => {
    // A header with a missing column has been named; its words are no items.
    if (i === top && (layout.header || spoilt)) {
      return { row: i + 1, kind: 'header', item: null, cells: named(row, layout) };
    }
    return classify(named(row, layout), i + 1, issues);
  });
  return { rows, layout, issues, cautions, text: false };
}

function widest(cells: readonly (readonly Cell[])[]): number {
  return cells.reduce((most, row) => Math.max(most, row.length), 0);
}

function readHeader(
  top: readonly Cell[],
  row: number,
  width: number,
  issues: Issue[],
  cautions: Issue[],
): Layout {
  const headings = top.map((cell) => (typeof cell === 'string' ? columnOf(cell) : null));
  if (!headings.includes('Item') || !headings.includes('At')) {
    if (headings.filter((name) => name !== null).length >= 2 && !isItemRow(top)) {
      const missing = headings.includes('Item') ? 'At' : 'Item';
      const misspelt = top.find(
        (cell) => typeof cell === 'string' && columnOf(cell) === null && columnMeant(cell) === missing,
      );
      issues.push({
        code: 'header-incomplete',
        kind: 'invalid',
        row,
        expected: missing,
        ...(typeof misspelt === 'string' ? { found: misspelt, suggestion: missing } : {}),
      });
    } else if (width > COLUMNS.length) {
      issues.push({ code: 'ninth-column', kind: 'invalid', found: String(width) });
    }
    return {
      header: false,
      columns: COLUMNS.slice(0, Math.max(1, Math.min(width, COLUMNS.length))),
      ignored: [],
    };
  }
  const columns: (ColumnName | null)[] = [];
  const ignored: string[] = [];
  top.forEach((cell, i) => {
    const name = headings[i] ?? null;
    if (name === null) {
      if (!isBlank(cell)) ignored.push(typeof cell === 'string' ? cell : showCell(cell));
    } else if (columns.includes(name)) {
      issues.push({ code: 'duplicate-column', kind: 'invalid', row, column: name });
    }
    columns.push(name);
  });
  for (const heading of ignored) {
    const meant = columnMeant(heading);
    if (meant !== undefined && !columns.includes(meant)) {
      cautions.push({ code: 'ignored-heading', kind: 'invalid', row, found: heading, suggestion: meant });
    }
  }
  while (columns.length < width) columns.push(null);
  return { header: true, columns, ignored };
}

function isItemRow(row: readonly Cell[]): boolean {
  return typeof row[0] === 'string' && itemOf(row[0]) !== null;
}

function isRemark(cell: Cell | undefined): boolean {
  return typeof cell === 'string' && (cell.startsWith('#') || cell.startsWith('//'));
}

function named(row: readonly Cell[], layout: Layout): Partial<Record<ColumnName, Cell>> {
  const cells: Partial<Record<ColumnName, Cell>> = {};
  const { columns } = layout;
  for (let i = 0; i < columns.length; i += 1) {
    const name = columns[i];
    const cell = row[i];
    if (name !== null && name !== undefined && cell !== null && cell !== undefined) cells[name] = cell;
  }
  return cells;
}

/** What kind of row this is. Blank means blank or 0 in every column of ours; a note alone is a remark. */
function classify(cells: Partial<Record<ColumnName, Cell>>, row: number, issues: Issue[]): RowInfo {
  const item = cells.Item;
  if (isRemark(item)) return { row, kind: 'remark', item: null, cells };
  if (isBlank(item)) {
    const other = COLUMNS.find((name) => name !== 'Item' && name !== 'Note' && !isBlank(cells[name]));
    if (other === undefined)
      return { row, kind: isBlank(cells.Note) ? 'blank' : 'remark', item: null, cells };
    issues.push({
      code: 'no-item',
      kind: 'invalid',
      row,
      column: 'Item',
      found: showCell(cells[other]),
      detail: { at: other },
    });
    return { row, kind: 'unknown', item: null, cells };
  }
  if (isErrorCell(item)) {
    issues.push({ code: 'cell-error', kind: 'invalid', row, column: 'Item', found: item.error });
    return { row, kind: 'unknown', item: null, cells };
  }
  if (typeof item !== 'string') {
    issues.push({ code: 'item-not-word', kind: 'invalid', row, column: 'Item', found: showCell(item) });
    return { row, kind: 'unknown', item: null, cells };
  }
  const known = itemOf(item);
  if (known === null) {
    issues.push(unknownItem(item, row, cells));
    return { row, kind: 'unknown', item: null, cells };
  }
  return { row, kind: 'item', item: known, cells };
}

function unknownItem(word: string, row: number, cells: Partial<Record<ColumnName, Cell>>): Issue {
  if (columnOf(word) === 'Item')
    return { code: 'header-late', kind: 'invalid', row, column: 'Item', found: showCell(cells.Item) };
  const suggestion = itemMeant(word);
  return {
    code: 'unknown-item',
    kind: 'invalid',
    row,
    column: 'Item',
    found: showCell(word),
    ...(suggestion === undefined ? {} : { suggestion }),
  };
}
