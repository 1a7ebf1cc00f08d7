/** From the subject behind a cell to everything the views show: one call of the engine, nothing remembered here. */
import {
  ask,
  BeamProblem,
  cautionsOf,
  readPosition,
  reviewBeam,
  say,
  spansOf,
  type BeamModel,
  type ColumnName,
  type Issue,
  type OpenBeam,
  type Quantity,
  type Response,
  type Review,
} from './engine';
import { DIAGRAMS, type Band, type DrawingInput, type LimitLine } from './drawing/frame';
import type { Subject } from './follow';
import { texts } from './texts';

export interface Reviewed {
  readonly subject: Subject;
  readonly review: Review;
  readonly issues: readonly Issue[];
  readonly cautions: readonly string[];
  /** messages by 0-based row of the range */
  readonly byRow: ReadonlyMap<number, readonly string[]>;
  readonly open: OpenBeam | null;
  readonly model: BeamModel | null;
  readonly drawing: DrawingInput | null;
  readonly checks: readonly Check[];
  /** positions the formula asks at */
  readonly marks: readonly number[];
  /** what a sketch had to leave out because of errors, in words; empty when the whole beam is drawn */
  readonly without: string;
}

/** One line of CHECK, in the reader's units. */
export interface Check {
  readonly span: string;
  readonly deflection: number;
  readonly at: number;
  readonly allowed: number;
  readonly used: number;
  readonly exceeded: boolean;
  readonly limit: string;
}

const MARKS_MOST = 60;

function marksOf(subject: Subject, model: BeamModel): number[] {
  const marks: number[] = [];
  for (const raw of subject.x.slice(0, MARKS_MOST)) {
    if (raw === null || raw === undefined || raw === '') continue;
    const read = readPosition(raw, model);
    if (read.ok) marks.push(read.x);
  }
  return [...new Set(marks)];
}

/** An argument that is there: blank and 0 are the same on some hosts. */
function isGiven(limit: unknown): boolean {
  return limit !== null && limit !== undefined && limit !== '' && limit !== 0;
}

/** Asks CHECK for its lines; a beam without limits has none, which is no fault. */
function checksOf(open: OpenBeam, limit: unknown): { checks: Check[]; issues: readonly Issue[] } {
  if (!isGiven(limit) && open.model.limits.length === 0) return { checks: [], issues: [] };
  try {
    const [, ...rows] = ask.check(open, limit);
    const checks = rows
      .filter((row) => !String(row[0]).startsWith('governs:'))
      .map((row): Check => ({
        span: String(row[0]),
        deflection: Number(row[1]),
        at: Number(row[2]),
        allowed: Number(row[3]),
        used: Number(row[4]),
        exceeded: row[6] === 'exceeded',
        limit: String(row[7]),
      }));
    return { checks, issues: [] };
  } catch (problem) {
    if (problem instanceof BeamProblem) return { checks: [], issues: problem.issues };
    throw problem;
  }
}

/**
 * CHECK lists every span for every limit, spans from left to right: the tightest limit of each span is drawn. A limit that is set on
 * another combination than the drawn one says nothing about the drawn curve and is left to the table of checks. `own`: the formula's own limit,
 * which replaces the rows.
 */
function limitLines(open: OpenBeam, checks: readonly Check[], own: boolean): LimitLine[] {
  const { model } = open;
  const spans = spansOf(model);
  const drawn = open.combination?.factors ?? model.cases.map(() => 1);
  const concerns = (k: number): boolean => {
    const set = own ? null : (model.limits[Math.floor(k / spans.length)]?.combination ?? null);
    return set === null || set.factors.every((factor, i) => factor === drawn[i]);
  };
  return spans.flatMap((span, i) => {
    const here = checks.filter((check, k) => k % spans.length === i && check.allowed > 0 && concerns(k));
    const tightest = [...here].sort((a, b) => a.allowed - b.allowed)[0];
    if (!tightest) return [];
    const { from, to, chord } = span;
    return [{ from, to, chord, allowed: tightest.allowed, text: tightest.limit }];
  });
}

/** What the person asks of the shown beam beyond its formula: combinations to draw an envelope over (as typed, between semicolons), cases that act span by span, a limit. */
export interface Wish {
  readonly combinations: string;
  readonly pattern: string;
  /** a limit to try in place of the beam's own; null: none */
  readonly limit: string | null;
}

export const NO_WISH: Wish = { combinations: '', pattern: '', limit: null };

const BAND_POINTS = 61;

/** Bands of all quantities; empty when nothing is wished. A wish that cannot be met is an issue. */
function bandsOf(
  subject: Subject,
  cells: readonly (readonly unknown[])[],
  wish: Wish,
): { bands: NonNullable<DrawingInput['bands']>; issues: readonly Issue[] } {
  const typed = wish.combinations
    .split(/[;\n]/)
    .map((text) => text.trim())
    .filter((text) => text !== '');
  const combinations: unknown = typed.length > 0 ? typed.map((text) => [text]) : subject.combinations;
  const pattern: unknown = wish.pattern.trim() !== '' ? wish.pattern : subject.pattern;
  if (combinations === null && (pattern === null || pattern === '')) return { bands: {}, issues: [] };
  const { open } = reviewBeam({ ...subject.args, combination: null, beam: cells });
  if (!open) return { bands: {}, issues: [] };
  try {
    const bands: Partial<Record<Quantity, Band>> = {};
    for (const quantity of DIAGRAMS) {
      const [, ...rows] = ask.envelope(open, quantity, combinations, pattern, BAND_POINTS);
      bands[quantity] = {
        x: rows.map((row) => Number(row[0])),
        lowest: rows.map((row) => Number(row[1])),
        highest: rows.map((row) => Number(row[2])),
      };
    }
    return { bands, issues: [] };
  } catch (problem) {
    if (problem instanceof BeamProblem) return { bands: {}, issues: problem.issues };
    throw problem;
  }
}

