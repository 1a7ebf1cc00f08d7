/**
 * A region with axial force or elastic foundation (or both, or with varying stiffness): the equations of fields.ts by power series.
 *
 * The closed forms of these regions are well known: cos, sin of s sqrt(P/EI) for a strut and cosh, sinh for a tie (Timoshenko & Gere,
 * Theory of Elastic Stability, ch. 1), e^(+-bs) cos bs, e^(+-bs) sin bs with b^4 = k/4EI on a foundation (Hetenyi, Beams on Elastic
 * Foundation, ch. 1; both cited from memory). All of them are entire functions of s and of the parameter: one power series
 * holds for tie, strut, foundation and their limits, and as the parameter goes to 0 its terms vanish one by one and leave the polynomial of the plain
 * beam; there is no switch at which digits could be lost. Regions are cut so short (growth <= 1, regions.ts) that some twenty terms reach
 * rounding level and no term exceeds the result; long stiff stretches become many regions, joined by the closing equations, and nothing
 * overflows. Tests compare with the closed forms over 30 decades of the parameter.
 */
import { evaluate } from './polynomial';
import { loadPolynomial, noLoad, type Fields, type RegionLoad } from './region-load';
import type { Region } from './regions';

/** More terms than ever needed with growth <= 1 and laws fitted to degree 16; the sum stops by itself far earlier. */
const MAX_TERMS = 72;
const NEGLIGIBLE = 2 ** -60;

const v = new Float64Array(MAX_TERMS + 2);
const t = new Float64Array(MAX_TERMS + 2);
const m = new Float64Array(MAX_TERMS + 2);
const s = new Float64Array(MAX_TERMS + 2);

export function integrateSeries(
  region: Region,
  axial: number,
  load: RegionLoad,
  v0: number,
  t0: number,
  m0: number,
  s0: number,
): Fields {
  if (region.origin === 0) return expand(region, axial, load, v0, t0, m0, s0);
  // the series stands in the middle of the region: find the middle state that gives the left one
  const left = evaluateAll(expand(region, axial, load, 0, 0, 0, 0), -0.5);
  const start = [v0 - left[0]!, t0 - left[1]!, m0 - left[2]!, s0 - left[3]!];
  const c = solveScaled(toLeft(region, axial), start, region);
  return expand(region, axial, load, c[0]!, c[1]!, c[2]!, c[3]!);
}

/** Writes the state at u (v, rotation, M, S) into out[at..at+3], from the state at u = 0 (regions with origin 0 only). */
export function seriesState(
  region: Region,
  axial: number,
  load: RegionLoad,
  start: readonly number[],
  u: number,
  out: number[],
  at: number,
): void {
  const n = run(region, axial, load, start[0]!, start[1]!, start[2]!, start[3]!);
  let a = 0;
  let b = 0;
  let c = 0;
  let d = 0;
  for (let k = n - 1; k >= 0; k--) {
    a = a * u + v[k]!;
    b = b * u + t[k]!;
    c = c * u + m[k]!;
    d = d * u + s[k]!;
  }
  out[at] = a;
  out[at + 1] = b;
  out[at + 2] = c;
  out[at + 3] = d;
}

const lefts = new WeakMap<Region, { axial: number; matrix: Float64Array }>();

/** Homogeneous map from the middle of a region to its left end (row-major 4x4), kept with the region. */
function toLeft(region: Region, axial: number): Float64Array {
  const known = lefts.get(region);
  if (known && known.axial === axial) return known.matrix;
  const matrix = new Float64Array(16);
  const none = noLoad();
  for (let j = 0; j < 4; j++) {
    const f = expand(region, axial, none, j === 0 ? 1 : 0, j === 1 ? 1 : 0, j === 2 ? 1 : 0, j === 3 ? 1 : 0);
    const column = evaluateAll(f, -0.5);
    for (let i = 0; i < 4; i++) matrix[4 * i + j] = column[i]!;
  }
  lefts.set(region, { axial, matrix });
  return matrix;
}

function evaluateAll(f: Fields, u: number): number[] {
  return [evaluate(f.v, u), evaluate(f.t, u), evaluate(f.M, u), evaluate(f.S, u)];
}

/** Typical flexibility of the region: only a scale. */
function scaleOf(region: Region): number {
  return region.fPoly ? Math.abs(region.fPoly[0]!) : region.f;
}

