/** The numbers of one member: the names' values in slots, with the dimensions of those that state a unit. */
import type { Issue } from '../issue';
import type { Bindings } from './bindings';
import { carry, NUMBER, PLAIN, type Carried } from './carried';
import { nearest } from './near';
import { readNumberText } from './number-text';
import type { Plan } from './plan';
import { readText } from './cell-text';
import { unitMissing, type Scalar } from './scalar';
import { sameDimension, unitText, usualUnit, type UnitSystem } from './system';

export interface Bound {
  /** env[0] is x */
  readonly env: number[];
  /** by slot; null when no value states a unit */
  readonly carried: readonly Carried[] | null;
}

interface Converted {
  readonly value: number;
  readonly carried: Carried;
}

/** A name without a readable value becomes NaN, with an issue. */
export function bind(plan: Plan, bindings: Bindings, issues: Issue[]): Bound {
  const { names } = plan;
  const env = new Array<number>(names.length + 1);
  env[0] = 0;
  let carried: Carried[] | null = null;
  for (let i = 0; i < names.length; i += 1) {
    const name = names[i]!;
    const value = bindings.get(name);
    if (typeof value === 'number') {
      env[i + 1] = value;
    } else if (value === undefined) {
      env[i + 1] = NaN;
      issues.push(unknownName(name, plan, bindings));
    } else {
      const read = readValue(name, value, plan.system, issues);
      env[i + 1] = read === null ? NaN : read.value;
      if (read !== null && read.carried !== PLAIN) {
        carried ??= new Array<Carried>(names.length + 1).fill(PLAIN);
        carried[i + 1] = read.carried;
      }
    }
  }
  return { env, carried };
}

function unknownName(name: string, plan: Plan, bindings: Bindings): Issue {
  const use = plan.uses.get(name);
  const suggestion = nearest(name, bindings.keys());
  return {
    code: 'unknown-name',
    kind: 'invalid',
    ...use,
    found: name,
    ...(suggestion === undefined ? {} : { suggestion }),
    detail: { names: [...bindings.keys()] },
  };
}

function readValue(name: string, text: string, system: UnitSystem | null, issues: Issue[]): Converted | null {
  const number = readNumberText(text);
  if (number?.kind === 'number') return { value: Number(number.decimal), carried: PLAIN };
  const place = { kind: 'invalid', column: 'values' } as const;
  if (number !== null) {
    issues.push({ ...place, code: 'ambiguous-number', found: text, detail: { name } });
    return null;
  }
  const read = readText(text);
  if (read.kind !== 'quantity') {
    const refused =
      read.kind === 'refused' && (read.reason === 'unknown-unit' || read.reason === 'foreign-unit');
    issues.push({
      ...place,
      code: refused ? read.reason : 'bad-value',
      found: refused ? read.found : text,
      ...(refused && read.suggestion !== undefined ? { suggestion: read.suggestion } : {}),
      detail: { name, text },
    });
    return null;
  }
  if (system === null) {
    issues.push({ ...place, code: 'units-row-missing', found: text, detail: { name } });
    return null;
  }
  const { unit } = read;
  const { force, length, angle } = unit;
  const pure = force === 0 && length === 0 && angle === 0;
  return {
    value: system.value(text, read.exact, unit),
    carried: pure ? NUMBER : { kind: 'known', dimension: unit },
  };
}

/** The scalar in the model's units; NaN when an issue was added. */
export function evaluate(scalar: Scalar, bound: Bound, plan: Plan, issues: Issue[]): number {
  if (scalar.evaluate === null) return scalar.constant;
  const factor = factorOf(scalar, bound, plan, issues);
  const value = scalar.evaluate(bound.env) * factor;
  if (Number.isFinite(value)) return value;
  // A missing or unreadable name has been said already; an expression of good numbers has not.
  if (
    !Number.isNaN(factor) &&
    scalar.expression!.names.every((name) => !Number.isNaN(bound.env[plan.names.indexOf(name) + 1]))
  ) {
    issues.push({
      code: 'not-finite',
      kind: 'invalid',
      row: scalar.row,
      column: scalar.field.column,
      found: scalar.expression!.text,
    });
  }
  return NaN;
}

/** What takes the expression's value into the model's units; NaN when an issue was added. */
export function factorOf(scalar: Scalar, bound: Bound, plan: Plan, issues: Issue[]): number {
  const { system } = plan;
  const { row } = scalar;
  const { column, dimension } = scalar.field;
  if (bound.carried === null || system === null) {
    if (!scalar.needsUnit) return scalar.factor;
    unitMissing(row, scalar.field, issues, system!, scalar.expression!.text);
    return NaN;
  }
  const { carried } = bound;
  const result = carry(scalar.expression!.root, (name) => carried[plan.names.indexOf(name) + 1] ?? PLAIN);
  if (result === null) {
    issues.push({ code: 'mixed-dimensions', kind: 'invalid', row, column, found: scalar.expression!.text });
    return NaN;
  }
  if (result.kind === 'number' || result.kind === 'plain') {
    if (!scalar.needsUnit) return scalar.factor;
    unitMissing(row, scalar.field, issues, system, scalar.expression!.text);
    return NaN;
  }
  if (result.kind === 'known') {
    if (sameDimension(result.dimension, dimension)) return 1;
    const unit = unitText(result.dimension, system);
    issues.push({
      code: 'wrong-dimension',
      kind: 'invalid',
      row,
      column,
      found: unit,
      expected: usualUnit(dimension, system) || 'a number without a unit',
    });
    return NaN;
  }
  if (scalar.unitColumn) {
    issues.push({
      code: 'unit-twice',
      kind: 'invalid',
      row,
      column,
      found: scalar.expression!.text,
      expected: scalar.unit!.text,
    });
    return NaN;
  }
  return 1;
}
