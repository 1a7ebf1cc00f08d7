import { ascending } from '../ascending';

/**
 * Positions that are meant to be one. Two rows may reach the same place by different arithmetic (12'-6" and 12.5 ft, L/3*2
 * and L-L/3, 0.1*3 and 0.3); the results differ by a few units in the last place, and a beam with a support and a load 1e-16
 * apart would be cut into a sliver there. So positions within TOLERANCE of the leftmost of them become that one. The
 * tolerance is 8 eps of the largest position: each position is the result of a handful of rounded operations, each at most
 * eps/2 of it; positions that are meant to differ (1e-7 of a span and finer) are a million times further apart.
 */
const TOLERANCE = 8 * Number.EPSILON;

/** Snaps `positions` in place; returns the ends of the beam. The input is finite and not empty. */
export function snap(positions: number[]): { readonly start: number; readonly end: number } {
  let start = Infinity;
  let end = -Infinity;
  for (const p of positions) {
    if (p < start) start = p;
    if (p > end) end = p;
  }
  const near = TOLERANCE * Math.max(Math.abs(start), Math.abs(end));
  const heads = headsOf(positions, near);
  for (let i = 0; i < positions.length; i += 1) positions[i] = headFor(heads, positions[i]!);
  return { start, end: headFor(heads, end) };
}

/** The positions that stay, ascending: each is further than `near` from the one before. */
function headsOf(positions: readonly number[], near: number): number[] {
  const sorted = ascending(positions);
  let n = 1;
  for (let i = 1; i < sorted.length; i += 1) {
    if (sorted[i]! - sorted[n - 1]! > near) {
      sorted[n] = sorted[i]!;
      n += 1;
    }
  }
  sorted.length = n;
  return sorted;
}

/** The largest head at or below p; every position has one within reach. */
function headFor(heads: readonly number[], p: number): number {
  let low = 0;
  let high = heads.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (heads[middle]! <= p) low = middle;
    else high = middle - 1;
  }
  return heads[low]!;
}