/** Solves A c = b with v, h t, f h^2 M, f h^3 S as variables, in which A is near the identity. */
function solveScaled(A: Float64Array, b: number[], region: Region): number[] {
  const h = region.h;
  const f = scaleOf(region);
  const d = [1, h, f * h * h, f * h * h * h];
  const a: number[][] = [];
  for (let i = 0; i < 4; i++) {
    a.push([0, 1, 2, 3].map((j) => (d[i]! * A[4 * i + j]!) / d[j]!));
    a[i]!.push(d[i]! * b[i]!);
  }
  for (let c = 0; c < 4; c++) {
    let p = c;
    for (let r = c + 1; r < 4; r++) if (Math.abs(a[r]![c]!) > Math.abs(a[p]![c]!)) p = r;
    [a[c], a[p]] = [a[p]!, a[c]!];
    for (let r = c + 1; r < 4; r++) {
      const k = a[r]![c]! / a[c]![c]!;
      for (let j = c; j < 5; j++) a[r]![j]! -= k * a[c]![j]!;
    }
  }
  const x = [0, 0, 0, 0];
  for (let r = 3; r >= 0; r--) {
    let sum = a[r]![4]!;
    for (let c = r + 1; c < 4; c++) sum -= a[r]![c]! * x[c]!;
    x[r] = sum / a[r]![r]!;
  }
  return x.map((value, i) => value / d[i]!);
}

function copy(from: Float64Array, length: number): number[] {
  const out: number[] = [];
  for (let k = 0; k < length; k++) out.push(from[k]!);
  return out;
}

/** The series about u = 0 from the state there, as four polynomials. */
function expand(
  region: Region,
  axial: number,
  load: RegionLoad,
  v0: number,
  t0: number,
  m0: number,
  s0: number,
): Fields {
  const n = run(region, axial, load, v0, t0, m0, s0);
  return { v: copy(v, n), t: copy(t, n), M: copy(m, n), S: copy(s, n) };
}

/** Fills the coefficients v, t, m, s and returns how many there are. */
function run(
  region: Region,
  axial: number,
  load: RegionLoad,
  v0: number,
  t0: number,
  m0: number,
  s0: number,
): number {
  const { h, k, fPoly, gPoly } = region;
  const N = axial;
  const q = loadPolynomial(region, load);
  // slope of the initial shape at u: wa + wb u
  const wb = load.w2 * h;
  const wa = load.w1 - region.origin * wb;
  const f = region.f;
  const g = region.g;
  const scale = scaleOf(region);
  const hM = scale * h * h;
  const hS = hM * h;
  v[0] = v0;
  t[0] = t0;
  m[0] = m0;
  s[0] = s0;
  let largest = Math.max(Math.abs(v0), h * Math.abs(t0), hM * Math.abs(m0), hS * Math.abs(s0));
  let quiet = 0;
  let n = 0;
  // the load's own terms must have entered before smallness means anything
  const least = q.length + 5;
  for (; n < MAX_TERMS; n++) {
    const wn = n === 0 ? wa : n === 1 ? wb : 0;
    // v' = (1 - N g) t + g (S - N w')
    let vn = t[n]!;
    if (gPoly) {
      for (let j = Math.min(n, gPoly.length - 1); j >= 0; j--) {
        const i = n - j;
        const w = i === 0 ? wa : i === 1 ? wb : 0;
        vn += gPoly[j]! * (s[i]! - N * (w + t[i]!));
      }
    } else if (g !== 0) vn += g * (s[n]! - N * (wn + t[n]!));
    let bend = f * m[n]!;
    if (fPoly) {
      bend = 0;
      for (let j = Math.min(n, fPoly.length - 1); j >= 0; j--) bend += fPoly[j]! * m[n - j]!;
    }
    if (n === 0) bend += load.kappa;
    const next = n + 1;
    v[next] = (h * vn) / next;
    t[next] = (-h * bend) / next;
    m[next] = (h * (s[n]! - N * (vn + wn))) / next;
    s[next] = (h * (k * v[n]! - (n < q.length ? q[n]! : 0))) / next;
    const size = Math.max(
      Math.abs(v[next]),
      h * Math.abs(t[next]),
      hM * Math.abs(m[next]),
      hS * Math.abs(s[next]),
    );
    if (size > largest) largest = size;
    quiet = size <= NEGLIGIBLE * largest ? quiet + 1 : 0;
    if (quiet >= 4 && next >= least) break;
  }
  return Math.min(n + 1, MAX_TERMS + 1);
}
