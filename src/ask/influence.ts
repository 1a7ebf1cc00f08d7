/**
 * Influence lines by Mueller-Breslau: the deflected shape of the beam under a unit action that belongs to the quantity.
 * (H. Mueller-Breslau 1886, the kinematic theorem; any structural analysis text.)
 *
 * In the model's signs (y down, clockwise), for a unit load acting down at x and the quantity at a section s:
 *   deflection        v(x) under a unit force at s                         (Maxwell)
 *   slope             v(x) under a unit clockwise couple at s              (Betti)
 *   moment            v(x) under a kink of -1 at s: M is the work on a free curvature, and a kink of the rotation by
 *                     +1 is a free curvature of -1 there (M = -EI v'')
 *   shear             v(x) under an offset of +1 at s: left of s it falls from 0 to -x/L on a simple span, right of s
 *                     it falls from 1 - x/L, which is V = R_left - (load, once it is left of s)
 *   reaction (up)     v(x) when the support, or the ground under its spring, goes down by 1
 *   couple (clockwise) -v(x) when the support, or the ground of its spring, turns clockwise by 1
 *
 * To the reader the unit load is a `point` row of Value 1: along the y axis, so upward with `axis up`.
 * With an `axial` row the beam keeps that force (a tangent, second-order influence line).
 */
import type { BeamModel, Load, Support } from '../beam/model';
import { solve } from '../integrate/solve';
import { fail, respond, type OpenBeam } from '../open';
import { readPosition } from '../rows';
import { plain } from '../signs';
import type { Response, Side } from '../solution';
import {
  cutSegment,
  extremes,
  fieldOf,
  largestOf,
  segmentAt,
  sortedOnce,
  unionOfBreaks,
  valueAt,
  type Segment,
} from './field';
import { addScaled, compose, type Coefficients } from './polynomial';
import { namedPositions, spread, withJumps } from './profile';
import { quiet } from './quiet';
import { samePlace } from './reactions';
import { heading, unitOf, write } from './units';
import { EFFECTS, readPoints, readWord, single, type Effect } from './words';

export interface Section {
  readonly x: number;
  readonly side: Side;
}

/** The support an effect `reaction` or `couple` is asked of. Throws 'no-support' with the supports that have one. */
export function supportAt(model: BeamModel, effect: Effect, x: number): Support {
  const can = (support: Support): boolean =>
    effect === 'couple'
      ? support.clamped || support.rotationalSpring > 0
      : support.held || support.spring > 0;
  const found = model.supports.find((support) => samePlace(model, support.at, x) && can(support));
  return (
    found ??
    fail({
      code: 'no-support',
      kind: 'unavailable',
      column: 'at',
      expected: effect === 'couple' ? 'a support that holds a couple' : 'a support that holds a force',
      found: write(x),
      detail: {
        part: effect === 'couple' ? 'couple' : 'force',
        unit: unitOf(model, 'length'),
        supports: model.supports.filter(can).map((support) => write(support.at)),
      },
    })
  );
}

/** A section argument: a position, one-sided when written "3-" or "3+". Throws the position's issue under the name `at`. */
export function readSection(model: BeamModel, at: unknown): Section {
  const cell = single(at);
  const read = readPosition(cell === null || cell === undefined || cell === '' ? 0 : cell, model);
  if (!read.ok) return fail({ ...read.issue, column: 'at' });
  const side = read.x === model.start ? 'right' : read.x === model.end ? 'left' : read.side;
  return { x: read.x, side };
}

/** Axial forces stay (they are part of the stiffness); every other load makes way for the unit action. */
export function bare(model: BeamModel): Load[] {
  return model.loads.filter((load) => load.kind === 'axial').map((load) => ({ ...load, case: -1 }));
}

export function respondTo(model: BeamModel, loads: readonly Load[]): Response {
  const result = solve({ ...model, cases: [], limits: [], loads: [...bare(model), ...loads] });
  return result.ok ? respond(result.solution, null) : fail(result.issue);
}

const NOBODY = { row: 0, case: -1 } as const;

/**
 * The influence line of an effect as a field over the whole beam, model signs, per unit load acting down.
 * `at` must be a support for 'reaction' and 'couple'.
 */
