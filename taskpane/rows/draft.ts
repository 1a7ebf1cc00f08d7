/**
 * The rows of a beam while they are edited: plain data and pure steps, so that undo is a list of earlier drafts.
 *
 * The range on the sheet is a fixed set of row slots; blank ones between or after the rows are spare. A draft holds the filled
 * rows in order and, per row, its slot. Adding takes the next spare slot; with none left the range has to grow, which is not
 * decided here. Removing closes up the gap and frees the last slot. Cells of the person's own columns travel with their row.
 */
import type { CellInput } from '../port';
import { moveFormula } from '../formula/move';

/** What stands in one cell: its value as read, and the formula that made it, '' for a literal. */
export interface Cell {
  readonly value: unknown;
  readonly formula: string;
}
export type Row = readonly Cell[];

export interface Draft {
  readonly rows: readonly Row[];
  /** slot of each row: index of the physical row in the range, rising */
  readonly slots: readonly number[];
  /** how many physical rows the range has */
  readonly capacity: number;
  /** physical rows of the heading, 0 or 1 */
  readonly head: number;
  readonly width: number;
}

export const EMPTY: Cell = { value: null, formula: '' };

const blank = (cell: Cell): boolean =>
  cell.formula === '' && (cell.value === null || cell.value === undefined || cell.value === '');

export function makeDraft(
  values: readonly (readonly unknown[])[],
  formulas: readonly (readonly string[])[],
  head: number,
): Draft {
  const rows: Row[] = [];
  const slots: number[] = [];
  const width = values[0]?.length ?? 0;
  values.forEach((line, index) => {
    if (index < head) return;
    const row = line.map((value, column): Cell => ({ value, formula: formulas[index]?.[column] ?? '' }));
    if (row.every(blank)) return;
    rows.push(row);
    slots.push(index);
  });
  return { rows, slots, capacity: values.length, head, width };
}

/** The same filled rows in the same slots; values of formulas, spare and still empty rows aside. */
export function sameDraft(a: Draft, b: Draft): boolean {
  const left = filled(a);
  const right = filled(b);
  return (
    a.head === b.head &&
    a.width === b.width &&
    left.length === right.length &&
    left.every(
      ([slot, row], i) =>
        slot === right[i]?.[0] && row.every((cell, j) => sameCell(cell, right[i]?.[1][j] ?? EMPTY)),
    )
  );
}

function filled(draft: Draft): (readonly [number, Row])[] {
  return draft.rows.flatMap((row, i) => (row.every(blank) ? [] : [[draft.slots[i] ?? 0, row] as const]));
}

/** The draft with values as the sheet has them now; rows that are still empty stay in the editor. */
export function adopt(draft: Draft, sheet: Draft): Draft {
  const bySlot = new Map(sheet.slots.map((slot, i) => [slot, sheet.rows[i]]));
  const rows = draft.rows.map((row, i) => bySlot.get(draft.slots[i] ?? -1) ?? row);
  const last = draft.slots[draft.slots.length - 1] ?? 0;
  return { ...draft, rows, capacity: Math.max(sheet.capacity, last + 1) };
}

/** Whether a row outside the first `rows` slots holds anything. */
export function overflows(draft: Draft, rows: number): boolean {
  return draft.rows.some((row, i) => (draft.slots[i] ?? 0) >= rows && !row.every(blank));
}

function sameCell(a: Cell, b: Cell): boolean {
  if (a.formula !== '' || b.formula !== '') return a.formula === b.formula;
  return a.value === b.value || (blank(a) && blank(b)) || JSON.stringify(a.value) === JSON.stringify(b.value);
}

export function setCell(draft: Draft, row: number, column: number, cell: Cell): Draft {
  const rows = draft.rows.map((old, i) =>
    i === row ? old.map((one, j) => (j === column ? cell : one)) : old,
  );
  return { ...draft, rows };
}

/** A spare slot for one more row: the first one after the last row, else the first one between. null: the range is full. */
function spareSlot(draft: Draft): number | null {
  const last = draft.slots[draft.slots.length - 1] ?? draft.head - 1;
  if (last + 1 < draft.capacity) return last + 1;
  for (let slot = draft.head; slot < draft.capacity; slot++) if (!draft.slots.includes(slot)) return slot;
  return null;
}

export function isFull(draft: Draft): boolean {
  return spareSlot(draft) === null;
}

