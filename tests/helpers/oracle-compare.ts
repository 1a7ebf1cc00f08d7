/**
 * Engine against oracle over one beam: every quantity on both sides of every break, inside every region, every reaction, and the peaks.
 * Errors are relative to the quantity's own peak over the beam (reactions: to the largest of forces and shears, couples and moments; with
 * a bow also to the movement from it, of which what is shown may be a small rest).
 */
import type { BeamModel } from '../../src/beam/model';
import { BeamProblem, type Issue } from '../../src/issue';
import { solve } from '../../src/integrate/solve';
import type { Quantity, Response, Side } from '../../src/solution';
import { solveOracle, type Oracle } from './oracle';

export const QUANTITIES: readonly Quantity[] = ['deflection', 'slope', 'moment', 'shear'];

export interface Comparison {
  readonly verdict: 'both solve' | 'both refuse' | 'only the engine solves' | 'only the oracle solves';
  readonly issue: Issue | null;
  /** relative error by quantity, reactions and peaks included */
  readonly errors: Readonly<Record<string, number>>;
  readonly worst: number;
  readonly where: string;
}

export function respond(
  model: BeamModel,
  factors: readonly number[] | null,
): { response: Response } | { response: null; issue: Issue } {
  const solved = solve(model);
  if (!solved.ok) return { response: null, issue: solved.issue };
  try {
    return { response: solved.solution.respond(factors) };
  } catch (error) {
    if (error instanceof BeamProblem) return { response: null, issue: error.issues[0]! };
    throw error;
  }
}

export function compare(
  model: BeamModel,
  factors: readonly number[] | null = null,
  /** at most this many places inside the beam */
  places = 400,
): Comparison {
  const engine = respond(model, factors);
  const oracle = solveOracle(model, factors);
  const none = { errors: {}, worst: 0, where: '' };
  if (!engine.response) {
    return {
      ...none,
      verdict: oracle.stable ? 'only the oracle solves' : 'both refuse',
      issue: engine.issue,
    };
  }
  if (!oracle.stable) return { ...none, verdict: 'only the engine solves', issue: null };
  return { ...measure(model, engine.response, oracle, places), verdict: 'both solve', issue: null };
}

export function measure(
  model: BeamModel,
  response: Response,
  oracle: Oracle,
  places: number,
): { errors: Record<string, number>; worst: number; where: string } {
  const samples: [number, Side][] = [];
  const breaks = [...new Set([...response.breaks, ...oracle.joints])].sort((a, b) => a - b);
  const stride = Math.max(1, Math.ceil((breaks.length * 3) / places));
  breaks.forEach((x, i) => {
    const next = breaks[i + 1];
    if (i % stride !== 0 && next !== undefined) return;
    samples.push([x, 'left'], [x, 'right']);
    if (next !== undefined && next > x) {
      samples.push(
        [x + 0.31 * (next - x), 'right'],
        [x + 0.5 * (next - x), 'right'],
        [x + 0.83 * (next - x), 'right'],
      );
    }
  });
  const errors: Record<string, number> = {};
  let worst = 0;
  let where = '';
  const note = (name: string, error: number, scale: number, place: string): void => {
    const relative = error === 0 ? 0 : error / scale;
    if (!(relative <= (errors[name] ?? -1))) errors[name] = relative;
    if (!(relative <= worst)) {
      worst = relative;
      where = `${name} at ${place}`;
    }
  };
  const bowed = model.loads.some((l) => l.kind === 'camber');
  const scales: Partial<Record<Quantity, number>> = {};
  for (const quantity of QUANTITIES) {
    const want = samples.map(([x, side]) => oracle.value(quantity, x, side));
    const peak = response.peak(quantity, 'largest');
    const atPeak = oracle.value(quantity, peak.at, peak.side);
    let scale = Math.max(Math.abs(atPeak), ...want.map(Math.abs));
    // never an error against the peak itself: what is shown, movement plus bow, may be the small difference of both
    const missed = Math.max(0, scale - Math.abs(peak.value));
    if (bowed && (quantity === 'deflection' || quantity === 'slope')) {
      const field = quantity === 'deflection' ? 'v' : 'theta';
      scale = Math.max(scale, ...samples.map(([x, side]) => Math.abs(oracle.raw(field, x, side))));
    }
    scales[quantity] = scale;
    samples.forEach(([x, side], i) => {
      note(quantity, Math.abs(response.value(quantity, x, side) - want[i]!), scale, `${x} ${side}`);
    });
    // the peak is attained where it says, and no sample of the oracle passes it
    note(`peak ${quantity}`, Math.abs(peak.value - atPeak), scale, `${peak.at}`);
    note(`peak ${quantity}`, missed, scale, 'missed');
  }
  const applied = model.loads.map((l) => (l.kind === 'point' ? Math.abs(l.force) : 0));
  const couples = model.loads.map((l) => (l.kind === 'couple' ? Math.abs(l.couple) : 0));
  const want = oracle.reactions();
  const forceScale = Math.max(scales.shear!, ...applied, ...want.map((q) => Math.abs(q.force)));
  const coupleScale = Math.max(scales.moment!, ...couples, ...want.map((q) => Math.abs(q.couple)));
  const got = response.reactions();
  for (const w of want) {
    const g = got.find((q) => q.at === w.at);
    note('reaction', g ? Math.abs(g.force - w.force) : Infinity, forceScale, `${w.at}`);
    note('reaction couple', g ? Math.abs(g.couple - w.couple) : Infinity, coupleScale, `${w.at}`);
  }
  return { errors, worst, where };
}
