import { fitPiece } from '../../../src/integrate/fit';
import { evaluate } from '../../../src/integrate/polynomial';
import { cutBeam, lawAt } from '../../../src/integrate/regions';
import { solve } from '../../../src/integrate/solve';
import type { BeamModel, Law, Load } from '../../../src/beam/model';
import { beam, distributed, fixed, linear, pin, point, stretch } from '../../helpers/model';

const EPS = 2 ** -52;
const law = (at: (x: number) => number): Law => ({ kind: 'function', at, text: 'test' });
const shaped = (from: number, to: number, at: (x: number) => number): Load => ({
  kind: 'distributed',
  from,
  to,
  law: law(at),
  row: 6,
  case: -1,
});
const always = (): boolean => true;

describe('cutting', () => {
  test('at every discontinuity, once', () => {
    const cut = cutBeam(
      beam(0, 8, {
        supports: [pin(0), pin(8)],
        ei: [stretch(0, 3, 1), stretch(3, 8, 2)],
        loads: [point(3, 1), distributed(1, 5, 2), point(6, 1)],
      }),
      0,
    );
    expect(cut.ok && [...cut.cut.breaks]).toEqual([0, 1, 3, 5, 6, 8]);
  });

  test('a linear law is exact at both its ends', () => {
    const s = { from: 0.1, to: 0.7, law: linear(1 / 3, 7.7) };
    expect(lawAt(s, 0.1)).toBe(1 / 3);
    expect(lawAt(s, 0.7)).toBe(7.7);
  });

  test('EI that is zero, negative or not finite somewhere is refused with its row and place', () => {
    for (const ei of [linear(1, 0), linear(-1, 2), law((at) => at - 2), law((at) => 1 / (at - 4))]) {
      const result = solve(beam(0, 4, { supports: [fixed(0)], ei: [stretch(0, 4, ei)] }));
      expect(result).toMatchObject({ ok: false, issue: { code: 'bad-law', row: 90, column: 'Value' } });
      const x = result.ok ? NaN : (result.issue.detail!.x as number);
      const there = 1 / lawAt({ from: 0, to: 4, law: ei }, x);
      expect(there > 0 && Number.isFinite(there)).toBe(false);
    }
  });

  test('a foundation stiffer than any number of regions can follow is refused, not run for ever', () => {
    const model: BeamModel = beam(0, 1e6, {
      supports: [pin(0), pin(1e6)],
      foundations: [{ from: 0, to: 1e6, stiffness: 1, row: 5 }],
    });
    expect(solve(model)).toMatchObject({ ok: false, issue: { code: 'too-stiff' } });
  });

  test('a law that never becomes smooth is refused', () => {
    const result = solve(
      beam(0, 1, { supports: [pin(0), pin(1)], loads: [shaped(0, 1, (x) => Math.sin(1e7 * x))] }),
    );
    expect(result).toMatchObject({ ok: false, issue: { code: 'bad-law', row: 6 } });
  });
});

describe('fitting', () => {
  test.each([
    ['exp', (x: number) => Math.exp(x), 1, 1.5],
    ['1/x', (x: number) => 1 / x, 2, 2.4],
    ['cubic', (x: number) => x ** 3 - 2, -1, 3],
  ])('%s to the last digits', (_name, f, a, b) => {
    const fit = fitPiece(f, a, b, always, false);
    if (fit.state !== 'fitted') throw new Error(fit.state);
    const scale = Math.max(Math.abs(f(a)), Math.abs(f(b)));
    for (let u = -0.5; u <= 0.5; u += 1 / 37) {
      // 17 values and their sums: 64 roundings
      expect(Math.abs(evaluate(fit.poly, u) - f(a + (u + 0.5) * (b - a)))).toBeLessThanOrEqual(
        64 * EPS * scale,
      );
    }
  });

  test('says when a piece is too long', () => {
    expect(fitPiece((x) => 1 / (1 + 100 * x * x), -1, 1, always, false).state).toBe('too-long');
    expect(fitPiece(Math.abs, -1, 1.1, always, false).state).toBe('too-long');
  });
});

describe('loads and stiffness given as functions of x', () => {
  const value = (m: BeamModel, x: number): number => {
    const r = solve(m);
    if (!r.ok) throw new Error(JSON.stringify(r.issue));
    return r.solution.respond(null).value('deflection', x, 'right');
  };

  test('a sine load on a simple span: w (L/pi)^4 / EI at mid span', () => {
    const L = 3;
    const m = beam(0, L, {
      supports: [pin(0), pin(L)],
      loads: [shaped(0, L, (x) => Math.sin((Math.PI * x) / L))],
    });
    expect(Math.abs(value(m, L / 2) / (L / Math.PI) ** 4 - 1)).toBeLessThan(64 * EPS);
  });

  test('a kink inside the law costs no digits: the load |x - 1|', () => {
    const m = beam(0, 2.5, { supports: [fixed(0)], loads: [shaped(0, 2.5, (x) => Math.abs(x - 1))] });
    const exact = beam(0, 2.5, {
      supports: [fixed(0)],
      loads: [distributed(0, 1, 1, 0), distributed(1, 2.5, 0, 1.5)],
    });
    expect(Math.abs(value(m, 2.5) / value(exact, 2.5) - 1)).toBeLessThan(256 * EPS);
  });

  test('a taper that shrinks to a thousand-millionth at its tip', () => {
    // I = I0 (1 + d - x/L)^3 with d = 1e-3: v(L) = P L^3/(E I0) * integral of t^2/(t + d)^3, t from the tip
    const d = 1e-3;
    const L = 2;
    const m = beam(0, L, {
      supports: [fixed(0)],
      ei: [
        stretch(
          0,
          L,
          law((x) => (1 + d - x / L) ** 3),
        ),
      ],
      loads: [point(L, 1)],
    });
    const t = 1 + d;
    const exact = L ** 3 * (Math.log(t / d) + (2 * d) / t - (d * d) / (2 * t * t) - 1.5);
    // the law itself carries eps/d of rounding near the tip, where the moment vanishes
    expect(Math.abs(value(m, L) / exact - 1)).toBeLessThan(1000 * EPS);
  });

  test('text and linear variation give the same taper', () => {
    const a = beam(0, 2, { supports: [fixed(0)], ei: [stretch(0, 2, linear(5, 1))], loads: [point(2, 1)] });
    const b = {
      ...a,
      ei: [
        stretch(
          0,
          2,
          law((x) => 5 - 2 * x),
        ),
      ],
    };
    expect(Math.abs(value(a, 2) / value(b, 2) - 1)).toBeLessThan(64 * EPS);
  });
});
