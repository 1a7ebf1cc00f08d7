import type { OpenBeam } from '../open';
/** INFLUENCE */
export function influence(
  _open: OpenBeam,
  _quantity: unknown,
  _at: unknown,
  _points?: unknown,
): (number | string)[][] {
  throw new Error('pending');
}
