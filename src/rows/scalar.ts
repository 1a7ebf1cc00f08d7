/**
 * A number cell, read once: a constant already in the model's units, or an expression with the factor that takes its value
 * there.
 */
import type { Issue } from '../issue';
import { isErrorCell, showCell, type Cell } from './cell';
import { readText } from './cell-text';
import type { Closure, Expression } from './expression';
import type { Field } from './items';
import { toNumber, type Ratio } from './rational';
import { sameDimension, usualUnit, type UnitSystem } from './system';
import { parseUnit, type Dimension, type Unit } from './units';

/** Made for every number cell of every table that comes by, so it is a plain class of one shape. */
export class Scalar {
  constructor(
    /** 1-based */
    readonly row: number,
    readonly field: Field,
    /** in the model's units, when there is no expression */
    readonly constant: number,
    readonly expression: Expression | null,
    readonly evaluate: Closure | null,
    /** model units per unit of the expression's value, unless its names carry units */
    readonly factor: number,
    /** the row needs a stated unit, and only names could carry it */
    readonly needsUnit: boolean,
    /** a unit stands in the Unit column, so names must not carry another */
    readonly unitColumn: boolean,
    /** blank or 0 */
    readonly blank: boolean,
    /** the unit it was written in; null = the bare unit */
    readonly unit: Unit | null,
    /** the number or expression as written, without its unit */
    readonly written: number | string,
  ) {}

