/** Short ways to write beam models in tests. */
import type { BeamModel, Law, Load, SectionStretch, Support } from '../../src/beam/model';

export const constant = (value: number): Law => ({ kind: 'linear', start: value, end: value });
export const linear = (start: number, end: number): Law => ({ kind: 'linear', start, end });

export function stretch(from: number, to: number, law: Law | number): SectionStretch {
  return { from, to, law: typeof law === 'number' ? constant(law) : law, rows: [90] };
}

const support = (at: number, extra: Partial<Support>): Support => ({
  at,
  held: false,
  clamped: false,
  spring: 0,
  rotationalSpring: 0,
  rows: [1],
  ...extra,
});
export const pin = (at: number): Support => support(at, { held: true });
export const fixed = (at: number): Support => support(at, { held: true, clamped: true });
export const guided = (at: number): Support => support(at, { clamped: true });
export const spring = (at: number, k: number): Support => support(at, { spring: k });
export const onSprings = (at: number, extra: Partial<Support>): Support => support(at, extra);

const base = { row: 9, case: -1 } as const;
export const point = (at: number, force: number, c = -1): Load => ({
  ...base,
  case: c,
  kind: 'point',
  at,
  force,
});
export const couple = (at: number, value: number, c = -1): Load => ({
  ...base,
  case: c,
  kind: 'couple',
  at,
  couple: value,
});
export const distributed = (from: number, to: number, start: number, end = start, c = -1): Load => ({
  ...base,
  case: c,
  kind: 'distributed',
  from,
  to,
  law: { kind: 'linear', start, end },
});
export const axial = (force: number): Load => ({ ...base, kind: 'axial', force });
export const settlement = (at: number, displacement: number): Load => ({
  ...base,
  kind: 'settlement',
  at,
  displacement,
});
export const rotation = (at: number, angle: number): Load => ({ ...base, kind: 'rotation', at, angle });
export const camber = (from: number, to: number, rise: number): Load => ({
  ...base,
  kind: 'camber',
  from,
  to,
  rise,
});
export const curvature = (from: number, to: number, value: number): Load => ({
  ...base,
  kind: 'curvature',
  from,
  to,
  curvature: value,
});

/** A beam of the given parts; EI = 1 over the whole beam unless given. */
export function beam(start: number, end: number, parts: Partial<BeamModel>): BeamModel {
  return {
    start,
    end,
    supports: [],
    releases: [],
    foundations: [],
    ei: [stretch(start, end, 1)],
    ga: [],
    loads: [],
    cases: [],
    limits: [],
    axis: 1,
    units: null,
    modulus: null,
    ...parts,
  };
}
