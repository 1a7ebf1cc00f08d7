/**
 * Units of the trade. mathjs reads the unit text (prefixes, products, quotients, powers) and gives its dimension; the factor
 * to another unit is computed from exact definitions (rational.ts) and rounded once.
 *
 * Definitions, exact: NIST SP 811 (2008), appendix B: 1 in = 0.0254 m, 1 ft = 12 in, 1 lb = 0.45359237 kg, standard gravity
 * 9.80665 m/s^2, so 1 lbf = 4.4482216152605 N and 1 kgf = 9.80665 N; 1 kip = 1000 lbf; 1 tf = 1000 kgf.
 */
import { makeUnitClass, type MathUnit } from './mathjs';
import { remember } from './memo';
import { nearest } from './near';
import { ONE, power, times, toNumber, type Ratio } from './rational';

/** Exponents of force, length and angle. */
export interface Dimension {
  readonly force: number;
  readonly length: number;
  readonly angle: number;
}

export interface Unit extends Dimension {
  /** as written, with the trade's dots and superscripts */
  readonly text: string;
  /** exact factor to newton, metre, radian, apart from pi^pi */
  readonly exact: Ratio;
  /** power of pi in the factor (degrees) */
  readonly pi: number;
}

export type UnitResult =
  | { readonly ok: true; readonly unit: Unit }
  | { readonly ok: false; readonly reason: 'unknown'; readonly part: string; readonly suggestion?: string }
  /** a unit, but not one of forces, lengths and angles (kg, s, K) */
  | { readonly ok: false; readonly reason: 'not-structural'; readonly suggestion?: string };

const LBF: Ratio = times({ n: 45359237n, d: 100000000n }, { n: 980665n, d: 100000n });
const KGF: Ratio = { n: 980665n, d: 100000n };
const INCH: Ratio = { n: 254n, d: 10000n };
const FOOT = times(INCH, { n: 12n, d: 1n });
const KIP = times(LBF, { n: 1000n, d: 1n });
const per = (a: Ratio, b: Ratio, k: number): Ratio => times(a, power(b, -k));

type Definition = readonly [exact: Ratio, force: number, length: number, angle?: number, pi?: number];

/** By the name mathjs files the unit under; prefixes come on top. A unit that is not here is not accepted. */
const EXACT: ReadonlyMap<string, Definition> = new Map<string, Definition>([
  ['N', [ONE, 1, 0]],
  ['newton', [ONE, 1, 0]],
  ['lbf', [LBF, 1, 0]],
  ['kip', [KIP, 1, 0]],
  ['kilogramforce', [KGF, 1, 0]],
  ['tf', [times(KGF, { n: 1000n, d: 1n }), 1, 0]],
  ['m', [ONE, 0, 1]],
  ['meter', [ONE, 0, 1]],
  ['in', [INCH, 0, 1]],
  ['inch', [INCH, 0, 1]],
  ['ft', [FOOT, 0, 1]],
  ['foot', [FOOT, 0, 1]],
  ['yd', [times(FOOT, { n: 3n, d: 1n }), 0, 1]],
  ['yard', [times(FOOT, { n: 3n, d: 1n }), 0, 1]],
  ['Pa', [ONE, 1, -2]],
  ['psi', [per(LBF, INCH, 2), 1, -2]],
  ['ksi', [per(KIP, INCH, 2), 1, -2]],
  ['psf', [per(LBF, FOOT, 2), 1, -2]],
  ['ksf', [per(KIP, FOOT, 2), 1, -2]],
  ['pli', [per(LBF, INCH, 1), 1, -1]],
  ['plf', [per(LBF, FOOT, 1), 1, -1]],
  ['klf', [per(KIP, FOOT, 1), 1, -1]],
  ['Nm', [ONE, 1, 1]],
  ['Ncm', [{ n: 1n, d: 100n }, 1, 1]],
  ['Nmm', [{ n: 1n, d: 1000n }, 1, 1]],
  ['rad', [ONE, 0, 0, 1]],
  ['radian', [ONE, 0, 0, 1]],
  ['deg', [{ n: 1n, d: 180n }, 0, 0, 1, 1]],
  ['degree', [{ n: 1n, d: 180n }, 0, 0, 1, 1]],
]);

/**
 * The class of mathjs, extended with the trade's units that it lacks. Its own kip and psi are rounded (1e-8 and 6e-11 off)
 * and replaced by their definitions.
 */
export const MathUnits = makeUnitClass();
MathUnits.createUnit({ kip: '4448.2216152605 N', psi: '1 lbf/in^2' }, { override: true });
MathUnits.createUnit({
  tf: '9806.65 N',
  ksi: '1 kip/in^2',
  psf: '1 lbf/ft^2',
  ksf: '1 kip/ft^2',
  pli: '1 lbf/in',
  plf: '1 lbf/ft',
  klf: '1 kip/ft',
  Nm: { definition: '1 N m', prefixes: 'short' },
  Ncm: { definition: '0.01 N m', prefixes: 'short' },
  Nmm: { definition: '0.001 N m', prefixes: 'short' },
});

