/**
 * Checks by general-purpose libraries that know nothing of beams:
 * - odex (Gragg-Bulirsch-Stoer extrapolation) marches the beam equations as four first-order equations from the state at the left end over
 *   the whole beam, adding what the rows and the reactions say at each place, and must arrive at a free right end with the state the
 *   engine gives;
 * - mathjs lusolve solves the same prismatic beams as a dense stiffness system.
 *
 * Tolerances: odex integrates to 1e-13 per step; marching is unstable by the growth of the homogeneous solution, so strongly coupled beams
 * are left out by the generator's sizes (growth below some 1e3) and the bound is 1e-8 of each peak. The dense system in doubles loses its
 * condition number, at most 1e6 here: 1e-9.
 */
import { lusolve, matrix } from 'mathjs';
import type { BeamModel, Law, Load } from '../../src/beam/model';
import type { Quantity } from '../../src/solution';
import { QUANTITIES, respond } from '../helpers/oracle-compare';
import { EVERYTHING, randomBeam, seeded } from '../helpers/random';

// odex ships its TypeScript source, which the strict options of this repository would check: it is required, and typed by hand
interface Odex {
  Solver: new (n: number) => {
    absoluteTolerance: number;
    relativeTolerance: number;
    solve(f: (x: number, y: number[]) => number[], x0: number, y0: number[], x1: number): { y: number[] };
  };
}
const { Solver } = jest.requireActual<Odex>('odex');

const BEAMS = process.env.PROVE ? 300 : 40;
const lawAt = (l: { from: number; to: number; law: Law }, x: number): number =>
  l.law.kind === 'function'
    ? l.law.at(x)
    : l.law.start + ((l.law.end - l.law.start) * (x - l.from)) / (l.to - l.from);
const figures = new Map<string, number>();
afterAll(() => {
  const lines = [...figures].map(([name, v]) => `  ${name}: ${Number.isInteger(v) ? v : v.toExponential(2)}`);
  process.stdout.write(`outside checks\n${lines.join('\n')}\n`);
});
const worst = (name: string, error: number): void => {
  figures.set(name, Math.max(figures.get(name) ?? 0, error));
};

/** The state (v, theta, M, S) of the solved beam right of its start, marched to its end; nothing but the rows and the reactions is added. */
function march(m: BeamModel): { errors: Record<Quantity, number> } | null {
  const response = respond(m, null).response;
  if (!response) return null;
  const L = m.end - m.start;
  const peak = (q: Quantity): number => Math.abs(response.peak(q, 'largest').value);
  const [P, T] = [Math.max(peak('deflection'), 1e-300), Math.max(peak('slope'), peak('deflection') / L)];
  const [MM, SS] = [peak('moment'), Math.max(peak('shear'), peak('moment') / L)];
  // releases: the new freedom is not marched but taken from the engine, so what follows judges the rest
  const breaks = response.breaks;
  const reactions = response.reactions();
  let state = [
    response.value('deflection', m.start, 'right'),
    response.value('slope', m.start, 'right'),
    0,
    0,
  ];
  const errors: Record<string, number> = { deflection: 0, slope: 0, moment: 0, shear: 0 };
  for (let i = 0; i < breaks.length; i++) {
    const x = breaks[i]!;
    for (const l of m.loads) {
      if (l.kind === 'point' && l.at === x) state[3]! -= l.force;
      if (l.kind === 'couple' && l.at === x) state[2]! += l.couple;
    }
    const support = reactions.find((r) => r.at === x);
    if (support) {
      state[3]! += support.force;
      state[2]! += support.couple;
    }
    for (const release of m.releases) {
      if (release.at !== x) continue;
      if (release.kind === 'moment') state[1] = response.value('slope', x, 'right');
      else state[0] = response.value('deflection', x, 'right');
    }
    if (i === breaks.length - 1) break;
    const [a, b] = [x, breaks[i + 1]!];
    const mid = 0.5 * (a + b);
    const over = <Q extends { from: number; to: number }>(list: readonly Q[]): Q[] =>
      list.filter((q) => q.from <= mid && q.to >= mid);
    const ei = over(m.ei)[0]!;
    const ga = over(m.ga)[0];
    const k = over(m.foundations)[0]?.stiffness ?? 0;
    const loads = over(m.loads.filter((l): l is Load & { kind: 'distributed' } => l.kind === 'distributed'));
    const kappa = over(
      m.loads.filter((l): l is Load & { kind: 'curvature' } => l.kind === 'curvature'),
    ).reduce((s, l) => s + l.curvature, 0);
    // unknowns scaled to the peaks, position to the region
    const h = b - a;
    const f = (u: number, y: number[]): number[] => {
      const at = a + h * u;
      const [v, t, M, S] = [y[0]! * P, y[1]! * T, y[2]! * MM, y[3]! * SS];
      const strain = ga ? S / lawAt(ga, at) : 0;
      const q = loads.reduce((sum, l) => sum + lawAt(l, at), 0);
      return [
        (h * (t + strain)) / P,
        (-h * (M / lawAt(ei, at) + kappa)) / T,
        (h * S) / MM,
        (h * (k * v - q)) / SS,
      ];
    };
    const solver = new Solver(4);
    solver.absoluteTolerance = 1e-14;
    solver.relativeTolerance = 1e-14;
    const start = [state[0]! / P, state[1]! / T, state[2]! / MM, state[3]! / SS];
    const end = solver.solve(f, 0, start, 1).y;
    state = [end[0]! * P, end[1]! * T, end[2]! * MM, end[3]! * SS];
    QUANTITIES.forEach((q, j) => {
      const error = Math.abs(state[j]! - response.value(q, b, 'left')) / [P, T, MM, SS][j]!;
      errors[q] = Math.max(errors[q]!, error);
    });
  }
  // beyond the last load and support the beam is free
  errors.moment = Math.max(errors.moment!, Math.abs(state[2]!) / MM);
  errors.shear = Math.max(errors.shear!, Math.abs(state[3]!) / SS);
  return { errors: errors };
}

