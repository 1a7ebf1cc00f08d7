/**
 * STIFFNESSFACTOR and REQUIREDI: the smallest factor s on every EI at which every limit is just met, used(s) = 1.
 *
 * Three kinds of beam, each as exact as it can be:
 *  - nothing but loads on a beam whose only flexibility is EI: v is proportional to 1/s, so s = used(1);
 *  - with settlements, imposed rotations, free curvature or camber besides: v = A/s + B, so used is the largest of
 *    |A t + B|/allowed, a convex function of t = 1/s: the limits hold on one interval of t, whose far end is the answer;
 *  - with springs, foundations, shear flexibility or an axial force: used(s) is solved anew for each s, bracketed and
 *    closed in on by Brent's method.
 * A limit that no stiffness meets (a settlement that alone exceeds it), or that every stiffness meets, is an answer in
 * words: 'not-by-stiffness'.
 */
import type { BeamModel, Law, SectionStretch } from '../beam/model';
import { solve } from '../integrate/solve';
import { BeamProblem } from '../issue';
import { fail, type OpenBeam } from '../open';
import type { Solution } from '../solution';
import { governing, testsOf, verdicts, type Test } from './check';
import { lowestBetween, rootBetween } from './roots';
import { write } from './units';

/** Factors from 2^-40 to 2^40 (1e12 either way) are tried: beyond, a beam is a hinge or a rock for any purpose. */
const WIDEST = 40;

/** The factor on every EI of the beam. Throws 'not-by-stiffness', 'no-limit', 'no-span'. */
export function stiffnessFactor(open: OpenBeam, limit?: unknown): number {
  const tests = testsOf(open, limit);
  return factorFor(open.model, open.solution, tests);
}

/**
 * The second moment of area, one for the whole beam, in the unit of the I row.
 * Throws 'no-modulus' when the beam's E is not one number, besides what `stiffnessFactor` throws.
 */
export function requiredI(open: OpenBeam, limit?: unknown): number {
  const { model } = open;
  const tests = testsOf(open, limit);
  if (model.modulus === null) {
    return fail({
      code: 'no-modulus',
      kind: 'unavailable',
      column: 'Item',
      expected: 'one E row for the whole beam, and I rows (not EI)',
      found: 'rows that do not give one E',
    });
  }
  const first = model.ei[0] as SectionStretch;
  const ei =
    first.law.kind === 'linear' ? Math.max(first.law.start, first.law.end) : first.law.at(first.from);
  const uniform: BeamModel = {
    ...model,
    ei: [{ from: model.start, to: model.end, law: { kind: 'linear', start: ei, end: ei }, rows: first.rows }],
  };
  const factor = factorFor(uniform, solved(uniform), tests);
  return ((factor * ei) / model.modulus) * (model.units?.secondMoment?.perModelUnit ?? 1);
}

function solved(model: BeamModel): Solution {
  const result = solve(model);
  return result.ok ? result.solution : fail(result.issue);
}

function scaled(model: BeamModel, factor: number): BeamModel {
  return { ...model, ei: model.ei.map((stretch) => ({ ...stretch, law: scaledLaw(stretch.law, factor) })) };
}

function scaledLaw(law: Law, factor: number): Law {
  if (law.kind === 'linear') return { kind: 'linear', start: factor * law.start, end: factor * law.end };
  return { kind: 'function', at: (x) => factor * law.at(x), text: law.text };
}

function factorFor(model: BeamModel, solution: Solution, tests: readonly Test[]): number {
  const asIs = governing(verdicts(model, solution, tests)).used;
  const elastic =
    model.foundations.length > 0 ||
    model.ga.length > 0 ||
    model.supports.some((support) => support.spring > 0 || support.rotationalSpring > 0) ||
    acting(model, tests, ['axial']);
  const imposed = acting(model, tests, ['settlement', 'rotation', 'curvature', 'camber']);
  if (!elastic && !imposed) return asIs > 0 ? asIs : alwaysMet(0);

  const usedAt = (factor: number): number => {
    if (folds(model, factor) > MOST_FOLDS) return NaN;
    try {
      return governing(verdicts(model, solved(scaled(model, factor)), tests)).used;
    } catch (problem) {
      // an axial force beyond the critical load of the softer beam: no deflection is large enough
      const code = problem instanceof BeamProblem ? problem.issues[0]?.code : undefined;
      if (code === 'past-critical-load') return Infinity;
      // so stiff or so soft that the solve itself has no digits left: the search ends there
      if (code === 'self-check-failed' || code === 'too-stiff') return NaN;
      throw problem;
    }
  };
  return elastic ? bySearch(usedAt, asIs) : byConvexity((t) => usedAt(1 / t), asIs);
}

/**
 * A softened beam under axial force or on a foundation bends in ever shorter waves; past this many over its length it has become a string
 * or a row of springs, its deflection no longer follows EI (by 1/300 at most), and a search there would only cost time: ever more regions.
 */
