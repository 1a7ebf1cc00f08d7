import type { OpenBeam } from '../open';
/** FREQUENCY, Hz */
export function frequency(_open: OpenBeam): number {
  throw new Error('pending');
}
