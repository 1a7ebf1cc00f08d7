/**
 * The self-check of a solution, from quantities the solver did not use to find it:
 * balance of vertical forces and of moments of the whole beam, external work against strain energy (Clapeyron's theorem), and, for each
 * region, its balance and compatibility: the diagrams' values at its right end against the state the closing equations joined there.
 * Each residual is relative to the sum of the absolute values of its own terms, so it has no units.
 */
import type { Residuals } from '../solution';
import { integrateRegion } from './fields';
import { addScaled, derivative, evaluate, multiply, productIntegral } from './polynomial';
import { loadPolynomial, noLoad } from './region-load';
import { BeamResponse, type System } from './response';

/**
 * A solution whose residuals exceed this is refused. Double precision leaves about 1e-15 times the loss of digits of the problem; 1e-7
 * still means seven correct digits in the balance, far beyond any use, while a wrong solution misses by orders of magnitude more.
 */
export const REFUSE = 1e-7;

class Balance {
  private sum = 0;
  private size = 0;
  add(term: number): void {
    this.sum += term;
    this.size += Math.abs(term);
  }
  /** also counts what the terms are made of, so that honest cancellation is not mistaken for an error */
  weigh(size: number): void {
    this.size += Math.abs(size);
  }
  get residual(): number {
    return this.size > 0 ? Math.abs(this.sum) / this.size : 0;
  }
}

/** Checks every load column of a solved system by itself; combinations are sums of checked columns. */
export function selfCheck(system: System): Residuals {
  let equilibrium = 0;
  let energy = 0;
  let conditions = system.closed.conditions;
  for (let c = 0; c < system.columns.count; c++) {
    const weights = new Float64Array(system.columns.count);
    weights[c] = 1;
    const found = checkColumn(system, c, weights);
    equilibrium = Math.max(equilibrium, found.equilibrium);
    energy = Math.max(energy, found.energy);
    conditions = Math.max(conditions, found.conditions);
  }
  return { equilibrium, energy, conditions };
}

/** Part of EI v / l^2 below which moments count as rounding: 2^-20 leaves a factor of 500 between eps and REFUSE. */
const UNSTRESSED = 2 ** -20;

/** Largest mismatch of the four components where regions join, each relative to its own size over the whole beam. */
class Joints {
  private readonly gap = [0, 0, 0, 0];
  private readonly size = [0, 0, 0, 0];
  private motion = 0;

  compare(a: readonly number[], b: Float64Array): void {
    for (let i = 0; i < 4; i++) {
      this.gap[i] = Math.max(this.gap[i]!, Math.abs(a[i]! - b[i]!));
      this.size[i] = Math.max(this.size[i]!, Math.abs(b[i]!));
    }
  }

  /** Sizes tied together through the length and flexibility of a segment: a zero component is only zero to rounding of the others. */
  scale(y: Float64Array, ahead: { length: number; flexibility: number }): void {
    const { length: l, flexibility: f } = ahead;
    this.motion = Math.max(
      this.motion,
      Math.abs(y[0]!),
      l * Math.abs(y[1]!),
      f * l * l * Math.abs(y[2]!),
      f * l * l * l * Math.abs(y[3]!),
    );
    const stiffness = (UNSTRESSED * this.motion) / (f * l * l);
    this.size[0] = Math.max(this.size[0]!, this.motion);
    this.size[1] = Math.max(this.size[1]!, this.motion / l);
    this.size[2] = Math.max(this.size[2]!, stiffness);
    this.size[3] = Math.max(this.size[3]!, stiffness / l);
  }

  get residual(): number {
    let worst = 0;
    for (let i = 0; i < 4; i++) if (this.gap[i]! > 0) worst = Math.max(worst, this.gap[i]! / this.size[i]!);
    return worst;
  }
}

/** For each break that is a station: length and mean flexibility of the segment to its right. */
function segmentsByStart(system: System): ({ length: number; flexibility: number } | undefined)[] {
  const { stations } = system.closed;
  const { regions } = system.cut;
  const out: ({ length: number; flexibility: number } | undefined)[] = [];
  for (let i = 0; i + 1 < stations.length; i++) {
    let length = 0;
    let bend = 0;
    for (let r = stations[i]!.at; r < stations[i + 1]!.at; r++) {
      const region = regions[r]!;
      length += region.h;
      bend += region.h * (region.fPoly ? region.fPoly[0]! : region.f);
    }
    out[stations[i]!.at] = { length, flexibility: bend / length };
  }
  return out;
}

