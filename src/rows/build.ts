/** Compiled table + names -> beam model: numbers only, no text is read here. */
import type { BeamModel, Law, LimitRow } from '../beam/model';
import type { Issue } from '../issue';
import type { Bindings } from './bindings';
import { bind, evaluate, factorOf, type Bound } from './bound';
import { gatherFoundations, gatherLoads } from './loads';
import type { Placed, Plan } from './plan';
import { numericCautions } from './cautions';
import { readingsOf, type Reading } from './readings';
import { lawAt } from './law';
import { gatherSection } from './section';
import { snap } from './snap';
import { checkImposed, gatherReleases, gatherSupports } from './supports';
import { modelUnits } from './system';
import { showNumber } from './show';

export type { Reading };

export type BuildResult =
  | {
      readonly ok: true;
      readonly model: BeamModel;
      /** one sentence per row, made when asked for */
      readonly readings: readonly Reading[];
      readonly cautions: readonly Issue[];
    }
  | { readonly ok: false; readonly issues: readonly Issue[] };

/** The numbers of one member, position by position and row by row, while its model is made. */
export class Evaluated {
  readonly issues: Issue[] = [];
  readonly cautions: Issue[] = [];
  /** by Plan.places, snapped */
  readonly positions: number[];
  /** by Plan.placed: Value in the model's units and signs; 0 for a law in x */
  readonly values: number[];
  readonly ends: number[];
  start = 0;
  end = 0;
  private readonly bound: Bound;

  constructor(
    readonly plan: Plan,
    bindings: Bindings,
  ) {
    const { places, placed } = plan;
    this.bound = bind(plan, bindings, this.issues);
    this.positions = new Array<number>(places.length);
    for (let i = 0; i < places.length; i += 1) {
      this.positions[i] = evaluate(places[i]!, this.bound, plan, this.issues);
    }
    this.values = new Array<number>(placed.length);
    this.ends = new Array<number>(placed.length);
    for (let k = 0; k < placed.length; k += 1) {
      const row = placed[k]!;
      const { value, end } = row;
      this.values[k] =
        value === null || value.usesX ? 0 : evaluate(value, this.bound, plan, this.issues) * row.sign;
      this.ends[k] = end === null ? 0 : evaluate(end, this.bound, plan, this.issues) * row.sign;
      if (row.positive) this.positive(k);
    }
  }

  from(row: Placed): number {
    return row.from < 0 ? this.start : this.positions[row.from]!;
  }

  to(row: Placed): number {
    return row.to < 0 ? this.end : this.positions[row.to]!;
  }

  /** A position for a sentence. */
  show(x: number): string {
    const { system } = this.plan;
    return system === null ? showNumber(x) : `${showNumber(x)} ${system.length.text}`;
  }

  /** The law of row k along its stretch. For I, EI and GA an End value of 0 or blank means constant. */
  law(k: number): Law {
    const row = this.plan.placed[k]!;
    const start = this.values[k]!;
    const { value } = row;
    if (value !== null && value.usesX) return this.lawOfX(k);
    const end = this.ends[k]!;
    return { kind: 'linear', start, end: end === 0 && row.item !== 'varying' ? start : end };
  }

  private lawOfX(k: number): Law {
    const row = this.plan.placed[k]!;
    const value = row.value!;
    const factor = factorOf(value, this.bound, this.plan, this.issues) * row.sign;
    const env = this.bound.env.slice();
    const evaluateAt = value.evaluate!;
    const at = (x: number): number => {
      env[0] = x;
      return evaluateAt(env) * factor;
    };
    const law: Law = { kind: 'function', at, text: value.expression!.text };
    this.checkLaw(law, row);
    return law;
  }

  /** A law is tried at its ends and its middle; between them the engine watches it. */
  private checkLaw(law: Law, row: Placed): void {
    if (this.issues.length > 0) return;
    const from = this.from(row);
    const to = this.to(row);
    for (const x of [from, (from + to) / 2, to]) {
      const value = lawAt(law, from, to, x);
      if (Number.isFinite(value) && (value > 0 || !row.positive)) continue;
      this.issues.push({
        code: 'bad-law',
        kind: 'invalid',
        row: row.row,
        column: 'Value',
        found: showNumber(value),
        expected: row.positive ? 'greater than 0' : 'a finite number',
        detail: { x: this.show(x) },
      });
      return;
    }
  }

