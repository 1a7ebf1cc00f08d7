/**
 * What acts inside one region, and the four fields that answer it. Coefficients are those of u (see Region.origin).
 */
import { addScaled, type Poly } from './polynomial';
import type { Region } from './regions';

/** What acts inside one region, for one load column or for a combination. */
export interface RegionLoad {
  /** distributed load at the region's left and right end, linear between */
  qa: number;
  qb: number;
  /** further distributed load as a fitted polynomial (origin -0.5), or null */
  qPoly: Poly | null;
  /** free curvature */
  kappa: number;
  /** initial shape w, positive down: its slope at the left end and the constant rate of its slope */
  w1: number;
  w2: number;
}

export interface Fields {
  readonly v: Poly;
  readonly t: Poly;
  readonly M: Poly;
  readonly S: Poly;
}

export function noLoad(): RegionLoad {
  return { qa: 0, qb: 0, qPoly: null, kappa: 0, w1: 0, w2: 0 };
}

/** The distributed load of a region in its own coordinate u. */
export function loadPolynomial(region: Region, load: RegionLoad): Poly {
  const { qa, qb, qPoly } = load;
  const linear = region.origin === 0 ? [qa, qb - qa] : [0.5 * (qa + qb), qb - qa];
  return qPoly ? addScaled(qPoly, linear, 1) : linear;
}
