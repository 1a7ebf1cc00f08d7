/**
 * The axial and the foundation parameter swept over 30 decades and more: no digits are lost where the parameter fades out and the second-order
 * formula turns into 0/0, none where it grows and the exponentials overflow.
 *
 * Two references: closed forms evaluated at 120 digits (so that their own cancellation at N = 1e-20, some 40 digits, does not matter),
 * and the oracle. Bound 1e-13 of the peak against closed forms and oracle alike; the worst is printed.
 */
import Decimal from 'decimal.js';
import type { BeamModel, Law, Load, Support } from '../../src/beam/model';
import { measure, respond } from '../helpers/oracle-compare';
import { solveOracle } from '../helpers/oracle';

const D = Decimal.clone({ precision: 120 });
const BOUND = 1e-13;
const constant = (value: number): Law => ({ kind: 'linear', start: value, end: value });
const own = { row: 1, case: -1 };
const support = (at: number, held: boolean, clamped: boolean): Support => ({
  at,
  held,
  clamped,
  spring: 0,
  rotationalSpring: 0,
  rows: [1],
});
const uniform: Load = { ...own, kind: 'distributed', from: 0, to: 1, law: constant(1) };

function beam(supports: Support[], loads: Load[], more: Partial<BeamModel> = {}): BeamModel {
  return {
    start: 0,
    end: 1,
    supports,
    releases: [],
    foundations: [],
    ei: [{ from: 0, to: 1, law: constant(1), rows: [1] }],
    ga: [],
    loads,
    cases: [],
    limits: [],
    axis: 1,
    units: null,
    modulus: null,
    ...more,
  };
}
const simple = [support(0, true, false), support(1, true, false)];
const propped = [support(0, true, true), support(1, true, false)];

function answer(model: BeamModel): { moment: number; deflection: number } {
  const got = respond(model, null);
  if (!got.response) throw new Error(JSON.stringify(got.issue));
  return {
    moment: got.response.value('moment', 0.5, 'right'),
    deflection: got.response.value('deflection', 0.5, 'right'),
  };
}

const worst = new Map<string, number>();
function check(title: string, got: number, want: Decimal): void {
  const error = Math.abs(new D(got).minus(want).div(want).toNumber());
  worst.set(title, Math.max(worst.get(title) ?? 0, error));
  expect(error).toBeLessThanOrEqual(BOUND);
}
afterAll(() => {
  const lines = [...worst].map(([title, error]) => `  ${title}: ${error.toExponential(2)}`);
  process.stdout.write(`parameter sweeps, worst relative error\n${lines.join('\n')}\n`);
});

const exponents = (from: number, to: number, step: number): number[] => {
  const out: number[] = [];
  for (let p = from; p <= to; p += step) out.push(p);
  return out;
};

describe('tension, simple span, uniform load: M = (w/N)(1 - 1/cosh(u/2)), u = L sqrt(N/EI) (Timoshenko & Gere, ch. 1)', () => {
  test.each(exponents(-22, 8, 0.5))('N = 1e%d', (power) => {
    const N = new D(10 ** power);
    const got = answer(beam(simple, [uniform, { ...own, kind: 'axial', force: 10 ** power }]));
    const moment = new D(1).minus(new D(1).div(N.sqrt().div(2).cosh())).div(N);
    check('tension moment', got.moment, moment);
    check('tension deflection', got.deflection, new D(1).div(8).minus(moment).div(N));
  });
});

test('a span of 100,000 e-folds is refused with its reason, not answered badly', () => {
  const got = respond(beam(simple, [uniform, { ...own, kind: 'axial', force: 1e10 }]), null);
  expect(got.response).toBeNull();
  expect(!got.response && got.issue.code).toBe('too-stiff');
});

