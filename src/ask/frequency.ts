/**
 * FREQUENCY by Rayleigh's method: f = 1/(2 pi) sqrt(g * integral of q v / integral of |q| v^2)
 * with q the vertical loads of the combination (point loads included), taken as masses |q|/g, and v the deflection under
 * them alone. (Lord Rayleigh, The Theory of Sound, section 88; any vibration text.) The result is at or above the
 * fundamental frequency; on continuous beams the sharpest estimate comes from a combination that loads
 * neighbouring spans in opposite directions, as the first mode moves them: masses count whatever their direction.
 *
 * v is piecewise polynomial and q linear, so Gauss-Legendre with enough nodes makes both integrals exact; a load
 * given as a text in x is as exact as the pieces the engine fits to it.
 */
import type { BeamModel, Combination, Load } from '../beam/model';
import { solve } from '../integrate/solve';
import { lawAt } from '../integrate/regions';
import { fail, respond, type OpenBeam } from '../open';
import { fieldOf, eachInterval, sortedOnce, valueAt } from './field';
import { evaluate } from './polynomial';
import { gauss } from './quadrature';

/** Nodes for a load that is a function of x: the engine's fitted pieces resolve it with no more than this. */
const SMOOTH_NODES = 24;

type Vertical = Extract<Load, { kind: 'point' | 'distributed' }>;

/** Fundamental bending frequency in Hz. Throws 'needs-units' (g is unknown without them) and 'no-mass'. */
export function frequency(open: OpenBeam): number {
  const { model, combination } = open;
  if (model.units === null) {
    return fail({
      code: 'needs-units',
      kind: 'invalid',
      column: 'beam',
      expected: 'a units row such as units, kN, m, mm: without it g is not known',
      found: 'no units row',
    });
  }
  const { work, inertia } = quotient(model, combination);
  if (!(inertia > 0) || !(work > 0)) {
    return fail({
      code: 'no-mass',
      kind: 'unavailable',
      column: 'combination',
      expected: 'vertical loads that deflect the beam: they are its masses',
      found: 'none in this combination',
    });
  }
  return Math.sqrt((model.units.gravity * work) / inertia) / (2 * Math.PI);
}

/** The integrals of q v and of |q| v^2. */
function quotient(model: BeamModel, combination: Combination | null): { work: number; inertia: number } {
  const factorOf = (load: Load): number =>
    combination === null || load.case < 0 ? 1 : (combination.factors[load.case] ?? 0);
  const vertical: { load: Vertical; factor: number }[] = [];
  for (const load of model.loads) {
    const factor = factorOf(load);
    if ((load.kind === 'point' || load.kind === 'distributed') && factor !== 0)
      vertical.push({ load, factor });
  }
  const kept = model.loads.filter(
    (load) => load.kind === 'point' || load.kind === 'distributed' || load.kind === 'axial',
  );
  const result = solve({ ...model, loads: kept, limits: [] });
  const solution = result.ok ? result.solution : fail(result.issue);
  const field = fieldOf(respond(solution, combination?.factors ?? null).pieces('deflection'));

  let work = 0;
  let inertia = 0;
  const points = new Map<number, number>();
  for (const { load, factor } of vertical) {
    if (load.kind === 'point') points.set(load.at, (points.get(load.at) ?? 0) + factor * load.force);
  }
  for (const [x, force] of points) {
    const v = valueAt(field, x);
    work += force * v;
    inertia += Math.abs(force) * v * v;
  }

  const spread = vertical.flatMap(({ load, factor }) =>
    load.kind === 'distributed' ? [{ load, factor }] : [],
  );
  if (spread.length === 0) return { work, inertia };
  const cuts = sortedOnce(spread.flatMap(({ load }) => [load.from, load.to]));
  eachInterval([field], cuts, (from, to, [c]) => {
    if (c === undefined) return;
    const here = spread.filter(({ load }) => load.from <= from && load.to >= to);
    if (here.length === 0) return;
    const q = (x: number): number => here.reduce((sum, { load, factor }) => sum + factor * lawAt(load, x), 0);
    const smooth = here.some(({ load }) => load.law.kind === 'function');
    const { nodes, weights } = gauss(Math.max(c.length + 1, smooth ? SMOOTH_NODES : 0));
    // |q| has a corner where a linear load changes sign: integrate either side of it
    const [qa, qb] = [q(from), q(to)];
    const corner = !smooth && qa * qb < 0 ? qa / (qa - qb) : 1;
    for (const [a, b] of corner < 1
      ? ([
          [0, corner],
          [corner, 1],
        ] as const)
      : ([[0, 1]] as const)) {
      for (let i = 0; i < nodes.length; i++) {
        const t = a + (b - a) * (nodes[i] as number);
        const weight = (b - a) * (weights[i] as number) * (to - from);
        const load = q(from + t * (to - from));
        const v = evaluate(c, t);
        work += weight * load * v;
        inertia += weight * Math.abs(load) * v * v;
      }
    }
  });
  return { work, inertia };
}
