/**
 * The word that was probably meant. Distance: edits of single characters, where two neighbours swapped count as one edit
 * (optimal string alignment); letters that differ only in size count as a small fraction of an edit.
 */
const OTHER_CASE = 0.1;

/** Edits that turn a into b, given up (Infinity) once they exceed `limit`. */
export function editDistance(a: string, b: string, limit = Infinity): number {
  if (Math.abs(a.length - b.length) > limit) return Infinity;
  let before: number[] = [];
  let above = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    let least = i;
    for (let j = 1; j <= b.length; j += 1) {
      let d = Math.min(above[j]! + 1, row[j - 1]! + 1, above[j - 1]! + change(a[i - 1]!, b[j - 1]!));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        d = Math.min(d, before[j - 2]! + 1);
      row.push(d);
      least = Math.min(least, d);
    }
    if (least > limit) return Infinity;
    before = above;
    above = row;
  }
  return above[b.length]!;
}

function change(a: string, b: string): number {
  if (a === b) return 0;
  return a.toLowerCase() === b.toLowerCase() ? OTHER_CASE : 1;
}

/**
 * The nearest of the candidates, if it is near enough to be worth saying: a third of its letters may be wrong, at
 * least one; of a single letter only its size.
 */
export function nearest(word: string, candidates: Iterable<string>): string | undefined {
  if (word.length > 60) return undefined;
  let best: string | undefined;
  let least = Infinity;
  for (const candidate of candidates) {
    const allowed =
      word.length < 2 ? 0.5 : Math.max(1, Math.floor(Math.min(word.length, candidate.length) / 3)) + 0.5;
    const d = editDistance(word, candidate, Math.min(allowed, least));
    if (d <= allowed && d < least && candidate !== word) {
      best = candidate;
      least = d;
    }
  }
  return best;
}