test(`odex marches ${BEAMS} random beams to their end conditions`, () => {
  let marched = 0;
  for (let seed = 1; seed <= BEAMS; seed++) {
    const m = randomBeam(seed, { ...EVERYTHING, axial: false, camber: false });
    const bed = m.foundations[0];
    const soft = Math.min(...m.ei.map((e) => Math.min(lawAt(e, e.from), lawAt(e, e.to))));
    // e-folds of the homogeneous solution over the bed: beyond 7 a march in doubles has no digits to show
    if (bed && (bed.to - bed.from) * (bed.stiffness / (4 * soft)) ** 0.25 > 7) continue;
    const result = march(m);
    if (!result) continue;
    marched++;
    for (const q of QUANTITIES) {
      worst(`odex ${q}`, result.errors[q]);
      expect(`seed ${seed} ${q} ${result.errors[q] <= 1e-8 ? 'reproduced' : result.errors[q]}`).toMatch(
        /reproduced/,
      );
    }
  }
  figures.set('beams marched', marched);
  expect(marched).toBeGreaterThan(0.8 * BEAMS);
}, 300000);

test('mathjs lusolve: dense stiffness of stepped continuous beams with springs', () => {
  for (let seed = 1; seed <= BEAMS; seed++) {
    const r = seeded(seed + 4711);
    const n = 3 + Math.floor(6 * r());
    const x = [0];
    for (let i = 1; i <= n; i++) x.push(x[i - 1]! + 1 + 4 * r());
    const stiffness = x.slice(1).map(() => 1000 * (1 + 9 * r()));
    const held = x.map((_, i) => i === 0 || i === n || r() < 0.5);
    const springs = x.map((_, i) => (!held[i] && r() < 0.5 ? 100 * (1 + r()) : 0));
    const forces = x.map(() => -20 + 40 * r());
    const couples = x.map(() => -20 + 40 * r());
    const q = stiffness.map(() => -5 + 10 * r());
    const size = 2 * (n + 1);
    const K = Array.from({ length: size }, () => new Array<number>(size).fill(0));
    const F = new Array<number>(size).fill(0);
    const add = (i: number, j: number, v: number): void => {
      K[i]![j]! += v;
    };
    for (let e = 0; e < n; e++) {
      const l = x[e + 1]! - x[e]!;
      const c = stiffness[e]! / l ** 3;
      const k = [
        [12, 6 * l, -12, 6 * l],
        [6 * l, 4 * l * l, -6 * l, 2 * l * l],
        [-12, -6 * l, 12, -6 * l],
        [6 * l, 2 * l * l, -6 * l, 4 * l * l],
      ];
      const load = [q[e]! * l * 0.5, (q[e]! * l * l) / 12, q[e]! * l * 0.5, (-q[e]! * l * l) / 12];
      for (let a = 0; a < 4; a++) {
        F[2 * e + a]! += load[a]!;
        for (let b = 0; b < 4; b++) add(2 * e + a, 2 * e + b, c * k[a]![b]!);
      }
    }
    x.forEach((_, i) => {
      F[2 * i]! += forces[i]!;
      F[2 * i + 1]! += couples[i]!;
      if (springs[i]) add(2 * i, 2 * i, springs[i]);
      if (held[i]) {
        for (let j = 0; j < size; j++) K[2 * i]![j] = K[j]![2 * i] = 0;
        K[2 * i]![2 * i] = 1;
        F[2 * i] = 0;
      }
    });
    const solved = lusolve(matrix(K), matrix(F)).toArray().flat(2) as number[];
    const own = { row: 1, case: -1 };
    const model: BeamModel = {
      start: 0,
      end: x[n]!,
      supports: x.flatMap((at, i) =>
        held[i] || springs[i]
          ? [{ at, held: held[i]!, clamped: false, spring: springs[i]!, rotationalSpring: 0, rows: [1] }]
          : [],
      ),
      releases: [],
      foundations: [],
      ei: stiffness.map((s, i) => ({
        from: x[i]!,
        to: x[i + 1]!,
        law: { kind: 'linear', start: s, end: s },
        rows: [1],
      })),
      ga: [],
      loads: [
        ...x.map((at, i): Load => ({ ...own, kind: 'point', at, force: forces[i]! })),
        ...x.map((at, i): Load => ({ ...own, kind: 'couple', at, couple: couples[i]! })),
        ...q.map((w, i): Load => ({
          ...own,
          kind: 'distributed',
          from: x[i]!,
          to: x[i + 1]!,
          law: { kind: 'linear', start: w, end: w },
        })),
      ],
      cases: [],
      limits: [],
      axis: 1,
      units: null,
      modulus: null,
    };
    const response = respond(model, null).response!;
    const v = Math.max(...x.map((_, i) => Math.abs(solved[2 * i]!)), 1e-300);
    const t = Math.max(...x.map((_, i) => Math.abs(solved[2 * i + 1]!)));
    x.forEach((at, i) => {
      const side = i === n ? 'left' : 'right';
      const error = Math.max(
        Math.abs(response.value('deflection', at, side) - solved[2 * i]!) / Math.max(v, t * 0.1),
        Math.abs(response.value('slope', at, side) - solved[2 * i + 1]!) / t,
      );
      worst('mathjs lusolve', error);
      expect(error).toBeLessThanOrEqual(1e-9);
    });
  }
});
