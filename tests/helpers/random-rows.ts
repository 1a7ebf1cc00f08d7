/**
 * Random beam tables: one abstract beam in kN and m, written down as rows in any system of units and in any of the ways the row language
 * allows. Blank cells are '' here; the tests turn them into whatever a host sends.
 */
import { seeded } from './random';

export type Cell = string | number | null | undefined;
/** exponents of force and length; 'angle' is without unit; 'deflection' is a length in the deflection unit */
type Dimension = readonly [number, number] | 'deflection' | 'angle';

export interface Item {
  readonly word: string;
  readonly at?: number;
  readonly to?: number;
  readonly value?: number;
  readonly end?: number;
  readonly dimension?: Dimension;
  /** unit word by system; only where a system states units */
  readonly kind?:
    | 'E'
    | 'I'
    | 'EI'
    | 'GA'
    | 'force'
    | 'couple'
    | 'line'
    | 'bed'
    | 'spring'
    | 'turning'
    | 'curvature'
    | 'shift'
    | 'angle';
  readonly loadCase?: string;
  /** turned over with `axis up` */
  readonly turns?: boolean;
}

export interface System {
  readonly name: string;
  readonly row: readonly string[] | null;
  /** kN and m in the force and length unit of the system */
  readonly force: number;
  readonly length: number;
  /** m in the deflection unit */
  readonly deflection: number;
  readonly units: Readonly<Record<NonNullable<Item['kind']>, string>> | null;
}

const KIP = 4.4482216152605;
const FOOT = 0.3048;
export const METRIC: System = {
  name: 'kN-m-mm',
  row: ['units', 'kN', 'm', 'mm'],
  force: 1,
  length: 1,
  deflection: 1000,
  units: {
    E: 'kN/m²',
    I: 'm4',
    EI: 'kN·m²',
    GA: 'kN',
    force: 'kN',
    couple: 'kN·m',
    line: 'kN/m',
    bed: 'kN/m²',
    spring: 'kN/m',
    turning: 'kN·m/rad',
    curvature: '1/m',
    shift: 'mm',
    angle: 'rad',
  },
};
export const IMPERIAL: System = {
  name: 'kip-ft-in',
  row: ['units', 'kip', 'ft', 'in'],
  force: 1 / KIP,
  length: 1 / FOOT,
  deflection: 12 / FOOT,
  units: {
    E: 'kip/ft²',
    I: 'ft4',
    EI: 'kip·ft²',
    GA: 'kip',
    force: 'kip',
    couple: 'kip·ft',
    line: 'kip/ft',
    bed: 'kip/ft²',
    spring: 'kip/ft',
    turning: 'kip·ft/rad',
    curvature: '1/ft',
    shift: 'in',
    angle: 'rad',
  },
};
export const SMALL: System = {
  name: 'N-mm-mm',
  row: ['units', 'N', 'mm', 'mm'],
  force: 1000,
  length: 1000,
  deflection: 1000,
  units: {
    E: 'MPa',
    I: 'mm4',
    EI: 'N·mm²',
    GA: 'N',
    force: 'N',
    couple: 'N·mm',
    line: 'N/mm',
    bed: 'N/mm²',
    spring: 'N/mm',
    turning: 'N·mm/rad',
    curvature: '1/mm',
    shift: 'mm',
    angle: 'rad',
  },
};
export const CONSISTENT: System = {
  name: 'consistent',
  row: null,
  force: 1,
  length: 1,
  deflection: 1,
  units: null,
};

export interface Beam {
  readonly items: readonly Item[];
  readonly length: number;
}

