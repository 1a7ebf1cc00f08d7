/**
 * Numbers written as text. A decimal point is always read; a decimal comma and groups of three (commas, points, thin or
 * ordinary spaces) are read when they can only mean one thing: "12,5", "0,125", "1 234,5", "1,234,567", "1.234,5".
 * "1,234" can mean two things and is refused.
 */
export type NumberText =
  /** decimal: the same number with a point and no groups; odd: written with commas or groups */
  | { readonly kind: 'number'; readonly decimal: string; readonly odd: boolean }
  | { readonly kind: 'ambiguous' };

const PLAIN = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;
const GAP = '[ \\u00a0\\u2007\\u2009\\u202f]';
const SPACED = new RegExp(`^[+-]?\\d{1,3}(?:${GAP}\\d{3})+(?:[.,]\\d+)?$`);
const AMBIGUOUS = /^[+-]?[1-9]\d{0,2},\d{3}$/;
const COMMA = /^[+-]?\d*,\d+(?:[eE][+-]?\d{1,3})?$/;
const COMMA_GROUPS = /^[+-]?\d{1,3}(?:(?:,\d{3}){2,}(?:\.\d+)?|(?:,\d{3})+\.\d+)$/;
const POINT_GROUPS = /^[+-]?\d{1,3}(?:(?:\.\d{3}){2,}(?:,\d+)?|(?:\.\d{3})+,\d+)$/;

/** null: this is no number. */
export function readNumberText(raw: string): NumberText | null {
  const text = raw
    .trim()
    .replace(/^[\u2212\u2013]/, '-')
    .replace(/^([+-])\s+/, '$1');
  if (PLAIN.test(text)) return { kind: 'number', decimal: text, odd: false };
  if (AMBIGUOUS.test(text)) return { kind: 'ambiguous' };
  if (COMMA.test(text)) return { kind: 'number', decimal: text.replace(',', '.'), odd: true };
  if (SPACED.test(text)) {
    return { kind: 'number', decimal: text.replace(new RegExp(GAP, 'g'), '').replace(',', '.'), odd: true };
  }
  if (COMMA_GROUPS.test(text)) return { kind: 'number', decimal: text.replace(/,/g, ''), odd: true };
  if (POINT_GROUPS.test(text)) {
    return { kind: 'number', decimal: text.replace(/\./g, '').replace(',', '.'), odd: true };
  }
  return null;
}

/**
 * "12 kN/m" -> number part and the rest. Only a text that begins with a number and goes on with a letter is split: a product
 * is never written without its `*`, so the rest can only be a unit. (The e of 12e-6*28 is an exponent, not a unit.)
 */
export function splitQuantity(text: string): { readonly number: string; readonly unit: string } | null {
  const match =
    /^([+\-\u2212\u2013]?\s*(?:\d[\d.,\u0020\u00a0\u2007\u2009\u202f]*|[.,]\d+)(?:[eE][+-]?\d{1,3})?)\s*(?![eE][+-]?\d)([A-Za-z\u00b5\u03bc\u00b0(].*)$/s.exec(
      text,
    );
  if (match === null || (match[2]!.startsWith('(') && !/[A-Za-z]/.test(match[2]!))) return null;
  return { number: match[1]!.trim(), unit: match[2]!.trim() };
}
