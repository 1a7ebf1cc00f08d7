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
import { integrateSeries } from './series';

/** Order of a state vector everywhere in src/integrate: deflection, rotation, moment, vertical force. */
export type State = Float64Array;

export function isCoupled(region: Region, axial: number): boolean {
  return axial !== 0 || region.k !== 0;
}

/** Fields from the state y[offset..offset+3] at the region's left end. */
export function integrateRegion(
  region: Region,
  axial: number,
  load: RegionLoad,
  y: ArrayLike<number>,
  offset = 0,
): Fields {
  const v0 = y[offset]!;
  const t0 = y[offset + 1]!;
  const m0 = y[offset + 2]!;
  const s0 = y[offset + 3]!;
  if (isCoupled(region, axial)) return integrateSeries(region, axial, load, v0, t0, m0, s0);
  if (region.origin === 0) return prismatic(region, load, v0, t0, m0, s0);
  return varying(region, load, v0, t0, m0, s0);
}

function prismatic(region: Region, load: RegionLoad, v0: number, t0: number, m0: number, s0: number): Fields {
  const { h, f, g } = region;
  const { qa, kappa } = load;
  const dq = load.qb - qa;
  const S = new Float64Array(dq !== 0 ? 3 : qa !== 0 ? 2 : 1);
  const n = S.length;
  const M = new Float64Array(n + 1);
  const t = new Float64Array(n + 2);
  const v = new Float64Array(n + 3);
  S[0] = s0;
  if (n > 1) S[1] = -h * qa;
  if (n > 2) S[2] = -0.5 * h * dq;
  M[0] = m0;
  for (let k = 0; k < n; k++) M[k + 1] = (h * S[k]!) / (k + 1);
  t[0] = t0;
  t[1] = -h * (f * m0 + kappa);
  for (let k = 1; k <= n; k++) t[k + 1] = (-h * f * M[k]!) / (k + 1);
  v[0] = v0;
  for (let k = 0; k <= n + 1; k++) v[k + 1] = (h * (t[k]! + (k < n ? g * S[k]! : 0))) / (k + 1);
  return { v, t, M, S };
}

function varying(region: Region, load: RegionLoad, v0: number, t0: number, m0: number, s0: number): Fields {
  const { h, origin } = region;
  const S = integrateFrom(loadPolynomial(region, load), origin, -h, s0);
  const M = integrateFrom(S, origin, h, m0);
  const bending = region.fPoly ? multiply(region.fPoly, M) : M.map((c) => region.f * c);
  bending[0]! += load.kappa;
  const t = integrateFrom(bending, origin, -h, t0);
  const incline = region.gPoly ? addScaled(multiply(region.gPoly, S), t, 1) : addScaled(t, S, region.g);
  const v = integrateFrom(incline, origin, h, v0);
  return { v, t, M, S };
}

/** Writes the state at the region's right end caused by `load` alone (zero state at the left end) into out[at..at+3]. */
export function particular(
  region: Region,
  axial: number,
  load: RegionLoad,
  out: Float64Array,
  at: number,
): void {
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
  const fields = integrateRegion(region, axial, load, ZERO);
  const u = region.origin + 1;
  out[at] = evaluate(fields.v, u);
  out[at + 1] = evaluate(fields.t, u);
  out[at + 2] = evaluate(fields.M, u);
  out[at + 3] = evaluate(fields.S, u);
}

const ZERO = new Float64Array(4);

/** Transfer matrix of a region (row-major 4x4): state at the right end = T x state at the left end, without load. */
export function transfer(region: Region, axial: number): Float64Array {
  const T = new Float64Array(16);
  const { h, f, g } = region;
  if (!isCoupled(region, axial)) {
    T[0] = T[5] = T[10] = T[15] = 1;
    T[1] = h;
    T[11] = h;
    if (region.origin === 0 || (!region.fPoly && !region.gPoly)) {
      T[6] = -h * f;
      T[2] = 0.5 * h * T[6];
      T[7] = T[2];
      T[3] = (-h * h * h * f) / 6 + h * g;
      return T;
    }
  }
  const none = noLoad();
  const u = region.origin + 1;
  const unit = new Float64Array(4);
  for (let j = isCoupled(region, axial) ? 0 : 2; j < 4; j++) {
    unit.fill(0);
    unit[j] = 1;
    const fields = integrateRegion(region, axial, none, unit);
    T[j] = evaluate(fields.v, u);
    T[4 + j] = evaluate(fields.t, u);
    T[8 + j] = evaluate(fields.M, u);
    T[12 + j] = evaluate(fields.S, u);
  }
  return T;
}
