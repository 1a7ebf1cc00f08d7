/**
 * From a beam model to its solution: cut, close, check.
 *
 * A first-order beam is solved once for the loads that always act and once for each case (unit solutions, sharing one factorisation);
 * any combination is their sum. With an axial force the equations depend on the combination (second order), so each combination is
 * solved by itself; its loads are one column.
 */
import type { BeamModel } from '../beam/model';
import { BeamProblem, type Issue } from '../issue';
import type { Response, SolveResult, Solution } from '../solution';
import { close, findStations, transferMatrices } from './closing';
import { Columns, type Sorting } from './columns';
import { criticalLoad, passedModes } from './critical';
import { findMechanism } from './mechanism';
import { cutBeam } from './regions';
import { BeamResponse, type System } from './response';
import { REFUSE, selfCheck } from './self-check';

type Built = { ok: true; system: System } | { ok: false; issue: Issue };

/** So close to its critical load (relative) a deflection has no digits left: refused like one past it. */
const CRITICAL_MARGIN = 1e-9;

export function solve(model: BeamModel): SolveResult {
  const mechanism = findMechanism(model);
  if (mechanism) return { ok: false, issue: mechanism };
  if (model.loads.some((l) => l.kind === 'axial')) {
    return { ok: true, solution: new SecondOrder(model) };
  }
  const built = build(model, 0, model.cases.length + 1, (load) => ({ column: load.case + 1, factor: 1 }));
  return built.ok ? { ok: true, solution: new FirstOrder(built.system) } : built;
}

function build(model: BeamModel, axial: number, count: number, sorting: Sorting): Built {
  const result = cutBeam(model, axial);
  if (!result.ok) return result;
  const { cut } = result;
  const columns = new Columns(model, cut, count, sorting);
  const stations = findStations(model, cut);
  const matrices = transferMatrices(cut, axial);
  const closed = close(model, cut, stations, columns, axial, matrices);
  if (!closed) return { ok: false, issue: failed('conditions', Infinity) };
  const segmentOf: number[] = [];
  for (let i = 0; i + 1 < stations.length; i++) {
    for (let r = stations[i]!.at; r < stations[i + 1]!.at; r++) segmentOf.push(i);
  }
  const system: System = {
    model,
    cut,
    columns,
    axial,
    matrices,
    closed,
    segmentOf,
    residuals: { equilibrium: 0, conditions: 0, energy: 0 },
  };
  const { equilibrium, conditions, energy } = (system.residuals = selfCheck(system));
  if (!(equilibrium <= REFUSE)) return { ok: false, issue: failed('equilibrium', equilibrium) };
  if (!(conditions <= REFUSE)) return { ok: false, issue: failed('conditions', conditions) };
  if (!(energy <= REFUSE)) return { ok: false, issue: failed('energy', energy) };
  return { ok: true, system };
}

function failed(which: string, residual: number): Issue {
  return {
    code: 'self-check-failed',
    kind: 'unavailable',
    detail: { which, residual: Number.isFinite(residual) ? residual : 'not finite' },
  };
}

class FirstOrder implements Solution {
  private everything: Response | null = null;
  private known: Map<string, Response> | null = null;
  constructor(private readonly system: System) {}

  respond(factors: readonly number[] | null): Response {
    if (!factors) return (this.everything ??= this.combine(null));
    const key = factors.join(' ');
    const known = (this.known ??= new Map<string, Response>());
    let response = known.get(key);
    if (!response) {
      response = this.combine(factors);
      if (known.size >= MAX_RESPONSES) known.clear();
      known.set(key, response);
    }
    return response;
  }

  private combine(factors: readonly number[] | null): Response {
    // the loads that always act, then the cases
    const weights = [1];
    for (let c = 1; c < this.system.columns.count; c++) weights.push(factors ? (factors[c - 1] ?? 0) : 1);
    return new BeamResponse(this.system, weights);
  }
}

/** Responses kept with a solution; more combinations than this in turn are simply formed again. */
const MAX_RESPONSES = 64;

class SecondOrder implements Solution {
  private readonly known = new Map<string, Response>();
  constructor(private readonly model: BeamModel) {}

  respond(factors: readonly number[] | null): Response {
    const key = factors ? factors.join(' ') : '';
    const known = this.known.get(key);
    if (known) return known;
    const factorOf = (c: number): number => (c < 0 || !factors ? 1 : (factors[c] ?? 0));
    let axial = 0;
    for (const l of this.model.loads) if (l.kind === 'axial') axial += factorOf(l.case) * l.force;
    const refuse = (issue: Issue): never => {
      throw new BeamProblem([issue], issue.code);
    };
    const slides = this.model.releases.some((r) => r.kind === 'shear');
    if (axial < 0 || (axial > 0 && slides)) {
      const passed = passedModes(this.model, axial * (1 + CRITICAL_MARGIN));
      if (passed !== null && passed > 0) {
        refuse({
          code: 'past-critical-load',
          kind: 'unavailable',
          detail: {
            critical: criticalLoad(this.model, axial * (1 + 2 * CRITICAL_MARGIN)),
            applied: Math.abs(axial),
            sense: axial < 0 ? 'compression' : 'tension',
          },
        });
      }
    }
    const built = build(this.model, axial, 1, (load) => ({ column: 0, factor: factorOf(load.case) }));
    if (!built.ok) return refuse(built.issue);
    const response = new BeamResponse(built.system, [1]);
    if (this.known.size >= MAX_RESPONSES) this.known.clear();
    this.known.set(key, response);
    return response;
  }
}
