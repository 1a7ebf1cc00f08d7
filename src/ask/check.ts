import type { OpenBeam } from '../open';
/** CHECK: heading, a row per span and limit, and a last row that names the governing one. */
export function check(_open: OpenBeam, _limit?: unknown): (number | string)[][] {
  throw new Error('pending');
}
/** USED: the worst used fraction. */
export function used(_open: OpenBeam, _limit?: unknown): number {
  throw new Error('pending');
}
