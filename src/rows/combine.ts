/**
 * Combinations (contract 2.8): a linear expression in case names, "1.35 G + 1.5 Q", "1.2*G - 0.5*W", "1.35 (G + S) + 1.5 Q",
 * or a two-column range of case and factor. Case names are matched exactly, capitals included, because "g" and "G" may be two
 * cases of one table; a name that differs only in capitals is suggested.
 */
import type { Combination } from '../beam/model';
import type { Issue } from '../issue';
import { isBlank, isErrorCell, normaliseCell, showCell, type Cell } from './cell';
import { remember } from './memo';
import { nearest } from './near';
import { readNumberText } from './number-text';

export type CombinationResult =
  | { readonly ok: true; readonly combination: Combination | null }
  | { readonly ok: false; readonly issues: Issue[] };

/** A case name is a letter, then letters, digits and underscores. */
export const CASE_NAME = /^\p{L}[\p{L}\p{N}_]*$/u;

type Terms = ReadonlyMap<string, number>;
type Linear =
  | { readonly ok: true; readonly terms: Terms }
  | { readonly ok: false; readonly code: string; readonly found: string };

/** The `combination` argument of a formula. null: everything acts. */
export function readCombination(raw: unknown, cases: readonly string[]): CombinationResult {
  return combine(raw, cases, { kind: 'invalid', column: 'combination' });
}

/** A combination in the Case column of a `limit` row. */
export function combineAtRow(
  cell: Cell | undefined,
  cases: readonly string[],
  row: number,
): CombinationResult {
  return combine(cell, cases, { kind: 'invalid', row, column: 'Case' });
}

type Place = Pick<Issue, 'kind' | 'row' | 'column'>;

function combine(raw: unknown, cases: readonly string[], place: Place): CombinationResult {
  if (Array.isArray(raw)) {
    const rows = raw as readonly unknown[];
    const first = rows[0];
    if (rows.length === 1 && Array.isArray(first) && first.length === 1)
      return combine(first[0], cases, place);
    return combineRange(rows, cases, place);
  }
  const cell = normaliseCell(raw);
  if (isBlank(cell)) return { ok: true, combination: null };
  if (isErrorCell(cell)) return fail({ ...place, code: 'cell-error', found: cell.error });
  if (typeof cell !== 'string') return fail({ ...place, code: 'bad-combination', found: showCell(cell) });
  const linear = parseLinear(cell);
  if (!linear.ok) {
    return fail({ ...place, code: linear.code, found: linear.found, detail: { text: cell } });
  }
  return spread(linear.terms, cell, cases, place);
}

function fail(...issues: Issue[]): CombinationResult {
  return { ok: false, issues };
}

function spread(terms: Terms, text: string, cases: readonly string[], place: Place): CombinationResult {
  const factors = new Array<number>(cases.length).fill(0);
  const issues: Issue[] = [];
  for (const [name, factor] of terms) {
    const i = cases.indexOf(name);
    if (i < 0) issues.push(unknownCase(name, cases, place));
    else factors[i] = factor;
  }
  return issues.length > 0 ? { ok: false, issues } : { ok: true, combination: { factors, text } };
}

export function unknownCase(name: string, cases: readonly string[], place: Place): Issue {
  const suggestion = nearest(name, cases);
  return {
    ...place,
    code: 'unknown-case',
    found: name,
    ...(suggestion === undefined ? {} : { suggestion }),
    detail: { cases: [...cases] },
  };
}

function combineRange(rows: readonly unknown[], cases: readonly string[], place: Place): CombinationResult {
  const terms = new Map<string, number>();
  const issues: Issue[] = [];
  rows.forEach((raw, i) => {
    const cells = (Array.isArray(raw) ? raw : [raw]).map(normaliseCell);
    const at = { ...place, row: i + 1 };
    if (cells.every(isBlank)) return;
    const [name, factor] = cells;
    if (cells.length !== 2) {
      if (i === 0) issues.push({ ...place, code: 'combination-shape', found: String(cells.length) });
      return;
    }
    const bad = cells.find(isErrorCell);
    if (bad !== undefined) {
      issues.push({ ...at, code: 'cell-error', found: (bad as { error: string }).error });
      return;
    }
    if (i === 0 && typeof factor === 'string' && typeof name === 'string' && /^case$/i.test(name)) return;
    if (typeof name !== 'string' || !CASE_NAME.test(name)) {
      issues.push({ ...at, code: 'bad-case', found: showCell(name) });
      return;
    }
    const value = factorOf(factor ?? null);
    if (value === null) issues.push({ ...at, code: 'bad-factor', found: showCell(factor) });
    else if (terms.has(name)) issues.push({ ...at, code: 'case-twice', found: name });
    else if (!cases.includes(name)) issues.push(unknownCase(name, cases, at));
    else terms.set(name, value);
  });
  if (issues.length > 0) return { ok: false, issues };
  if (terms.size === 0) return { ok: true, combination: null };
  const text = [...terms]
    .map(([name, factor]) => `${factor} ${name}`)
    .join(' + ')
    .replace(/\+ -/g, '- ');
  return spread(terms, text, cases, place);
}

