/**
 * Laws every beam must obey whatever its shape, on random beams that mix all items (fast-check draws the seeds; a failing seed is printed).
 * No second solver is needed here: statics, reciprocity, symmetry, calculus.
 *
 * Tolerances: BOUND times the scale of what is compared, 1e-11 as in the accuracy goal; BOUND covers some 1e4 roundings of the worst
 * conditioned random beam (measured worst 1e-13).
 */
import fc from 'fast-check';
import type { BeamModel, Law, Load } from '../../src/beam/model';
import type { Quantity, Response } from '../../src/solution';
import { respond, QUANTITIES } from '../helpers/oracle-compare';
import { EVERYTHING, randomBeam, seeded, type Recipe } from '../helpers/random';

const BOUND = 1e-11;
const RUNS = Number(process.env.RUNS ?? (process.env.PROVE ? 1000 : 120));
const seed = Number(process.env.SEED ?? 20261201);
const seeds = fc.integer({ min: 1, max: 2 ** 30 });
const check = (law: (beamSeed: number) => void): void => {
  fc.assert(fc.property(seeds, law), { numRuns: RUNS, seed });
};
const worst = new Map<string, number>();
const within = (law: string, error: number, scale: number, what: string, bound = BOUND): void => {
  const relative = error === 0 ? 0 : error / scale;
  worst.set(law, Math.max(worst.get(law) ?? 0, relative));
  if (!(relative <= bound)) throw new Error(`${law}: ${what} is off by ${relative}`);
};
afterAll(() => {
  const lines = [...worst].map(([law, error]) => `  ${law}: ${error.toExponential(2)}`);
  process.stdout.write(`laws, ${RUNS} beams each, seed ${seed}, worst relative error\n${lines.join('\n')}\n`);
});

function solved(model: BeamModel, factors: readonly number[] | null = null): Response {
  const got = respond(model, factors);
  // a mechanism or a beam past its critical load has no response: those verdicts are judged in engine.test.ts
  fc.pre(got.response !== null);
  return got.response;
}
function samplesOf(model: BeamModel, response: Response, count = 12): number[] {
  const r = seeded(Math.round(model.end * 1e6) + count);
  const out = Array.from({ length: count }, () => model.start + (model.end - model.start) * r());
  const breaks = response.breaks;
  const joints = new Set(breaks);
  return out.filter((x) => !joints.has(x));
}
const peakOf = (response: Response, q: Quantity): number => Math.abs(response.peak(q, 'largest').value);
const near = (x: number): number => (x === 0 ? 0 : x);

/** Gauss-Legendre, 10 points: nodes and weights on -1..1. */
const NODES = [
  0.14887433898163122, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845, 0.9739065285171717,
];
const WEIGHTS = [
  0.29552422471475287, 0.26926671930999635, 0.21908636251598204, 0.1494513491505806, 0.06667134430868814,
];
function integrate(f: (x: number) => number, a: number, b: number): number {
  const [m, h] = [0.5 * (a + b), 0.5 * (b - a)];
  let total = 0;
  NODES.forEach((node, i) => (total += WEIGHTS[i]! * (f(m - h * node) + f(m + h * node))));
  return total * h;
}
const lawAt = (l: { from: number; to: number; law: Law }, x: number): number =>
  l.law.kind === 'function'
    ? l.law.at(x)
    : l.law.start + ((l.law.end - l.law.start) * (x - l.from)) / (l.to - l.from);

