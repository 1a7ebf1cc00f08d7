/** DEFLECTION, SLOPE, MOMENT, SHEAR: a quantity at one position or at a range of positions. */
import { fail, type OpenBeam } from '../open';
import { readPosition } from '../rows';
import type { Quantity } from '../solution';
import { single } from './words';

/**
 * The quantity at x, in the reader's signs and units. `x`: a number, text such as "3-" (left-hand limit), "3+" or
 * "3.5 m", or a range of them; a range gives a matrix of the same shape, a single cell a number.
 * A blank x is 0, as the hosts that send 0 for a blank would have it.
 * Throws BeamProblem 'outside-beam' when a position is off the beam.
 */
export function value(open: OpenBeam, quantity: Quantity, x: unknown): number | number[][] {
  const cell = single(x);
  if (!Array.isArray(cell)) return one(open, quantity, cell);
  return (cell as unknown[]).map((row) =>
    Array.isArray(row) ? row.map((raw: unknown) => one(open, quantity, raw)) : [one(open, quantity, row)],
  );
}

function one(open: OpenBeam, quantity: Quantity, raw: unknown): number {
  const read = readPosition(raw, open.model);
  if (!read.ok) return fail(read.issue);
  return open.show(quantity, open.response.value(quantity, read.x, read.side));
}
