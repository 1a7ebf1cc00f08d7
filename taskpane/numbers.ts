/** Numbers for people: significant digits, the host's separators, no more figures than a drawing needs. */
import type { Separators } from './port';

export const PLAIN: Separators = { decimal: '.', group: '', list: ',' };

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

function raised(exponent: number): string {
  const digits = String(Math.abs(exponent))
    .split('')
    .map((digit) => SUPERSCRIPTS[Number(digit)] ?? digit)
    .join('');
  return (exponent < 0 ? '⁻' : '') + digits;
}

function grouped(whole: string, group: string): string {
  if (group === '' || whole.length <= 4) return whole;
  // a plain space could break a number over two lines
  const mark = /^\s$/.test(group) ? '\u202f' : group;
  return whole.replace(/\B(?=(\d{3})+$)/g, mark);
}

/** `digits` significant figures (default 4), trailing zeros dropped; very large and small ones as 1.2×10⁻⁵. Minus is U+2212. */
export function formatNumber(value: number, separators: Separators = PLAIN, digits = 4): string {
  if (!Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const size = Math.abs(value);
  const sign = value < 0 ? '−' : '';
  if (size < 1e-4 || size >= 1e7) {
    const [mantissa = '0', exponent = '0'] = size.toExponential(digits - 1).split('e');
    return `${sign}${trim(mantissa).replace('.', separators.decimal)}×10${raised(Number(exponent))}`;
  }
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(size)));
  const [whole = '0', fraction] = trim(size.toFixed(Math.min(decimals, 12))).split('.');
  const text = grouped(whole, separators.group);
  return sign + (fraction === undefined ? text : text + separators.decimal + fraction);
}

function trim(text: string): string {
  return text.includes('.') ? text.replace(/0+$/, '').replace(/\.$/, '') : text;
}

/** The shortest text that gives the number back, with the host's decimal mark: for editing. */
export function exactNumber(value: number, separators: Separators = PLAIN): string {
  return String(value).replace('.', separators.decimal);
}

/** What a person typed into a number cell: a number under the host's separators, or null when it is text. */
export function readNumber(text: string, separators: Separators = PLAIN): number | null {
  let plain = text.trim().replace('−', '-');
  if (
    separators.decimal !== '.' &&
    /^[-+]?[\d\s]*,?\d+(?:[eE][-+]?\d+)?$/.test(plain.replace(separators.decimal, ','))
  ) {
    plain = plain.replace(separators.decimal, '.');
  }
  return /^[-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?$/.test(plain) ? Number(plain) : null;
}
