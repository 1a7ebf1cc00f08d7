/**
 * A number cell, read once: a constant already in the model's units, or an expression with the factor that takes its value
 * there. Text is understood in this order: a number, a length in feet and inches, a number with a unit, an expression.
 */
import type { Issue } from '../issue';
import { isErrorCell, showCell, type Cell } from './cell';
import { parseExpression, type Closure, type Expression } from './expression';
import { readFeet } from './feet';
import type { Bare } from './items';
import { remember } from './memo';
import { readNumberText, splitQuantity } from './number-text';
import { decimal, times, toNumber, type Ratio } from './rational';
import { sameDimension, unitText, usualUnit, type UnitSystem } from './system';
import { parseUnit, type Dimension, type Unit } from './units';
import type { ColumnName } from './words';

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

export interface Scalar {
  readonly row: number;
  readonly column: ColumnName;
  /** in the model's units, when there is no expression */
  readonly constant: number;
  readonly expression: Expression | null;
  readonly evaluate: Closure | null;
  /** model units per unit of the expression's value, unless its names carry units */
  readonly factor: number;
  /** the row needs a stated unit, and only names could carry it */
  readonly needsUnit: boolean;
  /** a unit stands in the Unit column, so names must not carry another */
  readonly unitColumn: boolean;
  readonly dimension: Dimension;
  /** blank or 0 */
  readonly blank: boolean;
  readonly usesX: boolean;
  /** the unit it was written in; null = the bare unit */
  readonly unit: Unit | null;
  /** the number in that unit, for READBACK */
  readonly written: string;
}

export interface ScalarRequest {
  readonly row: number;
  readonly column: ColumnName;
  readonly dimension: Dimension;
  readonly bare: Bare;
  readonly law: boolean;
  /** the row's Unit column, read */
  readonly unit: Unit | null;
}

/** What reading the rows of one table shares. */
export interface Reading {
  readonly system: UnitSystem | null;
  readonly issues: Issue[];
  readonly cautions: Issue[];
  /** the place of a name in the closures' array; the row and column say where it is used */
  slot(name: string, row: number, column: string): number;
  /** a unit was stated in a table without a `units` row */
  unitWithoutRow(row: number, column: string, found: string): void;
  /** one-cell text: numbers are text by nature */
  readonly text: boolean;
}

/** null: an issue was added. */
export function readScalar(cell: Cell | undefined, ask: ScalarRequest, table: Reading): Scalar | null {
  const { row, column } = ask;
  if (cell === null || cell === undefined) return constant(0, '0', ask, table, true, ask.unit);
  if (typeof cell === 'number') return constant(cell, String(cell), ask, table, cell === 0, ask.unit);
  if (typeof cell === 'boolean') {
    table.issues.push({ code: 'cell-boolean', kind: 'invalid', row, column, found: showCell(cell) });
    return null;
  }
  if (isErrorCell(cell)) {
    table.issues.push({ code: 'cell-error', kind: 'invalid', row, column, found: cell.error });
    return null;
  }
  const text = readText(cell);
  switch (text.kind) {
    case 'number':
      if (text.odd || !table.text) {
        table.cautions.push({
          code: 'number-as-text',
          kind: 'invalid',
          row,
          column,
          found: cell,
          expected: String(text.value),
        });
      }
      return constant(text.value, String(text.value), ask, table, false, ask.unit);
    case 'quantity':
      if (text.odd) {
        table.cautions.push({
          code: 'number-as-text',
          kind: 'invalid',
          row,
          column,
          found: cell,
          expected: `${toNumber(text.exact)} ${text.unit.text}`,
        });
      }
      return quantity(text.exact, text.unit, cell, ask, table);
    case 'refused': {
      const { reason, found, suggestion } = text;
      table.issues.push({
        code: reason,
        kind: 'invalid',
        row,
        column,
        found,
        ...(suggestion === undefined ? {} : { suggestion }),
        detail: { text: cell, expected: expectedUnit(ask, table.system) },
      });
      return null;
    }
    default:
      return formula(text.expression, ask, table);
  }
}

function constant(
  value: number,
  written: string,
  ask: ScalarRequest,
  table: Reading,
  blank: boolean,
  unit: Unit | null,
): Scalar | null {
  const factor = bareFactor(ask, table);
  if (value !== 0 && needsUnit(ask, table)) {
    unitMissing(ask, table.issues, table.system!, written);
    return null;
  }
  const product = value * factor;
  if (!Number.isFinite(product)) {
    table.issues.push({
      code: 'not-finite',
      kind: 'invalid',
      row: ask.row,
      column: ask.column,
      found: written,
    });
    return null;
  }
  return { ...base(ask), constant: product, blank, unit, written, factor };
}

function base(ask: ScalarRequest) {
  return {
    row: ask.row,
    column: ask.column,
    expression: null,
    evaluate: null,
    needsUnit: false,
    unitColumn: ask.unit !== null,
    dimension: ask.dimension,
    usesX: false,
  };
}

