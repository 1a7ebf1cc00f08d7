import { solve } from '../../../src/integrate/solve';
import type { BeamModel } from '../../../src/beam/model';
import type { Response } from '../../../src/solution';
import {
  axial,
  beam,
  camber,
  couple,
  curvature,
  distributed,
  fixed,
  guided,
  linear,
  onSprings,
  pin,
  point,
  settlement,
  spring,
  stretch,
} from '../../helpers/model';

function respond(model: BeamModel): Response {
  const result = solve(model);
  if (!result.ok) throw new Error(JSON.stringify(result.issue));
  try {
    return result.solution.respond(null);
  } catch (error) {
    throw new Error(JSON.stringify((error as { issues: unknown }).issues));
  }
}

/** tolerance: 64 roundings of the expected value (a dozen operations on each side) */
const TOL = 64 * 2 ** -52;
function close(actual: number, expected: number, tolerance = TOL): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance * Math.abs(expected));
}

describe('hand-worked beams', () => {
  const L = 7;
  const w = 3;
  const EI = 11;
  const simple = { supports: [pin(0), pin(L)], ei: [stretch(0, L, EI)] };

  test('simple span under a uniform load', () => {
    const r = respond(beam(0, L, { ...simple, loads: [distributed(0, L, w)] }));
    close(r.value('deflection', L / 2, 'right'), (5 * w * L ** 4) / (384 * EI));
    close(r.value('slope', 0, 'right'), (w * L ** 3) / (24 * EI));
    close(r.value('moment', L / 2, 'right'), (w * L * L) / 8);
    close(r.value('shear', 0, 'right'), (w * L) / 2);
    close(r.reactions()[0]!.force, (w * L) / 2);
    close(r.reactions()[1]!.force, (w * L) / 2);
    const peak = r.peak('deflection', 'largest');
    close(peak.at, L / 2);
    close(peak.value, (5 * w * L ** 4) / (384 * EI));
  });

  test('clockwise couple on a simple span', () => {
    const a = 2;
    const r = respond(beam(0, L, { ...simple, loads: [couple(a, 5)] }));
    close(r.reactions()[0]!.force, -5 / L);
    close(r.value('moment', a, 'left'), (-5 * a) / L);
    close(r.value('moment', a, 'right'), 5 - (5 * a) / L);
    close(r.value('deflection', a, 'right'), (5 * a * (L - a) * (L - 2 * a)) / (3 * EI * L));
  });

  test('cantilever, guided end, propped, with settlement and springs', () => {
    const cantilever = respond(
      beam(0, L, { supports: [fixed(0)], ei: [stretch(0, L, EI)], loads: [point(L, 4)] }),
    );
    close(cantilever.value('deflection', L, 'left'), (4 * L ** 3) / (3 * EI));
    close(cantilever.reactions()[0]!.couple, -4 * L);
    close(cantilever.reactions()[0]!.force, 4);
    const sliding = respond(
      beam(0, L, { supports: [fixed(0), guided(L)], ei: [stretch(0, L, EI)], loads: [point(L, 4)] }),
    );
    close(sliding.value('deflection', L, 'left'), (4 * L ** 3) / (12 * EI));
    const propped = respond(
      beam(0, L, { supports: [fixed(0), pin(L)], ei: [stretch(0, L, EI)], loads: [settlement(L, 0.1)] }),
    );
    close(propped.reactions()[1]!.force, (-3 * EI * 0.1) / L ** 3);
    const elastic = respond(
      beam(0, L, {
        supports: [onSprings(0, { held: true, rotationalSpring: 6 })],
        ei: [stretch(0, L, EI)],
        loads: [point(L, 4)],
      }),
    );
    close(elastic.value('deflection', L, 'left'), (4 * L ** 3) / (3 * EI) + (4 * L * L) / 6);
    const onSpring = respond(
      beam(0, L, {
        supports: [pin(0), spring(L, 2)],
        ei: [stretch(0, L, EI)],
        loads: [distributed(0, L, w)],
      }),
    );
    close(onSpring.value('deflection', L, 'left'), (w * L) / 2 / 2);
    close(onSpring.reactions()[1]!.force, (w * L) / 2);
  });

  test('two spans, hinge, free curvature, camber', () => {
    const two = respond(
      beam(0, 2 * L, {
        supports: [pin(0), pin(L), pin(2 * L)],
        ei: [stretch(0, 2 * L, EI)],
        loads: [distributed(0, 2 * L, w)],
      }),
    );
    close(two.value('moment', L, 'right'), (-w * L * L) / 8);
    close(two.reactions()[1]!.force, (10 * w * L) / 8);
    const hinged = respond(
      beam(0, 5, {
        supports: [fixed(0), pin(5)],
        releases: [{ at: 2, kind: 'moment', row: 3 }],
        ei: [stretch(0, 5, EI)],
        loads: [distributed(2, 5, w)],
      }),
    );
    close(hinged.value('deflection', 2, 'right'), ((w * 3) / 2) * (8 / (3 * EI)));
    const warm = respond(beam(0, L, { ...simple, loads: [curvature(0, L, 0.01)] }));
    close(warm.value('deflection', L / 2, 'right'), (0.01 * L * L) / 8);
    const bowed = respond(beam(0, L, { ...simple, loads: [camber(0, L, 0.02)] }));
    close(bowed.value('deflection', L / 2, 'right'), -0.02);
    close(bowed.value('slope', 0, 'right'), (-4 * 0.02) / L);
  });

  test('shear deformation', () => {
    const r = respond(beam(0, L, { ...simple, ga: [stretch(0, L, 5)], loads: [distributed(0, L, w)] }));
    close(r.value('deflection', L / 2, 'right'), (5 * w * L ** 4) / (384 * EI) + (w * L * L) / (8 * 5));
  });

  test('taper: I linear from I0 at the tip to 2 I0 at the root', () => {
    // W L^3/(E I0) (ln 2 - 1/2): Megson, Structural and Stress Analysis, Example 13.14
    const r = respond(
      beam(0, L, { supports: [fixed(L)], ei: [stretch(0, L, linear(EI, 2 * EI))], loads: [point(0, 4)] }),
    );
    close(r.value('deflection', 0, 'right'), ((4 * L ** 3) / EI) * (Math.LN2 - 0.5));
  });
});