describe('compression, simple span, uniform load: M = (w/N)(1/cos(u/2) - 1)', () => {
  test.each(exponents(-22, 0.5, 0.5).concat([0.9]))('N = -1e%d', (power) => {
    const N = new D(10 ** power);
    const got = answer(beam(simple, [uniform, { ...own, kind: 'axial', force: -(10 ** power) }]));
    const moment = new D(1).div(N.sqrt().div(2).cos()).minus(1).div(N);
    check('compression moment', got.moment, moment);
    check('compression deflection', got.deflection, moment.minus(new D(1).div(8)).div(N));
  });
});

describe('elastic foundation, simple span, uniform load (Hetenyi, finite hinged beam)', () => {
  test.each(exponents(-22, 10, 0.5))('k = 1e%d', (power) => {
    const k = new D(10 ** power);
    const l = k.div(4).sqrt().sqrt();
    const [c, s] = [l.div(2).cosh(), l.div(2).sinh()];
    const [co, si] = [l.div(2).cos(), l.div(2).sin()];
    const sum = l.cosh().plus(l.cos());
    const model = beam(simple, [uniform], {
      foundations: [{ from: 0, to: 1, stiffness: 10 ** power, row: 1 }],
    });
    const got = answer(model);
    check('foundation deflection', got.deflection, new D(1).minus(c.times(co).times(2).div(sum)).div(k));
    // the moment at midspan fades to nothing on a stiff bed: judged against the largest moment
    const peak = respond(model, null).response!.peak('moment', 'largest').value;
    const error = Math.abs(
      new D(got.moment)
        .minus(s.times(si).div(sum).div(l.times(l)))
        .div(peak)
        .toNumber(),
    );
    worst.set('foundation moment', Math.max(worst.get('foundation moment') ?? 0, error));
    expect(error).toBeLessThanOrEqual(BOUND);
  });
});

describe('against the oracle, both parameters, with and without shear', () => {
  const loads: Load[] = [
    uniform,
    { ...own, kind: 'point', at: 0.37, force: 2 },
    { ...own, kind: 'couple', at: 0.7, couple: -0.4 },
    { ...own, kind: 'camber', from: 0, to: 1, rise: 0.01 },
  ];
  const ga = [{ from: 0, to: 1, law: constant(30), rows: [1] }];
  const kinds: [string, (p: number) => BeamModel][] = [
    ['tension', (p) => beam(propped, [...loads, { ...own, kind: 'axial', force: 10 ** p }])],
    [
      'compression',
      (p) => beam(propped, [...loads, { ...own, kind: 'axial', force: -Math.min(10 ** p, 14) }]),
    ],
    [
      'foundation',
      (p) => beam(propped, loads, { foundations: [{ from: 0, to: 0.8, stiffness: 10 ** p, row: 1 }] }),
    ],
    [
      'both, shear-flexible',
      (p) =>
        beam(propped, [...loads, { ...own, kind: 'axial', force: 10 ** (p / 2) }], {
          ga,
          foundations: [{ from: 0, to: 1, stiffness: 10 ** p, row: 1 }],
        }),
    ],
    [
      'both, linear EI',
      (p) =>
        beam(propped, [...loads, { ...own, kind: 'axial', force: -Math.min(10 ** p, 10) }], {
          ei: [{ from: 0, to: 1, law: { kind: 'linear', start: 3, end: 1 }, rows: [1] }],
          foundations: [{ from: 0.2, to: 1, stiffness: 10 ** p, row: 1 }],
        }),
    ],
  ];
  for (const [name, model] of kinds) {
    // the oracle needs an element for every three e-folds, so strong parameters are left to the closed forms above
    test.each(exponents(-22, 4, 2))(`${name}, 1e%d`, (power) => {
      const beamModel = model(power);
      const engine = respond(beamModel, null);
      expect(engine.response).not.toBeNull();
      const oracle = solveOracle(beamModel);
      expect(oracle.stable).toBe(true);
      const result = measure(beamModel, engine.response!, oracle, 100);
      worst.set(name, Math.max(worst.get(name) ?? 0, result.worst));
      expect(`${result.worst <= BOUND ? 'good' : result.worst} ${result.where}`).toMatch(/^good/);
    });
  }
});
