/**
 * From the selected cell to the beam behind it:
 * 1. a SPANROW call in the cell's own formula (or in the formula that spills into it);
 * 2. a SPANROW call elsewhere on the sheet whose beam range holds the cell;
 * 3. beam rows around the cell that nobody asks yet.
 * Everything is read through the port; what the pane cannot follow is said, not guessed.
 */
import type { BeamArguments } from './engine';
import { contains, intersect, parseArea } from './address';
import { columnOf, isItemRow } from './recognise';
import { CannotFollow, evaluate, type Argument, type Place } from './formula/evaluate';
import { findCalls, type BeamCall } from './formula/calls';
import { SPILLING, type Parameter } from './formula/functions';
import type { Area, Block, Selection, WorkbookPort } from './port';

/** How a beam came to be shown. */
export type Via = 'formula' | 'spill' | 'rows' | 'found';

export interface Subject {
  readonly via: Via;
  /** the cell whose formula is followed; for found rows the selected cell */
  readonly cell: Area;
  readonly formula: string;
  readonly calls: readonly BeamCall[];
  /** which of the calls */
  readonly index: number;
  /** where the beam's rows stand; null when they are written in the formula itself or joined from pieces */
  readonly source: Area | null;
  readonly cells: readonly (readonly unknown[])[];
  readonly args: BeamArguments;
  /** positions, limit and quantity the formula asks for, raw */
  readonly x: readonly unknown[];
  readonly limit: unknown;
  readonly quantity: string | null;
  /** combinations and patterned cases of an ENVELOPE, raw; null for every other question */
  readonly combinations: unknown;
  readonly pattern: unknown;
  /** cells read for this beam, the rows first */
  readonly read: readonly Area[];
}

export type Found =
  | { readonly kind: 'subject'; readonly subject: Subject }
  /** there is a call, but its beam cannot be followed */
  | { readonly kind: 'lost'; readonly cell: Area; readonly formula: string; readonly reason: CannotFollow }
  | { readonly kind: 'nothing' };

/** Sheets with more used cells than this are not searched for formulas that use the selected rows. */
const SEARCH_MOST = 60000;
const ROWS_AROUND = 400;

const blank = (value: unknown): boolean => value === null || value === undefined || value === '';

export class Follower {
  private sheet: {
    name: string;
    block: Block;
    calls: { cell: Area; formula: string; calls: readonly BeamCall[] }[];
  } | null = null;

  constructor(private readonly port: WorkbookPort) {}

  /** Forget what was read of the sheet: cells have changed. */
  changed(): void {
    this.sheet = null;
  }

  async follow(selection: Selection, index = 0): Promise<Found> {
    const cell = selection.active;
    const [block] = await this.port.read([cell]);
    const formula = block?.formulas[0]?.[0] ?? '';
    const calls = findCalls(formula);
    if (calls.length > 0)
      return this.open('formula', cell, formula, calls, Math.min(index, calls.length - 1), cell);
    const sheet = await this.search(cell.sheet);
    if (!sheet) return { kind: 'nothing' };
    return (
      (await this.spilled(cell, sheet.calls)) ??
      (await this.holding(cell, sheet.calls)) ??
      this.around(cell, sheet.block) ?? { kind: 'nothing' }
    );
  }

  /** Reads all arguments of one call again, for a beam that is held while its cells change. */
  async again(subject: Subject): Promise<Found> {
    if (subject.via === 'found' || subject.calls.length === 0) {
      if (!subject.source) return { kind: 'nothing' };
      const [block] = await this.port.read([subject.source]);
      if (!block) return { kind: 'nothing' };
      return { kind: 'subject', subject: plainSubject(subject.cell, subject.source, block) };
    }
    const [block] = await this.port.read([subject.cell]);
    const formula = block?.formulas[0]?.[0] ?? '';
    const calls = findCalls(formula);
    if (calls.length === 0) return { kind: 'nothing' };
    return this.open(
      subject.via,
      subject.cell,
      formula,
      calls,
      Math.min(subject.index, calls.length - 1),
      subject.cell,
    );
  }

