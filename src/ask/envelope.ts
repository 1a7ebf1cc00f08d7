/**
 * ENVELOPE: lowest and highest of a quantity along the beam over a range of combinations, with pattern cases if asked.
 * The rows hold the exact extremes of every span besides the spread positions: between breaks, and between the places
 * where a part of a pattern changes sign, the envelope of one combination is one polynomial.
 */
import type { BeamModel, Combination } from '../beam/model';
import type { Issue } from '../issue';
import { fail, respond, type OpenBeam } from '../open';
import { readCombination } from '../rows';
import { plain, shownFactor } from '../signs';
import type { Quantity } from '../solution';
import { candidates, eachInterval, fieldOf, sortedOnce, valueAt, type Segment } from './field';
import { layersOf, partLoads, type Layer } from './pattern';
import { addScaled, compose, evaluate, rootsIn, type Coefficients } from './polynomial';
import { namedPositions, spread, withJumps } from './profile';
import { quiet } from './quiet';
import { heading, unitOf } from './units';
import { describe, isBlank, QUANTITIES, readPoints, readWord } from './words';

/**
 * Heading and rows: x, lowest, highest, in the reader's signs and units (where the quantity jumps x stands twice).
 * `combinations`: a range with one combination text per cell (blank: everything acts, once); `pattern`: case names in
 * one text or a range. Open the beam without a combination. Throws 'bad-combinations', and what a wrong combination throws.
 */
export function envelope(
  open: OpenBeam,
  quantity: unknown,
  combinations: unknown,
  pattern?: unknown,
  points?: unknown,
): (number | string)[][] {
  const { model } = open;
  const what = readWord(quantity, 'quantity', QUANTITIES);
  const list = readCombinations(combinations, model);
  const cases = readPattern(pattern, model);
  const count = readPoints(points);
  const layers = layersFor(open, what, list, cases);
  const jumps = jumpsIn(layers);
  const extremes = spanExtremes(model, layers);
  const positions = spread(model, sortedOnce([...namedPositions(model), ...extremes]), count);
  const rows: (number | string)[][] = [
    [
      heading('x', unitOf(model, 'length')),
      heading(`lowest ${what}`, unitOf(model, what)),
      heading(`highest ${what}`, unitOf(model, what)),
    ],
  ];
  const bounds = withJumps(model, positions, jumps).map(({ x, side }) => ({
    x,
    ...boundsAt(layers, x, side === 'left'),
  }));
  const peak = bounds.reduce((most, { low, high }) => Math.max(most, -low, high), 0);
  for (const { x, low, high } of bounds) rows.push([x, plain(quiet(low, peak)), plain(quiet(high, peak))]);
  return rows;
}

/** The combinations of a range, cell by cell; blank cells are skipped, and nothing but blanks means that everything acts. */
function readCombinations(raw: unknown, model: BeamModel): (Combination | null)[] {
  const cells: unknown[] = Array.isArray(raw) ? (raw as unknown[]).flat(1) : [raw];
  const list: (Combination | null)[] = [];
  cells.forEach((cell, i) => {
    if (isBlank(cell)) return;
    if (typeof cell !== 'string') {
      fail({
        code: 'bad-combinations',
        kind: 'invalid',
        column: 'combinations',
        expected: 'a text such as "1.35 G + 1.5 Q" in every cell',
        found: describe(cell),
        detail: { cell: i + 1 },
      });
    }
    const read = readCombination(cell, model.cases);
    if (!read.ok)
      fail(
        ...read.issues.map((issue): Issue => ({
          ...issue,
          column: 'combinations',
          detail: { ...issue.detail, cell: i + 1 },
        })),
      );
    else list.push(read.combination);
  });
  return list.length > 0 ? list : [null];
}

