/**
 * Numbers in ascending order, as a new array. Short lists are sorted by insertion: quicker than the general sort, and without its
 * temporary copies (every member of a schedule sorts its positions).
 */
export function ascending(values: readonly number[]): number[] {
  if (values.length > 32) return Array.from(Float64Array.from(values).sort());
  const sorted = values.slice();
  for (let i = 1; i < sorted.length; i++) {
    const x = sorted[i]!;
    let j = i - 1;
    for (; j >= 0 && sorted[j]! > x; j--) sorted[j + 1] = sorted[j]!;
    sorted[j + 1] = x;
  }
  return sorted;
}
