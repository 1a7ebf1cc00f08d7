/**
 * A field: one quantity along the beam as polynomial segments, each with its own t in 0..1 from `from` to `to`.
 * Fields of several responses are added on the union of their breaks; extremes come from the derivative's roots.
 * At a jump two segments meet with different values: the extreme is over both limits.
 */
import type { Piece } from '../solution';
import { compose, derivative, evaluate, onInterval, rootsIn, type Coefficients } from './polynomial';

export interface Segment {
  readonly from: number;
  readonly to: number;
  readonly c: Coefficients;
}

export interface Extreme {
  readonly value: number;
  readonly at: number;
}

export function fieldOf(pieces: readonly Piece[], factor = 1): Segment[] {
  const segments: Segment[] = [];
  for (const piece of pieces) {
    const to = piece.x0 + piece.h;
    const c = onInterval(piece, piece.x0, to);
    segments.push({ from: piece.x0, to, c: factor === 1 ? c : c.map((term) => factor * term) });
  }
  return segments;
}

/** Index of the segment that holds x; at a break the one to the right, unless `left` asks for the other. */
export function segmentAt(field: readonly Segment[], x: number, left = false): number {
  let low = 0;
  let high = field.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    const from = (field[middle] as Segment).from;
    if (left ? from < x : from <= x) low = middle;
    else high = middle - 1;
  }
  return low;
}

export function valueAt(field: readonly Segment[], x: number, left = false): number {
  const segment = field[segmentAt(field, x, left)] as Segment;
  return evaluate(segment.c, (x - segment.from) / (segment.to - segment.from));
}

/** The part of a segment over from..to (inside it), t anew from 0 to 1. */
export function cutSegment(segment: Segment, from: number, to: number): Coefficients {
  if (from === segment.from && to === segment.to) return segment.c;
  const h = segment.to - segment.from;
  return compose(segment.c, (from - segment.from) / h, (to - from) / h);
}

/** Breaks of several fields, sorted, each once. */
export function unionOfBreaks(fields: readonly (readonly Segment[])[]): number[] {
  const all: number[] = [];
  for (const field of fields) {
    for (const segment of field) all.push(segment.from);
    const last = field[field.length - 1];
    if (last !== undefined) all.push(last.to);
  }
  return sortedOnce(all);
}

export function sortedOnce(values: number[]): number[] {
  values.sort((a, b) => a - b);
  return values.filter((value, i) => i === 0 || value !== values[i - 1]);
}

/** Visits each interval between neighbouring breaks (and the given cuts) with every field's polynomial there. */
export function eachInterval(
  fields: readonly (readonly Segment[])[],
  cuts: readonly number[],
  visit: (from: number, to: number, parts: readonly Coefficients[]) => void,
): void {
  const breaks = sortedOnce([...unionOfBreaks(fields), ...cuts]);
  const where = fields.map(() => 0);
  for (let i = 1; i < breaks.length; i++) {
    const from = breaks[i - 1] as number;
    const to = breaks[i] as number;
    const parts = fields.map((field, f) => {
      let at = where[f] as number;
      while (at < field.length - 1 && (field[at] as Segment).to <= from) at++;
      where[f] = at;
      return cutSegment(field[at] as Segment, from, to);
    });
    visit(from, to, parts);
  }
}

/** Calls `take` with the ends of 0..1 and every interior extreme of the polynomial. */
export function candidates(c: Coefficients, take: (t: number, value: number) => void): void {
  take(0, c[0] as number);
  for (const t of rootsIn(derivative(c), 0, 1)) take(t, evaluate(c, t));
  take(1, evaluate(c, 1));
}

/** Lowest and highest of a field over from..to (the whole field when left out). */
export function extremes(
  field: readonly Segment[],
  from = -Infinity,
  to = Infinity,
): { lowest: Extreme; highest: Extreme } {
  let lowest: Extreme = { value: Infinity, at: from };
  let highest: Extreme = { value: -Infinity, at: from };
  for (const segment of field) {
    const a = Math.max(from, segment.from);
    const b = Math.min(to, segment.to);
    if (!(b > a)) continue;
    candidates(cutSegment(segment, a, b), (t, value) => {
      const at = t === 1 ? b : a + t * (b - a);
      if (value < lowest.value) lowest = { value, at };
      if (value > highest.value) highest = { value, at };
    });
  }
  return { lowest, highest };
}

/** The one of largest magnitude, the first along the beam when two tie. */
export function largestOf(pair: { lowest: Extreme; highest: Extreme }): Extreme {
  const low = Math.abs(pair.lowest.value);
  const high = Math.abs(pair.highest.value);
  if (low === high) return pair.lowest.at < pair.highest.at ? pair.lowest : pair.highest;
  return low > high ? pair.lowest : pair.highest;
}