/** Case indices of the pattern argument: names parted by blanks, commas, semicolons or + signs, in one cell or several. */
function readPattern(raw: unknown, model: BeamModel): Set<number> {
  const cells: unknown[] = Array.isArray(raw) ? (raw as unknown[]).flat(1) : [raw];
  const indices = new Set<number>();
  for (const cell of cells) {
    if (isBlank(cell)) continue;
    for (const name of describe(cell).split(/[\s,;+]+/)) {
      if (name === '') continue;
      const index = model.cases.findIndex((one) => one === name);
      if (index >= 0) indices.add(index);
      else {
        // the wording of an unknown case is the combination's; a name that reads as something else (a number) is no case either
        const read = readCombination(name, model.cases);
        const issues: readonly Issue[] = read.ok
          ? [
              {
                code: 'bad-combinations',
                kind: 'invalid',
                expected: 'case names of the table',
                found: name,
                detail: { cases: model.cases },
              },
            ]
          : read.issues;
        fail(...issues.map((issue) => ({ ...issue, column: 'pattern' })));
      }
    }
  }
  return indices;
}

function layersFor(
  open: OpenBeam,
  quantity: Quantity,
  list: readonly (Combination | null)[],
  cases: ReadonlySet<number>,
): Layer[] {
  const factor = shownFactor(open.model, quantity);
  if (cases.size > 0) return layersOf(partLoads(open.model, cases), list, quantity, factor);
  return list.map((combination) => ({
    fixed: fieldOf(respond(open.solution, combination?.factors ?? null).pieces(quantity), factor),
    parts: [],
  }));
}

function boundsAt(layers: readonly Layer[], x: number, left: boolean): { low: number; high: number } {
  let low = Infinity;
  let high = -Infinity;
  for (const { fixed, parts } of layers) {
    let above = valueAt(fixed, x, left);
    let below = above;
    for (const part of parts) {
      const value = valueAt(part, x, left);
      if (value > 0) above += value;
      else below += value;
    }
    low = Math.min(low, below);
    high = Math.max(high, above);
  }
  return { low, high };
}

/** Continuity holds to rounding of terms as large as the peak; anything above this fraction of it is a jump. */
const JUMP = 1e-11;

function jumpsIn(layers: readonly Layer[]): Set<number> {
  const jumps = new Set<number>();
  for (const { fixed, parts } of layers) {
    for (const field of [fixed, ...parts]) {
      let peak = 0;
      for (const { c } of field) peak = Math.max(peak, Math.abs(c[0] as number), Math.abs(evaluate(c, 1)));
      for (let i = 1; i < field.length; i++) {
        const before = field[i - 1] as Segment;
        const after = field[i] as Segment;
        if (Math.abs((after.c[0] as number) - evaluate(before.c, 1)) > JUMP * peak) jumps.add(after.from);
      }
    }
  }
  return jumps;
}

/** Where the envelope is lowest and highest within each stretch between vertical supports. */
function spanExtremes(model: BeamModel, layers: readonly Layer[]): number[] {
  const stops = model.supports
    .filter((support) => support.held || support.spring > 0)
    .map((support) => support.at);
  const spans = stops.length + 1;
  const lowest = Array.from({ length: spans }, () => ({ value: Infinity, at: NaN }));
  const highest = Array.from({ length: spans }, () => ({ value: -Infinity, at: NaN }));
  for (const { fixed, parts } of layers) {
    eachInterval([fixed, ...parts], [], (from, to, all) => {
      const [base, ...pieces] = all as [Coefficients, ...Coefficients[]];
      const cuts = sortedOnce([0, ...pieces.flatMap((piece) => rootsIn(piece, 0, 1)), 1]);
      const next = stops.findIndex((at) => at >= to);
      const span = next < 0 ? stops.length : next;
      for (let i = 1; i < cuts.length; i++) {
        const a = cuts[i - 1] as number;
        const b = cuts[i] as number;
        let above = base;
        let below = base;
        for (const piece of pieces) {
          if (evaluate(piece, (a + b) / 2) > 0) above = addScaled(above, piece, 1);
          else below = addScaled(below, piece, 1);
        }
        const place = (t: number): number =>
          t === 1 && b === 1 ? to : from + (a + t * (b - a)) * (to - from);
        candidates(compose(above, a, b - a), (t, value) => {
          if (value > (highest[span] as { value: number }).value) highest[span] = { value, at: place(t) };
        });
        candidates(compose(below, a, b - a), (t, value) => {
          if (value < (lowest[span] as { value: number }).value) lowest[span] = { value, at: place(t) };
        });
      }
    });
  }
  return [...lowest, ...highest].map((one) => one.at).filter((at) => at >= model.start && at <= model.end);
}
