/**
 * A smooth function as a polynomial on a short piece, to the last digits.
 *
 * The function is interpolated in 17 Chebyshev points; the piece is short enough when the last Chebyshev coefficients have fallen to
 * rounding level (Trefethen, Approximation Theory and Approximation Practice, SIAM 2013, chapters 3 and 8: the coefficients of a
 * function that is analytic around the piece fall geometrically). A piece that passes has its singularities far away, so its power
 * series about the piece's middle falls as fast, and the change of basis below loses nothing.
 */
import type { Poly } from './polynomial';

const N = 16;
/** Rounding in 17 values and their sums leaves the tail at a few eps; 16 eps of the largest coefficient is called converged. */
const TAIL = 16 * 2 ** -52;

let cosines: Float64Array | null = null;
let toPowers: Float64Array[] | null = null;

function tables(): { cosines: Float64Array; toPowers: Float64Array[] } {
  if (!cosines || !toPowers) {
    cosines = new Float64Array(2 * N);
    for (let i = 0; i < 2 * N; i++) cosines[i] = Math.cos((Math.PI * i) / N);
    // T_k in powers of t, then t = 2u
    toPowers = [new Float64Array([1]), new Float64Array([0, 1])];
    for (let k = 2; k <= N; k++) {
      const row = new Float64Array(k + 1);
      const a = toPowers[k - 1]!;
      const b = toPowers[k - 2]!;
      for (let i = 0; i < a.length; i++) row[i + 1] = 2 * a[i]!;
      for (let i = 0; i < b.length; i++) row[i]! -= b[i]!;
      toPowers.push(row);
    }
  }
  return { cosines, toPowers };
}

export type Fit =
  | { readonly state: 'fitted'; readonly poly: Poly }
  | { readonly state: 'too-long' }
  | { readonly state: 'bad'; readonly x: number };

/**
 * Fits f on a..b in u = (x - a)/(b - a) - 1/2, u in -1/2..1/2.
 * `accept` is asked of every sample: false makes the fit 'bad' at that x (not finite, or not positive where it must be).
 * `force` takes the piece as it is (used at the smallest width, see regions.ts).
 */
export function fitPiece(
  f: (x: number) => number,
  a: number,
  b: number,
  accept: (y: number) => boolean,
  force: boolean,
): Fit {
  const { cosines: cos, toPowers: powers } = tables();
  const mid = 0.5 * (a + b);
  const half = 0.5 * (b - a);
  const y = new Float64Array(N + 1);
  for (let j = 0; j <= N; j++) {
    // the ends are taken a hair inside, so that a law that jumps at a break is read on this piece's side
    const x = j === 0 ? b - half * 2 ** -50 : j === N ? a + half * 2 ** -50 : mid + half * cos[j]!;
    const value = f(x);
    if (!accept(value)) return { state: 'bad', x };
    y[j] = value;
  }
  const c = new Float64Array(N + 1);
  let largest = 0;
  for (let k = 0; k <= N; k++) {
    let sum = 0.5 * (y[0]! + (k % 2 === 0 ? y[N]! : -y[N]!));
    for (let j = 1; j < N; j++) sum += y[j]! * cos[(j * k) % (2 * N)]!;
    c[k] = (sum * (k === 0 || k === N ? 1 : 2)) / N;
    largest = Math.max(largest, Math.abs(c[k]!));
  }
  // A value cannot be known better than the rounding of x inside the law lets it: eps |x| |f'|. Near a root of 1 - x/L that, not
  // the value's own rounding, is where the coefficients level off.
  let steepest = 0;
  for (let j = 0; j < N; j++) {
    steepest = Math.max(steepest, Math.abs(y[j + 1]! - y[j]!) / (half * (cos[j]! - cos[j + 1]!)));
  }
  const level = TAIL * largest + 8 * 2 ** -52 * Math.max(Math.abs(a), Math.abs(b)) * steepest;
  if (!force) {
    for (let k = N - 2; k <= N; k++) if (Math.abs(c[k]!) > level) return { state: 'too-long' };
  }
  let top = N;
  while (top > 0 && Math.abs(c[top]!) <= 2 ** -54 * largest) top--;
  const poly = new Array<number>(top + 1).fill(0);
  for (let k = 0; k <= top; k++) {
    const row = powers[k]!;
    for (let i = 0; i < row.length; i++) poly[i]! += c[k]! * row[i]!;
  }
  let scale = 1;
  for (let i = 0; i <= top; i++) {
    poly[i]! *= scale;
    scale *= 2;
  }
  if (!force) {
    // aliasing guard: two places that are no Chebyshev points must agree as well
    for (const u of [0.1837, -0.3519]) {
      const value = f(a + (u + 0.5) * (b - a));
      let sum = 0;
      for (let k = top; k >= 0; k--) sum = sum * u + poly[k]!;
      if (Math.abs(sum - value) > 8 * level) return { state: 'too-long' };
    }
  }
  return { state: 'fitted', poly };
}
