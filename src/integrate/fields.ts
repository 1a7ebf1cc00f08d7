/**
 * The double integration inside one region: from the state at its left end to the four fields as polynomials.
 *
 *   S' = -q + k v                      vertical force on the section (pushes the left part up), q down, foundation k v up
 *   M' = S - N (v' + w')               N axial force (tension +), w the initial shape (camber); without N this is V = M' = S
 *   t' = -(M/EI + kappa)               t rotation of the section, kappa free curvature
 *   v' = t + M'/GA                     shear deformation
 *
 * with s from the region's left end. Without axial force and foundation the four integrations are done one after the other on
 * polynomials: exact. Otherwise the same equations are solved by their power series (series.ts).
 *
 * Sources: the chain q -> V -> M -> slope -> deflection is the double integration of any text on strength of materials; shear term:
 * Timoshenko's beam; axial term with shear: Engesser's form, in which the shear strain follows the force normal to the deflected axis
 * (Timoshenko & Gere, Theory of Elastic Stability, 2nd ed., section 2.17, cited from memory).
 */
import { addScaled, evaluate, integrateFrom, multiply } from './polynomial';
import { loadPolynomial, noLoad, type Fields, type RegionLoad } from './region-load';
import type { Region } from './regions';
import { integrateSeries, seriesState } from './series';

export function isCoupled(region: Region, axial: number): boolean {
  return axial !== 0 || region.k !== 0;
}

/** Fields from the state y at the region's left end. */
export function integrateRegion(
  region: Region,
  axial: number,
  load: RegionLoad,
  y: readonly number[],
): Fields {
  const v0 = y[0]!;
  const t0 = y[1]!;
  const m0 = y[2]!;
  const s0 = y[3]!;
  if (isCoupled(region, axial)) return integrateSeries(region, axial, load, v0, t0, m0, s0);
  if (region.origin === 0) return prismatic(region, load, v0, t0, m0, s0);
  return varying(region, load, v0, t0, m0, s0);
}

function prismatic(region: Region, load: RegionLoad, v0: number, t0: number, m0: number, s0: number): Fields {
  const { h, f, g } = region;
  const s1 = -h * load.qa;
  const s2 = -0.5 * h * (load.qb - load.qa);
  const m1 = h * s0;
  const m2 = 0.5 * h * s1;
  const m3 = (h * s2) / 3;
  const bend = -h * f;
  const t1 = bend * m0 - h * load.kappa;
  const t2 = 0.5 * bend * m1;
  const t3 = (bend * m2) / 3;
  const t4 = 0.25 * bend * m3;
  const v1 = h * (t0 + g * s0);
  const v2 = 0.5 * h * (t1 + g * s1);
  const v3 = (h * (t2 + g * s2)) / 3;
  return {
    S: [s0, s1, s2],
    M: [m0, m1, m2, m3],
    t: [t0, t1, t2, t3, t4],
    v: [v0, v1, v2, v3, 0.25 * h * t3, 0.2 * h * t4],
  };
}

function varying(region: Region, load: RegionLoad, v0: number, t0: number, m0: number, s0: number): Fields {
  const { h, origin } = region;
  const S = integrateFrom(loadPolynomial(region, load), origin, -h, s0);
  const M = integrateFrom(S, origin, h, m0);
  const bending: number[] = region.fPoly ? multiply(region.fPoly, M) : M.map((c) => region.f * c);
  bending[0]! += load.kappa;
  const t = integrateFrom(bending, origin, -h, t0);
  const incline = region.gPoly ? addScaled(multiply(region.gPoly, S), t, 1) : addScaled(t, S, region.g);
  const v = integrateFrom(incline, origin, h, v0);
  return { v, t, M, S };
}

/** Writes the state at the region's right end caused by `load` alone (zero state at the left end) into out[at..at+3]. */
export function particular(region: Region, axial: number, load: RegionLoad, out: number[], at: number): void {
  if (!isCoupled(region, axial) && region.origin === 0) {
    const { h, f, g } = region;
    const { qa, qb, kappa } = load;
    const h2 = h * h;
    out[at] = (f * h2 * h2 * (4 * qa + qb)) / 120 - (g * h2 * (2 * qa + qb)) / 6 - 0.5 * kappa * h2;
    out[at + 1] = (f * h * h2 * (3 * qa + qb)) / 24 - kappa * h;
    out[at + 2] = (-h2 * (2 * qa + qb)) / 6;
    out[at + 3] = -0.5 * h * (qa + qb);
    return;
  }
  const u = region.origin + 1;
  if (region.origin === 0) {
    seriesState(region, axial, load, ZERO, u, out, at);
    return;
  }
  const fields = integrateRegion(region, axial, load, ZERO);
  out[at] = evaluate(fields.v, u);
  out[at + 1] = evaluate(fields.t, u);
  out[at + 2] = evaluate(fields.M, u);
  out[at + 3] = evaluate(fields.S, u);
}

const ZERO = [0, 0, 0, 0];

/** Transfer matrix of a region, column by column: state at the right end = T x state at the left. Null where `carry` needs none. */
export function transferMatrix(region: Region, axial: number): number[] | null {
  const coupled = isCoupled(region, axial);
  if (!coupled && !region.fPoly && !region.gPoly) return null;
  const T = [1, 0, 0, 0, region.h, 1, 0, 0, 0, 0, 1, 0, 0, 0, region.h, 1];
  const none = noLoad();
  const u = region.origin + 1;
  const unit = [0, 0, 0, 0];
  // without axial force and foundation the first two columns are those of a rigid piece
  for (let j = coupled ? 0 : 2; j < 4; j++) {
    unit.fill(0);
    unit[j] = 1;
    if (coupled && region.origin === 0) {
      seriesState(region, axial, none, unit, u, T, 4 * j);
      continue;
    }
    const fields = integrateRegion(region, axial, none, unit);
    T[4 * j] = evaluate(fields.v, u);
    T[4 * j + 1] = evaluate(fields.t, u);
    T[4 * j + 2] = evaluate(fields.M, u);
    T[4 * j + 3] = evaluate(fields.S, u);
  }
  return T;
}

/** Carries the state y[at..at+3] over a region without load, in place. */
export function carry(region: Region, matrix: readonly number[] | null, y: number[], at: number): void {
  const v = y[at]!;
  const t = y[at + 1]!;
  const m = y[at + 2]!;
  const s = y[at + 3]!;
  if (matrix === null) {
    const { h, f, g } = region;
    const hf = h * f;
    y[at] = v + h * t - 0.5 * h * hf * m + (h * g - (h * h * hf) / 6) * s;
    y[at + 1] = t - hf * m - 0.5 * h * hf * s;
    y[at + 2] = m + h * s;
    return;
  }
  for (let i = 0; i < 4; i++) {
    y[at + i] = matrix[i]! * v + matrix[4 + i]! * t + matrix[8 + i]! * m + matrix[12 + i]! * s;
  }
}
