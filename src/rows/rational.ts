/**
 * Exact fractions for unit factors: every unit of the trade is a fraction of SI units by definition (1 lb = 0.45359237 kg,
 * 1 in = 25.4 mm, standard gravity 9.80665 m/s^2: NIST SP 811 (2008), appendix B), so a factor between two units is rounded
 * once, to the nearest double, and equal lengths written in different units come out equal.
 */
export interface Ratio {
  readonly n: bigint;
  /** always positive */
  readonly d: bigint;
}

export const ONE: Ratio = { n: 1n, d: 1n };

export function times(a: Ratio, b: Ratio): Ratio {
  return { n: a.n * b.n, d: a.d * b.d };
}

/** a^k, k a (possibly negative) integer; a is not 0 when k is negative. */
export function power(a: Ratio, k: number): Ratio {
  const e = BigInt(Math.abs(k));
  return k >= 0 ? { n: a.n ** e, d: a.d ** e } : { n: a.d ** e, d: a.n ** e };
}

/** "12.5", "-3e-4", ".5": a decimal literal, exactly. */
export function decimal(text: string): Ratio {
  const [, sign, whole = '', part = '', exponent = '0'] =
    /^([+-]?)(\d*)\.?(\d*)(?:[eE]([+-]?\d+))?$/.exec(text) ?? [];
  const digits = BigInt(whole + part || '0');
  const shift = Number(exponent) - part.length;
  const n = sign === '-' ? -digits : digits;
  return shift >= 0 ? { n: n * 10n ** BigInt(shift), d: 1n } : { n, d: 10n ** BigInt(-shift) };
}

const BITS = 64n;

/** The nearest double (64 bits of quotient and a sticky bit, then one rounding to even). */
export function toNumber({ n, d }: Ratio): number {
  if (n === 0n) return 0;
  const size = n < 0n ? -n : n;
  const shift = BigInt(d.toString(2).length - size.toString(2).length) + BITS;
  const top = shift >= 0n ? size << shift : size;
  const bottom = shift >= 0n ? d : d << -shift;
  const quotient = top / bottom;
  const sticky = quotient * bottom === top ? 0n : 1n;
  const value = scale(Number((quotient << 1n) | sticky), -Number(shift) - 1);
  return n < 0n ? -value : value;
}

/** value x 2^k in two steps, so that no power of two on the way overflows or vanishes. */
function scale(value: number, k: number): number {
  const half = Math.trunc(k / 2);
  return value * 2 ** half * 2 ** (k - half);
}