export function influenceField(model: BeamModel, effect: Effect, section: Section): Segment[] {
  const { x, side } = section;
  switch (effect) {
    case 'deflection': {
      const act = (at: number): Load => ({ ...NOBODY, kind: 'point', at, force: 1 });
      return released(model, 'shear', x) ? beside(model, act, x, side) : shape(model, act(x));
    }
    case 'slope': {
      const act = (at: number): Load => ({ ...NOBODY, kind: 'couple', at, couple: 1 });
      return released(model, 'moment', x) ? beside(model, act, x, side) : shape(model, act(x));
    }
    case 'reaction':
      return shape(model, {
        ...NOBODY,
        kind: 'settlement',
        at: supportAt(model, effect, x).at,
        displacement: 1,
      });
    case 'couple':
      return shape(model, { ...NOBODY, kind: 'rotation', at: supportAt(model, effect, x).at, angle: 1 }, -1);
    case 'moment':
    case 'shear':
      return sectionForce(model, effect, x, side);
  }
}

/** A release at x: the two faces move apart there, and the unit action belongs to one of them. */
function released(model: BeamModel, kind: 'moment' | 'shear', x: number): boolean {
  return model.releases.some((release) => release.at === x && release.kind === kind);
}

function shape(model: BeamModel, load: Load, factor = 1): Segment[] {
  return fieldOf(respondTo(model, [load]).pieces('deflection'), factor);
}

function dislocation(effect: 'moment' | 'shear', at: number): Load {
  return effect === 'moment'
    ? { ...NOBODY, kind: 'kink', at, angle: -1 }
    : { ...NOBODY, kind: 'offset', at, displacement: 1 };
}

function sectionForce(model: BeamModel, effect: 'moment' | 'shear', x: number, side: Side): Segment[] {
  const support = model.supports.some((one) => one.at === x);
  const atEnd = x === model.start || x === model.end;
  if (!support && !atEnd) return shape(model, dislocation(effect, x));
  // A support takes up a dislocation at its own place, so there the section's force comes from the reactions' lines.
  if (model.foundations.length === 0 && bare(model).length === 0)
    return fromReactions(model, effect, x, side);
  return beside(model, (at) => dislocation(effect, at), x, side);
}

/** Influence lines of every reaction and couple at once: each unit movement of a support is a case of one solution. */
export interface ReactionLines {
  readonly at: readonly number[];
  readonly force: readonly (readonly Segment[] | null)[];
  readonly couple: readonly (readonly Segment[] | null)[];
}

export function reactionLines(model: BeamModel): ReactionLines {
  const loads: Load[] = [];
  for (const support of model.supports) {
    if (support.held || support.spring > 0) {
      loads.push({ row: 0, case: loads.length, kind: 'settlement', at: support.at, displacement: 1 });
    }
    if (support.clamped || support.rotationalSpring > 0) {
      loads.push({ row: 0, case: loads.length, kind: 'rotation', at: support.at, angle: 1 });
    }
  }
  const result = solve({ ...model, limits: [], cases: loads.map((_, i) => `unit${i}`), loads });
  const solution = result.ok ? result.solution : fail(result.issue);
  const line = (kind: 'settlement' | 'rotation', at: number): Segment[] | null => {
    const index = loads.findIndex((load) => load.kind === kind && load.at === at);
    if (index < 0) return null;
    const response = respond(
      solution,
      loads.map((_, i) => (i === index ? 1 : 0)),
    );
    return fieldOf(response.pieces('deflection'), kind === 'rotation' ? -1 : 1);
  };
  const at = model.supports.map((support) => support.at);
  return {
    at,
    force: at.map((x) => line('settlement', x)),
    couple: at.map((x) => line('rotation', x)),
  };
}

/**
 * Equilibrium of the part left of the section, for a beam held by its supports alone:
 * V = sum of R - (1 when the load is on the part), M = sum of R (s - a) + sum of C - (s - x when the load is on the part).
 */
