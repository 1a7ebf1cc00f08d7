/**
 * READBACK: one sentence per row, how it was read, in the units the row states (with the table's own in brackets where they
 * differ) and with directions in words, so that no sign has to be interpreted.
 */
import type { BeamModel, Law } from '../beam/model';
import type { Evaluated } from './build';
import { fieldsOf, MOMENT, type Field } from './items';
import { lawAt } from './law';
import type { Placed, Plan } from './plan';
import { showNumber } from './show';
import { unitText } from './system';
import type { Unit } from './units';

export interface Reading {
  /** 1-based row of the range */
  readonly row: number;
  readonly text: string;
}

/** Sorted by row. */
export function readingsOf(beam: Evaluated, model: BeamModel): Reading[] {
  const { plan } = beam;
  const found: Reading[] = plan.placed.map((placed, k) => ({
    row: placed.row,
    text: `${sentence(placed, k, beam)}.`,
  }));
  for (const { row, text, combination } of model.limits) {
    const when = combination === null ? 'with everything acting' : `under ${combination.text}`;
    found.push({ row, text: `deflection limit ${text}, ${when}.` });
  }
  if (plan.unitsRow !== null && plan.system !== null)
    found.push({ row: plan.unitsRow, text: unitsSentence(plan) });
  if (plan.axisRow !== null) {
    const [way, turn] = plan.axis === 1 ? ['down', 'clockwise'] : ['up', 'counter-clockwise'];
    const text = `y points ${way}: forces, settlements and deflections are positive ${way}, rotations and couples ${turn}.`;
    found.push({ row: plan.axisRow, text });
  }
  return found.sort((a, b) => a.row - b.row);
}

function unitsSentence({ system }: Plan): string {
  const { force, length, deflection } = system!;
  return `forces in ${force.text}, lengths in ${length.text}, moments in ${unitText(MOMENT, system!)}, deflections in ${deflection.text}.`;
}

/** Model signs: forces and displacements positive down, turns positive clockwise. */
const WAYS = {
  vertical: ['downwards', 'upwards'],
  turn: ['clockwise', 'counter-clockwise'],
  axial: ['in tension', 'in compression'],
  bend: ['sagging', 'hogging'],
  bow: ['upwards', 'downwards'],
} as const;

function sentence(row: Placed, k: number, beam: Evaluated): string {
  const value = beam.values[k]!;
  const at = beam.show(beam.from(row));
  const over = stretch(row, beam);
  const acting = row.case < 0 ? ', always acting' : `, case ${beam.plan.cases[row.case]!}`;
  const size = (way: keyof typeof WAYS): string => directed(value, way, row, beam);
  switch (row.item) {
    case 'pin':
      return `pin at ${at}, deflection held`;
    case 'fixed':
      return `fixed at ${at}, deflection and rotation held`;
    case 'guided':
      return `guided at ${at}, rotation held, free to deflect`;
    case 'spring':
      return `spring support of ${amount(value, row, beam)} at ${at}`;
    case 'rotational spring':
      return `rotational spring of ${amount(value, row, beam)} at ${at}`;
    case 'settlement':
      return `the support at ${at} is displaced ${size('vertical')}${acting}`;
    case 'rotation':
      return `the held rotation at ${at} is turned ${size('turn')}${acting}`;
    case 'foundation':
      return `elastic foundation of ${amount(value, row, beam)} ${over}`;
    case 'hinge':
      return `hinge at ${at}, bending moment released`;
    case 'shear release':
      return `shear release at ${at}, shear force released`;
    case 'point':
      return `point load ${size('vertical')} at ${at}${acting}`;
    case 'couple':
      return `couple ${size('turn')} at ${at}${acting}`;
    case 'uniform':
      return `uniform load ${size('vertical')} ${over}${acting}`;
    case 'varying':
      return `varying load ${along(row, k, beam, (v) => directed(v, 'vertical', row, beam))}${acting}`;
    case 'curvature':
      return `free curvature ${size('bend')} ${over}${acting}`;
    case 'axial':
      return `axial force ${size('axial')} along the whole beam${acting}`;
    case 'camber':
      return `camber ${size('bow')} ${over}, deflections are net of it${acting}`;
    default:
      return `${row.item} = ${along(row, k, beam, (v) => amount(v, row, beam))}`;
  }
}

function stretch(row: Placed, beam: Evaluated): string {
  return row.to < 0
    ? `over the whole beam, ${beam.show(beam.start)} to ${beam.show(beam.end)}`
    : `from ${beam.show(beam.from(row))} to ${beam.show(beam.to(row))}`;
}

/** "12 kN/m", "8360 cm⁴ at 0 m to 4000 cm⁴ at 6 m", or the expression with its values at both ends. */
function along(row: Placed, k: number, beam: Evaluated, show: (value: number) => string): string {
  const law: Law = beam.law(k);
  const from = beam.from(row);
  const to = beam.to(row);
  const [a, b] = [show(lawAt(law, from, to, from)), show(lawAt(law, from, to, to))];
  if (law.kind === 'linear' && law.start === law.end) return `${a} ${stretch(row, beam)}`;
  const ends = `${a} at ${beam.show(from)} to ${b} at ${beam.show(to)}`;
  return law.kind === 'linear' ? ends : `${law.text} (${ends})`;
}

function directed(value: number, way: keyof typeof WAYS, row: Placed, beam: Evaluated): string {
  const text = amount(Math.abs(value), row, beam);
  return value === 0 ? text : `${text} ${WAYS[way][value > 0 ? 0 : 1]}`;
}

/** A number of the model in the unit the row states, and in the table's own where that differs. */
function amount(value: number, row: Placed, beam: Evaluated): string {
  const field: Field = fieldsOf(row.item).value;
  const { system } = beam.plan;
  if (system === null) return showNumber(value) + (field.bare === 'radians' ? ' rad' : '');
  const own = unitText(field.dimension, system);
  const unit: Unit | null = row.value?.unit ?? (field.bare === 'deflection' ? system.deflection : null);
  if (unit === null || unit.text === own) return `${showNumber(value)} ${own}`;
  const factor = system.factor(unit);
  const stated = `${showNumber(value / factor)} ${unit.text}`;
  // kNm for kN·m needs no translation.
  return row.value?.unit && factor !== 1 ? `${stated} (${showNumber(value)} ${own})` : stated;
}
