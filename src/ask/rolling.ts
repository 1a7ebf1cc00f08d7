import type { OpenBeam } from '../open';
/** ROLLING */
export function rolling(
  _open: OpenBeam,
  _quantity: unknown,
  _at: unknown,
  _axles: unknown,
  _sense?: unknown,
  _give?: unknown,
): number {
  throw new Error('pending');
}
