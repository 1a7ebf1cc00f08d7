/**
 * Seeded random beams that mix every item of the model, and the hard set.
 *
 * Sizes are chosen so that every action matters: loads, settlements, curvatures and bows each move the beam by some L/300; springs,
 * foundations, shear and axial force stand between 1/100 and 100 times the beam's own stiffness. Most beams are stable; a beam that is not
 * (a hinge too many, a compression too large) is a test of the verdict.
 */
import type {
  BeamModel,
  Foundation,
  Law,
  Load,
  Release,
  SectionStretch,
  Support,
} from '../../src/beam/model';

export type Random = () => number;

/** mulberry32: 32 bits of state, uniform in [0, 1). */
export function seeded(seed: number): Random {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

export const CASES = ['G', 'Q', 'W'];

export interface Recipe {
  axial: boolean;
  laws: boolean;
  releases: boolean;
  foundation: boolean;
  shear: boolean;
  camber: boolean;
}
export const EVERYTHING: Recipe = {
  axial: true,
  laws: true,
  releases: true,
  foundation: true,
  shear: true,
  camber: true,
};

export function randomBeam(seed: number, recipe: Recipe = EVERYTHING): BeamModel {
  const r = seeded(seed * 7919 + 17);
  const chance = (p: number): boolean => r() < p;
  const between = (a: number, b: number): number => a + (b - a) * r();
  const decades = (a: number, b: number): number => 10 ** between(a, b);
  const sign = (): number => (chance(0.5) ? 1 : -1);
  const whole = (a: number, b: number): number => Math.floor(between(a, b + 1));

  const length = decades(-1, 2);
  const start = chance(0.3) ? between(-2, 2) * length : 0;
  const end = start + length;
  const L = end - start;
  const stiffness = decades(-2, 6);
  const force = (stiffness / L ** 2) * 0.01;
  const place = (): number => {
    const t = chance(0.5) ? whole(1, 19) / 20 : between(0.03, 0.97);
    return start + L * t;
  };
  const stretch = (): [number, number] => {
    if (chance(0.25)) return [start, end];
    for (;;) {
      const a = chance(0.2) ? start : place();
      const b = chance(0.2) ? end : place();
      if (b - a > 0.02 * L) return [a, b];
    }
  };
  const law = (size: number, positive: boolean): Law => {
    const kind = recipe.laws ? whole(0, 5) : whole(0, 3);
    if (kind <= 1) return { kind: 'linear', start: size, end: size };
    if (kind <= 3)
      return { kind: 'linear', start: size, end: size * (positive ? between(0.2, 5) : between(-2, 2)) };
    const a = positive ? between(-0.6, 1.5) : between(-2, 2);
    const b = between(1, 5);
    const c = chance(0.5) ? 3 : 2;
    if (kind === 4) {
      return { kind: 'function', at: (x) => size * (1 + (a * (x - start)) / L) ** c, text: `(1+ax)^${c}` };
    }
    return {
      kind: 'function',
      at: (x) => size * (1 + 0.5 * Math.sin((b * (x - start)) / L)) * Math.exp((0.5 * a * (x - start)) / L),
      text: 'sin exp',
    };
  };

  // supports
  const supports: Support[] = [];
  const taken = new Set<number>();
  const support = (at: number, weight: number): void => {
    if (taken.has(at)) return;
    taken.add(at);
    const kind = chance(0.6) ? 0 : whole(0, 5);
    const none = {
      at,
      held: false,
      clamped: false,
      spring: 0,
      rotationalSpring: 0,
      rows: [supports.length + 1],
    };
    const k = (stiffness / L ** 3) * weight * decades(-1, 3);
    const kr = (stiffness / L) * decades(-2, 2);
    if (kind === 0) supports.push({ ...none, held: true });
    else if (kind === 1) supports.push({ ...none, held: true, clamped: true });
    else if (kind === 2) supports.push({ ...none, clamped: true });
    else if (kind === 3) supports.push({ ...none, spring: k });
    else if (kind === 4) supports.push({ ...none, held: true, rotationalSpring: kr });
    else supports.push({ ...none, spring: k, rotationalSpring: kr });
  };
  if (chance(0.12)) {
    taken.add(start);
    supports.push({ at: start, held: true, clamped: true, spring: 0, rotationalSpring: 0, rows: [1] });
  } else {
    const count = whole(2, 5);
    support(chance(0.7) ? start : place(), 10);
    if (chance(0.7)) support(end, 10);
    while (supports.length < count) support(place(), 10);
  }
  supports.sort((a, b) => a.at - b.at);

  const releases: Release[] = [];
  if (recipe.releases && chance(0.3)) {
    const at = place();
    if (!taken.has(at)) {
      taken.add(at);
      releases.push({ at, kind: chance(0.8) ? 'moment' : 'shear', row: 1 });
    }
  }

  const foundations: Foundation[] = [];
  if (recipe.foundation && chance(0.25)) {
    const [from, to] = stretch();
    foundations.push({ from, to, stiffness: (stiffness / L ** 4) * decades(-2, 3.5), row: 1 });
  }

  const stretches = (size: number, gaps: boolean): SectionStretch[] => {
    const out: SectionStretch[] = [];
    const cuts = [start, end];
    for (let i = whole(0, 2); i > 0; i--) cuts.push(place());
    cuts.sort((a, b) => a - b);
    for (let i = 0; i + 1 < cuts.length; i++) {
      if (cuts[i]! >= cuts[i + 1]!) continue;
      if (gaps && chance(0.3)) continue;
      out.push({ from: cuts[i]!, to: cuts[i + 1]!, law: law(size * between(0.3, 3), true), rows: [1] });
    }
    return out;
  };
  const ei = stretches(stiffness, false);
  const ga = recipe.shear && chance(0.3) ? stretches((stiffness / L ** 2) * decades(0.5, 3), true) : [];

  const loads: Load[] = [];
  const caseOf = (): number => whole(-1, CASES.length - 1);
  const free = (): number => {
    for (;;) {
      const at = chance(0.15) ? end : place();
      if (!releases.some((q) => q.at === at)) return at;
    }
  };
  const size = (): number => sign() * between(0.3, 3);
  const [q0, q1] = stretch();
  loads.push({
    row: 1,
    case: -1,
    kind: 'distributed',
    from: q0,
    to: q1,
    law: law((size() * force) / L, false),
  });
  for (let i = whole(1, 5); i > 0; i--) {
    const own = { row: loads.length + 1, case: caseOf() };
    const kind = whole(0, 5);
    if (kind === 0) loads.push({ ...own, kind: 'point', at: free(), force: size() * force });
    else if (kind === 1) loads.push({ ...own, kind: 'couple', at: free(), couple: size() * force * L });
    else if (kind === 2) {
      const [from, to] = stretch();
      loads.push({ ...own, kind: 'distributed', from, to, law: law((size() * force) / L, false) });
    } else if (kind === 3) {
      const [from, to] = stretch();
      loads.push({ ...own, kind: 'curvature', from, to, curvature: (size() * 0.01) / L });
    } else if (kind === 4) {
      const s = supports[whole(0, supports.length - 1)]!;
      if (s.held || s.spring) {
        loads.push({ ...own, kind: 'settlement', at: s.at, displacement: size() * 0.003 * L });
      }
      if (s.clamped || s.rotationalSpring)
        loads.push({ ...own, kind: 'rotation', at: s.at, angle: size() * 0.003 });
    } else if (recipe.camber) {
      const [from, to] = stretch();
      loads.push({ ...own, kind: 'camber', from, to, rise: size() * 0.003 * L });
    }
  }
  if (recipe.axial && chance(0.25)) {
    const pull = chance(0.4);
    const released = releases.length > 0;
    const N =
      (stiffness / L ** 2) * (pull ? decades(-2, 2) : released ? -decades(-4, -1) : -decades(-2, 0.3));
    loads.push({ row: loads.length + 1, case: chance(0.5) ? -1 : 0, kind: 'axial', force: N });
  }
  return {
    start,
    end,
    supports,
    releases,
    foundations,
    ei,
    ga,
    loads,
    cases: CASES,
    limits: [],
    axis: 1,
    units: null,
    modulus: null,
  };
}

// ---- the hard set

const pin = (at: number, row = 1): Support => ({
  at,
  held: true,
  clamped: false,
  spring: 0,
  rotationalSpring: 0,
  rows: [row],
});
const constant = (value: number): Law => ({ kind: 'linear', start: value, end: value });
const plain = (
  start: number,
  end: number,
  supports: Support[],
  loads: Load[],
  more: Partial<BeamModel> = {},
): BeamModel => ({
  start,
  end,
  supports,
  releases: [],
  foundations: [],
  ei: [{ from: start, to: end, law: constant(1), rows: [1] }],
  ga: [],
  loads,
  cases: [],
  limits: [],
  axis: 1,
  units: null,
  modulus: null,
  ...more,
});
const own = { row: 1, case: -1 };

export interface HardBeam {
  readonly group: 'near pairs' | 'stiffness 1e6' | 'springs 1e±9' | '1,000 spans' | 'origin 1e4 L';
  readonly name: string;
  readonly model: BeamModel;
}

export function hardSet(): HardBeam[] {
  const out: HardBeam[] = [];
  const r = seeded(20261201);
  for (let i = 0; i < 8; i++) {
    const loads: Load[] = [];
    for (let j = 0; j < 4; j++) {
      const at = 0.1 + 0.8 * r();
      const force = 1 + r();
      loads.push({ ...own, kind: 'point', at, force });
      // every other pair is a dipole: two forces that all but cancel
      loads.push({ ...own, kind: 'point', at: at + 1e-7, force: i % 2 ? -force : force });
    }
    const supports = [pin(0), pin(0.3 + 0.4 * r()), pin(1)];
    out.push({ group: 'near pairs', name: `pairs ${i}`, model: plain(0, 1, supports, loads) });
  }
  for (let i = 0; i < 8; i++) {
    const cuts = [0, 0.13 + 0.1 * r(), 0.4 + 0.1 * r(), 0.7 + 0.1 * r(), 1];
    const ei = cuts.slice(1).map((to, j) => ({
      from: cuts[j]!,
      to,
      law: constant((i + j) % 2 ? 1 : 1e6),
      rows: [1],
    }));
    const supports =
      i < 4 ? [{ ...pin(0), clamped: true }, pin(0.55), pin(1)] : [pin(0), pin(0.25), pin(0.9)];
    const loads: Load[] = [
      { ...own, kind: 'distributed', from: 0, to: 1, law: constant(1) },
      { ...own, kind: 'point', at: 0.33, force: 2 },
    ];
    out.push({ group: 'stiffness 1e6', name: `steps ${i}`, model: plain(0, 1, supports, loads, { ei }) });
  }
  for (let power = -9; power <= 9; power += 1.5) {
    const k = 10 ** power;
    const spring = (at: number): Support => ({ ...pin(at), held: false, spring: k });
    const loads: Load[] = [
      { ...own, kind: 'distributed', from: 0, to: 0.8, law: constant(1) },
      { ...own, kind: 'couple', at: 0.2, couple: 0.3 },
    ];
    const rotational = { ...pin(0), rotationalSpring: k };
    out.push({
      group: 'springs 1e±9',
      name: `two springs ${power}`,
      model: plain(0, 1, [spring(0), spring(1)], loads),
    });
    out.push({
      group: 'springs 1e±9',
      name: `spring inside ${power}`,
      model: plain(0, 1, [pin(0), spring(0.4), pin(1)], loads),
    });
    out.push({
      group: 'springs 1e±9',
      name: `turning base ${power}`,
      model: plain(0, 1, [rotational], loads),
    });
  }
  {
    const supports = Array.from({ length: 1001 }, (_, i) => pin(i));
    const loads: Load[] = Array.from({ length: 400 }, (_, j) => ({
      ...own,
      kind: 'point' as const,
      at: Math.floor(r() * 1000) + 0.1 + 0.8 * r(),
      force: 1 + r() + j * 0,
    }));
    loads.push({ ...own, kind: 'distributed', from: 250, to: 750, law: constant(1) });
    out.push({ group: '1,000 spans', name: 'a thousand spans', model: plain(0, 1000, supports, loads) });
  }
  for (let i = 0; i < 6; i++) {
    const o = 1e4 * (i % 2 ? -1 : 1);
    const mid = o + 0.3 + 0.4 * r();
    const supports = i < 3 ? [pin(o), pin(mid), pin(o + 1)] : [{ ...pin(o), clamped: true }, pin(mid)];
    const loads: Load[] = [
      { ...own, kind: 'distributed', from: o, to: o + 1, law: { kind: 'linear', start: 1, end: 3 } },
      { ...own, kind: 'point', at: o + 0.9, force: 2 },
    ];
    out.push({ group: 'origin 1e4 L', name: `origin ${i}`, model: plain(o, o + 1, supports, loads) });
  }
  return out;
}
