/**
 * A law (linear, or any function of x) over a short stretch as a polynomial in t = (x - a)/(b - a), for the oracle.
 * Linear laws exactly; functions by interpolation at up to 17 Chebyshev points, accepted when five other points are met to a few units of the
 * last place of a double, which is all that such a law is known to.
 */
import type { Law } from '../../src/beam/model';
import type { Series } from './oracle-element';
import { Big } from './oracle-number';

/** Few points where they suffice: every product of series costs as many terms. */
const POINTS = [5, 9, 17];
const PROBES = [0.037, 0.21, 0.46, 0.71, 0.94];
/** Lebesgue constant of 17 Chebyshev points (2.8) x rounding of the law and of its argument (some 8 eps) */
const NOISE = 24 * 2 ** -52;

/** null: the stretch must be halved first. */
export function lawSeries(
  stretch: { readonly from: number; readonly to: number; readonly law: Law },
  a: number,
  b: number,
  force: boolean,
  /** a load: known to rounding of its largest value over the stretch only; where it passes through zero it has no digits of its own */
  load = false,
): Series | null {
  const { law } = stretch;
  const x0 = Big.of(a);
  const h = Big.of(b).minus(x0);
  if (law.kind === 'linear') {
    const start = Big.of(law.start);
    if (law.start === law.end) return [start];
    const rise = Big.of(law.end)
      .minus(start)
      .over(Big.of(stretch.to).minus(Big.of(stretch.from)));
    return [start.plus(rise.times(x0.minus(Big.of(stretch.from)))), rise.times(h)];
  }
  let whole = 0;
  for (let i = 0; load && i <= 16; i++) {
    whole = Math.max(whole, Math.abs(law.at(stretch.from + ((stretch.to - stretch.from) * i) / 16)));
  }
  for (const points of POINTS) {
    const last = force && points === POINTS[POINTS.length - 1];
    const series = interpolate(law.at, a, b, points, last, whole);
    if (series) return series;
  }
  return null;
}

function interpolate(
  at: (x: number) => number,
  a: number,
  b: number,
  points: number,
  force: boolean,
  whole: number,
): Series | null {
  const x0 = Big.of(a);
  const h = Big.of(b).minus(x0);
  const t: Big[] = [];
  const c: Big[] = [];
  let largest = whole;
  for (let i = 0; i < points; i++) {
    const x = a + (b - a) * (0.5 - 0.5 * Math.cos((Math.PI * (i + 0.5)) / points));
    const y = at(x);
    largest = Math.max(largest, Math.abs(y));
    t.push(Big.of(x).minus(x0).over(h));
    c.push(Big.of(y));
  }
  // Newton's divided differences
  for (let j = 1; j < points; j++) {
    for (let i = points - 1; i >= j; i--) c[i] = c[i]!.minus(c[i - 1]!).over(t[i]!.minus(t[i - j]!));
  }
  if (!force) {
    for (const probe of PROBES) {
      const x = a + (b - a) * probe;
      const u = Big.of(x).minus(x0).over(h);
      let y = c[points - 1]!;
      for (let j = points - 2; j >= 0; j--) y = y.times(u.minus(t[j]!)).plus(c[j]!);
      if (Math.abs(y.minus(Big.of(at(x))).toNumber()) > NOISE * largest) return null;
    }
  }
  // powers of t
  let series: Series = [c[points - 1]!];
  for (let j = points - 2; j >= 0; j--) {
    const next: Series = [c[j]!];
    series.forEach((value, n) => {
      next[n + 1] = (next[n + 1] ?? Big.zero).plus(value);
      next[n] = (next[n] ?? Big.zero).minus(value.times(t[j]!));
    });
    series = next;
  }
  return series;
}

/** Whether 1/p has a power series that settles quickly on 0..1: p stays near its start. */
export function variesLittle(p: Series): boolean {
  if (p.length === 1) return true;
  const start = p[0]!.toNumber();
  const first = Math.abs(p[1]!.toNumber() / start);
  if (p.length === 2) return first <= 0.3;
  let rest = 0;
  for (let n = 1; n < p.length; n++) rest += Math.abs(p[n]!.toNumber() / start);
  return rest <= 0.5;
}