function bareFactor(ask: ScalarRequest, table: Reading): number {
  if (table.system === null) return 1;
  if (ask.unit !== null) return table.system.factor(ask.unit);
  return ask.bare === 'deflection' ? table.system.deflectionFactor : 1;
}

function needsUnit(ask: ScalarRequest, table: Reading): boolean {
  return table.system !== null && ask.bare === 'stated' && ask.unit === null;
}

export function unitMissing(
  ask: { readonly row: number; readonly column: string; readonly dimension: Dimension },
  issues: Issue[],
  system: UnitSystem,
  written: string,
): void {
  issues.push({
    code: 'unit-missing',
    kind: 'invalid',
    row: ask.row,
    column: ask.column,
    found: written,
    suggestion: usualUnit(ask.dimension, system),
  });
}

function quantity(exact: Ratio, unit: Unit, cell: string, ask: ScalarRequest, table: Reading): Scalar | null {
  const { row, column } = ask;
  const { system } = table;
  if (system === null) {
    table.unitWithoutRow(row, column, cell);
    return null;
  }
  if (ask.unit !== null && ask.unit.text !== unit.text) {
    table.issues.push({
      code: 'unit-twice',
      kind: 'invalid',
      row,
      column,
      found: cell,
      expected: ask.unit.text,
    });
    return null;
  }
  if (!sameDimension(unit, ask.dimension)) {
    wrongDimension(unit, ask, table.issues, system);
    return null;
  }
  const value = toNumber(times(exact, system.exactFactor(unit))) * Math.PI ** unit.pi;
  if (!Number.isFinite(value)) {
    table.issues.push({ code: 'not-finite', kind: 'invalid', row, column, found: cell });
    return null;
  }
  return { ...base(ask), constant: value, blank: false, unit, written: String(toNumber(exact)), factor: 1 };
}

export function wrongDimension(
  unit: Unit,
  ask: { readonly row: number; readonly column: string; readonly dimension: Dimension },
  issues: Issue[],
  system: UnitSystem,
): void {
  issues.push({
    code: 'wrong-dimension',
    kind: 'invalid',
    row: ask.row,
    column: ask.column,
    found: unit.text,
    expected: usualUnit(ask.dimension, system),
  });
}

function expectedUnit(ask: ScalarRequest, system: UnitSystem | null): string {
  return system === null ? '' : usualUnit(ask.dimension, system);
}

function formula(expression: Expression, ask: ScalarRequest, table: Reading): Scalar | null {
  const { row, column } = ask;
  if (expression.usesX && !ask.law) {
    table.issues.push({ code: 'x-not-allowed', kind: 'invalid', row, column, found: expression.text });
    return null;
  }
  const evaluate = expression.root.compile((name) => table.slot(name, row, column));
  if (expression.names.length === 0 && !expression.usesX) {
    const value = evaluate([]);
    if (!Number.isFinite(value)) {
      table.issues.push({ code: 'not-finite', kind: 'invalid', row, column, found: expression.text });
      return null;
    }
    return constant(value, String(value), ask, table, false, ask.unit);
  }
  if (expression.names.length === 0 && needsUnit(ask, table)) {
    unitMissing(ask, table.issues, table.system!, expression.text);
    return null;
  }
  return {
    ...base(ask),
    constant: 0,
    expression,
    evaluate,
    factor: bareFactor(ask, table),
    needsUnit: needsUnit(ask, table),
    usesX: expression.usesX,
    blank: false,
    unit: ask.unit,
    written: expression.text,
  };
}

/** The row's Unit column; undefined: an issue was added. */
export function readUnitCell(
  cell: Cell | undefined,
  ask: { readonly row: number; readonly dimension: Dimension },
  table: Reading,
): Unit | null | undefined {
  const { row } = ask;
  const place = { kind: 'invalid', row, column: 'Unit' } as const;
  if (cell === null || cell === undefined || cell === 0) return null;
  if (typeof cell !== 'string') {
    if (isErrorCell(cell)) table.issues.push({ ...place, code: 'cell-error', found: cell.error });
    else table.issues.push({ ...place, code: 'unit-not-text', found: showCell(cell) });
    return undefined;
  }
  const unit = parseUnit(cell);
  if (!unit.ok) {
    const { suggestion } = unit;
    table.issues.push({
      ...place,
      code: unit.reason === 'unknown' ? 'unknown-unit' : 'foreign-unit',
      found: unit.reason === 'unknown' ? unit.part : cell,
      ...(suggestion === undefined ? {} : { suggestion }),
      detail: { text: cell, expected: table.system === null ? '' : usualUnit(ask.dimension, table.system) },
    });
    return undefined;
  }
  if (table.system === null) {
    table.unitWithoutRow(row, 'Unit', cell);
    return undefined;
  }
  if (!sameDimension(unit.unit, ask.dimension)) {
    wrongDimension(unit.unit, { row, column: 'Unit', dimension: ask.dimension }, table.issues, table.system);
    return undefined;
  }
  return unit.unit;
}

export { unitText };
