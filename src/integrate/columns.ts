/**
 * The loads sorted into load columns and regions: what the propagation reads.
 *
 * A column is a group of loads whose response is solved for once: the loads that always act, then one per case. A second-order beam has
 * one column with the combined loads. Arrays are [region][column] (x components), row-major.
 */
import type { BeamModel, Load } from '../beam/model';
import type { Poly } from './polynomial';
import type { RegionLoad } from './region-load';
import { lawAt, type Cut } from './regions';

/** Where a load goes and with which factor; null = it does not take part. */
export type Sorting = (load: Load) => { column: number; factor: number } | null;

export class Columns {
  readonly count: number;
  /** qa, qb per region and column */
  private readonly q: number[] | null;
  private readonly qPoly: Map<number, Poly> | null = null;
  private readonly kappa: number[] | null = null;
  /** w, w1, w2 per region and column: initial shape (positive down) at the region's left end, its slope and the slope's rate */
  private readonly shape: number[] | null = null;
  /** jumps of deflection, slope, moment and vertical force at each break, per column; null where nothing jumps */
  readonly jumps: number[] | null = null;
  /** displacement and rotation of supports, per support and column */
  readonly moved: number[] | null = null;

  /** columns in which anything acts; the others are zero everywhere */
  readonly active: readonly boolean[];

  constructor(model: BeamModel, cut: Cut, count: number, sorting: Sorting) {
    this.count = count;
    const active = new Array<boolean>(count).fill(false);
    this.active = active;
    const regions = cut.regions.length;
    let q: number[] | null = null;
    for (const load of model.loads) {
      const sorted = sorting(load);
      if (!sorted) continue;
      const { column, factor } = sorted;
      active[column] = true;
      switch (load.kind) {
        case 'point':
        case 'couple':
        case 'kink':
        case 'offset': {
          this.jumps ??= zeros((regions + 1) * count * 4);
          const at = (breakIndex(cut.breaks, load.at) * count + column) * 4;
          if (load.kind === 'point') this.jumps[at + 3]! -= factor * load.force;
          else if (load.kind === 'couple') this.jumps[at + 2]! += factor * load.couple;
          else if (load.kind === 'kink') this.jumps[at + 1]! += factor * load.angle;
          else this.jumps[at]! += factor * load.displacement;
          break;
        }
        case 'distributed': {
          const first = breakIndex(cut.breaks, load.from);
          const last = breakIndex(cut.breaks, load.to);
          if (load.law.kind === 'function') {
            this.qPoly ??= new Map();
            for (let r = first; r < last; r++) {
              const key = r * count + column;
              const piece = cut.shapes
                .get(load)!
                .get(r)!
                .map((c) => c * factor);
              const already = this.qPoly.get(key);
              this.qPoly.set(key, already ? sum(already, piece) : piece);
            }
          } else {
            q ??= zeros(regions * count * 2);
            for (let r = first; r < last; r++) {
              const at = (r * count + column) * 2;
              q[at]! += factor * lawAt(load, cut.breaks[r]!);
              q[at + 1]! += factor * lawAt(load, cut.breaks[r + 1]!);
            }
          }
          break;
        }
        case 'curvature': {
          this.kappa ??= zeros(regions * count);
          const last = breakIndex(cut.breaks, load.to);
          for (let r = breakIndex(cut.breaks, load.from); r < last; r++) {
            this.kappa[r * count + column]! += factor * load.curvature;
          }
          break;
        }
        case 'camber': {
          // w(s) = -4 rise t (1 - t), t = (x - from)/(to - from): an upward parabola, so negative in y down
          this.shape ??= zeros(regions * count * 3);
          const length = load.to - load.from;
          const rise = factor * load.rise;
          const last = breakIndex(cut.breaks, load.to);
          for (let r = breakIndex(cut.breaks, load.from); r < last; r++) {
            const at = (r * count + column) * 3;
            const left = cut.breaks[r]! - load.from;
            const right = load.to - cut.breaks[r]!;
            this.shape[at]! -= (4 * rise * left * right) / (length * length);
            this.shape[at + 1]! -= (4 * rise * (right - left)) / (length * length);
            this.shape[at + 2]! += (8 * rise) / (length * length);
          }
          break;
        }
        case 'settlement':
        case 'rotation': {
          this.moved ??= zeros(model.supports.length * count * 2);
          const support = model.supports.findIndex((s) => s.at === load.at);
          const at = (support * count + column) * 2;
          if (load.kind === 'settlement') this.moved[at]! += factor * load.displacement;
          else this.moved[at + 1]! += factor * load.angle;
          break;
        }
        case 'axial':
          break; // part of the equations, not of the loads (see solve.ts)
      }
    }
    this.q = q;
  }