function factorOf(cell: Cell): number | null {
  if (cell === null) return 0;
  if (typeof cell === 'number') return cell;
  if (typeof cell !== 'string') return null;
  const read = readNumberText(cell);
  return read?.kind === 'number' ? Number(read.decimal) : null;
}

/** A number plus factors of case names, while parsing. */
interface Sum {
  number: number;
  terms: Map<string, number>;
}

class Stop extends Error {
  constructor(
    readonly code: string,
    readonly found: string,
  ) {
    super(code);
  }
}

const TOKEN =
  /\s*(?:(\d+(?:[.,]\d+)?(?:[eE][+-]?\d+)?|[.,]\d+)|(\p{L}[\p{L}\p{N}_]*)|([-+*/()\u2212\u2013\u00b7\u00d7\u22c5]))/uy;

const parseLinear: (text: string) => Linear = remember((text: string): Linear => {
  try {
    if (text.length > 500) throw new Stop('bad-combination', `${text.slice(0, 40)}...`);
    const parser = new LinearParser(tokenise(text));
    const { number, terms } = parser.whole();
    if (number !== 0) throw new Stop('combination-without-case', String(number));
    for (const [name, factor] of terms) if (!Number.isFinite(factor)) throw new Stop('bad-combination', name);
    return { ok: true, terms };
  } catch (problem) {
    if (problem instanceof Stop) return { ok: false, code: problem.code, found: problem.found };
    throw problem;
  }
});

function tokenise(text: string): string[] {
  const found: string[] = [];
  TOKEN.lastIndex = 0;
  while (/\S/.test(text.slice(TOKEN.lastIndex))) {
    const start = TOKEN.lastIndex;
    const match = TOKEN.exec(text);
    if (match === null) throw new Stop('bad-combination', `"${text.slice(start).trim()[0]!}"`);
    const [, number, name, sign] = match;
    if (number !== undefined) found.push(number.replace(',', '.'));
    else if (name !== undefined) found.push(name);
    else found.push(sign!.replace(/[\u2212\u2013]/, '-').replace(/[\u00b7\u00d7\u22c5]/, '*'));
  }
  return found;
}

/** sum = product {(+|-) product}; product = [-] part {[*] part | / number}; part = number | name | ( sum ) */
class LinearParser {
  private next = 0;
  private depth = 0;
  constructor(private readonly tokens: readonly string[]) {}

  whole(): Sum {
    const sum = this.sum();
    if (this.next < this.tokens.length) throw new Stop('bad-combination', `"${this.tokens[this.next]!}"`);
    return sum;
  }

  private sum(): Sum {
    let total = this.product();
    for (let sign = this.peek(); sign === '+' || sign === '-'; sign = this.peek()) {
      this.next += 1;
      total = add(total, this.product(), sign === '+' ? 1 : -1);
    }
    return total;
  }

  private product(): Sum {
    let sign = 1;
    for (let token = this.peek(); token === '-' || token === '+'; token = this.peek()) {
      if (token === '-') sign = -sign;
      this.next += 1;
    }
    let total = this.part();
    for (;;) {
      const token = this.peek();
      if (token === '/') {
        this.next += 1;
        const by = this.part();
        if (by.terms.size > 0 || by.number === 0) throw new Stop('bad-combination', '"/"');
        total = times(total, { number: 1 / by.number, terms: new Map() });
      } else if (token === '*' || token === '(' || (token !== undefined && /^[\p{L}\d.]/u.test(token))) {
        if (token === '*') this.next += 1;
        total = times(total, this.part());
      } else {
        return times(total, { number: sign, terms: new Map() });
      }
    }
  }

  private part(): Sum {
    const token = this.peek();
    this.next += 1;
    if (token === '(') {
      this.depth += 1;
      if (this.depth > 30) throw new Stop('bad-combination', '"("');
      const inner = this.sum();
      if (this.peek() !== ')') throw new Stop('bad-combination', '"("');
      this.next += 1;
      this.depth -= 1;
      return inner;
    }
    if (token !== undefined && /^[\d.]/.test(token)) return { number: Number(token), terms: new Map() };
    if (token !== undefined && /^\p{L}/u.test(token)) return { number: 0, terms: new Map([[token, 1]]) };
    throw new Stop('bad-combination', token === undefined ? 'the end of the text' : `"${token}"`);
  }

  private peek(): string | undefined {
    return this.tokens[this.next];
  }
}

function add(a: Sum, b: Sum, sign: number): Sum {
  const terms = new Map(a.terms);
  for (const [name, factor] of b.terms) terms.set(name, (terms.get(name) ?? 0) + sign * factor);
  return { number: a.number + sign * b.number, terms };
}

function times(a: Sum, b: Sum): Sum {
  if (a.terms.size > 0 && b.terms.size > 0)
    throw new Stop('not-linear', [...a.terms.keys(), ...b.terms.keys()].join(' '));
  const [cases, factor] = a.terms.size > 0 ? [a, b.number] : [b, a.number];
  const terms = new Map<string, number>();
  for (const [name, value] of cases.terms) terms.set(name, value * factor);
  return {
    number: a.terms.size > 0 || b.terms.size > 0 ? cases.number * factor : a.number * b.number,
    terms,
  };
}