function fromReactions(model: BeamModel, effect: 'moment' | 'shear', s: number, side: Side): Segment[] {
  const lines = reactionLines(model);
  const terms: { field: readonly Segment[]; factor: number }[] = [];
  lines.at.forEach((a, k) => {
    if (a > s || (a === s && side === 'left')) return;
    const force = lines.force[k];
    const couple = lines.couple[k];
    if (force) terms.push({ field: force, factor: effect === 'shear' ? 1 : s - a });
    if (couple && effect === 'moment') terms.push({ field: couple, factor: 1 });
  });
  const breaks = sortedOnce([...unionOfBreaks(terms.map((term) => term.field)), model.start, s, model.end]);
  const field: Segment[] = [];
  for (let i = 1; i < breaks.length; i++) {
    const from = breaks[i - 1] as number;
    const to = breaks[i] as number;
    let c: Coefficients = to > s ? [0] : effect === 'shear' ? [-1] : [from - s, to - from];
    for (const { field: term, factor } of terms) c = addScaled(c, cut(term, from, to), factor);
    field.push({ from, to, c });
  }
  return field;
}

/** The field's polynomial over from..to, which crosses none of its breaks. */
function cut(field: readonly Segment[], from: number, to: number): Coefficients {
  return cutSegment(field[segmentAt(field, from + (to - from) / 2)] as Segment, from, to);
}

/**
 * A unit action on one side of a joint that would swallow it: of a support, on a foundation or under axial force (where
 * equilibrium of the part needs the whole shape), or of a release. It is put a hair's breadth beside the joint, and the
 * sliver between them is given back to its neighbour. The sliver is 2^-40 of the beam, so what changes over it (V x
 * sliver in M, and the like) is about 1e-12 of the result.
 */
const SLIVER = 2 ** -40;

function beside(model: BeamModel, act: (at: number) => Load, s: number, side: Side): Segment[] {
  const step = SLIVER * Math.max(model.end - model.start, Math.abs(s));
  const at = side === 'left' ? s - step : s + step;
  const field = shape(model, act(at));
  const kept = field.filter((one) =>
    side === 'left' ? one.to <= at || one.from >= s : one.from >= at || one.to <= s,
  );
  return kept.map((one) => {
    const from = side === 'right' && one.from === at ? s : one.from;
    const to = side === 'left' && one.to === at ? s : one.to;
    if (from === one.from && to === one.to) return one;
    const h = one.to - one.from;
    return { from, to, c: compose(one.c, (from - one.from) / h, (to - from) / h) };
  });
}

/** Factor from a model influence line (unit load down) to the reader's (unit load along y, result in reader's signs and units). */
export function influenceFactor(model: BeamModel, effect: Effect): number {
  switch (effect) {
    case 'deflection':
      return model.units?.deflectionPerLength ?? 1; // both the load and the deflection turn over with the axis
    case 'slope':
    case 'couple':
      return 1;
    case 'moment':
    case 'shear':
    case 'reaction':
      return model.axis;
  }
}

/**
 * INFLUENCE: heading and rows of x and the effect at the section per unit load at x. Where the line jumps (shear at its
 * section) x stands twice. `effect`: deflection, slope, moment, shear, reaction, couple.
 */
export function influence(
  open: OpenBeam,
  quantity: unknown,
  at: unknown,
  points?: unknown,
): (number | string)[][] {
  const { model } = open;
  const effect = readWord(quantity, 'quantity', EFFECTS);
  const section = readSection(model, at);
  const count = readPoints(points);
  const field = influenceField(model, effect, section);
  const factor = influenceFactor(model, effect);
  const named = namedPositions({ ...model, loads: [] });
  // a deflected shape jumps only where shear is released, and at the offset of a shear line
  const jumps = new Set(
    model.releases.filter((release) => release.kind === 'shear').map((release) => release.at),
  );
  if (effect === 'shear') jumps.add(section.x);
  const positions = spread(model, sortedOnce([...named, section.x, ...jumps]), count);
  const peak = largestOf(extremes(field)).value;
  const unit = unitOf(model, effect);
  const force = model.units === null ? '' : `per ${model.units.force}`;
  const rows: (number | string)[][] = [
    [
      heading('x', unitOf(model, 'length')),
      heading(`${effect} at ${write(section.x)}`, [unit, force].filter(Boolean).join(' ')),
    ],
  ];
  for (const place of withJumps(model, positions, jumps)) {
    rows.push([place.x, plain(factor * quiet(valueAt(field, place.x, place.side === 'left'), peak))]);
  }
  return rows;
}
