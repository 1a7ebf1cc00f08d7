import { BeamProblem } from '../../../src/issue';
import { solve } from '../../../src/integrate/solve';
import type { BeamModel } from '../../../src/beam/model';
import { axial, beam, camber, pin, point } from '../../helpers/model';

const EPS = 2 ** -52;

/** A joint that slides, under axial force. */
const model = (N: number, ...loads: BeamModel['loads']): BeamModel =>
  beam(0, 2, {
    supports: [pin(0), pin(0.5), pin(2)],
    releases: [{ at: 1.2, kind: 'shear', row: 4 }],
    loads: [...loads, axial(N)],
  });
const read = (m: BeamModel, x: number): number => {
  const r = solve(m);
  if (!r.ok) throw new Error(r.issue.code);
  return r.solution.respond(null).value('deflection', x, 'right');
};

describe('a sliding joint under axial force', () => {
  test.each([-1, -0.3, 0, 0.4])('Maxwell-Betti holds at N = %f', (N) => {
    const there = read(model(N, point(0.8, 1)), 1.6);
    const back = read(model(N, point(1.6, 1)), 0.8);
    const size = Math.abs(read(model(N, point(0.8, 1)), 0.8));
    expect(Math.abs(there - back)).toBeLessThan(256 * EPS * size);
  });

  test('camber bends it too, and the self-check agrees', () => {
    expect(Number.isFinite(read(model(-0.5, camber(0.5, 2, 0.01)), 1))).toBe(true);
  });

  test('it can snap sideways in tension: refused, with the critical tension', () => {
    const result = solve(model(2, point(0.8, 1)));
    if (!result.ok) throw new Error(result.issue.code);
    try {
      result.solution.respond(null);
      throw new Error('expected a refusal');
    } catch (problem) {
      if (!(problem instanceof BeamProblem)) throw problem;
      expect(problem.issues[0]).toMatchObject({
        code: 'past-critical-load',
        detail: { sense: 'tension', applied: 2 },
      });
      const critical = problem.issues[0]!.detail!.critical as number;
      expect(critical).toBeGreaterThan(0);
      expect(critical).toBeLessThan(2);
      // just below it there is an answer, a large one
      const near = Math.abs(read(model(0.999 * critical, point(0.8, 1)), 1.6));
      expect(near).toBeGreaterThan(50 * Math.abs(read(model(0, point(0.8, 1)), 1.6)));
    }
  });
});
