/**
 * One element of the oracle: the beam equations over a short stretch, solved as power series in t = (x - x0)/h in long arithmetic.
 *
 *   EI theta' = -(M + EI kappa)       kappa free curvature
 *   v' = theta + gamma,  (GA + N) gamma = S - N (theta + w'),  M' = S - N (v' + w')     w initial shape, positive down
 *   S' = -q + k v
 *
 * with N the axial force (tension positive) and the signs of src/beam/model.ts. From the series come the element's stiffness matrix
 * and end forces: the oracle is a displacement method (unknown joint deflections and rotations), the engine is not.
 */
import { Big, currentBits } from './oracle-number';

/** Power series in t, lowest power first. */
export type Series = Big[];
export const FIELDS = ['v', 'theta', 'M', 'S', 'V'] as const;
export type Field = (typeof FIELDS)[number];

export interface ElementData {
  readonly x0: number;
  readonly x1: number;
  /** EI as a polynomial in t */
  readonly ei: Series;
  /** GA as a polynomial in t; null = rigid in shear */
  readonly ga: Series | null;
  readonly k: Big;
  readonly axial: Big;
  readonly q: Series;
  readonly kappa: Big;
  /** slope of the initial shape, dw/dx, as a polynomial in t */
  readonly camberSlope: Series;
}

type Solution = Record<Field, Series>;

const MAX_TERMS = 1200;

export class Element {
  readonly h: Big;
  /** columns: unit v, unit theta, unit M, unit S at t = 0, then the loads alone */
  private readonly solutions: Solution[];
  /** stiffness 4x4 for (v0, theta0, v1, theta1) -> (-S0, M0, S1, -M1): symmetric; and the same end forces of the loads alone */
  readonly stiffness: Big[][];
  readonly loadForces: Big[];
  /** the state (v, theta, M, S) at t = 0 and then the fields, once the joints are known */
  private fields: Solution | null = null;

  constructor(readonly data: ElementData) {
    this.h = Big.of(data.x1).minus(Big.of(data.x0));
    this.solutions = this.expand();
    const at1 = this.solutions.map((s) => [sum(s.v), sum(s.theta), sum(s.M), sum(s.S)]);
    const T = (row: number, column: number): Big => at1[column]![row]!;
    // (v1, theta1) = A (v0, theta0) + B (M0, S0) + c  ->  (M0, S0) = B^-1 ((v1, theta1) - A (v0, theta0) - c)
    const det = T(0, 2)
      .times(T(1, 3))
      .minus(T(0, 3).times(T(1, 2)));
    const inverse = [
      [T(1, 3).over(det), T(0, 3).negated().over(det)],
      [T(1, 2).negated().over(det), T(0, 2).over(det)],
    ];
    const startForces = (v0: Big, t0: Big, v1: Big, t1: Big, loaded: boolean): [Big, Big] => {
      const c = loaded ? [T(0, 4), T(1, 4)] : [Big.zero, Big.zero];
      const a = v1.minus(T(0, 0).times(v0)).minus(T(0, 1).times(t0)).minus(c[0]!);
      const b = t1.minus(T(1, 0).times(v0)).minus(T(1, 1).times(t0)).minus(c[1]!);
      return [
        inverse[0]![0]!.times(a).plus(inverse[0]![1]!.times(b)),
        inverse[1]![0]!.times(a).plus(inverse[1]![1]!.times(b)),
      ];
    };
    this.start = startForces;
    const ends = (v0: Big, t0: Big, v1: Big, t1: Big, loaded: boolean): Big[] => {
      const [M0, S0] = startForces(v0, t0, v1, t1, loaded);
      const end = (row: number): Big => {
        let value = T(row, 0)
          .times(v0)
          .plus(T(row, 1).times(t0))
          .plus(T(row, 2).times(M0))
          .plus(T(row, 3).times(S0));
        if (loaded) value = value.plus(T(row, 4));
        return value;
      };
      return [S0.negated(), M0, end(3), end(2).negated()];
    };
    const [o, l] = [Big.zero, Big.one];
    const columns = [
      ends(l, o, o, o, false),
      ends(o, l, o, o, false),
      ends(o, o, l, o, false),
      ends(o, o, o, l, false),
    ];
    this.stiffness = [0, 1, 2, 3].map((row) => columns.map((column) => column[row]!));
    this.loadForces = ends(o, o, o, o, true);
  }

  private readonly start: (v0: Big, t0: Big, v1: Big, t1: Big, loaded: boolean) => [Big, Big];

