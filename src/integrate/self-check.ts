/**
 * The self-check of a solution, from quantities the solver did not use to find it:
 * balance of vertical forces and of moments of the whole beam, external work against strain energy (Clapeyron's theorem), and, for each
 * region, its balance and compatibility: the diagrams' values at its right end against the state the closing equations joined there.
 * Each residual is relative to the sum of the absolute values of its own terms, so it has no units.
 */
import type { Residuals } from '../solution';
import { addScaled, derivative, evaluate, multiply, productIntegral } from './polynomial';
import { loadPolynomial, noLoad } from './region-load';
import { addJump } from './closing';
import { carry, integrateRegion, particular } from './fields';
import type { System } from './response';

/**
 * A solution whose residuals exceed this is refused. Double precision leaves about 1e-15 times the loss of digits of the problem; 1e-7
 * still means seven correct digits in the balance, far beyond any use, while a wrong solution misses by orders of magnitude more.
 */
export const REFUSE = 1e-7;

/** Products of tiny loads lose their digits to underflow; below this nothing can be said, and nothing is there. */
const UNDERFLOW = 2 ** -960;

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
    return this.size > UNDERFLOW ? Math.abs(this.sum) / this.size : 0;
  }
}

/** Checks every load column of a solved system by itself; combinations are sums of checked columns. */
export function selfCheck(system: System): Residuals {
  let equilibrium = 0;
  let energy = 0;
  let conditions = system.closed.conditions;
  const reach = segmentsByStart(system);
  for (let c = 0; c < system.columns.count; c++) {
    if (!system.columns.active[c]) continue;
    const found = checkColumn(system, c, reach);
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

  compare(a: readonly number[], b: readonly number[]): void {
    for (let i = 0; i < 4; i++) {
      this.gap[i] = Math.max(this.gap[i]!, Math.abs(a[i]! - b[i]!));
      this.size[i] = Math.max(this.size[i]!, Math.abs(b[i]!));
    }
  }

  /** Sizes tied together through the length and flexibility of a segment: a zero component is only zero to rounding of the others. */
  scale(y: readonly number[], ahead: Reach): void {
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
    for (let i = 0; i < 4; i++)
      if (this.size[i]! > UNDERFLOW) worst = Math.max(worst, this.gap[i]! / this.size[i]!);
    return worst;
  }
}

/** Length and mean flexibility of the segment right of each station. */
interface Reach {
  readonly length: number;
  readonly flexibility: number;
}

function segmentsByStart(system: System): Reach[] {
  const { stations } = system.closed;
  const { regions } = system.cut;
  const out: Reach[] = [];
  for (let i = 0; i + 1 < stations.length; i++) {
    let length = 0;
    let bend = 0;
    for (let r = stations[i]!.at; r < stations[i + 1]!.at; r++) {
      const region = regions[r]!;
      length += region.h;
      bend += region.h * (region.fPoly ? region.fPoly[0]! : region.f);
    }
    out.push({ length, flexibility: bend / length });
  }
  return out;
}

function checkColumn(system: System, column: number, reach: readonly Reach[]): Residuals {
  const { cut, columns, axial, closed, matrices } = system;
  const { regions, breaks } = cut;
  const { stations, states } = closed;
  const C = columns.count;
  const x0 = breaks[0]!;
  const force = new Balance();
  const moment = new Balance();
  const work = new Balance();
  const load = noLoad();
  const joints = new Joints();
  const one = [1];
  const end = [0, 0, 0, 0];
  const own = [0, 0, 0, 0];
  /** states just left and just right of the break */
  const leftBuffer = [0, 0, 0, 0];
  const rightBuffer = [0, 0, 0, 0];
  const lever = [0, 0];
  let left: number[] | null = null;
  let right: number[] | null = null;
  let vStart = 0;
  let vEnd = 0;
  let next = 0;
  for (let b = 0; b <= regions.length; b++) {
    const x = breaks[b]! - x0;
    const station = stations[next]!.at === b ? stations[next]! : null;
    if (b === regions.length) right = null;
    else if (station) {
      const at = (next * C + column) * 4;
      right = rightBuffer;
      for (let i = 0; i < 4; i++) right[i] = states[at + i]!;
    } else {
      right = rightBuffer;
      for (let i = 0; i < 4; i++) right[i] = left![i]!;
      addJump(columns, b, column, axial, 1, right, 0);
    }
    if (!left) vStart = right![0]!;
    if (!right) vEnd = left![0]!;
    const state = right ?? left!;
    force.weigh(state[3]!);
    moment.weigh(state[2]!);
    moment.weigh(axial * state[0]!);
    if (left) joints.compare(end, left);
    const ahead = station && right ? reach[next]! : null;
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
    const j = columns.jumps ? (b * C + column) * 4 : -1;
    const offset = j >= 0 ? columns.jumps![j]! : 0;
    const kink = j >= 0 ? columns.jumps![j + 1]! : 0;
    let down = j >= 0 ? -columns.jumps![j + 3]! : 0;
    let couple = j >= 0 ? columns.jumps![j + 2]! : 0;
    const opened = left && right ? right[0]! - left[0]! : 0;
    if (station) {
      next++;
      const support = station.support;
      if (support && (support.held || support.spring !== 0)) {
        const reaction = (right ? right[3]! : 0) - (left ? left[3]! : 0) + down;
        down -= reaction;
        force.weigh(reaction);
      }
      if (support && (support.clamped || support.rotationalSpring !== 0)) {
        const reaction =
          (right ? right[2]! : 0) -
          (left ? left[2]! : 0) -
          couple +
          axial * (station.slide ? opened : offset);
        couple += reaction;
        moment.weigh(reaction);
      }
    }
    force.add(down);
    moment.add(down * x);
    moment.add(couple);
    const mean = (i: number): number =>
      left && right ? 0.5 * (left[i]! + right[i]!) : left ? left[i]! : right![i]!;
    // halves that stand apart under axial force turn the couple N x opening: it works, but it is no load on the whole
    if (opened !== 0 && axial !== 0) couple -= axial * opened;
    work.add(down * mean(0));
    work.add(couple * mean(1));
    work.add(-(station?.slide ? opened : offset) * mean(3));
    work.add(kink * mean(2));
    if (b === regions.length) break;

    // what acts along the region
    const region = regions[b]!;
    columns.read(b, column, load);
    const fields = integrateRegion(region, axial, load, right!);
    left = leftBuffer;
    for (let i = 0; i < 4; i++) left[i] = right![i]!;
    carry(region, matrices[b]!, left, 0);
    particular(region, axial, load, own, 0);
    for (let i = 0; i < 4; i++) left[i]! += own[i]!;
    const o = region.origin;
    end[0] = evaluate(fields.v, o + 1);
    end[1] = evaluate(fields.t, o + 1);
    end[2] = evaluate(fields.M, o + 1);
    end[3] = evaluate(fields.S, o + 1);
    const h = region.h;
    const q = loadPolynomial(region, load);
    const soil = region.k !== 0 ? fields.v.map((a) => -region.k * a) : null;
    const net = soil ? addScaled(q, soil, 1) : q;
    lever[0] = x - h * o;
    lever[1] = h;
    const resultant = h * productIntegral(net, one, o);
    force.add(resultant);
    moment.add(h * productIntegral(net, lever, o));
    if (soil) {
      const size = h * Math.sqrt(productIntegral(soil, soil, o));
      force.weigh(size);
      moment.weigh(size * (x + h));
    }
    work.add(h * productIntegral(net, fields.v, o));
    work.add(
      region.fPoly
        ? -h * productIntegral(multiply(region.fPoly, fields.M), fields.M, o)
        : -h * region.f * productIntegral(fields.M, fields.M, o),
    );
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
      work.add(
        region.gPoly
          ? -h * productIntegral(multiply(region.gPoly, fields.S), fields.S, o)
          : -h * region.g * productIntegral(fields.S, fields.S, o),
      );
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
