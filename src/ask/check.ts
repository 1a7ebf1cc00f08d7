/**
 * CHECK and USED: every span against every limit.
 *
 * Which limits: the formula's own `limit` argument, under the formula's combination; without it every `limit` row of the
 * table, each under its own combination (the Case column), or under the formula's combination where the row names none.
 * used = |deflection from the chord| / allowed; allowed = the absolute limit, or the span (twice the length of an
 * overhang) over the divisor. Deflections are net of camber, as everywhere.
 */
import type { BeamModel, Combination, Limit } from '../beam/model';
import { fail, respond, type OpenBeam } from '../open';
import { readLimit } from '../rows';
import type { Solution } from '../solution';
import { sag, spanName, spansOf, type Span } from './spans';
import { heading, unitOf, write } from './units';
import { single } from './words';

/** A limit with the combination it is tested under, resolved. */
export interface Test {
  readonly limit: Limit;
  readonly text: string;
  readonly combination: Combination | null;
  readonly row: number | null;
}

export interface Verdict {
  readonly span: Span;
  readonly test: Test;
  /** from the chord, model sign, length unit */
  readonly deflection: number;
  readonly at: number;
  /** length unit */
  readonly allowed: number;
  readonly used: number;
}

/** The limits a formula tests. Throws 'no-limit' when neither the formula nor the table has one. */
export function testsOf(open: OpenBeam, limit: unknown): Test[] {
  const { model, combination } = open;
  const own = readLimit(single(limit), model);
  if (!own.ok) return fail(own.issue);
  if (own.limit !== null) return [{ limit: own.limit, text: own.text, combination, row: null }];
  const rows = model.limits.map((row) => ({
    limit: row.limit,
    text: row.text,
    combination: row.combination ?? combination,
    row: row.row,
  }));
  if (rows.length > 0) return rows;
  return fail({
    code: 'no-limit',
    kind: 'invalid',
    column: 'limit',
    expected: 'a limit row in the table, or a limit in the formula such as "span/360"',
    found: 'neither',
  });
}

/** Every span against every test. Throws 'no-span' for a limit by span on a beam that has none. */
export function verdicts(model: BeamModel, solution: Solution, tests: readonly Test[]): Verdict[] {
  const spans = spansOf(model);
  const found: Verdict[] = [];
  for (const test of tests) {
    const response = respond(solution, test.combination?.factors ?? null);
    for (const span of spans) {
      const worst = sag(response, span);
      const allowed = allowedOf(model, span, test);
      found.push({
        span,
        test,
        deflection: worst.value,
        at: worst.at,
        allowed,
        used: Math.abs(worst.value) / allowed,
      });
    }
  }
  return found;
}

function allowedOf(model: BeamModel, span: Span, test: Test): number {
  if (test.limit.kind === 'absolute') return test.limit.value;
  if (span.kind !== 'whole') return span.length / test.limit.divisor;
  return fail({
    code: 'no-span',
    kind: 'unavailable',
    ...(test.row === null ? { column: 'limit' } : { row: test.row, column: 'Value' }),
    expected: `a deflection${model.units === null ? '' : ` in ${model.units.deflection}`}: the beam has no vertical support, so it has no span`,
    found: test.text,
  });
}

/** The first of the worst. */
export function governing(all: readonly Verdict[]): Verdict {
  return all.reduce((worst, one) => (one.used > worst.used ? one : worst));
}

/** The worst used fraction (1 = a limit just met). */
export function used(open: OpenBeam, limit?: unknown): number {
  return governing(verdicts(open.model, open.solution, testsOf(open, limit))).used;
}

/**
 * Heading; one row per span and limit: span, deflection from the chord (reader's sign and unit), where, allowed, used
 * fraction, span/deflection (twice the length for an overhang), within or exceeded, the limit; and a last row that
 * repeats the governing one.
 */
export function check(open: OpenBeam, limit?: unknown): (number | string)[][] {
  const { model } = open;
  const tests = testsOf(open, limit);
  const all = verdicts(model, open.solution, tests);
  const unit = unitOf(model, 'deflection');
  const row = (one: Verdict, prefix: string): (number | string)[] => [
    prefix + spanName(model, one.span),
    open.show('deflection', one.deflection),
    one.at,
    Math.abs(open.show('deflection', one.allowed)),
    one.used,
    // a span that does not move at all has no such ratio
    one.deflection === 0 ? 'no deflection' : one.span.length / Math.abs(one.deflection),
    one.used <= 1 + MET ? 'within' : 'exceeded',
    limitName(one.test, unit),
  ];
  return [
    [
      'span',
      heading('deflection from chord', unit),
      heading('at', unitOf(model, 'length')),
      heading('allowed', unit),
      'used',
      'span/deflection',
      'result',
      'limit',
    ],
    ...all.map((one) => row(one, '')),
    row(governing(all), 'governs: '),
  ];
}

/** A limit that is met to this many roundings is met: 1e-12 covers the solve's own (issue: 1e-12 of the peak). */
const MET = 1e-12;

function limitName(test: Test, unit: string): string {
  const bare = /^[-+.\d eE]+$/.test(test.text) ? `${test.text}${unit === '' ? '' : ` ${unit}`}` : test.text;
  const under = test.combination === null ? '' : ` under ${test.combination.text}`;
  return `${bare}${under}${test.row === null ? '' : ` (row ${write(test.row)})`}`;
}
