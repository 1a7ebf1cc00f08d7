/**
 * VERIFY(): every published case run live through the same questions as the worksheet functions.
 * What an office files as proof of the installed version.
 */
import { maxDeflection, peak, reaction, rolling, value } from '../ask';
import { openBeam, type OpenBeam } from '../open';
import type { Quantity } from '../solution';
import { PUBLISHED_CASES, rowsOf, type PublishedAsk, type PublishedCase } from '.';

const VALUES: Readonly<Record<string, Quantity>> = {
  DEFLECTION: 'deflection',
  SLOPE: 'slope',
  MOMENT: 'moment',
  SHEAR: 'shear',
};

/** The answer of one worksheet function about an opened published beam; throws BeamProblem like the function itself. */
export function answer(open: OpenBeam, ask: PublishedAsk): number {
  const [first, second, third, fourth, fifth] = ask.args;
  const quantity = VALUES[ask.function];
  if (quantity !== undefined) return value(open, quantity, first) as number;
  switch (ask.function) {
    case 'MAXDEFLECTION':
      return maxDeflection(open);
    case 'PEAK':
      return peak(open, first, second, third);
    case 'REACTION':
      return reaction(open, first, second);
    case 'ROLLING':
      return rolling(open, first, second, third, fourth, fifth);
    default:
      throw new Error(`published case asks ${ask.function}`);
  }
}

/** Relative difference; a published 0 is judged against the ask's own scale. */
export function difference(computed: number, ask: PublishedAsk): number {
  const published = Number(ask.value);
  const scale = Math.abs(published) || ask.scale || 1;
  return Math.abs(computed - published) / scale;
}

/** The formula as it would stand in a cell, with `beam` for the range of rows. */
export function formulaText(ask: PublishedAsk): string {
  const args = ask.args.map((a) =>
    typeof a === 'string'
      ? `"${a}"`
      : typeof a === 'number'
        ? String(a)
        : `{${a.map((row) => row.join(',')).join(';')}}`,
  );
  return `=SPANROW.${ask.function}(${['beam', ...args].join(', ')})`;
}

export interface Verified {
  readonly case: PublishedCase;
  readonly ask: PublishedAsk;
  readonly published: number;
  readonly computed: number;
  readonly difference: number;
}

export function verifyAll(): Verified[] {
  const out: Verified[] = [];
  for (const one of PUBLISHED_CASES) {
    const open = openBeam({ beam: rowsOf(one) });
    for (const ask of one.asks) {
      const computed = answer(open, ask);
      out.push({
        case: one,
        ask,
        published: Number(ask.value),
        computed,
        difference: difference(computed, ask),
      });
    }
  }
  return out;
}

const HEADING = [
  'case',
  'description',
  'source',
  'status',
  'formula',
  'quantity',
  'unit',
  'published',
  'computed',
  'relative difference',
];

/** Heading and one row per published answer. */
export function verify(): (number | string)[][] {
  const rows: (number | string)[][] = [HEADING];
  for (const v of verifyAll()) {
    const { case: one, ask } = v;
    const what = ask.place === undefined ? ask.quantity : `${ask.quantity}, ${ask.place}`;
    rows.push([
      one.id,
      one.description,
      one.source,
      one.status,
      formulaText(ask),
      what,
      ask.unit,
      v.published,
      v.computed,
      v.difference,
    ]);
  }
  return rows;
}
