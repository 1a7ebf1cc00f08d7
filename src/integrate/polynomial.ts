/**
 * Polynomials p(u) = sum c[k] u^k on a short interval (0..1, or -1/2..1/2 for fitted pieces), coefficients in ascending order.
 * Everything the beam's diagrams are made of. Intervals are short and coefficients do not grow, so Horner's rule keeps its digits.
 */

/** A plain array: short typed arrays cost far more to make than to use. */
export type Poly = readonly number[];

export function evaluate(p: Poly, u: number): number {
  let sum = 0;
  for (let k = p.length - 1; k >= 0; k--) sum = sum * u + p[k]!;
  return sum;
}

export function derivative(p: Poly): Poly {
  const n = p.length;
  if (n <= 1) return [0];
  const d: number[] = [];
  for (let k = 1; k < n; k++) d.push(k * p[k]!);
  return d;
}

/** start + scale * (integral of p from `from` to u). */
export function integrateFrom(p: Poly, from: number, scale: number, start: number): Poly {
  const n = p.length;
  const out: number[] = [0];
  for (let k = 0; k < n; k++) out.push((scale * p[k]!) / (k + 1));
  out[0] = from === 0 ? start : start - evaluate(out, from);
  return out;
}

export function multiply(p: Poly, q: Poly): number[] {
  const out = new Array<number>(p.length + q.length - 1).fill(0);
  for (let i = 0; i < p.length; i++) {
    const a = p[i]!;
    if (a !== 0) for (let j = 0; j < q.length; j++) out[i + j]! += a * q[j]!;
  }
  return out;
}

/** p + scale * q */
export function addScaled(p: Poly, q: Poly, scale: number): number[] {
  const out = p.slice();
  while (out.length < q.length) out.push(0);
  for (let k = 0; k < q.length; k++) out[k]! += scale * q[k]!;
  return out;
}

/** Integral of u^n over 0..1 and over -1/2..1/2. */
const POWERS = 256;
const overUnit = Float64Array.from({ length: POWERS }, (_, n) => 1 / (n + 1));
const overCentred = Float64Array.from({ length: POWERS }, (_, n) => (n % 2 === 0 ? 0.5 ** n / (n + 1) : 0));

/** Integral of p*q over from..from+1 (from = 0 or -1/2), term by term: exact up to rounding. */
export function productIntegral(p: Poly, q: Poly, from: number): number {
  const moments = from === 0 ? overUnit : overCentred;
  let sum = 0;
  for (let i = 0; i < p.length; i++) {
    const a = p[i]!;
    if (a === 0) continue;
    for (let j = 0; j < q.length; j++) sum += a * q[j]! * moments[i + j]!;
  }
  return sum;
}

/** An upper bound of |p| on the interval, cheap: used to skip pieces that cannot hold the extreme. */
export function bound(p: Poly, from: number): number {
  let sum = 0;
  let power = 1;
  const reach = Math.max(Math.abs(from), Math.abs(from + 1));
  for (let k = 0; k < p.length; k++) {
    sum += Math.abs(p[k]!) * power;
    power *= reach;
  }
  return sum;
}

/** Root of p between a and b, whose values differ in sign: Newton's steps kept inside a shrinking bracket. */
function bracketedRoot(p: Poly, a: number, b: number, fa: number): number {
  let lo = a;
  let hi = b;
  let x = 0.5 * (a + b);
  const rising = fa < 0;
  // 100 halvings shrink any bracket below the spacing of doubles; Newton normally needs six steps
  for (let i = 0; i < 100; i++) {
    let f = 0;
    let d = 0;
    for (let k = p.length - 1; k >= 0; k--) {
      d = d * x + f;
      f = f * x + p[k]!;
    }
    if (f === 0) return x;
    if (f < 0 === rising) lo = x;
    else hi = x;
    const step = f / d;
    let next = x - step;
    if (!(next > lo && next < hi)) next = 0.5 * (lo + hi);
    if (next === x || Math.abs(next - x) <= 2 ** -53 * Math.abs(x)) return next;
    x = next;
  }
  return x;
}

/**
 * All places in a..b where p passes through zero, ascending. Between two neighbouring roots of p' the polynomial is monotone, so
 * every sign change brackets exactly one root: nothing is sampled and nothing can be missed.
 */
export function rootsIn(p: Poly, a: number, b: number): number[] {
  let n = p.length;
  while (n > 1 && p[n - 1] === 0) n--;
  if (n <= 1) return [];
  if (n === 2) {
    const root = -p[0]! / p[1]!;
    return root >= a && root <= b ? [root] : [];
  }
  const q = n === p.length ? p : p.slice(0, n);
  const turning = rootsIn(derivative(q), a, b);
  const roots: number[] = [];
  let x0 = a;
  let f0 = evaluate(q, a);
  if (f0 === 0) roots.push(a);
  for (let i = 0; i <= turning.length; i++) {
    const x1 = i < turning.length ? turning[i]! : b;
    const f1 = evaluate(q, x1);
    if (f1 === 0) {
      if (roots[roots.length - 1] !== x1) roots.push(x1);
    } else if (f0 !== 0 && f0 < 0 !== f1 < 0) {
      roots.push(bracketedRoot(q, x0, x1, f0));
    }
    x0 = x1;
    f0 = f1;
  }
  return roots;
}
