import { REFUSE, selfCheck } from '../../../src/integrate/self-check';
import { solve } from '../../../src/integrate/solve';
import type { System } from '../../../src/integrate/response';
import type { BeamModel } from '../../../src/beam/model';
import type { Response } from '../../../src/solution';
import {
  beam,
  couple,
  curvature,
  distributed,
  fixed,
  linear,
  pin,
  point,
  settlement,
  spring,
  stretch,
} from '../../helpers/model';

const EPS = 2 ** -52;

function systemOf(model: BeamModel): System {
  const result = solve(model);
  if (!result.ok) throw new Error(JSON.stringify(result.issue));
  return (result.solution as unknown as { system: System }).system;
}

const busy = (): BeamModel =>
  beam(0, 12, {
    supports: [fixed(0), pin(5), spring(12, 3)],
    releases: [{ at: 3, kind: 'moment', row: 4 }],
    foundations: [{ from: 9, to: 11, stiffness: 2, row: 5 }],
    ei: [stretch(0, 6, 4), stretch(6, 12, linear(4, 9))],
    ga: [stretch(2, 12, 30)],
    loads: [distributed(0, 8, 1, 3), point(7, -2), couple(10, 4), settlement(5, 0.1), curvature(6, 9, 0.02)],
  });

describe('self-check', () => {
  test('a sound solution leaves rounding only', () => {
    const { equilibrium, conditions, energy } = systemOf(busy()).residuals;
    // a dozen regions, a few hundred operations each
    expect(equilibrium).toBeLessThan(1000 * EPS);
    expect(conditions).toBeLessThan(1000 * EPS);
    expect(energy).toBeLessThan(1000 * EPS);
  });

  test('beams without load, only displaced, or without stress are not mistaken for wrong ones', () => {
    const parts = { supports: [pin(0), pin(5), pin(12)] };
    for (const loads of [
      [],
      [settlement(0, 1), settlement(5, 1), settlement(12, 1)],
      [settlement(0, 1e9), settlement(5, 1e9), settlement(12, 1e9)],
    ]) {
      expect(solve(beam(0, 12, { ...parts, loads })).ok).toBe(true);
    }
    expect(solve(beam(0, 5, { supports: [fixed(0), fixed(5)], loads: [curvature(0, 5, 0.01)] })).ok).toBe(
      true,
    );
  });

  test.each([0, 1, 2, 3])(
    'a wrong constant of integration (component %i) is noticed in every span',
    (component) => {
      const system = systemOf(busy());
      const { stations } = system.closed;
      const states = system.closed.states as number[];
      for (let i = 0; i + 1 < stations.length; i++) {
        const at = 4 * i + component;
        const kept = states[at]!;
        // one part in a thousand of the component's size over the beam
        let size = 0;
        for (let k = component; k < states.length; k += 4) size = Math.max(size, Math.abs(states[k]!));
        states[at] = kept + 1e-3 * size;
        const { equilibrium, conditions, energy } = selfCheck(system);
        states[at] = kept;
        expect(Math.max(equilibrium, conditions, energy)).toBeGreaterThan(REFUSE);
      }
      const sound = selfCheck(system);
      expect(Math.max(sound.equilibrium, sound.conditions, sound.energy)).toBeLessThan(1000 * EPS);
    },
  );

  test('units do not matter', () => {
    const scaled = (length: number, force: number): BeamModel => {
      const m = busy();
      const L = length;
      const F = force;
      return {
        ...m,
        end: 12 * L,
        supports: m.supports.map((s) => ({ ...s, at: s.at * L, spring: (s.spring * F) / L })),
        releases: m.releases.map((r) => ({ ...r, at: r.at * L })),
        foundations: m.foundations.map((f) => ({
          ...f,
          from: f.from * L,
          to: f.to * L,
          stiffness: (f.stiffness * F) / L ** 2,
        })),
        ei: [stretch(0, 6 * L, 4 * F * L * L), stretch(6 * L, 12 * L, linear(4 * F * L * L, 9 * F * L * L))],
        ga: [stretch(2 * L, 12 * L, 30 * F)],
        loads: [
          distributed(0, 8 * L, F / L, (3 * F) / L),
          point(7 * L, -2 * F),
          couple(10 * L, 4 * F * L),
          settlement(5 * L, 0.1 * L),
          curvature(6 * L, 9 * L, 0.02 / L),
        ],
      };
    };
    const response = (m: BeamModel): Response => {
      const r = solve(m);
      if (!r.ok) throw new Error(JSON.stringify(r.issue));
      return r.solution.respond(null);
    };
    const one = response(scaled(1, 1));
    const peak = Math.abs(one.peak('deflection', 'largest').value);
    for (const [L, F] of [
      [1e9, 1],
      [1e-9, 1],
      [1, 1e9],
      [1, 1e-9],
      [1e9, 1e-9],
    ] as const) {
      // scaling by powers of ten rounds each of some twenty inputs once
      const shift =
        response(scaled(L, F)).value('deflection', 10 * L, 'right') / L -
        one.value('deflection', 10, 'right');
      expect(Math.abs(shift)).toBeLessThan(64 * EPS * peak);
    }
  });
});
