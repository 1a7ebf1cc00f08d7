/** The argument x of a formula: a position on the beam, with the side to look from at a jump. */
import type { BeamModel } from '../beam/model';
import type { Issue } from '../issue';
import type { Side } from '../solution';
import { isErrorCell, normaliseCell, showCell } from './cell';
import { lengthIn } from './limit';
import { readText } from './cell-text';
import { showNumber } from './show';

export type PositionResult =
  | { readonly ok: true; readonly x: number; readonly side: Side }
  | { readonly ok: false; readonly issue: Issue };

/**
 * A number in the length unit, "3.5 m", "12'-6\"", or with a side: "3-" (left-hand limit), "3+" (right-hand limit, the default).
 * A position within a few units in the last place of one that the table names is that one: x is often the result of the
 * same arithmetic in another order.
 */
export function readPosition(raw: unknown, model: BeamModel): PositionResult {
  if (typeof raw === 'number' && Number.isFinite(raw)) return place(raw, 'right', model);
  const cell = normaliseCell(
    Array.isArray(raw) && raw.length === 1 ? unwrap(raw as readonly unknown[]) : raw,
  );
  // A blank cell arrives as 0 on some hosts, so it is position 0 on all of them.
  if (cell === null) return place(0, 'right', model);
  if (isErrorCell(cell))
    return { ok: false, issue: { code: 'cell-error', kind: 'invalid', column: 'x', found: cell.error } };
  if (typeof cell === 'number') return place(cell, 'right', model);
  if (typeof cell === 'boolean') return bad(showCell(cell), model);
  const sided = /^(.*?[^\s+-])\s*([+\-\u2212])$/s.exec(cell);
  const text = readText(sided === null ? cell : sided[1]!);
  const side: Side = sided !== null && sided[2] !== '+' ? 'left' : 'right';
  if (text.kind === 'number') return place(text.value, side, model);
  if (text.kind === 'quantity') {
    if (model.units === null) {
      return { ok: false, issue: { code: 'units-row-missing', kind: 'invalid', column: 'x', found: cell } };
    }
    const { force, length, angle } = text.unit;
    if (force !== 0 || length !== 1 || angle !== 0) {
      return {
        ok: false,
        issue: {
          code: 'wrong-dimension',
          kind: 'invalid',
          column: 'x',
          found: text.unit.text,
          expected: model.units.length,
        },
      };
    }
    return place(lengthIn(model, text.exact, text.unit), side, model);
  }
  return bad(showCell(cell), model);
}

function unwrap(raw: readonly unknown[]): unknown {
  const [first] = raw;
  return Array.isArray(first) && first.length === 1 ? (first as readonly unknown[])[0] : first;
}

function bad(found: string, model: BeamModel): PositionResult {
  const expected = model.units === null ? 'a number' : `a number in ${model.units.length}`;
  return { ok: false, issue: { code: 'bad-position', kind: 'invalid', column: 'x', found, expected } };
}

function place(raw: number, side: Side, model: BeamModel): PositionResult {
  const x = snapped(raw, model);
  if (x >= model.start && x <= model.end) return { ok: true, x, side };
  const unit = model.units === null ? '' : ` ${model.units.length}`;
  return {
    ok: false,
    issue: {
      code: 'outside-beam',
      kind: 'invalid',
      column: 'x',
      found: showNumber(raw) + unit,
      detail: { from: showNumber(model.start) + unit, to: showNumber(model.end) + unit },
    },
  };
}

const named = new WeakMap<BeamModel, Float64Array>();

/** Every position the model names, ascending. */
function positionsOf(model: BeamModel): Float64Array {
  let found = named.get(model);
  if (found === undefined) {
    const all = new Set<number>([model.start, model.end]);
    for (const { at } of model.supports) all.add(at);
    for (const { at } of model.releases) all.add(at);
    for (const { from, to } of [...model.ei, ...model.ga, ...model.foundations]) all.add(from).add(to);
    for (const load of model.loads) {
      if ('at' in load) all.add(load.at);
      else if ('from' in load) all.add(load.from).add(load.to);
    }
    found = Float64Array.from(all).sort();
    named.set(model, found);
  }
  return found;
}

function snapped(x: number, model: BeamModel): number {
  const near = 8 * Number.EPSILON * Math.max(Math.abs(model.start), Math.abs(model.end));
  const positions = positionsOf(model);
  let low = 0;
  let high = positions.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (positions[middle]! < x) low = middle + 1;
    else high = middle;
  }
  for (const candidate of [positions[low], positions[low - 1]]) {
    if (candidate !== undefined && Math.abs(candidate - x) <= near) return candidate;
  }
  return x;
}
