/**
 * The published cases: beams of handbooks and textbooks posed as worksheet rows, with the value each source prints or its formula gives.
 * cases.json carries them once; VERIFY, tests/published and docs/verification.md all read it here.
 *
 * Formula values are decimal texts of 17 and more digits, evaluated at 50 digits; printed values stand beside them as the source
 * prints them. Signs are those of `axis down`. Rows hold fewer cells than eight where the last ones are blank.
 */
import cases from './cases.json';

/** What a worksheet formula about the beam answers: the function, its arguments after the beam, and the published answer. */
export interface PublishedAsk {
  readonly function: string;
  readonly args: readonly (string | number | readonly (readonly number[])[])[];
  /** decimal text */
  readonly value: string;
  readonly unit: string;
  /** what the source calls it */
  readonly quantity: string;
  readonly place?: string;
  readonly formula?: string;
  /** digits as the source prints them, where it prints a number */
  readonly printed?: string;
  /** for a published 0: the size it is to be judged against, in the same unit */
  readonly scale?: number;
}

export interface PublishedCase {
  readonly id: string;
  readonly source: string;
  /** whether the formula or value was seen on a public page or recalled from memory */
  readonly status: string;
  readonly description: string;
  /** how the case was posed, where that is not obvious */
  readonly note?: string;
  /** cases whose closed form or whose solution is not a polynomial: the accuracy goal is 1e-11, else 1e-12 */
  readonly kind?: 'foundation' | 'taper';
  readonly rows: readonly (readonly (string | number)[])[];
  readonly asks: readonly PublishedAsk[];
}

export const PUBLISHED_CASES = cases as unknown as readonly PublishedCase[];

const COLUMNS = 8;

/** The rows as the host would deliver them: a full matrix, blanks as empty texts. */
export function rowsOf(one: PublishedCase): (string | number)[][] {
  return one.rows.map((row) => [...row, ...new Array<string>(COLUMNS - row.length).fill('')]);
}