  private async open(
    via: Via,
    cell: Area,
    formula: string,
    calls: readonly BeamCall[],
    index: number,
    selected: Area,
  ): Promise<Found> {
    const call = calls[index];
    if (!call) return { kind: 'nothing' };
    const place: Place = { port: this.port, home: cell, read: [] };
    const get = async (name: Parameter): Promise<Argument | null> => {
      const node = call.args[name];
      return node ? evaluate(node, place) : null;
    };
    try {
      const beam = await get('beam');
      if (!beam) return { kind: 'nothing' };
      const combination = via === 'rows' ? null : await get('combination');
      const names = await get('names');
      const values = await get('values');
      const x = via === 'rows' ? null : ((await get('x')) ?? (await get('at')));
      const limit = via === 'rows' ? null : await get('limit');
      const quantity = via === 'rows' ? null : await get('quantity');
      const combinations = via === 'rows' ? null : await get('combinations');
      const pattern = via === 'rows' ? null : await get('pattern');
      const value = (argument: Argument | null): unknown => {
        if (!argument) return null;
        const single = argument.values.length === 1 && argument.values[0]?.length === 1;
        return single ? (argument.values[0]?.[0] ?? null) : argument.values;
      };
      return {
        kind: 'subject',
        subject: {
          via,
          cell: selected,
          formula,
          calls,
          index,
          source: beam.area,
          cells: beam.values,
          args: {
            beam: beam.values,
            combination: value(combination),
            names: names?.values ?? null,
            values: values?.values ?? null,
          },
          x: x ? x.values.flat() : [],
          limit: value(limit),
          quantity: quantity ? String(value(quantity)) : ownQuantity(call.fn),
          combinations: combinations?.values ?? null,
          pattern: value(pattern),
          read: place.read,
        },
      };
    } catch (reason) {
      if (reason instanceof CannotFollow) return { kind: 'lost', cell, formula, reason };
      throw reason;
    }
  }

  private async search(name: string): Promise<NonNullable<Follower['sheet']> | null> {
    if (this.sheet?.name === name) return this.sheet;
    const used = await this.port.used(name);
    if (!used || used.rows * used.columns > SEARCH_MOST) return null;
    const [block] = await this.port.read([used]);
    if (!block) return null;
    const calls: NonNullable<Follower['sheet']>['calls'] = [];
    block.formulas.forEach((row, i) =>
      row.forEach((formula, j) => {
        if (formula === '') return;
        const found = findCalls(formula);
        if (found.length === 0) return;
        const cell = {
          sheet: name,
          row: block.area.row + i,
          column: block.area.column + j,
          rows: 1,
          columns: 1,
        };
        calls.push({ cell, formula, calls: found });
      }),
    );
    this.sheet = { name, block, calls };
    return this.sheet;
  }

  private async spilled(cell: Area, all: NonNullable<Follower['sheet']>['calls']): Promise<Found | null> {
    const spilling = all.filter(
      (one) =>
        one.cell.row <= cell.row &&
        one.cell.column <= cell.column &&
        one.calls.some((call) => SPILLING.has(call.fn) || call.args.x !== undefined),
    );
    // the nearest first; a sheet with very many spills is not worth a slow selection
    for (const one of spilling.reverse().slice(0, 20)) {
      const area = await this.port.spill(one.cell);
      if (area && contains(area, cell))
        return this.open('spill', one.cell, one.formula, one.calls, 0, one.cell);
    }
    return null;
  }

  /** A call whose beam range holds the cell; the smallest such range wins. */
  private async holding(cell: Area, all: NonNullable<Follower['sheet']>['calls']): Promise<Found | null> {
    const seen = new Map<string, Area | null>();
    let best: { area: Area; one: (typeof all)[number]; index: number } | null = null;
    for (const one of all) {
      for (const [index, call] of one.calls.entries()) {
        const node = call.args.beam;
        if (!node || !['reference', 'name', 'structured'].includes(node.kind)) continue;
        let area = seen.get(call.beamText);
        if (area === undefined) {
          area = await evaluate(node, { port: this.port, home: one.cell, read: [] }).then(
            (argument) => argument.area,
            () => null,
          );
          seen.set(call.beamText, area);
        }
        if (!area || !contains(area, cell)) continue;
        if (!best || area.rows * area.columns < best.area.rows * best.area.columns)
          best = { area, one, index };
      }
    }
    if (!best) return this.member(cell, all);
    return this.open('rows', best.one.cell, best.one.formula, best.one.calls, best.index, best.one.cell);
  }

  /** A cell among the values of a template's member: that member, as the first formula that takes these values sees it. */
  private async member(cell: Area, all: NonNullable<Follower['sheet']>['calls']): Promise<Found | null> {
    for (const one of all) {
      for (const [index, call] of one.calls.entries()) {
        const node = call.args.values;
        if (node?.kind !== 'reference') continue;
        const area = parseArea(node.text, node.sheet ?? one.cell.sheet);
        if (area && contains(area, cell))
          return this.open('rows', one.cell, one.formula, one.calls, index, one.cell);
      }
    }
    return null;
  }

