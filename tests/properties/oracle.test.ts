/**
 * The oracle judged by closed forms, before it judges the engine. Sources stand beside the checks; the closed forms are evaluated in double
 * precision, so the tolerance is 16 eps of the value unless a line says otherwise.
 */
import Decimal from 'decimal.js';
import type { BeamModel, Load, SectionStretch, Support } from '../../src/beam/model';
import { Big, withBits } from '../helpers/oracle-number';
import { solveOracle } from '../helpers/oracle';

const EPS = 2 ** -52;
const pin = (at: number): Support => ({
  at,
  held: true,
  clamped: false,
  spring: 0,
  rotationalSpring: 0,
  rows: [1],
});
const fixed = (at: number): Support => ({ ...pin(at), clamped: true });
const ei = (from: number, to: number, start: number, end = start): SectionStretch => ({
  from,
  to,
  law: { kind: 'linear', start, end },
  rows: [1],
});
const base = { row: 1, case: -1 };
const uniform = (from: number, to: number, q: number): Load => ({
  ...base,
  kind: 'distributed',
  from,
  to,
  law: { kind: 'linear', start: q, end: q },
});
const point = (at: number, force: number): Load => ({ ...base, kind: 'point', at, force });

function beam(end: number, supports: Support[], loads: Load[], more: Partial<BeamModel> = {}): BeamModel {
  return {
    start: 0,
    end,
    supports,
    releases: [],
    foundations: [],
    ei: [ei(0, end, 1)],
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
const near = (got: number, want: number, factor = 16): void => {
  expect(Math.abs(got - want)).toBeLessThanOrEqual(factor * EPS * Math.abs(want));
};

describe('long arithmetic', () => {
  test('agrees with a decimal library in 55 digits', () => {
    const D = Decimal.clone({ precision: 70 });
    const decimal = (b: Big): Decimal => new D(b.m.toString()).times(new D(2).pow(b.e));
    withBits(200, () => {
      let a = Big.of(0.1);
      for (let i = 1; i < 60; i++) {
        const b = Big.of(Math.sin(i) * 10 ** ((i % 13) - 6)).over(Big.of(3));
        const [x, y] = [decimal(a), decimal(b)];
        const size = x.abs().plus(y.abs());
        const close = (got: Big, want: Decimal, scale: Decimal): void => {
          expect(decimal(got).minus(want).abs().lte(scale.abs().times('1e-55'))).toBe(true);
          expect(got.toNumber()).toBe(want.toNumber());
        };
        close(a.plus(b), x.plus(y), size);
        close(a.minus(b), x.minus(y), size);
        close(a.times(b), x.times(y), x.times(y));
        close(a.over(b), x.div(y), x.div(y));
        a = i % 2 === 0 ? a.times(b).plus(Big.one) : a.over(b).minus(b);
      }
    });
  });
  test('takes any double exactly and gives it back', () => {
    for (const x of [0, 1, -3.75, 5e-324, 2.2250738585072014e-308, 1.7976931348623157e308, -0.1, 1e22]) {
      expect(Big.of(x).toNumber()).toBe(x);
    }
  });
});

describe('oracle against closed forms', () => {
  test('simple span, uniform load: 5 w L^4/384 (AISC Manual Table 3-23 case 1)', () => {
    const o = solveOracle(beam(1, [pin(0), pin(1)], [uniform(0, 1, 1)]));
    near(o.value('deflection', 0.5), 5 / 384);
    near(o.value('slope', 0), 1 / 24);
    near(o.value('moment', 0.5), 1 / 8);
    near(o.value('shear', 0), 1 / 2);
    near(o.reactions()[0]!.force, 0.5);
  });
  test('clockwise couple at a (Shigley Table A-9 case 8)', () => {
    const a = 0.375;
    const b = 1 - a;
    const o = solveOracle(beam(1, [pin(0), pin(1)], [{ ...base, kind: 'couple', at: a, couple: 1 }]));
    near(o.value('deflection', a), (a * b * (b - a)) / 3);
    near(o.value('slope', a), (a ** 3 + b ** 3) / 3);
    near(o.value('moment', a, 'left'), -a);
    near(o.value('moment', a, 'right'), b);
  });
  test('propped cantilever reaction and end couple', () => {
    const o = solveOracle(beam(1, [fixed(0), pin(1)], [uniform(0, 1, 1)]));
    near(o.reactions()[1]!.force, 3 / 8);
    near(o.reactions()[0]!.force, 5 / 8);
    near(o.reactions()[0]!.couple, -1 / 8);
  });
  test('cantilever, I from 2 to 1: ln 2 - 1/2 (Megson, Example 13.14)', () => {
    const o = solveOracle(beam(1, [fixed(0)], [point(1, 1)], { ei: [ei(0, 1, 2, 1)] }));
    near(o.value('deflection', 1), Math.LN2 - 0.5);
  });
  test('the same taper as a function of x', () => {
    const law = { kind: 'function' as const, at: (x: number) => 2 - x, text: '2-x' };
    const o = solveOracle(beam(1, [fixed(0)], [point(1, 1)], { ei: [{ from: 0, to: 1, law, rows: [1] }] }));
    near(o.value('deflection', 1), Math.LN2 - 0.5);
  });
  test('shear: cantilever tip load PL^3/3EI + PL/GA', () => {
    const o = solveOracle(beam(1, [fixed(0)], [point(1, 1)], { ga: [ei(0, 1, 4)] }));
    near(o.value('deflection', 1), 1 / 3 + 1 / 4);
    near(o.value('slope', 1), 1 / 2);
  });
  test('compressed simple span, uniform load, midspan moment (sec u - 1) w L^2/4u^2 (Timoshenko & Gere)', () => {
    const N = -5;
    const u = Math.sqrt(5) / 2;
    const o = solveOracle(
      beam(1, [pin(0), pin(1)], [uniform(0, 1, 1), { ...base, kind: 'axial', force: N }]),
    );
    near(o.value('moment', 0.5), (1 / Math.cos(u) - 1) / (4 * u * u), 64);
  });
  test('bowed strut: amplification of a parabola bow under compression', () => {
    // v'' = -M, M = -N (v + w), N = -p; by hand: v + w = (-8 r/p) (cos(c (x - 1/2))/cos(c/2) - 1), c = sqrt p
    const p = 4;
    const r = 0.01;
    const o = solveOracle(
      beam(
        1,
        [pin(0), pin(1)],
        [
          { ...base, kind: 'axial', force: -p },
          { ...base, kind: 'camber', from: 0, to: 1, rise: r },
        ],
      ),
    );
    near(o.value('deflection', 0.5), ((-8 * r) / p) * (1 / Math.cos(1) - 1), 64);
  });
  test('the critical load of a simple span is pi^2 EI/L^2, with shear Pe/(1 + Pe/GA) (Engesser)', () => {
    const strut = (force: number, ga: SectionStretch[] = []): boolean =>
      solveOracle(beam(1, [pin(0), pin(1)], [{ ...base, kind: 'axial', force }, uniform(0, 1, 1)], { ga }))
        .stable;
    const pe = Math.PI ** 2;
    expect(strut(-pe * (1 - 1e-13))).toBe(true);
    expect(strut(-pe * (1 + 1e-13))).toBe(false);
    const soft = pe / (1 + pe / 7);
    expect(strut(-soft * (1 - 1e-13), [ei(0, 1, 7)])).toBe(true);
    expect(strut(-soft * (1 + 1e-13), [ei(0, 1, 7)])).toBe(false);
  });
  test('infinite beam on elastic foundation, point load: P beta/2k (Hetenyi)', () => {
    const o = solveOracle(
      beam(60, [], [point(30, 1)], { foundations: [{ from: 0, to: 60, stiffness: 4, row: 1 }] }),
    );
    near(o.value('deflection', 30), 1 / 8);
    near(o.value('moment', 30), 1 / 4);
  });
  test('hinge, shear release, kink and offset', () => {
    const hinged = solveOracle(
      beam(2, [fixed(0), pin(2)], [uniform(1, 2, 1)], { releases: [{ at: 1, kind: 'moment', row: 1 }] }),
    );
    near(hinged.value('moment', 0), -0.5);
    near(hinged.value('deflection', 1), 0.5 / 3);
    const sliding = solveOracle(
      beam(2, [fixed(0), fixed(2)], [uniform(0, 1, 1)], { releases: [{ at: 1, kind: 'shear', row: 1 }] }),
    );
    // the left half is a cantilever with a free couple at its tip, turning as the tip of the right half does
    expect(Math.abs(sliding.value('shear', 1, 'left'))).toBeLessThan(1e-30);
    near(sliding.value('moment', 1), 1 / 12);
    const kinked = solveOracle(beam(2, [pin(0), pin(2)], [{ ...base, kind: 'kink', at: 1, angle: -1 }]));
    near(kinked.value('deflection', 1), 0.5);
    const offset = solveOracle(
      beam(2, [pin(0), pin(2)], [{ ...base, kind: 'offset', at: 0.5, displacement: 1 }]),
    );
    near(offset.value('deflection', 0.5, 'right') - offset.value('deflection', 0.5, 'left'), 1);
  });
  test('a mechanism has no stable state', () => {
    expect(solveOracle(beam(1, [pin(0)], [uniform(0, 1, 1)])).stable).toBe(false);
  });
});