/** Puts a row at an index. A full range makes the draft one slot longer than the range: see `overflow`. */
export function insertRow(draft: Draft, index: number, row?: Row): Draft {
  const slot = spareSlot(draft);
  const made = row ?? Array.from({ length: draft.width }, () => EMPTY);
  const rows = [...draft.rows.slice(0, index), made, ...draft.rows.slice(index)];
  const slots = [...draft.slots, slot ?? draft.capacity].sort((a, b) => a - b);
  return { ...draft, rows, slots, capacity: slot === null ? draft.capacity + 1 : draft.capacity };
}

export function removeRow(draft: Draft, index: number): Draft {
  return { ...draft, rows: draft.rows.filter((_, i) => i !== index), slots: draft.slots.slice(0, -1) };
}

export function moveRow(draft: Draft, index: number, to: number): Draft {
  const row = draft.rows[index];
  if (!row || to < 0 || to >= draft.rows.length) return draft;
  const rows = draft.rows.filter((_, i) => i !== index);
  rows.splice(to, 0, row);
  return { ...draft, rows };
}

export function duplicateRow(draft: Draft, index: number): Draft {
  const row = draft.rows[index];
  return row ? insertRow(draft, index + 1, row) : draft;
}

/** Raw matrix for the engine, in the shape of the range: what the sheet will hold once this draft is written. */
export function toCells(draft: Draft, heading: readonly unknown[] | null): unknown[][] {
  const lines: unknown[][] = Array.from({ length: draft.capacity }, () =>
    Array.from({ length: draft.width }, () => null),
  );
  if (heading) lines[0] = [...heading];
  draft.rows.forEach((row, i) => {
    lines[draft.slots[i] ?? 0] = row.map((cell) => cell.value);
  });
  return lines;
}

/** What one cell needs to be written; undefined when it already holds that. `top` is the sheet row of slot 0. */
function input(cell: Cell, from: number, to: number, top: number): CellInput {
  if (cell.formula !== '') return { formula: moveFormula(cell.formula, top + from, top + to) };
  const { value } = cell;
  if (value === null || value === undefined || value === '') return null;
  if (typeof value === 'number' || typeof value === 'boolean' || typeof value === 'string') return value;
  if (typeof value === 'object' && 'basicValue' in value)
    return (value as { basicValue: number | string }).basicValue;
  return null;
}

/**
 * The cells that change from one draft to another, as a matrix over the range; undefined leaves a cell alone. `origins` tells
 * where rows stood when their formulas were written, if not in `before`. `top` is the sheet row of slot 0.
 */
export function difference(
  before: Draft,
  after: Draft,
  top: number,
  origins = before,
): (CellInput | undefined)[][] {
  const height = Math.max(before.capacity, after.capacity);
  const cells: (CellInput | undefined)[][] = Array.from({ length: height }, () =>
    Array.from({ length: after.width }, () => undefined),
  );
  const old = new Map(before.slots.map((slot, i) => [slot, before.rows[i]]));
  const origin = new Map<Row, number>();
  origins.rows.forEach((row, i) => origin.set(row, origins.slots[i] ?? 0));
  for (let slot = after.head; slot < height; slot++) {
    const index = after.slots.indexOf(slot);
    const row = index < 0 ? undefined : after.rows[index];
    const was = old.get(slot);
    if (row === was) continue;
    const from = row ? (origin.get(row) ?? slot) : slot;
    for (let column = 0; column < after.width; column++) {
      const cell = row?.[column] ?? EMPTY;
      const cellWas = was?.[column] ?? EMPTY;
      if (sameCell(cell, cellWas) && (cell.formula === '' || from === slot)) continue;
      const line = cells[slot];
      if (line) line[column] = input(cell, from, slot, top);
    }
  }
  return cells;
}

/** Undo and redo over drafts. */
export class History {
  private past: Draft[] = [];
  private future: Draft[] = [];
  constructor(private now: Draft) {}

  get current(): Draft {
    return this.now;
  }
  get canUndo(): boolean {
    return this.past.length > 0;
  }
  get canRedo(): boolean {
    return this.future.length > 0;
  }
  push(draft: Draft): void {
    this.past.push(this.now);
    this.now = draft;
    this.future = [];
  }
  /** the present state changes without a step (values of formulas have been recalculated) */
  replace(draft: Draft): void {
    this.now = draft;
  }
  undo(): Draft {
    const draft = this.past.pop();
    if (draft) {
      this.future.push(this.now);
      this.now = draft;
    }
    return this.now;
  }
  redo(): Draft {
    const draft = this.future.pop();
    if (draft) {
      this.past.push(this.now);
      this.now = draft;
    }
    return this.now;
  }
}