test('equilibrium of forces and moments', () => {
  check((s) => {
    const m = randomBeam(s);
    const response = solved(m);
    let force = 0;
    let moment = 0;
    let forces = 0;
    let moments = 0;
    const L = m.end - m.start;
    const down = (x: number, f: number): void => {
      force += f;
      forces += Math.abs(f);
      moment += f * (x - m.start);
      moments += Math.abs(f) * L;
    };
    const turn = (c: number): void => {
      moment += c;
      moments += Math.abs(c);
    };
    let axial = 0;
    for (const l of m.loads) {
      if (l.kind === 'point') down(l.at, l.force);
      else if (l.kind === 'couple') turn(l.couple);
      else if (l.kind === 'axial') axial += l.force;
    }
    const breaks = response.breaks;
    for (let i = 0; i + 1 < breaks.length; i++) {
      const [a, b] = [breaks[i]!, breaks[i + 1]!];
      const mid = 0.5 * (a + b);
      const loads = m.loads.filter(
        (l): l is Load & { kind: 'distributed' } => l.kind === 'distributed' && l.from <= mid && l.to >= mid,
      );
      const bed = m.foundations.find((f) => f.from <= mid && f.to >= mid);
      const bows = m.loads.filter(
        (l): l is Load & { kind: 'camber' } => l.kind === 'camber' && l.from <= mid && l.to >= mid,
      );
      const w = (x: number): number =>
        bows.reduce((sum, l) => {
          const t = (x - l.from) / (l.to - l.from);
          return sum - 4 * l.rise * t * (1 - t);
        }, 0);
      const net = (x: number): number =>
        loads.reduce((sum, l) => sum + lawAt(l, x), 0) -
        (bed ? bed.stiffness * (response.value('deflection', x, 'right') - w(x)) : 0);
      // the moment arm from the region's middle, so that the two integrals stay small differences of nothing
      const f = integrate(net, a, b);
      down(mid, f);
      turn(integrate((x) => net(x) * (x - mid), a, b));
      forces += (b - a) * Math.abs(net(mid));
    }
    for (const r of response.reactions()) {
      down(r.at, -r.force);
      turn(r.couple);
    }
    if (axial !== 0) {
      let rise = response.value('deflection', m.end, 'left') - response.value('deflection', m.start, 'right');
      for (const at of m.releases) {
        rise -= response.value('deflection', at.at, 'right') - response.value('deflection', at.at, 'left');
      }
      turn(-axial * rise);
    }
    within('equilibrium of forces', Math.abs(force), forces, `sum ${force}`);
    within('equilibrium of moments', Math.abs(moment), moments + forces * L, `sum ${moment}`);
  });
});

test('superposition of cases', () => {
  check((s) => {
    const m = randomBeam(s, { ...EVERYTHING, axial: false });
    const r = seeded(s);
    const factors = m.cases.map(() => -2 + 4 * r());
    const all = solved(m, factors);
    const none = solved(
      m,
      m.cases.map(() => 0),
    );
    const units = m.cases.map((_, i) =>
      solved(
        m,
        m.cases.map((__, j) => (i === j ? 1 : 0)),
      ),
    );
    for (const q of QUANTITIES) {
      const scale =
        peakOf(none, q) +
        units.reduce((sum, u, i) => sum + Math.abs(factors[i]!) * (peakOf(u, q) + peakOf(none, q)), 0);
      for (const x of samplesOf(m, all, 6)) {
        const base = none.value(q, x, 'right');
        const sum = units.reduce(
          (total, u, i) => total + factors[i]! * (u.value(q, x, 'right') - base),
          base,
        );
        within('superposition', Math.abs(all.value(q, x, 'right') - sum), scale, `${q} at ${x}`);
      }
    }
  });
});

test('Maxwell-Betti: the work of one load on the path of another is mutual', () => {
  check((s) => {
    const m = randomBeam(s);
    const r = seeded(s + 1);
    const axial = m.loads.filter((l) => l.kind === 'axial').map((l) => ({ ...l, case: -1 }));
    const free = (): number => m.start + (m.end - m.start) * r();
    const L = m.end - m.start;
    const load = (at: number, couple: boolean): Load =>
      couple
        ? { row: 1, case: -1, kind: 'couple', at, couple: L }
        : { row: 1, case: -1, kind: 'point', at, force: 1 };
    const [a, b] = [free(), free()];
    fc.pre(m.releases.every((q) => q.at !== a && q.at !== b));
    const [ca, cb] = [r() < 0.5, r() < 0.5];
    const first = solved({ ...m, loads: [...axial, load(a, ca)] });
    const second = solved({ ...m, loads: [...axial, load(b, cb)] });
    const path = (response: Response, at: number, couple: boolean): number =>
      couple ? L * response.value('slope', at, 'right') : response.value('deflection', at, 'right');
    const scale = Math.max(
      peakOf(first, 'deflection'),
      L * peakOf(first, 'slope'),
      peakOf(second, 'deflection'),
      L * peakOf(second, 'slope'),
    );
    within('Maxwell-Betti', Math.abs(path(first, b, cb) - path(second, a, ca)), scale, `${a}, ${b}`);
  });
});

