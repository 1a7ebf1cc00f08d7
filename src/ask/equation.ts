/**
 * Polynomials as text a checker can read, and paste into a cell: `12.5 + 3*s - 0.5*s^2`.
 * Ten significant digits: the terms of a deflection may exceed it some hundred times before they cancel, and the sum
 * must still be good to 1e-6.
 */
import type { Coefficients } from './polynomial';
import { addScaled, evaluate, multiply } from './polynomial';

const DIGITS = 10;

/** A polynomial fitted to a curve that is none, and how far it is from the curve at most (measured between its nodes). */
export interface Fit {
  readonly coefficients: Coefficients;
  readonly departure: number;
}

export function evaluateAny(curve: Coefficients | Fit, s: number): number {
  return evaluate('coefficients' in curve ? curve.coefficients : curve, s);
}

/** The curve over s = 0..h as text; a term that is rounding next to the largest one there is left out. */
export function polynomialText(curve: Coefficients | Fit, h: number): string {
  if ('coefficients' in curve) {
    return `fitted: ${terms(curve.coefficients, FIT_DIGITS, h)} (within ${curve.departure.toPrecision(2)})`;
  }
  return terms(curve, DIGITS, h);
}

/** A coefficient below this part of the largest term is the rounding of a zero. */
const ROUNDING = 1e-14;

function terms(c: Coefficients, digits: number, h: number): string {
  let text = '';
  const most = c.reduce((size, raw, k) => Math.max(size, Math.abs(raw) * h ** k), 0);
  c.forEach((raw, k) => {
    if (Math.abs(raw) * h ** k <= ROUNDING * most) return;
    const value = Number(raw.toPrecision(digits));
    if (value === 0) return;
    const power = k === 0 ? '' : k === 1 ? 's' : `s^${k}`;
    const size = Math.abs(value);
    const term = k === 0 ? String(size) : `${size}*${power}`;
    if (text === '') text = value < 0 ? `-${term}` : term;
    else text += value < 0 ? ` - ${term}` : ` + ${term}`;
  });
  return text === '' ? '0' : text;
}

/** A fitted curve needs more digits: powers of s on 0..h cancel by up to 4^degree. */
const FIT_DIGITS = 12;
/** Enough to recompute a deflection to 1e-6 of its peak, with a tenth to spare. */
const FIT_GOAL = 1e-7;
const FIT_DEGREES = [4, 6, 8, 10, 12];
const PROBES = 40;

/** The lowest of a few degrees that follows f on 0..h to 1e-7 of its peak there; the closest one when none does. */
export function fitted(f: (s: number) => number, h: number): Fit {
  let best: Fit | null = null;
  for (const degree of FIT_DEGREES) {
    const fit = interpolate(f, h, degree);
    if (best === null || fit.departure < best.departure) best = fit;
    const peak = Math.max(...Array.from({ length: 9 }, (_, i) => Math.abs(f((h * i) / 8))));
    if (fit.departure <= FIT_GOAL * peak) return fit;
  }
  return best as Fit;
}

/** Interpolation at Chebyshev-Lobatto points (ends included), by divided differences. */
function interpolate(f: (s: number) => number, h: number, degree: number): Fit {
  const nodes = Array.from({ length: degree + 1 }, (_, i) => (1 - Math.cos((Math.PI * i) / degree)) / 2);
  const table = nodes.map((t, i) => f(i === degree ? h : t * h));
  for (let order = 1; order <= degree; order++) {
    for (let i = degree; i >= order; i--) {
      table[i] =
        ((table[i] as number) - (table[i - 1] as number)) /
        ((nodes[i] as number) - (nodes[i - order] as number));
    }
  }
  let c: Coefficients = [table[degree] as number];
  for (let i = degree - 1; i >= 0; i--) {
    c = addScaled(multiply(c, [-(nodes[i] as number), 1]), [table[i] as number], 1);
  }
  const inS = c.map((value, k) => Number((value / h ** k).toPrecision(FIT_DIGITS)));
  let departure = 0;
  for (let i = 0; i <= PROBES; i++) {
    const s = i === PROBES ? h : (h * i) / PROBES;
    departure = Math.max(departure, Math.abs(evaluate(inS, s) - f(s)));
  }
  return { coefficients: inS, departure };
}
