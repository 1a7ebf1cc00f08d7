/**
 * The response to one combination: the unit solutions of the load columns added up, and everything that can be asked of the diagrams.
 *
 * Diagrams are polynomials per region (see solution.ts, Piece); a value touches only the regions between its station and itself; extremes
 * come from the roots of the derivative polynomials and from both sides of every break, never from sampling.
 */
import type { BeamModel } from '../beam/model';
import type { Peak, Piece, Quantity, Reaction, Residuals, Response, Sense, Side } from '../solution';
import { addJump, type Closed, type Matrices } from './closing';
import type { Columns } from './columns';
import { carry, integrateRegion, particular } from './fields';
import { addScaled, bound, derivative, evaluate, rootsIn, type Poly } from './polynomial';
import { noLoad } from './region-load';
import type { Cut } from './regions';

/** A beam solved for its load columns; shared by all combinations. */
export interface System {
  readonly model: BeamModel;
  readonly cut: Cut;
  readonly columns: Columns;
  readonly axial: number;
  readonly matrices: Matrices;
  readonly closed: Closed;
  /** station index at the left of each region */
  readonly segmentOf: readonly number[];
  /** filled in by the self-check, before anybody sees the system */
  residuals: Residuals;
}

/** Two extremes within this factor of each other are one: the leftmost place is reported, so it does not flicker with rounding. */
const SAME = 1 + 16 * 2 ** -52;

interface Diagrams {
  /** what is shown: initial shape included in deflection and slope, shear = dM/dx */
  readonly deflection: Poly;
  readonly slope: Poly;
  readonly moment: Poly;
  readonly shear: Poly;
}

export class BeamResponse implements Response {
  readonly residuals: Residuals;
  /** state at the left end of each region, once its segment has been carried through */
  private readonly states: number[][] = [];
  private readonly diagrams: (Diagrams | undefined)[] = [];
  private readonly load = noLoad();
  private readonly own = [0, 0, 0, 0];

  constructor(
    readonly system: System,
    private readonly weights: readonly number[],
  ) {
    this.residuals = system.residuals;
  }

  get breaks(): readonly number[] {
    return this.system.cut.breaks;
  }

  /** Carries the state through the segment right of a station. */
  private prepare(segment: number): void {
    const { closed, columns } = this.system;
    const C = columns.count;
    const first = closed.stations[segment]!.at;
    if (this.states[first]) return;
    const last = closed.stations[segment + 1]!.at;
    let y = [0, 0, 0, 0];
    for (let c = 0; c < C; c++) {
      const weight = this.weights[c]!;
      if (weight === 0) continue;
      for (let i = 0; i < 4; i++) y[i]! += weight * closed.states[(segment * C + c) * 4 + i]!;
    }
    this.states[first] = y;
    for (let r = first; r + 1 < last; r++) {
      y = [y[0]!, y[1]!, y[2]!, y[3]!];
      this.step(r, y);
      this.jump(r + 1, y);
      this.states[r + 1] = y;
    }
  }

  /** y <- T y + p over region r */
  private step(r: number, y: number[]): void {
    const { columns, cut, axial, matrices } = this.system;
    const region = cut.regions[r]!;
    carry(region, matrices[r]!, y, 0);
    columns.accumulate(r, this.weights, this.load);
    particular(region, axial, this.load, this.own, 0);
    for (let i = 0; i < 4; i++) y[i]! += this.own[i]!;
  }

  private jump(b: number, y: number[]): void {
    const { columns, axial } = this.system;
    if (!columns.jumps) return;
    for (let c = 0; c < columns.count; c++) {
      if (this.weights[c] !== 0) addJump(columns, b, c, axial, this.weights[c]!, y, 0);
    }
  }

  /** State at the right end of region r (v, rotation, M, S), just left of the break. */
  private stateAtEnd(r: number): number[] {
    const y = this.stateAtStart(r).slice();
    this.step(r, y);
    return y;
  }

  private stateAtStart(r: number): readonly number[] {
    this.prepare(this.system.segmentOf[r]!);
    return this.states[r]!;
  }

  diagram(r: number): Diagrams {
    const known = this.diagrams[r];
    if (known) return known;
    const { columns, cut, axial } = this.system;
    const start = this.stateAtStart(r);
    const region = cut.regions[r]!;
    columns.accumulate(r, this.weights, this.load);
    const fields = integrateRegion(region, axial, this.load, start);
    let deflection = fields.v;
    let slope = fields.t;
    const w = columns.initialShape(r, this.weights);
    if (w) {
      const { h, origin } = region;
      // w(s) = w0 + w1 s + w2 s^2/2 with s = h (u - origin)
      const c1 = h * (w[1] - w[2] * h * origin);
      const shape = [w[0] - h * origin * w[1] + 0.5 * w[2] * h * h * origin * origin, c1, 0.5 * w[2] * h * h];
      deflection = addScaled(fields.v, shape, 1);
      slope = addScaled(fields.t, [c1 / h, w[2] * h], 1);
    }
    const shear = axial === 0 ? fields.S : derivative(fields.M).map((c) => c / region.h);
    const out: Diagrams = { deflection, slope, moment: fields.M, shear };
    this.diagrams[r] = out;
    return out;
  }

  private locate(x: number, side: Side): number {
    const breaks = this.system.cut.breaks;
    let lo = 0;
    let hi = breaks.length - 1;
    // largest lo with breaks[lo] <= x
    while (hi - lo > 1) {
      const mid = (lo + hi) >> 1;
      if (breaks[mid]! <= x) lo = mid;
      else hi = mid;
    }
    if (side === 'left' && x === breaks[lo] && lo > 0) return lo - 1;
    return lo;
  }

