/**
 * Polynomials on an interval: p(t) = sum c[k] t^k, t in 0..1, lowest power first.
 * Every exact extreme of the questions (envelopes, influence lines, trains, chords) is found with these.
 *
 * Roots are isolated by the roots of the derivative, found the same way down to degree 2: between two neighbouring
 * critical points a polynomial is monotone and holds at most one root, which a bracketed Newton iteration takes to
 * full precision. No sampling, and nothing is missed.
 */
import type { Piece } from '../solution';

export type Coefficients = Float64Array;

export function evaluate(c: Coefficients, t: number): number {
  let sum = 0;
  for (let k = c.length - 1; k >= 0; k--) sum = sum * t + (c[k] as number);
  return sum;
}

export function derivative(c: Coefficients): Coefficients {
  const d = new Float64Array(Math.max(1, c.length - 1));
  for (let k = 1; k < c.length; k++) d[k - 1] = k * (c[k] as number);
  return d;
}

/** The antiderivative that is zero at t = 0. */
export function integral(c: Coefficients): Coefficients {
  const s = new Float64Array(c.length + 1);
  for (let k = 0; k < c.length; k++) s[k + 1] = (c[k] as number) / (k + 1);
  return s;
}

/** a + factor b */
export function plus(a: Coefficients, b: Coefficients, factor = 1): Coefficients {
  const sum = new Float64Array(Math.max(a.length, b.length));
  sum.set(a);
  for (let k = 0; k < b.length; k++) sum[k] = (sum[k] as number) + factor * (b[k] as number);
  return sum;
}

export function times(a: Coefficients, b: Coefficients): Coefficients {
  const product = new Float64Array(a.length + b.length - 1);
  for (let i = 0; i < a.length; i++) {
    for (let j = 0; j < b.length; j++) {
      product[i + j] = (product[i + j] as number) + (a[i] as number) * (b[j] as number);
    }
  }
  return product;
}

/** p(alpha + beta t) as a polynomial in t, by Horner's rule on polynomials. */
export function compose(c: Coefficients, alpha: number, beta: number): Coefficients {
  const n = c.length;
  const out = new Float64Array(Math.max(1, n));
  for (let k = n - 1; k >= 0; k--) {
    // out = out * (alpha + beta t) + c[k]; the degree grows by one each turn
    for (let j = n - 1 - k; j >= 1; j--) out[j] = alpha * (out[j] as number) + beta * (out[j - 1] as number);
    out[0] = alpha * (out[0] as number) + (c[k] as number);
  }
  return out;
}

/** A piece of a field over from..to (inside the piece), t = 0 at `from` and 1 at `to`. */
export function onInterval(piece: Piece, from: number, to: number): Coefficients {
  const alpha = (from - piece.x0) / piece.h + piece.origin;
  const beta = (to - from) / piece.h;
  return alpha === 0 && beta === 1 ? piece.coefficients : compose(piece.coefficients, alpha, beta);
}

/** Below this fraction of the largest coefficient a leading term moves no value on 0..1 by more than rounding does. */
const NEGLIGIBLE = 2 * Number.EPSILON;

/** Roots strictly inside 0..1 where the polynomial changes sign, in order. A polynomial that is nothing but zero has none. */
export function rootsInside(c: Coefficients): number[] {
  let scale = 0;
  for (const term of c) scale = Math.max(scale, Math.abs(term));
  if (scale === 0) return [];
  let degree = c.length - 1;
  while (degree > 0 && Math.abs(c[degree] as number) <= NEGLIGIBLE * scale) degree--;
  return changes(degree === c.length - 1 ? c : c.slice(0, degree + 1));
}

function changes(c: Coefficients): number[] {
  if (c.length <= 1) return [];
  if (c.length === 2) {
    const t = -(c[0] as number) / (c[1] as number);
    return t > 0 && t < 1 ? [t] : [];
  }
  if (c.length === 3) return quadratic(c[0] as number, c[1] as number, c[2] as number);
  const slope = derivative(c);
  const stops = [0, ...rootsInside(slope), 1];
  const roots: number[] = [];
  let left = 0;
  let leftValue = c[0] as number;
  for (let i = 1; i < stops.length; i++) {
    const right = stops[i] as number;
    const rightValue = evaluate(c, right);
    // a zero exactly on a stop belongs to the pair of intervals around it: counted once, when the signs beyond differ
    if (leftValue !== 0 && rightValue !== 0 && leftValue < 0 !== rightValue < 0) {
      roots.push(bracketed(c, slope, left, right, leftValue));
    } else if (rightValue === 0 && right < 1) {
      const beyond = evaluate(c, (right + (stops[i + 1] as number)) / 2);
      if (leftValue !== 0 && beyond !== 0 && leftValue < 0 !== beyond < 0) roots.push(right);
    }
    left = right;
    leftValue = rightValue;
  }
  return roots;
}

/** Both roots without cancellation: q = -(b + sign(b) sqrt(b^2 - 4ac))/2, t1 = q/a, t2 = c/q. */
function quadratic(c: number, b: number, a: number): number[] {
  const disc = b * b - 4 * a * c;
  if (!(disc > 0)) return [];
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(disc)) / 2;
  const roots = [q / a, q === 0 ? 0 : c / q].filter((t) => t > 0 && t < 1);
  return roots.sort((left, right) => left - right);
}

/** Newton steps kept inside a shrinking bracket; a step that leaves it, or gains too little, becomes a bisection. */
function bracketed(
  c: Coefficients,
  slope: Coefficients,
  from: number,
  to: number,
  fromValue: number,
): number {
  let low = from;
  let high = to;
  let t = (from + to) / 2;
  const negativeLow = fromValue < 0;
  // 200 bisections exhaust any bracket of doubles; Newton ends it in a handful
  for (let turn = 0; turn < 200; turn++) {
    const value = evaluate(c, t);
    if (value === 0) return t;
    if (value < 0 === negativeLow) low = t;
    else high = t;
    const step = t - value / evaluate(slope, t);
    const next = step > low && step < high ? step : (low + high) / 2;
    if (next === t || high - low <= Number.EPSILON * Math.max(Math.abs(low), Math.abs(high))) return next;
    if (Math.abs(next - t) <= Number.EPSILON * Math.abs(t)) return next;
    t = next;
  }
  return t;
}