function mirrored(m: BeamModel): BeamModel {
  const law = (l: Law): Law =>
    l.kind === 'linear' ? { kind: 'linear', start: l.end, end: l.start } : { ...l, at: (x) => l.at(-x) };
  const flip = <T extends { from: number; to: number }>(t: T): T => ({
    ...t,
    from: near(-t.to),
    to: near(-t.from),
  });
  const back = <T>(list: readonly T[]): T[] => [...list].reverse();
  return {
    ...m,
    start: near(-m.end),
    end: near(-m.start),
    supports: back(m.supports).map((q) => ({ ...q, at: near(-q.at) })),
    releases: back(m.releases).map((q) => ({ ...q, at: near(-q.at) })),
    foundations: back(m.foundations).map(flip),
    ei: back(m.ei).map((q) => ({ ...flip(q), law: law(q.law) })),
    ga: back(m.ga).map((q) => ({ ...flip(q), law: law(q.law) })),
    loads: m.loads.map((l): Load => {
      if (l.kind === 'couple') return { ...l, at: near(-l.at), couple: -l.couple };
      if (l.kind === 'rotation') return { ...l, at: near(-l.at), angle: -l.angle };
      if (l.kind === 'distributed') return { ...flip(l), law: law(l.law) };
      if (l.kind === 'axial') return l;
      if ('from' in l) return flip(l);
      return { ...l, at: near(-l.at) };
    }),
  };
}

test('mirror image', () => {
  check((s) => {
    const m = randomBeam(s);
    const here = solved(m);
    const there = solved(mirrored(m));
    const sign = { deflection: 1, slope: -1, moment: 1, shear: -1 };
    // a bow shows a difference of two movements: judged against the larger of them, which the slope of the bow bounds
    const bow = m.loads.reduce((sum, l) => sum + (l.kind === 'camber' ? Math.abs(l.rise) : 0), 0);
    for (const q of QUANTITIES) {
      const scale = peakOf(here, q) + (q === 'deflection' ? bow : 0);
      for (const x of samplesOf(m, here)) {
        const error = Math.abs(here.value(q, x, 'right') - sign[q] * there.value(q, -x, 'left'));
        within('mirror image', error, scale, `${q} at ${x}`);
      }
    }
  });
});

function same(law: string, m: BeamModel, a: Response, b: Response): void {
  const bow = m.loads.reduce((sum, l) => sum + (l.kind === 'camber' ? Math.abs(l.rise) : 0), 0);
  for (const q of QUANTITIES) {
    const scale = peakOf(a, q) + (q === 'deflection' ? bow : 0);
    for (const x of samplesOf(m, a)) {
      within(law, Math.abs(a.value(q, x, 'right') - b.value(q, x, 'right')), scale, `${q} at ${x}`);
    }
  }
}

test('a dummy point changes nothing', () => {
  check((s) => {
    const m = randomBeam(s);
    const r = seeded(s + 2);
    const dummies: Load[] = [1, 2, 3].map(() => ({
      row: 1,
      case: -1,
      kind: 'point',
      at: m.start + (m.end - m.start) * r(),
      force: 0,
    }));
    same('dummy point', m, solved(m), solved({ ...m, loads: [...m.loads, ...dummies] }));
  });
});

test('loads may be merged or split, and come in any order', () => {
  check((s) => {
    const m = randomBeam(s);
    const r = seeded(s + 3);
    const loads = m.loads.flatMap((l): Load[] => {
      if (l.kind === 'point')
        return [
          { ...l, force: 0.25 * l.force },
          { ...l, force: 0.75 * l.force },
        ];
      if (l.kind === 'couple')
        return [
          { ...l, couple: 0.5 * l.couple },
          { ...l, couple: 0.5 * l.couple },
        ];
      if (l.kind === 'distributed') {
        const at = l.from + (l.to - l.from) * (0.2 + 0.6 * r());
        if (l.law.kind === 'function')
          return [
            { ...l, to: at },
            { ...l, from: at },
          ];
        const mid = lawAt(l, at);
        return [
          { ...l, to: at, law: { ...l.law, end: mid } },
          { ...l, from: at, law: { ...l.law, start: mid } },
        ];
      }
      if (l.kind === 'curvature') {
        const at = l.from + (l.to - l.from) * (0.2 + 0.6 * r());
        return [
          { ...l, from: at },
          { ...l, to: at },
        ];
      }
      return [l];
    });
    same('merged loads', m, solved(m), solved({ ...m, loads: loads.reverse() }));
  });
});