  value(quantity: Quantity, x: number, side: Side): number {
    const r = this.locate(x, side);
    const region = this.system.cut.regions[r]!;
    const u = x === this.system.cut.breaks[r + 1] ? 1 : (x - region.x0) / region.h;
    return evaluate(this.diagram(r)[quantity], u + region.origin);
  }

  peak(quantity: Quantity, sense: Sense, from?: number, to?: number): Peak {
    const { regions, breaks } = this.system.cut;
    const a = from ?? breaks[0]!;
    const b = to ?? breaks[breaks.length - 1]!;
    const first = this.locate(a, 'right');
    const last = b > a ? this.locate(b, 'left') : first;
    let best: Peak | null = null;
    let rank = -Infinity;
    const score = (value: number): number =>
      sense === 'largest' ? Math.abs(value) : sense === 'highest' ? value : -value;
    for (let r = first; r <= last; r++) {
      const region = regions[r]!;
      const poly = this.diagram(r)[quantity];
      if (best && (sense === 'largest' || rank > 0) && bound(poly, region.origin) <= rank) continue;
      const u0 = region.origin + (r === first ? Math.max(0, (a - region.x0) / region.h) : 0);
      const u1 = region.origin + (r === last && b < breaks[r + 1]! ? (b - region.x0) / region.h : 1);
      const consider = (u: number, side: Side): void => {
        const value = evaluate(poly, u);
        const s = score(value);
        const better = best === null || (s > rank && s - rank > Math.abs(rank) * (SAME - 1));
        if (!better) return;
        rank = s;
        const at = u === region.origin + 1 ? breaks[r + 1]! : region.x0 + (u - region.origin) * region.h;
        // a root a hair before the right end falls on the break itself: it is still this region's, so seen from the left
        best = at >= breaks[r + 1]! ? { value, at: breaks[r + 1]!, side: 'left' } : { value, at, side };
      };
      consider(u0, 'right');
      for (const u of rootsIn(derivative(poly), u0, u1)) consider(u, 'right');
      if (u1 > u0) consider(u1, 'left');
    }
    return best!;
  }

  zeros(quantity: Quantity): number[] {
    const { regions, breaks } = this.system.cut;
    const out: number[] = [];
    const scale = Math.abs(this.peak(quantity, 'largest').value);
    if (scale === 0) return out;
    // a value this small next to the peak is rounding, not a crossing away from the break
    const noise = 256 * 2 ** -52 * scale;
    const add = (x: number): void => {
      const before = out[out.length - 1];
      if (before === undefined || x - before > 1e-12 * (breaks[breaks.length - 1]! - breaks[0]!)) out.push(x);
    };
    let previous = 0;
    for (let r = 0; r < regions.length; r++) {
      const region = regions[r]!;
      const poly = this.diagram(r)[quantity];
      if (bound(poly, region.origin) <= noise) {
        continue;
      }
      const start = evaluate(poly, region.origin);
      const startSign = Math.abs(start) <= noise ? 0 : Math.sign(start);
      if (previous !== 0 && startSign !== 0 && startSign !== previous) add(region.x0);
      for (const u of rootsIn(poly, region.origin, region.origin + 1))
        add(region.x0 + (u - region.origin) * region.h);
      const end = evaluate(poly, region.origin + 1);
      if (startSign === 0) add(region.x0);
      if (Math.abs(end) <= noise) add(breaks[r + 1]!);
      previous = Math.abs(end) <= noise ? 0 : Math.sign(end);
    }
    return out.sort((x, y) => x - y);
  }

  pieces(quantity: Quantity): readonly Piece[] {
    return this.system.cut.regions.map((region, r) => ({
      x0: region.x0,
      h: region.h,
      origin: region.origin,
      coefficients: Float64Array.from(this.diagram(r)[quantity]),
    }));
  }

  jumps(quantity: Quantity): readonly number[] {
    const { breaks, regions } = this.system.cut;
    const out: number[] = [];
    const scale = Math.abs(this.peak(quantity, 'largest').value);
    for (let b = 1; b < breaks.length - 1; b++) {
      const left = evaluate(this.diagram(b - 1)[quantity], regions[b - 1]!.origin + 1);
      const right = evaluate(this.diagram(b)[quantity], regions[b]!.origin);
      // continuity holds to rounding of terms no larger than the peak times a small growth
      if (Math.abs(right - left) > 1e-11 * scale) out.push(breaks[b]!);
    }
    return out;
  }

  private reactionList: readonly Reaction[] | null = null;

  reactions(): readonly Reaction[] {
    if (this.reactionList) return this.reactionList;
    const { closed, axial, cut } = this.system;
    const out: Reaction[] = [];
    const lastBreak = cut.breaks.length - 1;
    for (const station of closed.stations) {
      const support = station.support;
      if (!support) continue;
      const b = station.at;
      const before = b > 0 ? this.stateAtEnd(b - 1) : ZERO;
      const after = b < lastBreak ? this.stateAtStart(b) : ZERO;
      const act = [0, 0, 0, 0];
      this.jump(b, act);
      const holdsForce = support.held || support.spring !== 0;
      const holdsCouple = support.clamped || support.rotationalSpring !== 0;
      // A sliding joint's axial force turns the couple N x offset. The jumps keep their digits for soft and for stiff springs alike;
      // k x v would lose those of a stiff one.
      const opened = station.slide ? axial * (after[0]! - before[0]!) : 0;
      out.push({
        at: support.at,
        force: holdsForce ? after[3]! - before[3]! - act[3]! : 0,
        couple: holdsCouple ? after[2]! - before[2]! - act[2]! + opened : 0,
        holdsForce,
        holdsCouple,
      });
    }
    this.reactionList = out;
    return out;
  }
}

const ZERO = [0, 0, 0, 0];
