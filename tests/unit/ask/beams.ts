/** Beams as one cell of text, and tolerances: a named factor times eps times the scale of the quantity. */
import { openBeam, type BeamArguments, type OpenBeam } from '../../../src/index';

/** Digits a solve of a few spans may lose: 1e-12 of the peak is the project's own bound for closed forms. */
export const SOLVE = 1e-12 / Number.EPSILON;

export function beam(text: string, more: Partial<BeamArguments> = {}): OpenBeam {
  return openBeam({ beam: text, ...more });
}

/** |got - expected| <= factor eps scale, with numbers in the message. */
export function expectNear(got: number, expected: number, scale = Math.abs(expected), factor = SOLVE): void {
  const off = Math.abs(got - expected);
  if (!(off <= factor * Number.EPSILON * scale)) {
    throw new Error(`expected ${expected}, got ${got}: off by ${off}, ${off / scale} of the scale ${scale}`);
  }
}

/** A column of a spilled table below its heading, as numbers. */
export function column(table: readonly (readonly (number | string)[])[], index: number): number[] {
  return table.slice(1).map((row) => row[index] as number);
}
