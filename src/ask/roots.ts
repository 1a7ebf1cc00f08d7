/**
 * Root and minimum of a function that is only known by its values, to full precision, without a derivative.
 * R. P. Brent, Algorithms for Minimization without Derivatives (1973), chapters 4 and 5 (from memory).
 */

/** A root of f between a and b, whose values fa and fb differ in sign. Infinite values are allowed at one end: they count by sign. */
export function rootBetween(f: (x: number) => number, a: number, b: number, fa: number, fb: number): number {
  let [x0, y0, x1, y1] = [a, fa, b, fb];
  // make both ends finite by halving, so that interpolation has something to work with
  for (let i = 0; i < 1100 && !(Number.isFinite(y0) && Number.isFinite(y1)); i++) {
    const middle = (x0 + x1) / 2;
    if (middle === x0 || middle === x1) break;
    const y = f(middle);
    if (y > 0 === y0 > 0) [x0, y0] = [middle, y];
    else [x1, y1] = [middle, y];
  }
  if (Math.abs(y0) < Math.abs(y1)) [x0, y0, x1, y1] = [x1, y1, x0, y0];
  let [older, olderY] = [x0, y0];
  let oldest = x0;
  let halved = true;
  // 200 halvings exhaust any bracket of doubles
  for (let i = 0; i < 200 && y1 !== 0; i++) {
    const width = Math.abs(x1 - x0);
    if (width <= 2 * Number.EPSILON * Math.abs(x1)) break;
    let next: number =
      y0 !== olderY && y1 !== olderY
        ? (x0 * y1 * olderY) / ((y0 - y1) * (y0 - olderY)) +
          (x1 * y0 * olderY) / ((y1 - y0) * (y1 - olderY)) +
          (older * y0 * y1) / ((olderY - y0) * (olderY - y1))
        : x1 - (y1 * (x1 - x0)) / (y1 - y0);
    const bound: number = (3 * x0 + x1) / 4;
    const outside: boolean = !(next > Math.min(bound, x1) && next < Math.max(bound, x1));
    const last: number = halved ? Math.abs(x1 - older) : Math.abs(older - oldest);
    halved = outside || Math.abs(next - x1) >= last / 2;
    if (halved) next = (x0 + x1) / 2;
    if (next === x0 || next === x1) break;
    const y = f(next);
    [oldest, older, olderY] = [older, x1, y1];
    if (y > 0 === y0 > 0) [x0, y0] = [next, y];
    else [x1, y1] = [next, y];
    if (Math.abs(y0) < Math.abs(y1)) [x0, y0, x1, y1] = [x1, y1, x0, y0];
  }
  return x1;
}

const GOLDEN = (3 - Math.sqrt(5)) / 2;

/** Lowest value of f on a..b and its place, for a function with one valley there (golden section; the value is exact to the square of the place's error). */
export function lowestBetween(f: (x: number) => number, a: number, b: number): { x: number; value: number } {
  let low = a;
  let high = b;
  let x1 = low + GOLDEN * (high - low);
  let x2 = high - GOLDEN * (high - low);
  let y1 = f(x1);
  let y2 = f(x2);
  // the place is good to sqrt(eps): below that the values no longer differ
  while (high - low > 1e-9 * (Math.abs(low) + Math.abs(high)) && x1 < x2) {
    if (y1 <= y2) {
      [high, x2, y2] = [x2, x1, y1];
      x1 = low + GOLDEN * (high - low);
      y1 = f(x1);
    } else {
      [low, x1, y1] = [x1, x2, y2];
      x2 = high - GOLDEN * (high - low);
      y2 = f(x2);
    }
  }
  return y1 <= y2 ? { x: x1, value: y1 } : { x: x2, value: y2 };
}
