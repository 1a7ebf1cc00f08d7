/** The items as one table: which cells each takes, of what dimension its Value is, and what is checked about it. */
import type { ColumnName, ItemName } from './words';
import type { Dimension } from './units';

/** What a bare number is in: the units row's force and length, its deflection unit, radians, or nothing (the unit must be stated). */
export type Bare = 'model' | 'deflection' | 'radians' | 'stated';

/** What a number cell is asked for. */
export interface Field {
  readonly column: ColumnName;
  readonly dimension: Dimension;
  readonly bare: Bare;
  /** may be an expression in x */
  readonly law: boolean;
}

export interface ItemSpec {
  readonly group: 'support' | 'imposed' | 'release' | 'foundation' | 'section' | 'load' | 'setting';
  /** place: one position; stretch: At..To, blank or 0..0 = the whole beam */
  readonly at: 'none' | 'place' | 'stretch';
  readonly value: Dimension | null;
  readonly bare: Bare;
  /** must be greater than 0 */
  readonly positive: boolean;
  /** turns over with `axis up` */
  readonly signed: boolean;
  /** takes an End value */
  readonly end: boolean;
  /** the Value may be an expression in x */
  readonly law: boolean;
  /** takes a Case */
  readonly load: boolean;
  /** what its Value is called in a sentence */
  readonly quantity: string;
}

const dim = (force: number, length: number, angle = 0): Dimension => ({ force, length, angle });

export const FORCE = dim(1, 0);
export const LENGTH = dim(0, 1);
export const MOMENT = dim(1, 1);
export const LINE_LOAD = dim(1, -1);
export const STRESS = dim(1, -2);
export const SECOND_MOMENT = dim(0, 4);
export const BENDING_STIFFNESS = dim(1, 2);
export const ANGLE = dim(0, 0, 1);
/** moment per radian; written with or without the radian */
export const ROTATIONAL_STIFFNESS = dim(1, 1, -1);
export const CURVATURE = dim(0, -1);

const plain: ItemSpec = {
  group: 'support',
  at: 'place',
  value: null,
  bare: 'model',
  positive: false,
  signed: false,
  end: false,
  law: false,
  load: false,
  quantity: '',
};
const stiff = { bare: 'stated', positive: true } as const;
const load = { group: 'load', load: true } as const;

export const SPECS: Readonly<Record<ItemName, ItemSpec>> = {
  pin: plain,
  fixed: plain,
  guided: plain,
  spring: { ...plain, ...stiff, value: LINE_LOAD, quantity: 'stiffness' },
  'rotational spring': { ...plain, ...stiff, value: ROTATIONAL_STIFFNESS, quantity: 'stiffness' },
  settlement: {
    ...plain,
    group: 'imposed',
    value: LENGTH,
    bare: 'deflection',
    signed: true,
    load: true,
    quantity: 'displacement',
  },
  rotation: {
    ...plain,
    group: 'imposed',
    value: ANGLE,
    bare: 'radians',
    signed: true,
    load: true,
    quantity: 'angle',
  },
  foundation: {
    ...plain,
    ...stiff,
    group: 'foundation',
    at: 'stretch',
    value: STRESS,
    quantity: 'stiffness',
  },
  hinge: { ...plain, group: 'release' },
  'shear release': { ...plain, group: 'release' },
  E: { ...plain, ...stiff, group: 'section', at: 'stretch', value: STRESS, law: true, quantity: 'modulus' },
  I: {
    ...plain,
    ...stiff,
    group: 'section',
    at: 'stretch',
    value: SECOND_MOMENT,
    end: true,
    law: true,
    quantity: 'second moment of area',
  },
  EI: {
    ...plain,
    ...stiff,
    group: 'section',
    at: 'stretch',
    value: BENDING_STIFFNESS,
    end: true,
    law: true,
    quantity: 'bending stiffness',
  },
  GA: {
    ...plain,
    ...stiff,
    group: 'section',
    at: 'stretch',
    value: FORCE,
    end: true,
    law: true,
    quantity: 'shear stiffness',
  },
  point: { ...plain, ...load, value: FORCE, signed: true, quantity: 'force' },
  couple: { ...plain, ...load, value: MOMENT, signed: true, quantity: 'couple' },
  uniform: { ...plain, ...load, at: 'stretch', value: LINE_LOAD, signed: true, quantity: 'load' },
  varying: {
    ...plain,
    ...load,
    at: 'stretch',
    value: LINE_LOAD,
    signed: true,
    end: true,
    law: true,
    quantity: 'load',
  },
  curvature: { ...plain, ...load, at: 'stretch', value: CURVATURE, quantity: 'curvature' },
  axial: { ...plain, ...load, at: 'none', value: FORCE, quantity: 'axial force' },
  camber: { ...plain, ...load, at: 'stretch', value: LENGTH, bare: 'deflection', quantity: 'rise' },
  units: { ...plain, group: 'setting' },
  axis: { ...plain, group: 'setting' },
  limit: {
    ...plain,
    group: 'setting',
    at: 'none',
    value: LENGTH,
    bare: 'deflection',
    positive: true,
    quantity: 'deflection',
  },
};

export const AT: Field = { column: 'At', dimension: LENGTH, bare: 'model', law: false };
export const TO: Field = { column: 'To', dimension: LENGTH, bare: 'model', law: false };

/** The fields of Value and End value of each item; fixed objects, because they are asked for with every row of every table. */
const FIELDS = new Map<ItemName, { readonly value: Field; readonly end: Field }>();
for (const [item, spec] of Object.entries(SPECS) as [ItemName, ItemSpec][]) {
  const { value, bare, law } = spec;
  if (value === null) continue;
  FIELDS.set(item, {
    value: { column: 'Value', dimension: value, bare, law },
    end: { column: 'End value', dimension: value, bare, law: false },
  });
}

export function fieldsOf(item: ItemName): { readonly value: Field; readonly end: Field } {
  return FIELDS.get(item)!;
}

/** Is this column of any use to the item? Settings read their cells themselves. */
export function takes(item: ItemName, column: ColumnName): boolean {
  if (column === 'Item' || column === 'Note') return true;
  if (item === 'units') return column === 'At' || column === 'To' || column === 'Value';
  if (item === 'axis') return column === 'At';
  if (item === 'limit') return column === 'Value' || column === 'Unit' || column === 'Case';
  const spec = SPECS[item];
  switch (column) {
    case 'At':
      return spec.at !== 'none';
    case 'To':
      return spec.at === 'stretch';
    case 'Value':
    case 'Unit':
      return spec.value !== null;
    case 'End value':
      return spec.end;
    default:
      return spec.load;
  }
}
