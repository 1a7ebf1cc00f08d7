/** STIFFNESSFACTOR and REQUIREDI: closed forms where there are any, else the definition: at the factor found, the limit is just met. */
import { ask, BeamProblem } from '../../../src/index';
import { beam, expectNear } from './beams';

/** The beam with every EI times the factor must just meet the limit: used = 1. */
function justMet(text: (factor: number) => string, limit: unknown): number {
  const factor = ask.stiffnessFactor(beam(text(1)), limit);
  expectNear(ask.used(beam(text(factor)), limit), 1, 1, 1e-10 / Number.EPSILON);
  return factor;
}

test('loads alone: deflection is proportional to 1/EI, so the factor is the used fraction', () => {
  const open = beam(
    'units kN m mm; pin 0; pin 6; uniform 0 6 "12 kN/m"; E value="210 GPa"; I value="8360 cm4"; limit value=span/360',
  );
  // I = 5 w L^3 360/(384 E)
  const required = ((5 * 12 * 6 ** 3 * 360) / (384 * 210e6)) * 1e8;
  expectNear(ask.requiredI(open), required);
  expectNear(ask.stiffnessFactor(open), required / 8360);
});

test('required I is in the unit of the I row, whatever the length unit', () => {
  const open = beam(
    'units kip ft in; pin 0; pin 20; point 10 value="10 kip"; E value="29000 ksi"; I value="612 in4"; limit value=span/360',
  );
  // I = P L^2 360/(48 E) in kip and in
  expectNear(ask.requiredI(open), (10 * 240 ** 2 * 360) / (48 * 29000));
});

test('one I for the whole beam replaces a stepped section', () => {
  const open = beam('pin 0; pin 4; uniform 0 4 3; E value=1000; I 0 1 2; I 1 4 5');
  expectNear(ask.requiredI(open, 0.01), (5 * 3 * 4 ** 4) / (384 * 1000 * 0.01));
});

test('propped cantilever whose prop settles: a load part A/s and a part B that no stiffness changes', () => {
  // deflection from the chord; both parts are known fields, so the factor is checked by its definition
  const factor = justMet(
    (s) => `fixed 0; pin 5; settlement 5 value=0.012; uniform 0 5 20; EI value=${5000 * s}`,
    0.016,
  );
  expect(factor).toBeGreaterThan(0);
});

test('simple span with camber: net sag A/s - rise, closed form with equal shapes', () => {
  // end couples bend a span into a parabola like the camber: rise c, sag M L^2/(8 EI)
  const span = (s: number): string =>
    `pin 0; pin 8; couple 0 value=30; couple 8 value=-30; camber 0 8 0.02; EI value=${6000 * s}`;
  const sag = (30 * 64) / (8 * 6000);
  expectNear(justMet(span, 0.01), sag / (0.02 + 0.01), undefined, 1e-10 / Number.EPSILON);
});

test('camber beyond the limit: too stiff a beam fails too, and the window below is found', () => {
  const span = (s: number): string =>
    `pin 0; pin 8; couple 0 value=30; couple 8 value=-30; camber 0 8 0.05; EI value=${60000 * s}`;
  // as it stands the net bow is 0.046, over the limit of 0.01; the smallest factor leaves a net sag of 0.01
  expectNear(justMet(span, 0.01), (30 * 64) / (8 * 60000) / 0.06, undefined, 1e-10 / Number.EPSILON);
});

test('spring support, shear flexibility, foundation and axial force: bracketed root', () => {
  justMet((s) => `pin 0; spring 4 value=150; pin 9; uniform 0 9 6; EI value=${1500 * s}`, 0.03);
  justMet((s) => `pin 0; pin 6; uniform 0 6 6; EI value=${700 * s}; GA value=2500`, 0.06);
  justMet((s) => `pin 0; pin 6; foundation 0 6 20; uniform 0 6 6; EI value=${900 * s}`, 0.05);
  justMet((s) => `pin 0; pin 6; uniform 0 6 6; EI value=${2000 * s}; axial value=-300`, 0.05);
});

test('compression: the factor stays above the one at which the beam would buckle', () => {
  const factor = ask.stiffnessFactor(
    beam('pin 0; pin 6; uniform 0 6 0.001; EI value=2000; axial value=-300'),
    0.05,
  );
  expect(factor).toBeGreaterThan((300 * 36) / Math.PI ** 2 / 2000);
});

test('shear deflection alone beyond the limit cannot be met by stiffness', () => {
  // w L^2/(8 GA) = 0.135 m whatever EI is
  const issue = issueOf(() =>
    ask.stiffnessFactor(beam('pin 0; pin 6; uniform 0 6 6; EI value=700; GA value=200'), 0.1),
  );
  expect(issue).toMatchObject({
    code: 'not-by-stiffness',
    kind: 'unavailable',
    detail: { reason: 'never met' },
  });
});

test('a settlement alone beyond the limit cannot be met by stiffness', () => {
  const issue = issueOf(() =>
    ask.stiffnessFactor(beam('fixed 0; pin 5; settlement 5 value=0.1; uniform 0 5 1; EI value=5000'), 0.001),
  );
  expect(issue).toMatchObject({ code: 'not-by-stiffness', detail: { reason: 'never met' } });
});

test('no load at all: every stiffness meets the limit, which is said in words and not as 0', () => {
  const issue = issueOf(() => ask.stiffnessFactor(beam('pin 0; pin 6; EI value=1'), 0.1));
  expect(issue).toMatchObject({ code: 'not-by-stiffness', detail: { reason: 'always met' } });
});

test('without one E there is no required I', () => {
  expect(issueOf(() => ask.requiredI(beam('pin 0; pin 6; uniform 0 6 1; EI value=100'), 1)).code).toBe(
    'no-modulus',
  );
});

function issueOf(run: () => unknown): BeamProblem['issues'][number] {
  try {
    run();
  } catch (problem) {
    if (problem instanceof BeamProblem && problem.issues[0]) return problem.issues[0];
    throw problem;
  }
  throw new Error('nothing was thrown');
}
