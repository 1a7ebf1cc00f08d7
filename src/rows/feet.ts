/** Lengths in feet and inches: 12'-6", 12' 6 1/2", 6 1/2", 12', -3'-6", 12 ft 6 in; exact, in inches. */
import { decimal, times, type Ratio } from './rational';

const NUMBER = '(\\d+(?:\\.\\d+)?|\\.\\d+)';
const FEET = new RegExp(
  `^([+-])?\\s*(?:${NUMBER}\\s*')?\\s*-?\\s*(?:(?:(\\d+)(?:\\s+|-))?(\\d+)\\s*/\\s*(\\d+)\\s*"|${NUMBER}\\s*")?$`,
);

/** null: this is no length in feet and inches. */
export function readFeet(raw: string): Ratio | null {
  const text = raw
    .trim()
    .replace(/[\u2032\u2019]/g, "'")
    .replace(/[\u2033\u201d]|''/g, '"')
    .replace(/^[\u2212\u2013]/, '-')
    .replace(/[\u2010-\u2013]/g, '-')
    .replace(/(\d)\s*(?:ft|feet)\b\.?(?=\s*-?\s*\d)/i, "$1'")
    .replace(/('.*\d)\s*(?:in|inch|inches)\.?$/i, '$1"');
  if (!/['"]/.test(text)) return null;
  const match = FEET.exec(text);
  if (match === null) return null;
  const [, sign, feet, whole, top, bottom, inches] = match;
  if (feet === undefined && top === undefined && inches === undefined) return null;
  let total = times(decimal(feet ?? '0'), { n: 12n, d: 1n });
  total = add(total, decimal(inches ?? whole ?? '0'));
  if (top !== undefined && bottom !== undefined) {
    if (BigInt(bottom) === 0n) return null;
    total = add(total, { n: BigInt(top), d: BigInt(bottom) });
  }
  return sign === '-' ? { n: -total.n, d: total.d } : total;
}

function add(a: Ratio, b: Ratio): Ratio {
  return { n: a.n * b.d + b.n * a.d, d: a.d * b.d };
}
