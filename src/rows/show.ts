/** Numbers for sentences. */

/** Six significant digits without trailing zeros; powers of ten from 1e7 and below 1e-4: 12, 0.0125, 1.33333, 2.1e8. */
export function showNumber(value: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  const short = Number(value.toPrecision(6));
  if (size >= 1e-4 && size < 1e7) return String(short);
  return short
    .toExponential(5)
    .replace(/\.?0*e/, 'e')
    .replace('e+', 'e');
}
