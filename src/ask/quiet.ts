/**
 * Zeros of a diagram come out of the solve as rounding of its peak: 7e-15 mm at a support would only puzzle a reader of
 * the spilled table. 256 eps (6e-14) of the peak is rounding for any quantity the solve carries through a span.
 */
const ROUNDING = 256 * Number.EPSILON;

/** What is rounding next to `peak` is shown as 0; everything else as it is. */
export function quiet(value: number, peak: number): number {
  return Math.abs(value) <= ROUNDING * Math.abs(peak) ? 0 : value;
}
