/**
 * Influence lines, axle trains, envelopes, required stiffness and frequency against their own definitions, carried out the long way
 * with single values of single beams, over random tables.
 *
 * Tolerance: BOUND = 1e-10 of the largest value of the effect (both sides are solutions of different beams, each good to 1e-13, and
 * root finding adds its own 1e-12).
 */
import fc from 'fast-check';
import { ask, BeamProblem, openBeam, type OpenBeam } from '../../src/index';
import { seeded } from '../helpers/random';
import { METRIC, randomItems, rowsIn, type Beam, type Cell } from '../helpers/random-rows';

const BOUND = 1e-10;
const RUNS = Number(process.env.RUNS ?? (process.env.PROVE ? 1000 : 60));
const seed = Number(process.env.SEED ?? 20261201);
/** Questions that solve many beams for one answer run on a share of the tables. */
const check = (law: (beamSeed: number) => void, share = 1): void => {
  fc.assert(fc.property(fc.integer({ min: 1, max: 2 ** 30 }), law), {
    numRuns: Math.ceil(RUNS * share),
    seed,
  });
};
const worst = new Map<string, number>();
const within = (law: string, error: number, what: string): void => {
  worst.set(law, Math.max(worst.get(law) ?? 0, error));
  if (!(error <= BOUND)) throw new Error(`${law}: ${what} is off by ${error}`);
};
afterAll(() => {
  const lines = [...worst].map(([law, error]) => `  ${law}: ${error.toExponential(2)}`);
  process.stdout.write(
    `questions, ${RUNS} tables each, seed ${seed}, worst relative difference\n${lines.join('\n')}\n`,
  );
});

const LOADS = new Set(['point', 'couple', 'uniform', 'varying', 'curvature', 'settlement', 'camber']);
const bareRows = (beam: Beam): Cell[][] =>
  rowsIn({ ...beam, items: beam.items.filter((q) => !LOADS.has(q.word)) }, METRIC);
const pointRow = (x: number, force: number): Cell[] => ['point', x, '', force, '', 'kN', '', ''];

/** Opens and solves; beams without a stable state are passed over. */
function open(cells: unknown, combination: unknown = ''): OpenBeam {
  try {
    const opened = openBeam({ beam: cells, combination });
    void opened.response;
    return opened;
  } catch (problem) {
    if (!(problem instanceof BeamProblem)) throw problem;
    fc.pre(!problem.issues.some((i) => i.code === 'unstable' || i.code === 'past-critical-load'));
    throw problem;
  }
}

type Effect = 'deflection' | 'slope' | 'moment' | 'shear' | 'reaction';
const EFFECTS: readonly Effect[] = ['deflection', 'slope', 'moment', 'shear', 'reaction'];
const effectOf = (opened: OpenBeam, effect: Effect, at: number): number =>
  effect === 'reaction' ? ask.reaction(opened, at) : (ask.value(opened, effect, at) as number);
const supportsOf = (beam: Beam): number[] =>
  beam.items.filter((q) => ['pin', 'fixed', 'spring'].includes(q.word)).map((q) => q.at!);
function sectionOf(beam: Beam, effect: Effect, r: () => number): number {
  const supports = supportsOf(beam);
  return effect === 'reaction'
    ? supports[Math.floor(r() * supports.length)]!
    : beam.length * (0.02 + 0.96 * r());
}

test('an influence line is the effect of a unit load, place by place', () => {
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s);
    const effect = EFFECTS[s % 5]!;
    const at = sectionOf(beam, effect, r);
    const rows = bareRows(beam);
    const line = ask.influence(open(rows), effect, at, 11).slice(1) as number[][];
    const peak = Math.max(...line.map((row) => Math.abs(row[1]!)));
    for (let i = 0; i < line.length; i += 2) {
      const [x, value] = line[i]!;
      // at its own section the shear line jumps: both one-sided values stand there
      if (effect === 'shear' && Math.abs(x! - at) < 1e-9 * beam.length) continue;
      const direct = effectOf(open([...rows, pointRow(x!, 1)]), effect, at);
      within(`influence of ${effect}`, Math.abs(direct - value!) / peak, `${effect} at ${at}, load at ${x}`);
    }
  });
});