test('each diagram is the derivative of the next', () => {
  check((s) => {
    const m = randomBeam(s);
    const response = solved(m);
    const slopes = (q: Quantity, x: number): { rate: number; h: number } => {
      const piece = response.pieces(q).find((p) => p.x0 <= x && x < p.x0 + p.h)!;
      const u = (x - piece.x0) / piece.h + piece.origin;
      let rate = 0;
      for (let k = piece.coefficients.length - 1; k > 0; k--) rate = rate * u + k * piece.coefficients[k]!;
      return { rate: rate / piece.h, h: piece.h };
    };
    const at = <T extends { from: number; to: number }>(list: readonly T[], x: number): T | undefined =>
      list.find((q) => q.from <= x && x <= q.to);
    const rotation = Math.max(peakOf(response, 'slope'), 1e-300);
    for (const x of samplesOf(m, response)) {
      const value = (q: Quantity): number => response.value(q, x, 'right');
      // a derivative may lose the ratio of its scale to the diagram's scale over the region's length, and no more
      const judge = (law: string, q: Quantity, want: number, scale: number): void => {
        const { rate, h } = slopes(q, x);
        within(
          law,
          Math.abs(rate - want),
          Math.max(scale, Math.abs(want), peakOf(response, q) / h),
          `${q}' at ${x}`,
        );
      };
      judge("M' = V", 'moment', value('shear'), peakOf(response, 'shear'));
      const ga = at(m.ga, x);
      const strain = ga ? value('shear') / lawAt(ga, x) : 0;
      judge("v' = slope + V/GA", 'deflection', value('slope') + strain, rotation);
      let bend = value('moment') / lawAt(at(m.ei, x)!, x);
      for (const l of m.loads) {
        if (l.kind === 'curvature' && l.from <= x && x <= l.to) bend += l.curvature;
        if (l.kind === 'camber' && l.from <= x && x <= l.to) bend -= (8 * l.rise) / (l.to - l.from) ** 2;
      }
      judge("slope' = -(M/EI + curvature)", 'slope', -bend, Math.abs(bend));
    }
  });
});

test('continuity: each diagram jumps exactly where and by what the rows say', () => {
  check((s) => {
    const m = randomBeam(s);
    const response = solved(m);
    const jump = (q: Quantity, x: number): number =>
      response.value(q, x, 'right') - response.value(q, x, 'left');
    const reactions = response.reactions();
    const axial = m.loads.some((l) => l.kind === 'axial');
    const hinges = new Set(m.releases.map((q) => `${q.kind} ${q.at}`));
    for (const x of response.breaks) {
      if (x === m.start || x === m.end) continue;
      const here = <K extends Load['kind']>(kind: K): Extract<Load, { kind: K }>[] =>
        m.loads.filter((l): l is Extract<Load, { kind: K }> => l.kind === kind && 'at' in l && l.at === x);
      const reaction = reactions.find((q) => q.at === x);
      if (!hinges.has(`shear ${x}`)) {
        within(
          'continuity of deflection',
          Math.abs(jump('deflection', x)),
          peakOf(response, 'deflection'),
          `at ${x}`,
        );
      } else if (!axial) {
        within(
          'released shear',
          Math.abs(response.value('shear', x, 'left')),
          peakOf(response, 'shear'),
          `at ${x}`,
        );
      }
      if (hinges.has(`moment ${x}`)) {
        within(
          'released moment',
          Math.abs(response.value('moment', x, 'left')),
          peakOf(response, 'moment'),
          `at ${x}`,
        );
        within(
          'released moment',
          Math.abs(response.value('moment', x, 'right')),
          peakOf(response, 'moment'),
          `at ${x}`,
        );
      }
      let bowKink = 0;
      for (const l of m.loads) {
        if (l.kind !== 'camber') continue;
        if (l.from === x) bowKink -= (4 * l.rise) / (l.to - l.from);
        if (l.to === x) bowKink -= (4 * l.rise) / (l.to - l.from);
      }
      if (!hinges.has(`moment ${x}`)) {
        within(
          'continuity of slope',
          Math.abs(jump('slope', x) - bowKink),
          peakOf(response, 'slope') + Math.abs(bowKink),
          `at ${x}`,
        );
      }
      const couple = here('couple').reduce((sum, l) => sum + l.couple, 0) + (reaction?.couple ?? 0);
      within(
        'jump of moment',
        Math.abs(jump('moment', x) - couple),
        peakOf(response, 'moment') + Math.abs(couple),
        `at ${x}`,
      );
      if (!axial) {
        const force = here('point').reduce((sum, l) => sum - l.force, 0) + (reaction?.force ?? 0);
        within(
          'jump of shear',
          Math.abs(jump('shear', x) - force),
          peakOf(response, 'shear') + Math.abs(force),
          `at ${x}`,
        );
      }
    }
  });
});

