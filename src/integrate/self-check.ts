/**
 * The self-check of a solution, from quantities the solver did not use to find it:
 * balance of vertical forces and of moments of the whole beam, and external work against strain energy (Clapeyron's theorem).
 * Each residual is relative to the sum of the absolute values of its own terms, so it has no units.
 */
import type { Residuals } from '../solution';
import { integrateRegion } from './fields';
import { addScaled, derivative, multiply, productIntegral } from './polynomial';
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
  for (let c = 0; c < system.columns.count; c++) {
    const weights = new Float64Array(system.columns.count);
    weights[c] = 1;
    const [balance, work] = checkColumn(system, c, weights);
    equilibrium = Math.max(equilibrium, balance);
    energy = Math.max(energy, work);
  }
  return { equilibrium, energy, conditions: system.closed.conditions };
}

/** Part of EI v / l^2 below which moments count as rounding: 2^-20 leaves a factor of 500 between eps and REFUSE. */
const UNSTRESSED = 2 ** -20;

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

function checkColumn(system: System, column: number, weights: Float64Array): [number, number] {
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
    const ahead = reach[b];
    if (ahead) {
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
    let couple = j >= 0 ? columns.jumps![j + 2]! - axial * offset : 0;
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
    // a sliding joint under axial force turns the couple N x offset
    if (opened !== offset && axial !== 0 && left && right) couple -= axial * (opened - offset);
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
  return [Math.max(force.residual, moment.residual), work.residual];
}
