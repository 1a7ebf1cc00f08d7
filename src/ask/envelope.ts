import type { OpenBeam } from '../open';
/** ENVELOPE: open the beam without a combination. */
export function envelope(
  _open: OpenBeam,
  _quantity: unknown,
  _combinations: unknown,
  _pattern?: unknown,
  _points?: unknown,
): (number | string)[][] {
  throw new Error('pending');
}