function checkColumn(system: System, column: number, weights: Float64Array): Residuals {
  const { cut, columns, axial, closed } = system;
  const { regions, breaks } = cut;
  const response = new BeamResponse(system, weights);
  const x0 = breaks[0]!;
  const force = new Balance();
  const moment = new Balance();
  const work = new Balance();
  const load = noLoad();
  const supports = new Map(closed.stations.filter((s) => s.support).map((s) => [s.at, s]));
  const reactions = response.reactions();
  let nextReaction = 0;

  const reach = segmentsByStart(system);
  const joints = new Joints();
  const end = [0, 0, 0, 0];
  let vStart = 0;
  let vEnd = 0;
  for (let b = 0; b <= regions.length; b++) {
    const x = breaks[b]! - x0;
    const left = b > 0 ? response.stateAtEnd(b - 1) : null;
    const right = b < regions.length ? response.stateAtStart(b) : null;
    if (!left) vStart = right![0]!;
    if (!right) vEnd = left![0]!;
    const state = right ?? left!;
    force.weigh(state[3]!);
    moment.weigh(state[2]!);
    moment.weigh(axial * state[0]!);
    if (left && b > 0) joints.compare(end, left);
    const ahead = reach[b];
    if (ahead) {
      joints.scale(state, ahead);
      // a beam that is only displaced holds moments of rounding size: eps times EI v / l^2. They are no error.
      const v = Math.max(Math.abs(state[0]!), Math.abs(state[1]!) * ahead.length);
      const stiffness = (UNSTRESSED * v) / (ahead.flexibility * ahead.length ** 2);
      force.weigh(stiffness / ahead.length);
      moment.weigh(stiffness);
      work.weigh((stiffness * v) / ahead.length);
    }
    // concentrated actions and reactions at this break
    const j = columns.jumps ? (b * columns.count + column) * 4 : -1;
    const offset = j >= 0 ? columns.jumps![j]! : 0;
    const kink = j >= 0 ? columns.jumps![j + 1]! : 0;
    let down = j >= 0 ? -columns.jumps![j + 3]! : 0;
    let couple = j >= 0 ? columns.jumps![j + 2]! : 0;
    if (supports.has(b)) {
      const reaction = reactions[nextReaction++]!;
      down -= reaction.force;
      couple += reaction.couple;
      force.weigh(reaction.force);
      moment.weigh(reaction.couple);
    }
    force.add(down);
    moment.add(down * x);
    moment.add(couple);
    const mean = (i: number): number =>
      left && right ? 0.5 * (left[i]! + right[i]!) : left ? left[i]! : right![i]!;
    const opened = left && right ? right[0]! - left[0]! : 0;
    // halves that stand apart under axial force turn the couple N x opening: it works, but it is no load on the whole
    if (opened !== 0 && axial !== 0) couple -= axial * opened;
    work.add(down * mean(0));
    work.add(couple * mean(1));
    work.add(-offset * mean(3));
    work.add(kink * mean(2));
    if (b === regions.length) break;

    // what acts along the region
    const region = regions[b]!;
    columns.read(b, column, load);
    const fields = integrateRegion(region, axial, load, right!);
    const o = region.origin;
    end[0] = evaluate(fields.v, o + 1);
    end[1] = evaluate(fields.t, o + 1);
    end[2] = evaluate(fields.M, o + 1);
    end[3] = evaluate(fields.S, o + 1);
    const h = region.h;
    const q = loadPolynomial(region, load);
    const soil = region.k !== 0 ? fields.v.map((a) => -region.k * a) : null;
    const net = soil ? addScaled(q, soil, 1) : q;
    const one = [1];
    const lever = [x - h * o, h];
    const resultant = h * productIntegral(net, one, o);
    force.add(resultant);
    moment.add(h * productIntegral(net, lever, o));
    if (soil) {
      const size = h * Math.sqrt(productIntegral(soil, soil, o));
      force.weigh(size);
      moment.weigh(size * (x + h));
    }
    work.add(h * productIntegral(net, fields.v, o));
    const bend = region.fPoly ? multiply(region.fPoly, fields.M) : fields.M.map((m) => m * region.f);
    work.add(-h * productIntegral(bend, fields.M, o));
    if (load.kappa !== 0) work.add(-h * load.kappa * productIntegral(fields.M, one, o));
    if (axial !== 0) {
      // v' + w' along the region, and the shear strain v' - rotation
      const incline = derivative(fields.v).map((a) => a / h);
      const initial = [load.w1 - load.w2 * h * o, load.w2 * h];
      const total = addScaled(incline, initial, 1);
      work.add(-h * axial * productIntegral(total, fields.t, o));
      const strain = addScaled(incline, fields.t, -1);
      work.add(-h * productIntegral(strain, fields.S, o));
    } else if (region.gPoly || region.g !== 0) {
      const strain = region.gPoly ? multiply(region.gPoly, fields.S) : fields.S.map((s) => s * region.g);
      work.add(-h * productIntegral(strain, fields.S, o));
    }
  }
  if (axial !== 0) {
    let rise = 0;
    for (let b = 0; b < regions.length; b++) {
      columns.read(b, column, load);
      rise += load.w1 * regions[b]!.h + 0.5 * load.w2 * regions[b]!.h ** 2;
    }
    moment.add(-axial * (vEnd - vStart));
    moment.add(-axial * rise);
  }
  return {
    equilibrium: Math.max(force.residual, moment.residual),
    energy: work.residual,
    conditions: joints.residual,
  };
}