const MOST_FOLDS = 300;

/** e-folds of the homogeneous solution over the whole beam, with every EI multiplied by `factor`; all axial forces counted at full size. */
function folds(model: BeamModel, factor: number): number {
  let soft = Infinity;
  for (const { law, from, to } of model.ei) {
    const ends = law.kind === 'linear' ? [law.start, law.end] : [law.at(from), law.at(to)];
    soft = Math.min(soft, ...ends);
  }
  let axial = 0;
  for (const load of model.loads) if (load.kind === 'axial') axial += Math.abs(load.force);
  let bed = 0;
  for (const { stiffness } of model.foundations) bed = Math.max(bed, stiffness);
  const ei = factor * soft;
  return (model.end - model.start) * (Math.sqrt(axial / ei) + Math.sqrt(Math.sqrt(bed / ei)));
}

/** Whether a load of one of these kinds takes part in a combination that is tested. */
function acting(model: BeamModel, tests: readonly Test[], kinds: readonly string[]): boolean {
  return model.loads.some(
    (load) =>
      kinds.includes(load.kind) &&
      tests.some(
        (test) => test.combination === null || load.case < 0 || test.combination.factors[load.case] !== 0,
      ),
  );
}

/** used as a convex function of t = 1/s: the far end of the interval on which it is at most 1. */
function byConvexity(used: (t: number) => number, asIs: number): number {
  let inside = 1;
  if (asIs > 1) {
    // convex: walk down the slope, by doubling, until the valley is passed; then the valley's floor decides
    const rising = used(1 + 1e-6) > asIs;
    let far = 1;
    let value = asIs;
    for (let i = 0; i < WIDEST && value > 1; i++) {
      const next = rising ? far / 2 : far * 2;
      const beyond = used(next);
      if (beyond > value) {
        const floor = lowestBetween(
          used,
          Math.min(next, rising ? 4 * next : next / 4),
          Math.max(next, rising ? 4 * next : next / 4),
        );
        if (floor.value > 1) return cannot(floor.value);
        far = floor.x;
        value = floor.value;
        break;
      }
      far = next;
      value = beyond;
    }
    if (value > 1) return cannot(value);
    inside = far;
  }
  let outside = 2 * inside;
  let above = used(outside);
  for (let i = 0; i < 2 * WIDEST && above <= 1; i++) {
    inside = outside;
    outside *= 2;
    above = used(outside);
  }
  if (!(above > 1)) return alwaysMet(Number.isNaN(above) ? used(inside) : above);
  return 1 / rootBetween((t) => used(t) - 1, inside, outside, used(inside) - 1, above - 1);
}

/** used(s) of an elastically held or second-order beam: bracket on a ladder of factors, then close in. */
function bySearch(used: (factor: number) => number, asIs: number): number {
  let met = 1;
  let value = asIs;
  if (asIs > 1) {
    for (let i = 0; i < WIDEST && value > 1; i++) {
      const next = used(2 * met);
      if (Number.isNaN(next)) break;
      met *= 2;
      value = next;
    }
    if (value > 1) {
      // no stiffer beam will do; an upward camber may still leave a window among the softer ones
      const ladder = Array.from({ length: 4 * WIDEST + 1 }, (_, i) => WIDEST - i / 2);
      const level = (power: number): number => used(2 ** power);
      let best = { x: WIDEST, value };
      for (const power of ladder) {
        const here = level(power);
        if (here < best.value) best = { x: power, value: here };
      }
      const floor = lowestBetween(level, best.x - 0.5, best.x + 0.5);
      if (floor.value < best.value) best = floor;
      if (best.value > 1) return cannot(best.value);
      met = 2 ** best.x;
      value = best.value;
    }
  }
  let lacking = met / 2;
  let below = used(lacking);
  for (let i = 0; i < 2 * WIDEST && below <= 1; i++) {
    met = lacking;
    lacking /= 2;
    below = used(lacking);
  }
  if (!(below > 1)) return alwaysMet(Number.isNaN(below) ? used(met) : below);
  return rootBetween((factor) => used(factor) - 1, lacking, met, below - 1, used(met) - 1);
}

function cannot(best: number): never {
  return fail({
    code: 'not-by-stiffness',
    kind: 'unavailable',
    column: 'limit',
    expected: 'a limit that some stiffness meets',
    found: `${write(best)} of the limit used at the best stiffness`,
    detail: { reason: 'never met', best },
  });
}

function alwaysMet(most: number): never {
  return fail({
    code: 'not-by-stiffness',
    kind: 'unavailable',
    column: 'limit',
    expected: 'a deflection that depends on the stiffness',
    found: `${write(most)} of the limit used at any stiffness`,
    detail: { reason: 'always met', best: most },
  });
}