describe('axial force', () => {
  const L = 7;
  const EI = 11;
  const w = 3;
  const strut = (N: number): BeamModel =>
    beam(0, L, {
      supports: [pin(0), pin(L)],
      ei: [stretch(0, L, EI)],
      loads: [distributed(0, L, w), axial(N)],
    });
  const euler = (Math.PI ** 2 * EI) / L ** 2;

  test.each([0.1, 0.5, 0.9, 0.999])('strut at %f of the Euler load', (ratio) => {
    // Timoshenko & Gere, Theory of Elastic Stability, section 1.3 (from memory): with k = sqrt(P/EI), u = kL/2,
    // mid deflection = w/(P k^2) (sec u - 1) - w L^2/(8 P); sec u - 1 = 2 sin^2(u/2)/cos u keeps digits
    const P = ratio * euler;
    const k = Math.sqrt(P / EI);
    const u = (k * L) / 2;
    const expected = ((w / (P * k * k)) * 2 * Math.sin(u / 2) ** 2) / Math.cos(u) - (w * L * L) / (8 * P);
    // amplification of rounding: 1/(1 - ratio) and the closed form's own cancellation, 1/ratio^2
    close(respond(strut(-P)).value('deflection', L / 2, 'right'), expected, (TOL / (1 - ratio) / ratio) * 4);
  });

  test('tie', () => {
    const P = 30;
    const k = Math.sqrt(P / EI);
    const u = (k * L) / 2;
    const expected = (w * L * L) / (8 * P) - (w / (P * k * k)) * (1 - 1 / Math.cosh(u));
    close(respond(strut(P)).value('deflection', L / 2, 'right'), expected, 4 * TOL);
  });

  test('a cambered strut: the bow is amplified', () => {
    const P = 0.5 * euler;
    const r = respond(
      beam(0, L, {
        supports: [pin(0), pin(L)],
        ei: [stretch(0, L, EI)],
        loads: [camber(0, L, 0.02), axial(-P)],
      }),
    );
    // an upward bow under compression bows further up: parabola = load of intensity P * 8 rise / L^2 upward
    const k = Math.sqrt(P / EI);
    const u = (k * L) / 2;
    const q = (-P * 8 * 0.02) / L ** 2;
    const extra = ((q / (P * k * k)) * 2 * Math.sin(u / 2) ** 2) / Math.cos(u) - (q * L * L) / (8 * P);
    close(r.value('deflection', L / 2, 'right'), -0.02 + extra, 4 * TOL);
  });

  test('past the critical load', () => {
    const result = solve(strut(-1.0001 * euler));
    if (!result.ok) throw new Error('expected a solution object');
    try {
      result.solution.respond(null);
      throw new Error('expected a refusal');
    } catch (error) {
      const issue = (error as { issues: { code: string; detail: { critical: number } }[] }).issues[0]!;
      expect(issue.code).toBe('past-critical-load');
      close(issue.detail.critical, euler, 1e-11);
    }
  });
});

