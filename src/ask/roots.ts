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
/** The place of a smooth minimum is good to sqrt(eps): nearer, the values no longer differ; the value itself is then exact. */
const PLACE = Math.sqrt(Number.EPSILON);

/** Lowest value of f on a..b and its place, for a function with one valley there: parabolas, golden section where they fail. */
export function lowestBetween(f: (x: number) => number, a: number, b: number): { x: number; value: number } {
  let low = Math.min(a, b);
  let high = Math.max(a, b);
  let x = low + GOLDEN * (high - low);
  let [second, third] = [x, x];
  let value = f(x);
  let [secondValue, thirdValue] = [value, value];
  let step = 0;
  let before = 0;
  // each golden step takes 38 % off: 80 exhaust sqrt(eps) of any bracket
  for (let turn = 0; turn < 80; turn++) {
    const middle = (low + high) / 2;
    const close = PLACE * Math.abs(x) + PLACE * PLACE * (b - a);
    if (Math.abs(x - middle) <= 2 * close - (high - low) / 2) break;
    let golden = true;
    if (Math.abs(before) > close) {
      const r = (x - second) * (value - thirdValue);
      let q = (x - third) * (value - secondValue);
      let p = (x - third) * q - (x - second) * r;
      q = 2 * (q - r);
      if (q > 0) p = -p;
      q = Math.abs(q);
      const last = before;
      before = step;
      if (Math.abs(p) < Math.abs((q * last) / 2) && p > q * (low - x) && p < q * (high - x)) {
        step = p / q;
        golden = false;
        const to = x + step;
        if (to - low < 2 * close || high - to < 2 * close) step = x < middle ? close : -close;
      }
    }
    if (golden) {
      before = x < middle ? high - x : low - x;
      step = GOLDEN * before;
    }
    const to = Math.abs(step) >= close ? x + step : x + (step > 0 ? close : -close);
    const here = f(to);
    if (here <= value) {
      if (to < x) high = x;
      else low = x;
      [third, thirdValue, second, secondValue] = [second, secondValue, x, value];
      [x, value] = [to, here];
    } else {
      if (to < x) low = to;
      else high = to;
      if (here <= secondValue || second === x) {
        [third, thirdValue, second, secondValue] = [second, secondValue, to, here];
      } else if (here <= thirdValue || third === x || third === second) {
        [third, thirdValue] = [to, here];
      }
    }
  }
  return { x, value };
}
