/** The units of a table: what its `units` row says, and the way of any other unit into them. */
import type { ModelUnits } from '../beam/model';
import { power, times, toNumber, type Ratio } from './rational';
import type { Dimension, Unit } from './units';

export interface UnitSystem {
  readonly force: Unit;
  readonly length: Unit;
  readonly deflection: Unit;
  /** one deflection unit in length units */
  readonly deflectionFactor: number;
  /** one `unit` in the model's force, length and radian */
  factor(unit: Unit): number;
  /** the same factor as a fraction, to be multiplied by an exact number before rounding (pi left out) */
  exactFactor(unit: Unit): Ratio;
  /** an exact number of `unit` in the model's units, rounded once; remembered by its text ("8360 cm4") */
  value(text: string, exact: Ratio, unit: Unit): number;
}

const known = new Map<string, UnitSystem>();

/** Systems are remembered, and with them the factors. */
export function unitSystem(force: Unit, length: Unit, deflection: Unit): UnitSystem {
  const key = `${force.text}|${length.text}|${deflection.text}`;
  const found = known.get(key);
  if (found !== undefined) return found;
  const exactFactor = (unit: Unit): Ratio =>
    times(unit.exact, times(power(force.exact, -unit.force), power(length.exact, -unit.length)));
  const factors = new Map<Unit, number>();
  const factor = (unit: Unit): number => {
    let value = factors.get(unit);
    if (value === undefined) {
      value = toNumber(exactFactor(unit)) * Math.PI ** unit.pi;
      if (factors.size > 1000) factors.clear();
      factors.set(unit, value);
    }
    return value;
  };
  const values = new Map<string, number>();
  const value = (text: string, exact: Ratio, unit: Unit): number => {
    let found = values.get(text);
    if (found === undefined) {
      found = toNumber(times(exact, exactFactor(unit))) * Math.PI ** unit.pi;
      if (values.size > 2000) values.clear();
      values.set(text, found);
    }
    return found;
  };
  const system: UnitSystem = {
    force,
    length,
    deflection,
    deflectionFactor: factor(deflection),
    factor,
    exactFactor,
    value,
  };
  if (known.size > 200) known.clear();
  known.set(key, system);
  return system;
}

/** 9.80665 m/s^2 (standard gravity, NIST SP 811) in length/s^2. */
export function gravityIn(length: Unit): number {
  return toNumber(times({ n: 980665n, d: 100000n }, power(length.exact, -1)));
}

/** What the model keeps of the units; `secondMoment` is the unit of the I rows. */
export function modelUnits(system: UnitSystem, secondMoment: Unit | null): ModelUnits {
  return {
    force: system.force.text,
    length: system.length.text,
    deflection: system.deflection.text,
    deflectionPerLength: toNumber(times(system.length.exact, power(system.deflection.exact, -1))),
    gravity: gravityIn(system.length),
    secondMoment:
      secondMoment === null
        ? null
        : {
            unit: secondMoment.text,
            perModelUnit: toNumber(times(power(system.length.exact, 4), power(secondMoment.exact, -1))),
          },
  };
}

/** A unit of this dimension in the table's own units, e.g. "kN/m" or "kN·m²"; "GPa" for stresses. */
export function usualUnit(dimension: Dimension, system: UnitSystem): string {
  const { force, length } = dimension;
  const customary = /in|ft|foot|inch|yd|yard/.test(system.length.text);
  if (force === 1 && length === -2) return customary ? 'ksi' : 'GPa';
  if (force === 0 && length === 4) return customary ? 'in\u2074' : 'cm\u2074';
  return unitText(dimension, system);
}

const UP = ['', '', '\u00b2', '\u00b3', '\u2074'];

/** The model's own unit of this dimension, e.g. "kN·m", "kN/m", "1/m", "rad". */
export function unitText({ force, length, angle }: Dimension, system: UnitSystem): string {
  const l = (k: number) => system.length.text + (UP[k] ?? `^${k}`);
  const f = system.force.text;
  if (force === 0 && length === 0) return angle === 0 ? '' : 'rad';
  if (force === 0) return length > 0 ? l(length) : `1/${l(-length)}`;
  if (length === 0) return f;
  return length > 0 ? `${f}\u00b7${l(length)}` : `${f}/${l(-length)}`;
}

/** Same dimension; an angle counts as a number where only its radians are meant (moment per radian, curvature). */
export function sameDimension(unit: Dimension, expected: Dimension): boolean {
  if (unit.force !== expected.force || unit.length !== expected.length) return false;
  if (expected.angle !== 0) return unit.angle === 0 || unit.angle === expected.angle;
  if (expected.force === 0 && expected.length === -1) return unit.angle === 0 || unit.angle === 1;
  if (expected.force === 1 && expected.length === 1) return unit.angle === 0;
  return unit.angle === 0;
}
