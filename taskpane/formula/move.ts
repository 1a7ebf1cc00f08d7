/** A formula that moves with its row: references to its own row follow, everything else stays. */
import { tokenize } from './tokens';

/** Rows are zero-based. `=D5*1.5` moved from row index 4 to 6 becomes `=D7*1.5`; `$5`, other rows and other sheets stay. */
export function moveFormula(formula: string, from: number, to: number): string {
  if (from === to) return formula;
  let tokens;
  try {
    tokens = tokenize(formula);
  } catch {
    return formula; // not a formula we can read: better left exactly as it was
  }
  let result = '';
  let at = 0;
  const own = String(from + 1);
  for (const token of tokens) {
    if (token.kind !== 'reference' || token.sheet !== null) continue;
    const ends = token.text.split(':');
    const all = ends.every(
      (end) => /^\$?[A-Za-z]{1,3}[0-9]+$/.test(end) && end.replace(/^\$?[A-Za-z]+/, '') === own,
    );
    if (!all) continue;
    const moved = ends.map((end) => end.replace(/[0-9]+$/, String(to + 1))).join(':');
    result += formula.slice(at, token.start) + moved + (token.spill ? '#' : '');
    at = token.end;
  }
  return result + formula.slice(at);
}
