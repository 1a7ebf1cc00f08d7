/** Numbers for sentences. */

/** Six significant digits, without trailing zeros: 12, 0.0125, 1.33333, 2.1e+8 as 2.1e8. */
export function showNumber(value: number): string {
  if (value === 0) return '0';
  return String(Number(value.toPrecision(6))).replace('e+', 'e');
}