test('a rolling train: nowhere worse when stepped along, and as bad as said where said', () => {
  const GRID = 100;
  check((s) => {
    const beam = randomItems(s);
    const r = seeded(s + 5);
    const effect = EFFECTS[s % 5]!;
    const at = sectionOf(beam, effect, r);
    const rows = bareRows(beam);
    const opened = open(rows);
    const step = beam.length / GRID;
    const axles: [number, number][] = [[0, 1 + 9 * r()]];
    for (let i = 0; i < s % 4; i++) axles.push([axles[i]![0] + 1 + Math.floor(12 * r()), 1 + 9 * r()]);
    const train = axles.map(([n, f]) => [n * step, f]);
    const sense = s % 3 === 0 ? 'lowest' : 'highest';
    const value = ask.rolling(opened, effect, at, train, sense, 'value');
    const position = ask.rolling(opened, effect, at, train, sense, 'position');
    const line = ask.influence(opened, effect, at, GRID + 1).slice(1) as number[][];
    const ordinate: number[] = [];
    for (let i = 0; i <= GRID; i++) {
      const row = line.find((q) => Math.abs(q[0]! - i * step) < 1e-9 * beam.length);
      ordinate.push(row ? row[1]! : NaN);
    }
    const total = axles.reduce((sum, [, f]) => sum + f, 0);
    const scale = total * Math.max(...line.map((q) => Math.abs(q[1]!)));
    const sign = sense === 'highest' ? 1 : -1;
    for (const way of [1, -1]) {
      for (let p = -60; p <= GRID + 60; p++) {
        let sum = 0;
        for (const [n, f] of axles) {
          const i = p + way * n;
          if (i >= 0 && i <= GRID) sum += f * ordinate[i]!;
        }
        within(
          `rolling ${effect}: not passed`,
          Math.max(0, sign * (sum - value)) / scale,
          `train at ${p}/${GRID} of the beam`,
        );
      }
    }
    // as said where said: the train standing there, its axles on the beam as point loads (a hair inside for a jump)
    const standing = [1, -1].map((way) => {
      const loads = train
        .map(([n, f]) => ({ x: position + way * n!, f: f! }))
        .filter((q) => q.x >= -1e-9 * beam.length && q.x <= beam.length * (1 + 1e-9));
      if (loads.length === 0) return Math.abs(value) / scale;
      const table = (shift: number): Cell[][] => [
        ...rows,
        ...loads.map((q) => pointRow(Math.min(beam.length, Math.max(0, q.x + shift)), q.f)),
      ];
      const miss = (shift: number): number =>
        Math.abs(effectOf(open(table(shift)), effect, at) - value) / scale;
      const there = miss(0);
      if (there <= BOUND) return there;
      // only where the effect jumps may an axle stand a hair off the place, which changes the rest by as little
      const hair = 1e-6 * beam.length;
      return Math.min(miss(hair), miss(-hair)) < 1e-4 ? 0 : there;
    });
    within(`rolling ${effect}: attained`, Math.max(0, Math.min(...standing)), `first axle at ${position}`);
  });
});

test('an envelope holds the lowest and the highest of its combinations', () => {
  const combinations = ['1.35 G', 'G + 1.5 Q', '0.9 G - 0.4 Q'];
  check((s) => {
    const beam = randomItems(s);
    fc.pre(new Set(beam.items.map((q) => q.loadCase).filter(Boolean)).size === 2);
    const rows = rowsIn(beam, METRIC);
    const quantity = (['deflection', 'slope', 'moment', 'shear'] as const)[s % 4]!;
    const each = combinations.map((c) => open(rows, c));
    const spill = ask
      .envelope(
        open(rows),
        quantity,
        combinations.map((c) => [c]),
        '',
        9,
      )
      .slice(1) as number[][];
    const peak = Math.max(...each.map((o) => Math.abs(ask.peak(o, quantity, 'largest', 'value'))));
    let low = Infinity;
    let high = -Infinity;
    spill.forEach(([x, lowest, highest], i) => {
      low = Math.min(low, lowest!);
      high = Math.max(high, highest!);
      if (spill[i - 1]?.[0] === x || spill[i + 1]?.[0] === x) return; // a jump: both one-sided values
      const values = each.map((o) => ask.value(o, quantity, x) as number);
      within('envelope', Math.abs(lowest! - Math.min(...values)) / peak, `lowest at ${x}`);
      within('envelope', Math.abs(highest! - Math.max(...values)) / peak, `highest at ${x}`);
    });
    // the extremes over the beam stand in the spill
    within(
      'envelope extremes',
      Math.abs(high - Math.max(...each.map((o) => ask.peak(o, quantity, 'highest', 'value')))) / peak,
      'highest',
    );
    within(
      'envelope extremes',
      Math.abs(low - Math.min(...each.map((o) => ask.peak(o, quantity, 'lowest', 'value')))) / peak,
      'lowest',
    );
  });
});

