/**
 * Polynomials on the intervals of a question: p(t) = sum c[k] t^k, t in 0..1, lowest power first.
 * The arithmetic is the engine's (integrate/polynomial.ts); here is what moves a piece onto another interval.
 */
import {
  addScaled,
  derivative,
  evaluate,
  integrateFrom,
  multiply,
  rootsIn,
  type Poly,
} from '../integrate/polynomial';
import type { Piece } from '../solution';

export { addScaled, derivative, evaluate, integrateFrom, multiply, rootsIn };
export type Coefficients = Poly;

/** p(alpha + beta t) as a polynomial in t, by Horner's rule on polynomials. */
export function compose(c: ArrayLike<number>, alpha: number, beta: number): Coefficients {
  const n = c.length;
  const out = new Array<number>(Math.max(1, n)).fill(0);
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
  return alpha === 0 && beta === 1
    ? Array.from(piece.coefficients)
    : compose(piece.coefficients, alpha, beta);
}