  private positive(k: number): void {
    const row = this.plan.placed[k]!;
    const place = {
      code: 'not-positive',
      kind: 'invalid',
      row: row.row,
      detail: { item: row.item },
    } as const;
    if (!row.value!.usesX && this.values[k]! <= 0) {
      this.issues.push({ ...place, column: 'Value', found: showNumber(this.values[k]!) });
    }
    if (this.ends[k]! < 0)
      this.issues.push({ ...place, column: 'End value', found: showNumber(this.ends[k]!) });
  }

  /** Ends of the beam; every stretch runs to the right and has a length. */
  extend(): boolean {
    if (this.positions.length === 0) {
      this.issues.push({ code: 'no-positions', kind: 'invalid' });
      return false;
    }
    const { start, end } = snap(this.positions);
    this.start = start;
    this.end = end;
    for (const row of this.plan.placed) {
      if (row.to < 0) continue;
      const from = this.positions[row.from]!;
      const to = this.positions[row.to]!;
      if (from < to) continue;
      this.issues.push({
        code: from > to ? 'reversed' : 'no-length',
        kind: 'invalid',
        row: row.row,
        column: 'To',
        found: this.show(to),
        detail: { item: row.item, at: this.show(from) },
      });
    }
    if (!(start < end))
      this.issues.push({ code: 'no-length-beam', kind: 'invalid', found: this.show(start) });
    return this.issues.length === 0;
  }

  limits(): LimitRow[] {
    const found: LimitRow[] = [];
    for (const { row, scalar, kind, text, combination } of this.plan.limits) {
      const value = evaluate(scalar, this.bound, this.plan, this.issues);
      if (!(value > 0)) {
        if (!Number.isNaN(value)) {
          this.issues.push({
            code: 'bad-limit',
            kind: 'invalid',
            row,
            column: 'Value',
            found: showNumber(value),
          });
        }
        continue;
      }
      const limit = kind === 'fraction' ? ({ kind, divisor: value } as const) : ({ kind, value } as const);
      found.push({ row, limit, combination, text });
    }
    return found;
  }
}

export function buildPlan(plan: Plan, bindings: Bindings): BuildResult {
  const beam = new Evaluated(plan, bindings);
  const { issues } = beam;
  if (issues.length > 0) return { ok: false, issues };
  if (!beam.extend()) return { ok: false, issues };
  const supports = gatherSupports(beam);
  checkImposed(beam, supports);
  const foundations = gatherFoundations(beam);
  if (supports.length === 0 && foundations.length === 0)
    issues.push({ code: 'no-supports', kind: 'invalid' });
  const releases = gatherReleases(beam, supports);
  const { ei, ga, modulus } = gatherSection(beam);
  const loads = gatherLoads(beam);
  const limits = beam.limits();
  if (issues.length > 0) return { ok: false, issues };
  const model: BeamModel = {
    start: beam.start,
    end: beam.end,
    supports,
    releases,
    foundations,
    ei,
    ga,
    loads,
    cases: plan.cases,
    limits,
    axis: plan.axis,
    units: unitsOf(plan),
    modulus,
  };
  return new Built(model, beam);
}

const units = new WeakMap<Plan, BeamModel['units']>();

function unitsOf(plan: Plan): BeamModel['units'] {
  if (plan.system === null) return null;
  let found = units.get(plan);
  if (found === undefined) units.set(plan, (found = modelUnits(plan.system, plan.secondMoment)));
  return found;
}

/** Readings and cautions are made when asked for. */
class Built {
  readonly ok = true;
  private made: readonly Reading[] | null = null;
  private warned: readonly Issue[] | null = null;
  constructor(
    readonly model: BeamModel,
    private readonly beam: Evaluated,
  ) {}
  get readings(): readonly Reading[] {
    return (this.made ??= readingsOf(this.beam, this.model));
  }
  get cautions(): readonly Issue[] {
    return (this.warned ??= [
      ...this.beam.plan.cautions,
      ...this.beam.cautions,
      ...numericCautions(this.beam, this.model),
    ]);
  }
}