test('pattern loading: every one of the 2^n patterns stays inside, some touch', () => {
  check((s) => {
    const r = seeded(s + 6);
    const spans = 2 + (s % 3);
    const x = [0];
    for (let i = 0; i < spans; i++) x.push(x[i]! + 3 + 4 * r());
    const end = x[spans]!;
    const base: Cell[][] = [
      ['units', 'kN', 'm', 'mm'],
      ...x.map((at): Cell[] => ['pin', at]),
      ['EI', 0, end, 5000 * (1 + r()), 5000 * (1 + r()), 'kN·m²'],
      ['uniform', 0, end, 4, '', 'kN/m', 'G'],
    ].map((row) => [...row, ...new Array<Cell>(8 - row.length).fill('')]);
    const live = (i: number): Cell[] => ['uniform', x[i]!, x[i + 1]!, 9, '', 'kN/m', 'Q', ''];
    const quantity = (['deflection', 'slope', 'moment', 'shear'] as const)[s % 4]!;
    const full = open([...base, ['uniform', 0, end, 9, '', 'kN/m', 'Q', '']]);
    const spill = ask.envelope(full, quantity, [['1.35 G + 1.5 Q']], 'Q', 7).slice(1) as number[][];
    const patterns = Array.from({ length: 2 ** spans }, (_, mask) => {
      const rows = [...base];
      for (let i = 0; i < spans; i++) if (mask & (1 << i)) rows.push(live(i));
      return open(rows, mask === 0 ? '1.35 G' : '1.35 G + 1.5 Q');
    });
    const peak = Math.max(...patterns.map((o) => Math.abs(ask.peak(o, quantity, 'largest', 'value'))));
    spill.forEach(([at, lowest, highest], i) => {
      if (spill[i - 1]?.[0] === at || spill[i + 1]?.[0] === at) return;
      const values = patterns.map((o) => ask.value(o, quantity, at) as number);
      within('pattern', Math.abs(lowest! - Math.min(...values)) / peak, `lowest at ${at}`);
      within('pattern', Math.abs(highest! - Math.max(...values)) / peak, `highest at ${at}`);
    });
  }, 1 / 3);
});

test('the stiffness factor just meets the limit, and so does the required I', () => {
  let met = 0;
  check((s) => {
    const beam = randomItems(s);
    const limit = ['span/300', 'span/120', 5][s % 3]!;
    const opened = open(rowsIn(beam, METRIC));
    const scaledRows = (factor: number): Cell[][] =>
      rowsIn(
        {
          ...beam,
          items: beam.items.map((q) =>
            q.word === 'EI' || q.word === 'I'
              ? { ...q, value: q.value! * factor, end: q.end && q.end * factor }
              : q,
          ),
        },
        METRIC,
      );
    let factor: number;
    try {
      factor = ask.stiffnessFactor(opened, limit);
    } catch (problem) {
      if (!(problem instanceof BeamProblem) || problem.issues[0]!.code !== 'not-by-stiffness') throw problem;
      return;
    }
    met++;
    within('stiffness factor', Math.abs(ask.used(open(scaledRows(factor)), limit) - 1), `factor ${factor}`);
    if (beam.items.some((q) => q.word === 'E')) {
      let needed: number;
      try {
        needed = ask.requiredI(opened, limit);
      } catch (problem) {
        if (!(problem instanceof BeamProblem) || problem.issues[0]!.code !== 'not-by-stiffness')
          throw problem;
        return;
      }
      const one = beam.items.filter((q) => q.word !== 'I');
      const unit = beam.items.find((q) => q.word === 'I')!;
      const rows = rowsIn(
        { ...beam, items: [...one, { ...unit, at: 0, to: beam.length, value: needed }] },
        METRIC,
      );
      within('required I', Math.abs(ask.used(open(rows), limit) - 1), `I ${needed}`);
    }
  }, 1 / 4);
  expect(met).toBeGreaterThan(RUNS / 12);
});

test("frequency: Rayleigh's quotient with the shape under the own weight", () => {
  // simple span: omega^2 = (3024/31) EI g/(w L^4) (exact: 97.409); cantilever: (162/13) (exact: 12.362). By hand from the static shapes.
  for (const [support, second, factor] of [
    ['pin', 'pin', 3024 / 31],
    ['fixed', '# none', 162 / 13],
  ] as const) {
    const rows = [
      ['units', 'kN', 'm', 'mm'],
      [support, 0],
      [second, 7],
      ['EI', 0, 7, 4000, '', 'kN·m²'],
      ['uniform', 0, 7, 3, '', 'kN/m'],
    ];
    const want = Math.sqrt((factor * 4000 * 9.80665) / (3 * 7 ** 4)) / (2 * Math.PI);
    const got = ask.frequency(
      open(rows.map((row) => [...row, ...new Array<string>(8 - row.length).fill('')])),
    );
    expect(Math.abs(got / want - 1)).toBeLessThan(64 * 2 ** -52);
  }
});