/** Words the trade writes that mathjs files under another name. `lb` is a force here: no row asks for a mass. */
const ALIASES: ReadonlyMap<string, string> = new Map([
  ['lb', 'lbf'],
  ['lbs', 'lbf'],
  ['k', 'kip'],
  ['kips', 'kip'],
  ['kgf', 'kilogramforce'],
  ['tonnef', 'tf'],
]);

/** Words a near miss may mean, in their usual spelling. */
const USUAL =
  'N kN MN daN kgf tf lbf lb kip m mm cm km in ft yd Pa kPa MPa GPa psi ksi psf ksf pli plf klf Nm kNm MNm Nmm kNmm kNcm rad mrad deg'.split(
    ' ',
  );

/** Reads a unit text; remembered per text. */
export const parseUnit: (text: string) => UnitResult = remember(read);

function read(text: string): UnitResult {
  const plain = spell(text);
  if (plain.length > 60) return { ok: false, reason: 'unknown', part: text.slice(0, 60) };
  let parsed: MathUnit;
  try {
    parsed = MathUnits.parse(plain);
  } catch {
    return unknown(text, plain);
  }
  // "1/m" is read as the value 1 over a metre; any other number in front belongs to the value, not to the unit.
  if (parsed.value !== null && parsed.value !== undefined && !/^1\s*\//.test(plain))
    return unknown(text, plain);
  let exact = ONE;
  let pi = 0;
  const sum = { force: 0, length: 0, angle: 0 };
  for (const { unit, prefix, power: exponent } of parsed.units) {
    const definition = EXACT.get(unit.name);
    if (definition === undefined) return foreign(plain);
    if (!Number.isInteger(exponent) || Math.abs(exponent) > 12)
      return { ok: false, reason: 'not-structural' };
    const [base, force, length, angle = 0, pies = 0] = definition;
    const ten = power({ n: 10n, d: 1n }, Math.round(Math.log10(prefix.value)));
    exact = times(exact, power(times(base, ten), exponent));
    pi += pies * exponent;
    sum.force += force * exponent;
    sum.length += length * exponent;
    sum.angle += angle * exponent;
  }
  return { ok: true, unit: { text: pretty(text), exact, pi, ...sum } };
}

/** The trade's spelling -> the spelling of mathjs: dots, hyphens between units, superscripts, "cm4", micro and degree signs. */
function spell(text: string): string {
  return text
    .trim()
    .replace(/[\u2070\u00b9\u00b2\u00b3\u2074-\u2079\u207b]+/g, (run) => '^' + [...run].map(digit).join(''))
    .replace(/\*\*/g, '^')
    .replace(/[\u00b7\u22c5\u00d7\u2022\u2219]/g, '*')
    .replace(/[\u00b5\u03bc]/g, 'u')
    .replace(/\u00b0/g, 'deg')
    .replace(/([A-Za-z0-9)])\s*[-\u2010-\u2013\u2212]\s*(?=[A-Za-z(])/g, '$1*')
    .replace(/([A-Za-z])(-?\d)/g, '$1^$2')
    .replace(/[A-Za-z]+/g, (word) => ALIASES.get(word) ?? word);
}

const SUPERSCRIPTS = '\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079';
function digit(sign: string): string {
  return sign === '\u207b' ? '-' : String(SUPERSCRIPTS.indexOf(sign));
}

/** For the reader: "kN*m^2" -> "kN·m²". */
function pretty(text: string): string {
  return text
    .trim()
    .replace(/\s*\*\s*/g, '\u00b7')
    .replace(
      /([A-Za-z])\^?([2-46])(?!\d)/g,
      (_, letter: string, power_: string) => letter + SUPERSCRIPTS[Number(power_)]!,
    );
}

function unknown(text: string, plain: string): UnitResult {
  let part = text;
  let mended = true;
  const suggestion = text.replace(/[A-Za-z\u00b5\u03bc]+/g, (word) => {
    if (isUnitWord(word)) return word;
    part = part === text ? word : part;
    const near = nearest(word, USUAL);
    if (near === undefined) mended = false;
    return near ?? word;
  });
  const good = mended && suggestion !== text && suggestion.length <= 40 && isUnitText(spell(suggestion));
  return { ok: false, reason: 'unknown', part: plain === '' ? text : part, ...(good ? { suggestion } : {}) };
}

function isUnitWord(word: string): boolean {
  return isUnitText(spell(word));
}

function isUnitText(plain: string): boolean {
  try {
    return MathUnits.parse(plain).units.every(({ unit }) => EXACT.has(unit.name));
  } catch {
    return false;
  }
}

/** Masses are the usual mix-up: a weight is meant. */
function foreign(plain: string): UnitResult {
  const mended = plain
    .replace(/\bkg\b/g, 'kgf')
    .replace(/\b(?:t|ton|tonne|tonnes)\b/g, 'tf')
    .replace(/kilogramforce/g, 'kgf');
  const suggestion = mended !== plain && isUnitText(spell(mended)) ? mended : undefined;
  return { ok: false, reason: 'not-structural', ...(suggestion === undefined ? {} : { suggestion }) };
}

/** 1 unit, in newton, metre and radian. */
export function siFactor(unit: Unit): number {
  return toNumber(unit.exact) * Math.PI ** unit.pi;
}

/** The names in the table of exact definitions, for the test that compares them with those of mathjs. */
export const EXACT_NAMES: readonly string[] = [...EXACT.keys()];