  /** Tells the element where its ends went. */
  settle(v0: Big, t0: Big, v1: Big, t1: Big): void {
    const [M0, S0] = this.start(v0, t0, v1, t1, true);
    const weights = [v0, t0, M0, S0, Big.one];
    const combine = (field: Field): Series => {
      const out: Series = [];
      this.solutions.forEach((s, column) => {
        s[field].forEach((c, n) => {
          out[n] = (out[n] ?? Big.zero).plus(c.times(weights[column]!));
        });
      });
      return out;
    };
    this.fields = {
      v: combine('v'),
      theta: combine('theta'),
      M: combine('M'),
      S: combine('S'),
      V: combine('V'),
    };
  }

  value(field: Field, x: number): Big {
    if (!this.fields) throw new Error('settle the element first');
    if (x === this.data.x1) return sum(this.fields[field]);
    if (x === this.data.x0) return this.fields[field][0] ?? Big.zero;
    return evaluate(this.fields[field], Big.of(x).minus(Big.of(this.data.x0)).over(this.h));
  }

  private expand(): Solution[] {
    const { ei, ga, k, axial, q, kappa, camberSlope } = this.data;
    const h = this.h;
    const soft = ga ? ga.map((c, n) => (n === 0 ? c.plus(axial) : c)) : null;
    const bends = !k.isZero || !axial.isZero;
    const degree = Math.max(ei.length, soft?.length ?? 1, q.length, camberSlope.length) + 4;
    const solutions: Solution[] = [];
    const inner: { kappa: Series; gamma: Series }[] = [];
    for (let s = 0; s < 5; s++) {
      const first = (i: number): Series => [i === s ? Big.one : Big.zero];
      solutions.push({ v: first(0), theta: first(1), M: first(2), S: first(3), V: [] });
      inner.push({ kappa: [], gamma: [] });
    }
    const pivot = Big.one.over(ei[0]!);
    const softPivot = soft ? Big.one.over(soft[0]!) : Big.zero;
    const peaks = solutions.map(() => [-Infinity, -Infinity, -Infinity, -Infinity]);
    let quiet = 0;
    for (let n = 0; ; n++) {
      let small = true;
      for (let s = 0; s < 5; s++) {
        const { v, theta, M, S, V } = solutions[s]!;
        const { kappa: bending, gamma } = inner[s]!;
        const loaded = s === 4;
        const coefficients = [v[n]!, theta[n]!, M[n]!, S[n]!];
        coefficients.forEach((c, i) => {
          const size = c.magnitude;
          const peak = peaks[s]!;
          if (size > peak[i]!) peak[i] = size;
          if (size > peak[i]! - currentBits() - 8) small = false;
        });
        let c = M[n]!;
        for (let j = 1; j <= n && j < ei.length; j++) c = c.minus(ei[j]!.times(bending[n - j]!));
        bending[n] = ei.length > 1 || !c.isZero ? c.times(pivot) : Big.zero;
        const tilt = loaded && n < camberSlope.length ? theta[n]!.plus(camberSlope[n]!) : theta[n]!;
        const normal = axial.isZero ? S[n]! : S[n]!.minus(axial.times(tilt));
        if (soft) {
          let g = normal;
          for (let j = 1; j <= n && j < soft.length; j++) g = g.minus(soft[j]!.times(gamma[n - j]!));
          gamma[n] = g.times(softPivot);
        } else gamma[n] = Big.zero;
        V[n] = axial.isZero ? S[n]! : normal.minus(axial.times(gamma[n]!));
        const step = h.over(Big.of(n + 1));
        v[n + 1] = step.times(theta[n]!.plus(gamma[n]!));
        theta[n + 1] = step.times(loaded && n === 0 ? bending[n]!.plus(kappa) : bending[n]!).negated();
        M[n + 1] = step.times(V[n]!);
        let down = bends && !k.isZero ? k.times(v[n]!).negated() : Big.zero;
        if (loaded && n < q.length) down = down.plus(q[n]!);
        S[n + 1] = step.times(down).negated();
      }
      quiet = small && n >= degree ? quiet + 1 : 0;
      if (quiet >= 5) break;
      if (n > MAX_TERMS) throw new Error('oracle: the series does not settle; the element is too long');
    }
    return solutions;
  }
}

function sum(series: Series): Big {
  let total = Big.zero;
  for (let n = series.length - 1; n >= 0; n--) total = total.plus(series[n]!);
  return total;
}

export function evaluate(series: Series, t: Big): Big {
  let total = Big.zero;
  for (let n = series.length - 1; n >= 0; n--) total = total.times(t).plus(series[n]!);
  return total;
}
