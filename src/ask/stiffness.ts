import type { OpenBeam } from '../open';
/** STIFFNESSFACTOR */
export function stiffnessFactor(_open: OpenBeam, _limit?: unknown): number {
  throw new Error('pending');
}
/** REQUIREDI */
export function requiredI(_open: OpenBeam, _limit?: unknown): number {
  throw new Error('pending');
}