export function randomItems(seed: number): Beam {
  const r = seeded(seed * 31 + 5);
  const between = (a: number, b: number): number => a + (b - a) * r();
  const whole = (a: number, b: number): number => Math.floor(between(a, b + 1));
  const chance = (p: number): boolean => r() < p;
  const digits = (x: number): number => Number(x.toPrecision(4));
  const sign = (): number => (chance(0.5) ? 1 : -1);
  const L = digits(between(2, 30));
  const place = (): number => digits(L * between(0.05, 0.95));
  const stretch = (): [number, number] => {
    const a = chance(0.4) ? 0 : place();
    for (;;) {
      const b = chance(0.4) ? L : place();
      if (b > a + 0.02 * L) return [a, b];
      if (a > 0.9 * L) return [a, L];
    }
  };
  const B = 10 ** between(3, 6);
  const P = B / L ** 2 / 300;
  const items: Item[] = [];
  const taken = new Set<number>([0, L]);
  const first = whole(0, 3);
  if (first === 0) items.push({ word: 'fixed', at: 0 });
  else items.push({ word: 'pin', at: 0 });
  if (first === 1) {
    items.push({
      word: 'rotational spring',
      at: 0,
      value: digits((B / L) * between(0.1, 10)),
      kind: 'turning',
      dimension: [1, 1],
    });
  }
  const last = whole(0, 3);
  if (last === 0 && first === 0)
    items.push({ word: 'point', at: L, value: digits(P), kind: 'force', dimension: [1, 0], turns: true });
  else if (last === 1) {
    items.push({
      word: 'spring',
      at: L,
      value: digits((B / L ** 3) * between(3, 300)),
      kind: 'spring',
      dimension: [1, -1],
    });
  } else items.push({ word: last === 2 ? 'fixed' : 'pin', at: L });
  for (let i = whole(0, 2); i > 0; i--) {
    const at = place();
    if (taken.has(at)) continue;
    taken.add(at);
    items.push({ word: 'pin', at });
  }
  if (chance(0.2) && items.filter((q) => q.word === 'pin' || q.word === 'fixed').length > 2) {
    const at = place();
    if (!taken.has(at)) {
      taken.add(at);
      items.push({ word: 'hinge', at });
    }
  }
  if (chance(0.5)) {
    items.push({
      word: 'EI',
      at: 0,
      to: L,
      value: digits(B),
      end: chance(0.5) ? digits(B * between(0.5, 2)) : undefined,
      kind: 'EI',
      dimension: [1, 2],
    });
  } else {
    const E = 2.1e8;
    const cut = place();
    items.push({ word: 'E', value: E, kind: 'E', dimension: [1, -2] });
    items.push({ word: 'I', at: 0, to: cut, value: digits(B / E), kind: 'I', dimension: [0, 4] });
    items.push({
      word: 'I',
      at: cut,
      to: L,
      value: digits((B / E) * between(0.5, 2)),
      kind: 'I',
      dimension: [0, 4],
    });
  }
  if (chance(0.3))
    items.push({
      word: 'GA',
      value: digits((B / L ** 2) * between(10, 1000)),
      kind: 'GA',
      dimension: [1, 0],
    });
  if (chance(0.2)) {
    const [at, to] = stretch();
    items.push({
      word: 'foundation',
      at,
      to,
      value: digits((B / L ** 4) * between(1, 1000)),
      kind: 'bed',
      dimension: [1, -2],
    });
  }
  const cases = ['', 'G', 'Q'];
  const loadCase = (): string => cases[whole(0, 2)]!;
  const size = (): number => sign() * between(0.3, 3);
  items.push({
    word: 'uniform',
    at: 0,
    to: L,
    value: digits(P / L),
    kind: 'line',
    dimension: [1, -1],
    turns: true,
  });
  for (let i = whole(1, 5); i > 0; i--) {
    const kind = whole(0, 6);
    const own = { loadCase: loadCase() };
    const free = (): number => {
      for (;;) {
        const at = place();
        if (!items.some((q) => q.word === 'hinge' && q.at === at)) return at;
      }
    };
    if (kind === 0)
      items.push({
        ...own,
        word: 'point',
        at: free(),
        value: digits(size() * P),
        kind: 'force',
        dimension: [1, 0],
        turns: true,
      });
    else if (kind === 1)
      items.push({
        ...own,
        word: 'couple',
        at: free(),
        value: digits(size() * P * L),
        kind: 'couple',
        dimension: [1, 1],
        turns: true,
      });
    else if (kind === 2) {
      const [at, to] = stretch();
      items.push({
        ...own,
        word: 'uniform',
        at,
        to,
        value: digits((size() * P) / L),
        kind: 'line',
        dimension: [1, -1],
        turns: true,
      });
    } else if (kind === 3) {
      const [at, to] = stretch();
      items.push({
        ...own,
        word: 'varying',
        at,
        to,
        value: digits((size() * P) / L),
        end: digits((size() * P) / L),
        kind: 'line',
        dimension: [1, -1],
        turns: true,
      });
    } else if (kind === 4) {
      const [at, to] = stretch();
      items.push({
        ...own,
        word: 'curvature',
        at,
        to,
        value: digits((size() * 0.01) / L),
        kind: 'curvature',
        dimension: [0, -1],
      });
    } else if (kind === 5) {
      items.push({
        ...own,
        word: 'settlement',
        at: 0,
        value: digits(size() * 0.002 * L),
        kind: 'shift',
        dimension: 'deflection',
        turns: true,
      });
    } else {
      const [at, to] = stretch();
      items.push({
        ...own,
        word: 'camber',
        at,
        to,
        value: digits(size() * 0.003 * L),
        kind: 'shift',
        dimension: 'deflection',
      });
    }
  }
  if (chance(0.15)) {
    items.push({
      word: 'axial',
      value: digits((B / L ** 2) * between(-1, 10)),
      kind: 'force',
      dimension: [1, 0],
      loadCase: loadCase(),
    });
  }
  return { items, length: L };
}

/** A base value (kN, m) in the units of a system. */
export function inSystem(value: number, dimension: Dimension, system: System): number {
  if (dimension === 'angle') return value;
  if (dimension === 'deflection') return value * system.deflection;
  const [f, l] = dimension;
  return value * system.force ** f * system.length ** l;
}

/** The rows, eight columns each, blanks as ''. */
export function rowsIn(beam: Beam, system: System, up = false): Cell[][] {
  const rows: Cell[][] = [];
  const pad = (cells: readonly Cell[]): Cell[] => [...cells, ...new Array<Cell>(8 - cells.length).fill('')];
  if (system.row) rows.push(pad(system.row));
  if (up) rows.push(pad(['axis', 'up']));
  for (const q of beam.items) {
    const sign = up && q.turns ? -1 : 1;
    const number = (v: number | undefined): Cell =>
      v === undefined ? '' : sign * inSystem(v, q.dimension ?? 'angle', system);
    const position = (x: number | undefined): Cell => (x === undefined ? '' : x * system.length);
    rows.push([
      q.word,
      position(q.at),
      position(q.to),
      number(q.value),
      number(q.end),
      system.units && q.kind ? system.units[q.kind] : '',
      q.loadCase ?? '',
      '',
    ]);
  }
  return rows;
}