  /** Whether anything acts inside region r in this column; if so it is written into `load`. */
  read(r: number, column: number, load: RegionLoad): boolean {
    const i = r * this.count + column;
    let any = false;
    load.qa = load.qb = load.kappa = load.w1 = load.w2 = 0;
    load.qPoly = null;
    if (this.q && (this.q[2 * i] !== 0 || this.q[2 * i + 1] !== 0)) {
      load.qa = this.q[2 * i]!;
      load.qb = this.q[2 * i + 1]!;
      any = true;
    }
    const piece = this.qPoly?.get(i);
    if (piece) {
      load.qPoly = piece;
      any = true;
    }
    if (this.kappa && this.kappa[i] !== 0) {
      load.kappa = this.kappa[i]!;
      any = true;
    }
    if (this.shape) {
      load.w1 = this.shape[3 * i + 1]!;
      load.w2 = this.shape[3 * i + 2]!;
      if (load.w1 !== 0 || load.w2 !== 0) any = true;
    }
    return any;
  }

  /** Adds weight x this column's load of region r to `load`. */
  accumulate(r: number, weights: readonly number[], load: RegionLoad): void {
    load.qa = load.qb = load.kappa = load.w1 = load.w2 = 0;
    load.qPoly = null;
    for (let c = 0; c < this.count; c++) {
      const weight = weights[c]!;
      if (weight === 0) continue;
      const i = r * this.count + c;
      if (this.q) {
        load.qa += weight * this.q[2 * i]!;
        load.qb += weight * this.q[2 * i + 1]!;
      }
      const piece = this.qPoly?.get(i);
      if (piece) {
        const scaled = piece.map((a) => a * weight);
        load.qPoly = load.qPoly ? sum(load.qPoly, scaled) : scaled;
      }
      if (this.kappa) load.kappa += weight * this.kappa[i]!;
      if (this.shape) {
        load.w1 += weight * this.shape[3 * i + 1]!;
        load.w2 += weight * this.shape[3 * i + 2]!;
      }
    }
  }

  /** Initial shape at the left end of region r: w, slope, rate of slope, weighted; null without camber. */
  initialShape(r: number, weights: readonly number[]): [number, number, number] | null {
    if (!this.shape) return null;
    const out: [number, number, number] = [0, 0, 0];
    for (let c = 0; c < this.count; c++) {
      const at = (r * this.count + c) * 3;
      for (let k = 0; k < 3; k++) out[k]! += weights[c]! * this.shape[at + k]!;
    }
    return out;
  }

  /** Slope of the initial shape just right of break b in one column. */
  shapeSlope(b: number, column: number): number {
    return this.shape ? (this.shape[(b * this.count + column) * 3 + 1] ?? 0) : 0;
  }
}

function zeros(count: number): number[] {
  return new Array<number>(count).fill(0);
}

function sum(p: Poly, q: Poly): Poly {
  const [long, short] = p.length >= q.length ? [p, q] : [q, p];
  const out = long.slice();
  for (let k = 0; k < short.length; k++) out[k]! += short[k]!;
  return out;
}

/** Index of a position that is known to be a break. */
export function breakIndex(breaks: readonly number[], x: number): number {
  let lo = 0;
  let hi = breaks.length - 1;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (breaks[mid]! < x) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}