function scaled(m: BeamModel, length: number, force: number): BeamModel {
  const law = (l: Law, k: number): Law =>
    l.kind === 'linear'
      ? { kind: 'linear', start: l.start * k, end: l.end * k }
      : { ...l, at: (x) => k * l.at(x / length) };
  const place = <T extends { from: number; to: number }>(t: T): T => ({
    ...t,
    from: t.from * length,
    to: t.to * length,
  });
  const at = <T extends { at: number }>(t: T): T => ({ ...t, at: t.at * length });
  return {
    ...m,
    start: m.start * length,
    end: m.end * length,
    supports: m.supports.map((q) => ({
      ...at(q),
      spring: (q.spring * force) / length,
      rotationalSpring: q.rotationalSpring * force * length,
    })),
    releases: m.releases.map(at),
    foundations: m.foundations.map((q) => ({ ...place(q), stiffness: (q.stiffness * force) / length ** 2 })),
    ei: m.ei.map((q) => ({ ...place(q), law: law(q.law, force * length ** 2) })),
    ga: m.ga.map((q) => ({ ...place(q), law: law(q.law, force) })),
    loads: m.loads.map((l): Load => {
      switch (l.kind) {
        case 'point':
          return { ...at(l), force: l.force * force };
        case 'couple':
          return { ...at(l), couple: l.couple * force * length };
        case 'distributed':
          return { ...place(l), law: law(l.law, force / length) };
        case 'curvature':
          return { ...place(l), curvature: l.curvature / length };
        case 'axial':
          return { ...l, force: l.force * force };
        case 'camber':
          return { ...place(l), rise: l.rise * length };
        case 'settlement':
          return { ...at(l), displacement: l.displacement * length };
        case 'rotation':
          return at(l);
        default:
          return l;
      }
    }),
  };
}

test.each([
  ['lengths x 1e9', 1e9, 1],
  ['lengths x 1e-9', 1e-9, 1],
  ['forces x 1e9', 1, 1e9],
  ['forces x 1e-9', 1, 1e-9],
])('%s changes no relative result', (name, length, force) => {
  check((s) => {
    const m = randomBeam(s);
    const a = solved(m);
    const b = solved(scaled(m, length, force));
    const factor = { deflection: length, slope: 1, moment: force * length, shear: force };
    const bow = m.loads.reduce((sum, l) => sum + (l.kind === 'camber' ? Math.abs(l.rise) : 0), 0);
    for (const q of QUANTITIES) {
      const scale = peakOf(a, q) + (q === 'deflection' ? bow : 0);
      for (const x of samplesOf(m, a, 6)) {
        within(
          name,
          Math.abs(a.value(q, x, 'right') - b.value(q, x * length, 'right') / factor[q]),
          scale,
          `${q} at ${x}`,
        );
      }
    }
  });
});

test('scaling by a power of two changes not one bit', () => {
  const recipe: Recipe = { ...EVERYTHING, laws: false };
  check((s) => {
    const m = randomBeam(s, recipe);
    const a = solved(m);
    const [length, force] = [2 ** 20, 2 ** -14];
    const b = solved(scaled(m, length, force));
    const factor = { deflection: length, slope: 1, moment: force * length, shear: force };
    for (const q of QUANTITIES) {
      for (const x of samplesOf(m, a, 6)) {
        within(
          'power of two',
          Math.abs(a.value(q, x, 'right') - b.value(q, x * length, 'right') / factor[q]),
          peakOf(a, q),
          `${q} at ${x}`,
        );
      }
    }
  });
});

test('an extreme is nowhere passed, and is attained where it says', () => {
  check((s) => {
    const m = randomBeam(s);
    const response = solved(m);
    for (const q of QUANTITIES) {
      const high = response.peak(q, 'highest');
      const low = response.peak(q, 'lowest');
      const scale = Math.max(Math.abs(high.value), Math.abs(low.value));
      within(
        'extremes',
        Math.abs(response.value(q, high.at, high.side) - high.value),
        scale,
        `${q} at ${high.at}`,
      );
      within(
        'extremes',
        Math.abs(response.value(q, low.at, low.side) - low.value),
        scale,
        `${q} at ${low.at}`,
      );
      for (const x of samplesOf(m, response, 24)) {
        const value = response.value(q, x, 'right');
        within('extremes', Math.max(0, value - high.value, low.value - value), scale, `${q} at ${x}`);
      }
      for (const x of response.zeros(q)) {
        const [l, r] = [response.value(q, x, 'left'), response.value(q, x, 'right')];
        // zero, or a jump across zero
        within(
          'zeros',
          l * r < 0 && Math.abs(l - r) > 1e-9 * scale ? 0 : Math.min(Math.abs(l), Math.abs(r)),
          scale,
          `${q} at ${x}`,
        );
      }
    }
  });
});