export function reviewSubject(subject: Subject, wish: Wish = NO_WISH): Reviewed {
  return reviewCells(subject, subject.cells, wish);
}

/** The same beam with other rows: a draft while it is typed. */
export function reviewCells(
  subject: Subject,
  cells: readonly (readonly unknown[])[],
  wish: Wish = NO_WISH,
): Reviewed {
  const review = reviewBeam({ ...subject.args, beam: cells });
  const { open } = review;
  const model = review.model;
  const issues: Issue[] = [...review.issues];
  let checks: Check[] = [];
  if (open) {
    const found = checksOf(open, wish.limit ?? subject.limit);
    checks = found.checks;
    issues.push(...found.issues);
  }
  const envelope = open ? bandsOf(subject, cells, wish) : { bands: {}, issues: [] };
  issues.push(...envelope.issues);
  const marks = model ? marksOf(subject, model) : [];
  const sketch = model ? null : sketchOf(subject, cells, review);
  const byRow = new Map<number, string[]>();
  const note = (issue: Issue): void => {
    if (issue.row === undefined) return;
    const words = byRow.get(issue.row - 1) ?? [];
    words.push(say(issue));
    byRow.set(issue.row - 1, words);
  };
  issues.forEach(note);
  const cautions = [...(open?.cautions ?? []), ...(open ? cautionsOf(open) : [])];
  cautions.forEach(note);
  return {
    subject,
    review,
    issues,
    cautions: cautions.map(say),
    byRow,
    open,
    model,
    drawing: model
      ? {
          ...drawingOf(
            review,
            model,
            open,
            marks,
            open ? limitLines(open, checks, isGiven(wish.limit ?? subject.limit)) : [],
          ),
          bands: envelope.bands,
        }
      : (sketch?.drawing ?? null),
    checks,
    marks,
    without: sketch?.without ?? '',
  };
}

/**
 * A picture of rows that are not in order yet: the same beam without the rows in error, and with some stiffness if it has none.
 * Only drawn, never answered.
 */
function sketchOf(
  subject: Subject,
  cells: readonly (readonly unknown[])[],
  review: Review,
): { drawing: DrawingInput; without: string } | null {
  if (cells.length < 2) return null;
  const { columns, header } = review.table.layout;
  const bad = new Set<number>();
  const blank = (row: number): void => {
    if (row > (header ? 1 : 0)) bad.add(row);
  };
  let stiff = false;
  let now = review;
  // rows left out still say how far the beam reaches: a load of nothing stands for them
  const named = review.table.rows
    .filter((row) => row.kind === 'item' || row.kind === 'unknown')
    .flatMap((row) => [row.cells.At, row.cells.To])
    .filter((cell): cell is number => typeof cell === 'number');
  const reach = [Math.min(...named), Math.max(...named)] as const;
  for (let attempt = 0; attempt < 4; attempt++) {
    const blamed = now.issues.flatMap((issue) => (issue.row === undefined ? [] : [issue.row]));
    const before = bad.size;
    blamed.forEach(blank);
    if (bad.size === before) {
      if (stiff) return null;
      // nothing left to blame but what is missing: the stiffness
      stiff = true;
      for (const row of now.table.rows) if (/^(E|I|EI)$/.test(row.item ?? '')) blank(row.row);
    }
    const kept = cells.map((row, i) => (bad.has(i + 1) ? row.map(() => null) : row));
    const units = now.table.rows.find((row) => row.item === 'units')?.cells;
    const word = (cell: unknown): string => (typeof cell === 'string' ? cell : '');
    const unit = units ? `${word(units.At)}*${word(units.To)}^2` : null;
    const line = (values: Partial<Record<ColumnName, unknown>>): unknown[] =>
      columns.map((name) => (name === null ? null : (values[name] ?? null)));
    const extra = [line({ Item: 'uniform', At: reach[0], To: reach[1], Value: 0 })];
    if (stiff) extra.push(line({ Item: 'EI', Value: 1, Unit: unit }));
    now = reviewBeam({ ...subject.args, beam: reach[1] > reach[0] ? [...kept, ...extra] : kept });
    if (!now.model) continue;
    const model = { ...now.model, loads: now.model.loads.filter((load) => load.row <= cells.length) };
    const rows = [...bad].sort((a, b) => a - b);
    const parts: string[] = [];
    if (rows.length > 0) parts.push(texts.messages.sketchRows(rows));
    if (stiff) parts.push(texts.messages.sketchStiffness);
    const drawing = drawingOf(now, model, null, [], []);
    return { drawing, without: texts.messages.sketch(parts.join(', ')) };
  }
  return null;
}

function drawingOf(
  review: Review,
  model: BeamModel,
  open: OpenBeam | null,
  marks: readonly number[],
  limits: readonly LimitLine[],
): DrawingInput {
  const words = new Map(review.table.rows.map((row) => [row.row, row.cells.Item]));
  const response: Response | null = open ? open.response : null;
  return {
    model,
    response,
    factors: open?.combination?.factors ?? null,
    show: (quantity, value) => (open ? open.show(quantity, value) : value),
    word: (row) => {
      const word = words.get(row);
      return typeof word === 'string' ? word : '';
    },
    marks,
    limits,
  };
}
