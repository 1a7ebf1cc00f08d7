import type { OpenBeam } from '../open';
/** REGIONS */
export function regions(_open: OpenBeam): (number | string)[][] {
  throw new Error('pending');
}
