/**
 * Pattern loading: the loads of a pattern case are parted span by span, and each part acts only where it makes the
 * effect worse. For each position x and each combination:
 *   highest(x) = fixed(x) + sum over parts of max(0, part(x)),  lowest with min.
 * Parts reach from vertical support to vertical support; a distributed load is cut there. Axial force and camber are
 * not parted: they are properties of the whole beam and act with the combination.
 */
import type { BeamModel, Combination, Load } from '../beam/model';
import { solve } from '../integrate/solve';
import { lawAt } from '../integrate/regions';
import { fail, respond as respondTo } from '../open';
import type { Quantity, Response } from '../solution';
import { fieldOf, type Segment } from './field';

export interface Parted {
  /** a model whose every load has a case of its own kind: 0 the loads that always act, 1.. the table's cases, then the parts */
  readonly model: BeamModel;
  /** for each part, the table's case it belongs to */
  readonly partCase: readonly number[];
}

/** The loads of a beam sorted into always, cases and parts. `pattern` holds indices of the table's cases. */
export function partLoads(model: BeamModel, pattern: ReadonlySet<number>): Parted {
  const stops = model.supports
    .filter((support) => support.held || support.spring > 0)
    .map((support) => support.at);
  const keys = new Map<string, number>();
  const partCase: number[] = [];
  const loads: Load[] = [];
  const firstPart = model.cases.length + 1;
  const partOf = (index: number, place: string): number => {
    const key = `${index}/${place}`;
    let part = keys.get(key);
    if (part === undefined) {
      part = partCase.length;
      keys.set(key, part);
      partCase.push(index);
    }
    return firstPart + part;
  };
  for (const load of model.loads) {
    if (!pattern.has(load.case) || load.kind === 'axial' || load.kind === 'camber') {
      loads.push({ ...load, case: load.case + 1 });
    } else if ('at' in load) {
      loads.push({ ...load, case: partOf(load.case, placeOf(stops, load.at)) });
    } else {
      const cuts = [load.from, ...stops.filter((at) => at > load.from && at < load.to), load.to];
      for (let i = 1; i < cuts.length; i++) {
        const from = cuts[i - 1] as number;
        const to = cuts[i] as number;
        const place = partOf(load.case, placeOf(stops, from + (to - from) / 2));
        if (load.kind === 'curvature' || load.law.kind === 'function')
          loads.push({ ...load, from, to, case: place });
        else {
          const law = { kind: 'linear', start: lawAt(load, from), end: lawAt(load, to) } as const;
          loads.push({ ...load, from, to, law, case: place });
        }
      }
    }
  }
  const cases = ['always', ...model.cases, ...partCase.map((_, i) => `part${i}`)];
  return { model: { ...model, cases, loads, limits: [] }, partCase };
}

/** Span number, or the support itself for what stands right on it. */
function placeOf(stops: readonly number[], x: number): string {
  const next = stops.findIndex((at) => at >= x);
  if (next >= 0 && stops[next] === x) return `support ${next}`;
  return `span ${next < 0 ? stops.length : next}`;
}

export interface Layer {
  /** what acts whatever the pattern */
  readonly fixed: readonly Segment[];
  readonly parts: readonly (readonly Segment[])[];
}

/** Fields of one quantity for each combination, each part with its factor, in model signs times `factor`. */
export function layersOf(
  parted: Parted,
  combinations: readonly (Combination | null)[],
  quantity: Quantity,
  factor: number,
): Layer[] {
  const { model, partCase } = parted;
  const tableCases = model.cases.length - 1 - partCase.length;
  const axial = model.loads.some((load) => load.kind === 'axial');
  const shared = axial ? null : responder(model);
  return combinations.map((combination) => {
    const factors = Array.from({ length: tableCases }, (_, i) =>
      combination === null ? 1 : (combination.factors[i] ?? 0),
    );
    const respond = shared ?? responder(withAxial(model, factors));
    const weights = [1, ...factors, ...partCase.map(() => 0)];
    const fixed = fieldOf(respond(weights).pieces(quantity), factor);
    const parts: Segment[][] = [];
    partCase.forEach((index, i) => {
      const weight = factors[index] as number;
      if (weight === 0) return;
      const unit = weights.map((_, k) => (k === tableCases + 1 + i ? 1 : 0));
      parts.push(fieldOf(respond(unit).pieces(quantity), factor * weight));
    });
    return { fixed, parts };
  });
}

function responder(model: BeamModel): (weights: readonly number[]) => Response {
  const result = solve(model);
  const solution = result.ok ? result.solution : fail(result.issue);
  return (weights) => respondTo(solution, weights);
}

/** Second order: with the combination's axial force held, the rest adds up. The force becomes part of the beam. */
function withAxial(model: BeamModel, factors: readonly number[]): BeamModel {
  let force = 0;
  const loads: Load[] = [];
  for (const load of model.loads) {
    if (load.kind === 'axial') force += (load.case === 0 ? 1 : (factors[load.case - 1] ?? 0)) * load.force;
    else loads.push(load);
  }
  loads.push({ row: 0, case: -1, kind: 'axial', force });
  return { ...model, loads };
}
