import type { BeamModel } from '../../../src/beam/model';
import { criticalLoad, passedModes } from '../../../src/integrate/critical';
import { solve } from '../../../src/integrate/solve';
import {
  axial,
  beam,
  fixed,
  guided,
  linear,
  onSprings,
  pin,
  point,
  spring,
  stretch,
} from '../../helpers/model';

const EPS = 2 ** -52;
const L = 3;
const EI = 5;
const unit = EI / L ** 2;

const critical = (parts: Partial<BeamModel>): number => {
  const model = beam(0, L, { ei: [stretch(0, L, EI)], ...parts });
  // start from a load that is certainly past the first mode
  let load = unit;
  while (passedModes(model, -load) === 0) load *= 2;
  return criticalLoad(model, -load);
};

/**
 * Critical loads of columns: Timoshenko & Gere, Theory of Elastic Stability, 2nd ed., sections 2.1-2.10 (from memory); transcendental
 * equations solved here by their own bisection.
 */
function root(f: (x: number) => number, a: number, b: number): number {
  const rising = f(a) < 0;
  for (let i = 0; i < 200; i++) {
    const m = 0.5 * (a + b);
    if (f(m) < 0 === rising) a = m;
    else b = m;
  }
  return 0.5 * (a + b);
}

describe('critical loads', () => {
  const fixedPinned = root((u) => Math.sin(u) - u * Math.cos(u), 4, 4.7) ** 2;
  test.each<[string, Partial<BeamModel>, number]>([
    ['pinned ends', { supports: [pin(0), pin(L)] }, Math.PI ** 2],
    ['fixed and free', { supports: [fixed(0)] }, Math.PI ** 2 / 4],
    ['fixed ends', { supports: [fixed(0), fixed(L)] }, 4 * Math.PI ** 2],
    ['fixed and pinned', { supports: [fixed(0), pin(L)] }, fixedPinned],
    ['fixed and guided', { supports: [fixed(0), guided(L)] }, Math.PI ** 2],
    ['two equal spans', { supports: [pin(0), pin(L / 2), pin(L)] }, 4 * Math.PI ** 2],
    [
      'fixed, hinge at mid span, fixed: each half leans on the other',
      { supports: [fixed(0), fixed(L)], releases: [{ at: L / 2, kind: 'moment', row: 3 }] },
      Math.PI ** 2, // antimetric: two fixed-free halves of length L/2
    ],
    [
      'rotational spring of 4 EI/L at one end: tan u = u/(1 + u^2/4)',
      { supports: [onSprings(0, { held: true, rotationalSpring: (4 * EI) / L }), pin(L)] },
      root((u) => Math.sin(u) * (1 + (u * u) / 4) - u * Math.cos(u), 3.2, 4.4) ** 2,
    ],
    [
      // rigid-body mode: k L of the spring at the free pin end
      'pinned and on a weak spring: P = k L',
      { supports: [pin(0), spring(L, (0.5 * unit) / L)] },
      0.5,
    ],
    [
      // m^2 pi^2 + c L^4/(m^2 pi^2 EI): modes 1 and 2 coincide at c L^4/EI = 4 pi^4
      'on a foundation where two modes coincide',
      {
        supports: [pin(0), pin(L)],
        foundations: [{ from: 0, to: L, stiffness: (4 * Math.PI ** 4 * EI) / L ** 4, row: 5 }],
      },
      5 * Math.PI ** 2,
    ],
  ])('%s', (_name, parts, expected) => {
    // the count of pivots decides to some rounding errors of the assembled stiffness; at a double mode to their square root
    const tolerance = parts.foundations ? 1e-7 : 1e5 * EPS;
    expect(Math.abs(critical(parts) / (expected * unit) - 1)).toBeLessThan(tolerance);
  });

  test('shear-flexible column: P = Pe/(1 + Pe/GA), Engesser', () => {
    const ga = 2 * unit;
    const e = Math.PI ** 2;
    const expected = e / (1 + e / 2);
    const found = critical({ supports: [pin(0), pin(L)], ga: [stretch(0, L, ga)] });
    expect(Math.abs(found / (expected * unit) - 1)).toBeLessThan(1e5 * EPS);
  });

  test('a tapered column: below that of its stout end, above that of its slender end', () => {
    const found = critical({ supports: [pin(0), pin(L)], ei: [stretch(0, L, linear(EI, 2 * EI))] });
    expect(found).toBeGreaterThan(Math.PI ** 2 * unit);
    expect(found).toBeLessThan(2 * Math.PI ** 2 * unit);
  });

  test('modes passed are counted one by one', () => {
    const model = beam(0, L, { supports: [pin(0), pin(L)], ei: [stretch(0, L, EI)] });
    for (const [ratio, modes] of [
      [0.99, 0],
      [1.01, 1],
      [3.99, 1],
      [4.01, 2],
      [9.01, 3],
    ] as const) {
      expect(passedModes(model, -ratio * Math.PI ** 2 * unit)).toBe(modes);
    }
  });

  test('between two modes a deflection could be computed, but is refused', () => {
    const model = beam(0, L, {
      supports: [pin(0), pin(L)],
      ei: [stretch(0, L, EI)],
      loads: [point(1, 1), axial(-2 * Math.PI ** 2 * unit)],
    });
    const result = solve(model);
    if (!result.ok) throw new Error('expected a solution object');
    expect(() => result.solution.respond(null)).toThrow('past-critical-load');
  });
});
