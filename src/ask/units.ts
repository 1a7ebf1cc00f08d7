/** Unit texts of results and headings: '' when the table has no `units` row and nothing is converted. */
import type { BeamModel } from '../beam/model';
import type { Effect } from './words';

/** Unit of a result, e.g. 'kN·m' for a moment; '' without a `units` row. */
export function unitOf(model: BeamModel, what: Effect | 'length' | 'stiffness'): string {
  const units = model.units;
  if (units === null) return what === 'slope' ? 'rad' : '';
  switch (what) {
    case 'length':
      return units.length;
    case 'deflection':
      return units.deflection;
    case 'slope':
      return 'rad';
    case 'moment':
    case 'couple':
      return `${units.force}·${units.length}`;
    case 'shear':
    case 'reaction':
      return units.force;
    case 'stiffness':
      return `${units.force}·${units.length}²`;
  }
}

/** A column heading: `moment (kN·m)`, or just `moment` when there is no unit to state. */
export function heading(name: string, unit: string): string {
  return unit === '' ? name : `${name} (${unit})`;
}

/** A number as a reader writes it: at most `digits` significant digits, no trailing zeros. */
export function write(value: number, digits = 6): string {
  const rounded = Number(value.toPrecision(digits));
  return String(rounded === 0 ? 0 : rounded);
}
