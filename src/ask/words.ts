/**
 * Arguments that are words or counts: quantity, sense, give, part, points.
 * A blank (which some hosts send as 0) takes the default where there is one.
 */
import type { Issue } from '../issue';
import { fail } from '../open';
import { nearest } from '../rows/near';

export const QUANTITIES = ['deflection', 'slope', 'moment', 'shear'] as const;
/** what an influence line or a train can be asked about: the four quantities and what a support gives */
export const EFFECTS = ['deflection', 'slope', 'moment', 'shear', 'reaction', 'couple'] as const;
export type Effect = (typeof EFFECTS)[number];
export const SENSES = ['largest', 'highest', 'lowest'] as const;
export const PARTS = ['force', 'couple'] as const;

export function isBlank(raw: unknown): boolean {
  return raw === null || raw === undefined || raw === 0 || (typeof raw === 'string' && raw.trim() === '');
}

/** A range of one cell is that cell. */
export function single(raw: unknown): unknown {
  if (!Array.isArray(raw)) return raw;
  if (raw.length === 1) {
    const row: unknown = raw[0];
    if (!Array.isArray(row)) return row;
    if (row.length === 1) return row[0];
  }
  return raw;
}

/**
 * The word of an argument, in any case and with blanks around it.
 * Throws 'no-such-word' with the words it could be and the nearest one.
 */
export function readWord<W extends string>(
  raw: unknown,
  argument: string,
  words: readonly W[],
  standard?: W,
): W {
  const cell = single(raw);
  if (standard !== undefined && isBlank(cell)) return standard;
  const text = typeof cell === 'string' ? cell.trim().toLowerCase() : describe(cell);
  for (const word of words) if (word === text) return word;
  const near = typeof cell === 'string' ? nearest(text, words) : undefined;
  const issue: Issue = {
    code: 'no-such-word',
    kind: 'invalid',
    column: argument,
    expected: words.join(', '),
    found: typeof cell === 'string' ? cell.trim() : text,
    ...(near === undefined ? {} : { suggestion: near }),
    detail: { words },
  };
  return fail(issue);
}

/** What a cell holds, in words that can stand in a sentence. */
export function describe(cell: unknown): string {
  if (cell === null || cell === undefined || cell === '') return 'nothing';
  if (Array.isArray(cell)) return 'a range';
  if (typeof cell === 'string') return cell;
  if (typeof cell === 'number' || typeof cell === 'boolean') return String(cell);
  return 'a value that is not a plain number or text';
}

/** Spilled diagrams: this many equal steps over the beam when `points` is left out, besides every break. 40 steps draw a smooth curve on any chart. */
export const STANDARD_POINTS = 41;
/** A spill longer than this is a slip of the pen (a host's sheet has 1,048,576 rows). */
export const MOST_POINTS = 100000;

/** The `points` argument: how many equally spaced positions a spill holds at least. Throws 'bad-points'. */
export function readPoints(raw: unknown): number {
  const cell = single(raw);
  if (isBlank(cell)) return STANDARD_POINTS;
  const count = typeof cell === 'string' ? Number(cell) : cell;
  if (typeof count === 'number' && Number.isInteger(count) && count >= 2 && count <= MOST_POINTS)
    return count;
  return fail({
    code: 'bad-points',
    kind: 'invalid',
    column: 'points',
    expected: `a whole number from 2 to ${MOST_POINTS}`,
    found: describe(cell),
  });
}
