/**
 * The text of a number cell, understood in this order: a number, a length in feet and inches, a number with a unit, an
 * expression.
 */
import { parseExpression, type Expression } from './expression';
import { readFeet } from './feet';
import { remember } from './memo';
import { readNumberText, splitQuantity } from './number-text';
import { decimal, type Ratio } from './rational';
import { parseUnit, type Unit } from './units';

/** What the text of a cell says, before any table is known. */
export type Text =
  | { readonly kind: 'number'; readonly value: number; readonly odd: boolean }
  | { readonly kind: 'quantity'; readonly exact: Ratio; readonly unit: Unit; readonly odd: boolean }
  | { readonly kind: 'expression'; readonly expression: Expression }
  | {
      readonly kind: 'refused';
      readonly reason: string;
      readonly found: string;
      readonly suggestion?: string;
    };

const INCHES = parseUnit('in');

/** Reads the text of a number cell; remembered per text. */
export const readText: (text: string) => Text = remember((text: string): Text => {
  const number = readNumberText(text);
  if (number !== null) {
    if (number.kind === 'ambiguous') return { kind: 'refused', reason: 'ambiguous-number', found: text };
    return { kind: 'number', value: Number(number.decimal), odd: number.odd };
  }
  const feet = readFeet(text);
  if (feet !== null && INCHES.ok) return { kind: 'quantity', exact: feet, unit: INCHES.unit, odd: false };
  const split = splitQuantity(text);
  if (split !== null) {
    const part = readNumberText(split.number);
    if (part?.kind === 'ambiguous') return { kind: 'refused', reason: 'ambiguous-number', found: text };
    if (part?.kind === 'number') {
      const unit = parseUnit(split.unit);
      if (unit.ok) return { kind: 'quantity', exact: decimal(part.decimal), unit: unit.unit, odd: part.odd };
      const reason = unit.reason === 'unknown' ? 'unknown-unit' : 'foreign-unit';
      const { suggestion } = unit;
      return {
        kind: 'refused',
        reason,
        found: unit.reason === 'unknown' ? unit.part : split.unit,
        ...(suggestion === undefined ? {} : { suggestion }),
      };
    }
  }
  const result = parseExpression(text);
  if (result.ok) return { kind: 'expression', expression: result.expression };
  const { reason, found, suggestion } = result;
  return { kind: 'refused', reason, found, ...(suggestion === undefined ? {} : { suggestion }) };
});
