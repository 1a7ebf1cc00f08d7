import type { BeamArguments } from '../open';
/** READBACK: one column of sentences; never throws. */
export function readback(_args: BeamArguments): string[][] {
  throw new Error('pending');
}