  private around(cell: Area, block: Block): Found | null {
    const top = Math.max(block.area.row, cell.row - ROWS_AROUND);
    const bottom = Math.min(block.area.row + block.area.rows, cell.row + ROWS_AROUND);
    const at = (row: number, column: number): unknown =>
      block.values[row - block.area.row]?.[column - block.area.column] ?? null;
    const area = withHeader(cell, top, bottom, block, at) ?? withoutHeader(cell, top, bottom, block, at);
    if (!area) return null;
    const common = intersect(area, block.area);
    if (!common) return null;
    const cut = (matrix: readonly (readonly unknown[])[]): unknown[][] =>
      matrix
        .slice(common.row - block.area.row, common.row - block.area.row + common.rows)
        .map((row) =>
          row.slice(common.column - block.area.column, common.column - block.area.column + common.columns),
        );
    const part = { area: common, values: cut(block.values), formulas: cut(block.formulas) as string[][] };
    return { kind: 'subject', subject: plainSubject(cell, common, part) };
  }
}

function plainSubject(cell: Area, source: Area, block: Block): Subject {
  return {
    via: 'found',
    cell,
    formula: '',
    calls: [],
    index: 0,
    source,
    cells: block.values,
    args: { beam: block.values, combination: null, names: null, values: null },
    x: [],
    limit: null,
    quantity: null,
    combinations: null,
    pattern: null,
    read: [source],
  };
}

function ownQuantity(fn: string): string | null {
  if (fn === 'MAXDEFLECTION') return 'deflection';
  return ['DEFLECTION', 'SLOPE', 'MOMENT', 'SHEAR'].includes(fn) ? fn.toLowerCase() : null;
}

type At = (row: number, column: number) => unknown;

/** A header with Item and At at or above the cell, with no gap of two blank rows between. */
function withHeader(cell: Area, top: number, bottom: number, block: Block, at: At): Area | null {
  const right = block.area.column + block.area.columns;
  for (let row = cell.row; row >= top; row--) {
    let from = cell.column;
    if (columnOf(at(row, from)) === null && blank(at(row, from))) {
      // the selected column itself may be one without a heading
      if (row < cell.row && blank(at(row, from))) {
        const anything = Array.from({ length: right - block.area.column }, (_, i) =>
          at(row, block.area.column + i),
        );
        if (anything.every(blank)) {
          const above = Array.from({ length: right - block.area.column }, (_, i) =>
            at(row - 1, block.area.column + i),
          );
          if (above.every(blank)) return null;
        }
      }
      continue;
    }
    while (from > block.area.column && !blank(at(row, from - 1))) from--;
    let to = cell.column;
    while (to + 1 < right && !blank(at(row, to + 1))) to++;
    const words = new Set<string>();
    let items = from;
    for (let column = from; column <= to; column++) {
      const name = columnOf(at(row, column));
      if (name !== null) words.add(name);
      if (name === 'Item') items = column;
    }
    if (!words.has('Item') || !words.has('At')) continue;
    let last = row;
    let gap = 0;
    for (let next = row + 1; next < bottom && gap < 2; next++) {
      let filled = false;
      for (let column = from; column <= to; column++) filled ||= !blank(at(next, column));
      if (filled) {
        // after a blank row only another item belongs to the beam: what else stands there is the rest of the sheet
        if (gap > 0 && !isItemRow([at(next, items)])) break;
        last = next;
        gap = 0;
      } else gap++;
    }
    if (cell.row > last) return null;
    return { sheet: cell.sheet, row, column: from, rows: last - row + 1, columns: to - from + 1 };
  }
  return null;
}

/** Item words in one column at the cell's row and its neighbours. */
function withoutHeader(cell: Area, top: number, bottom: number, block: Block, at: At): Area | null {
  const slice = (row: number, column: number): unknown[] =>
    Array.from({ length: 8 }, (_, i) => at(row, column + i));
  for (let column = cell.column; column >= Math.max(block.area.column, cell.column - 7); column--) {
    if (!isItemRow(slice(cell.row, column))) continue;
    let first = cell.row;
    while (first > top && isItemRow(slice(first - 1, column))) first--;
    let last = cell.row;
    while (last + 1 < bottom && isItemRow(slice(last + 1, column))) last++;
    if (last === first) continue;
    let columns = 1;
    for (let row = first; row <= last; row++) {
      for (let k = 7; k >= columns; k--) if (!blank(at(row, column + k))) columns = k + 1;
    }
    return { sheet: cell.sheet, row: first, column, rows: last - first + 1, columns };
  }
  return null;
}