  get usesX(): boolean {
    return this.expression !== null && this.expression.usesX;
  }
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

/** `unit` is the row's Unit column, read. null: an issue was added. */
export function readScalar(
  cell: Cell | undefined,
  row: number,
  field: Field,
  unit: Unit | null,
  table: Reading,
): Scalar | null {
  if (cell === null || cell === undefined) return constant(0, 0, row, field, unit, true, table);
  if (typeof cell === 'number') return constant(cell, cell, row, field, unit, cell === 0, table);
  if (typeof cell === 'boolean') {
    return fault(table, {
      code: 'cell-boolean',
      kind: 'invalid',
      row,
      column: field.column,
      found: showCell(cell),
    });
  }
  if (isErrorCell(cell)) {
    return fault(table, {
      code: 'cell-error',
      kind: 'invalid',
      row,
      column: field.column,
      found: cell.error,
    });
  }
  const text = readText(cell);
  switch (text.kind) {
    case 'number':
      if (text.odd || !table.text) asText(cell, String(text.value), row, field, table);
      return constant(text.value, text.value, row, field, unit, false, table);
    case 'quantity':
      if (text.odd) asText(cell, `${toNumber(text.exact)} ${text.unit.text}`, row, field, table);
      return quantity(text.exact, text.unit, cell, row, field, unit, table);
    case 'expression':
      return formula(text.expression, row, field, unit, table);
    default: {
      const { reason, found, suggestion } = text;
      const expected = table.system === null ? '' : usualUnit(field.dimension, table.system);
      return fault(table, {
        code: reason,
        kind: 'invalid',
        row,
        column: field.column,
        found,
        suggestion,
        detail: { text: cell, expected },
      });
    }
  }
}

function fault(table: Reading, issue: Issue): null {
  table.issues.push(issue);
  return null;
}

function asText(cell: string, expected: string, row: number, field: Field, table: Reading): void {
  table.cautions.push({
    code: 'number-as-text',
    kind: 'invalid',
    row,
    column: field.column,
    found: cell,
    expected,
  });
}

function constant(
  value: number,
  written: number | string,
  row: number,
  field: Field,
  unit: Unit | null,
  blank: boolean,
  table: Reading,
): Scalar | null {
  if (value !== 0 && needsUnit(field, unit, table))
    return unitMissing(row, field, table.issues, table.system!, String(written));
  const factor = bareFactor(field, unit, table);
  const product = value * factor;
  if (!Number.isFinite(product)) {
    return fault(table, {
      code: 'not-finite',
      kind: 'invalid',
      row,
      column: field.column,
      found: String(written),
    });
  }
  return new Scalar(row, field, product, null, null, factor, false, unit !== null, blank, unit, written);
}

function bareFactor(field: Field, unit: Unit | null, { system }: Reading): number {
  if (system === null) return 1;
  if (unit !== null) return system.factor(unit);
  return field.bare === 'deflection' ? system.deflectionFactor : 1;
}

function needsUnit(field: Field, unit: Unit | null, table: Reading): boolean {
  return unit === null && field.bare === 'stated' && table.system !== null;
}

export function unitMissing(
  row: number,
  field: Field,
  issues: Issue[],
  system: UnitSystem,
  written: string,
): null {
  issues.push({
    code: 'unit-missing',
    kind: 'invalid',
    row,
    column: field.column,
    found: written,
    suggestion: usualUnit(field.dimension, system),
  });
  return null;
}

function quantity(
  exact: Ratio,
  stated: Unit,
  cell: string,
  row: number,
  field: Field,
  unit: Unit | null,
  table: Reading,
): Scalar | null {
  const { system } = table;
  const { column } = field;
  if (system === null) {
    table.unitWithoutRow(row, column, cell);
    return null;
  }
  if (unit !== null && unit.text !== stated.text) {
    return fault(table, {
      code: 'unit-twice',
      kind: 'invalid',
      row,
      column,
      found: cell,
      expected: unit.text,
    });
  }
  if (!sameDimension(stated, field.dimension))
    return wrongDimension(stated, row, column, field.dimension, table.issues, system);
  const value = system.value(cell, exact, stated);
  if (!Number.isFinite(value))
    return fault(table, { code: 'not-finite', kind: 'invalid', row, column, found: cell });
  return new Scalar(row, field, value, null, null, 1, false, true, false, stated, cell);
}

function wrongDimension(
  unit: Unit,
  row: number,
  column: string,
  dimension: Dimension,
  issues: Issue[],
  system: UnitSystem,
): null {
  issues.push({
    code: 'wrong-dimension',
    kind: 'invalid',
    row,
    column,
    found: unit.text,
    expected: usualUnit(dimension, system),
  });
  return null;
}

function formula(
  expression: Expression,
  row: number,
  field: Field,
  unit: Unit | null,
  table: Reading,
): Scalar | null {
  const { column } = field;
  const { names, usesX, text } = expression;
  if (usesX && !field.law)
    return fault(table, { code: 'x-not-allowed', kind: 'invalid', row, column, found: text });
  const evaluate = expression.root.compile((name) => table.slot(name, row, column));
  if (names.length === 0 && !usesX) {
    const value = evaluate([]);
    if (!Number.isFinite(value))
      return fault(table, { code: 'not-finite', kind: 'invalid', row, column, found: text });
    return constant(value, text, row, field, unit, false, table);
  }
  const stated = !needsUnit(field, unit, table);
  // Without names there is nothing that could carry the unit later.
  if (!stated && names.length === 0) return unitMissing(row, field, table.issues, table.system!, text);
  const factor = bareFactor(field, unit, table);
  return new Scalar(row, field, 0, expression, evaluate, factor, !stated, unit !== null, false, unit, text);
}

/** The row's Unit column; undefined: an issue was added. */
export function readUnitCell(
  cell: Cell | undefined,
  row: number,
  dimension: Dimension,
  table: Reading,
): Unit | null | undefined {
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
      detail: { text: cell, expected: table.system === null ? '' : usualUnit(dimension, table.system) },
    });
    return undefined;
  }
  if (table.system === null) {
    table.unitWithoutRow(row, 'Unit', cell);
    return undefined;
  }
  if (!sameDimension(unit.unit, dimension)) {
    wrongDimension(unit.unit, row, 'Unit', dimension, table.issues, table.system);
    return undefined;
  }
  return unit.unit;
}