describe('elastic foundation', () => {
  test.each([1, 10, 1e3, 1e6, 1e9])('pinned-pinned on k = %f', (k) => {
    // Hetenyi, Beams on Elastic Foundation (from memory): uniform load q on a pinned-pinned beam
    const EI = 11;
    const L = 7;
    const beta = (k / (4 * EI)) ** 0.25;
    const l = beta * L;
    const q = 3;
    // (q/k)(1 - 2 cosh(l/2) cos(l/2)/(cosh l + cos l)), divided by e^l
    const e = Math.exp(-l / 2);
    const ratio = (2 * (1 + e * e) * Math.cos(l / 2) * e) / (1 + e ** 4 + 2 * e * e * Math.cos(l));
    const r = respond(
      beam(0, L, {
        supports: [pin(0), pin(L)],
        ei: [stretch(0, L, EI)],
        foundations: [{ from: 0, to: L, stiffness: k, row: 5 }],
        loads: [distributed(0, L, q)],
      }),
    );
    // (1 - ratio) cancels when l is small
    close(r.value('deflection', L / 2, 'right'), (q / k) * (1 - ratio), Math.max(TOL * 4, (20 * TOL) / k));
  });
});

describe('mechanisms', () => {
  const code = (m: BeamModel): unknown => {
    const r = solve(m);
    return r.ok ? 'solved' : r.issue;
  };
  test('one pin, no support, three hinges, slide', () => {
    expect(code(beam(0, 4, { supports: [pin(1)] }))).toMatchObject({
      code: 'unstable',
      detail: { motion: 'rotate', about: 1 },
    });
    expect(code(beam(0, 4, { supports: [guided(1)] }))).toMatchObject({
      code: 'unstable',
      detail: { motion: 'translate' },
    });
    expect(code(beam(0, 4, {}))).toMatchObject({ code: 'unstable' });
    expect(
      code(
        beam(0, 8, {
          supports: [fixed(0), pin(4), fixed(8)],
          releases: [1, 2, 3].map((at) => ({ at, kind: 'moment' as const, row: 2 })),
        }),
      ),
    ).toMatchObject({ code: 'unstable' });
    expect(
      code(beam(0, 8, { supports: [fixed(0), fixed(8)], releases: [{ at: 3, kind: 'shear', row: 2 }] })),
    ).toBe('solved');
  });
});
