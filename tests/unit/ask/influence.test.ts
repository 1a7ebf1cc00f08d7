/**
 * Influence lines: closed forms of the simple and the two-span beam, and for every effect, every kind of support, both axes
 * and both sides of a section the definition itself: the effect of a unit `point` row placed at x.
 */
import { ask, BeamProblem, type Quantity } from '../../../src/index';
import { beam, column, expectNear } from './beams';

const EFFECTS = ['deflection', 'slope', 'moment', 'shear'] as const;

/** The effect at a section under a `point` row of Value 1 at x: what an influence line means. */
function direct(text: string, effect: string, at: string | number, x: number): number {
  const loaded = beam(`${text}; point ${x} value=1`);
  if (effect === 'reaction') return ask.reaction(loaded, at);
  if (effect === 'couple') return ask.reaction(loaded, at, 'couple');
  return ask.value(loaded, effect as Quantity, at) as number;
}

/** Compares the spilled line with direct placement; at a jump the two rows are the limits, so they are asked just beside it. */
function compare(text: string, effect: string, at: string | number, factor?: number): void {
  const table = ask.influence(beam(text), effect, at, 7);
  const xs = column(table, 0);
  const line = column(table, 1);
  const scale = Math.max(...line.map(Math.abs));
  expect(scale).toBeGreaterThan(0);
  xs.forEach((x, i) => {
    // at a jump (for shear, the section itself) the rows are limits, and a load right there has no one value
    if (xs[i - 1] === x || xs[i + 1] === x || (effect === 'shear' && x === parseFloat(String(at)))) return;
    expectNear(line[i] as number, direct(text, effect, at, x), scale, factor);
  });
}

const BEAMS: Record<string, string> = {
  'simple span': 'pin 0; pin 6; EI value=1000',
  'simple span, axis up': 'pin 0; pin 6; EI value=1000; axis up',
  'two spans with overhang and steps': 'pin 0; pin 5; pin 9; EI 0 4 1000; EI 4 10.5 1700',
  'fixed, hinge, spring, axis up':
    'fixed 0; hinge 3; spring 5 value=120; pin 9; rotational spring 9 value=400; EI value=900; axis up',
  'shear-flexible, tapered, guided': 'guided 0; pin 4; pin 7; EI value=800*(1+x/7)^2; GA value=3000',
  'on a foundation': 'pin 0; pin 6; foundation 0 6 50; EI value=500',
  'in tension': 'pin 0; pin 4; pin 7; EI value=500; axial value=120',
  'in compression, axis up': 'fixed 0; pin 4; pin 7; EI value=500; axial value=-60; axis up',
};

describe.each(Object.entries(BEAMS))('%s', (_name, raw) => {
  // item words of two words are quoted in the text form
  const text = raw.replace('rotational spring', '"rotational spring"');
  test.each(EFFECTS)('%s at sections inside a span is what a unit load gives', (effect) => {
    compare(text, effect, 2.3);
    compare(text, effect, 5.7);
  });
});

test('sections beside a support: each side has its own shear line', () => {
  const text = 'pin 0; pin 5; pin 9; EI value=1000';
  for (const at of ['5-', '5+', '0+', '9-']) compare(text, 'shear', at);
  compare(text, 'moment', 5);
  const jumps = ask.influence(beam(text), 'shear', '5+', 5).filter((row) => row[0] === 5);
  expect(jumps.map((row) => row[1])).toEqual([0, 1]);
});

test('clamped supports inside and at the ends: moments on either side', () => {
  const text = 'fixed 0; fixed 4; spring 7 value=200; "rotational spring" 7 value=300; pin 9; EI value=1000';
  for (const at of ['0', '4-', '4+', '7-', '7+']) {
    compare(text, 'moment', at);
    compare(text, 'shear', at);
  }
});

test('the two faces of a release have their own lines', () => {
  const loose = 1e-10 / Number.EPSILON; // the sliver beside the release, see influence.ts
  const hinged = 'fixed 0; hinge 3; pin 7; EI value=1000';
  for (const at of ['3-', '3+']) compare(hinged, 'slope', at, loose);
  const slid = 'fixed 0; "shear release" 3; fixed 7; EI value=1000';
  for (const at of ['3-', '3+']) compare(slid, 'deflection', at, loose);
});

test('beside a support on a foundation and under axial force', () => {
  // the sliver of 2^-40 of the beam beside the support leaves about 1e-12 of the result, times the steepness of the line
  const loose = 1e-10 / Number.EPSILON;
  for (const more of ['foundation 0 9 40', 'axial value=150']) {
    const text = `pin 0; spring 5 value=300; fixed 9; EI value=1000; ${more}`;
    for (const at of ['5-', '5+', '9']) {
      compare(text, 'moment', at, loose);
      compare(text, 'shear', at, loose);
    }
  }
});

test.each(['', '; axis up'])('reactions and couples of every kind of support%s', (axis) => {
  const text = `fixed 0; pin 4; "rotational spring" 4 value=500; spring 8 value=90; guided 10; EI value=700${axis}`;
  for (const at of [0, 4, 8]) compare(text, 'reaction', at);
  for (const at of [0, 4, 10]) compare(text, 'couple', at);
});

test('two equal spans: reaction of the middle support and moment over it, closed form', () => {
  // By the three-moment equation for a unit load at z = x/L in the left span (Clapeyron):
  // M_B = -L z (1 - z^2)/4, R_B = z (3 - z^2)/2
  const L = 6.2;
  const two = beam(`pin 0; pin ${L}; pin ${2 * L}; EI value=14595`);
  const moment = ask.influence(two, 'moment', L, 21);
  const reaction = ask.influence(two, 'reaction', L, 21);
  for (const [x, m] of moment.slice(1) as [number, number][]) {
    const z = (x <= L ? x : 2 * L - x) / L;
    expectNear(m, (-L * z * (1 - z * z)) / 4, L / 10);
  }
  for (const [x, r] of reaction.slice(1) as [number, number][]) {
    const z = (x <= L ? x : 2 * L - x) / L;
    expectNear(r, (z * (3 - z * z)) / 2, 1);
  }
});

test('the unit load follows the axis, so a point row times the ordinate is its effect', () => {
  const up = beam('pin 0; pin 6; EI value=1000; axis up');
  const ordinate = column(ask.influence(up, 'moment', 3, 2), 1)[1] as number;
  expectNear(ordinate, -1.5); // a unit load acting up hogs
});

test('headings name the section and the units', () => {
  const table = ask.influence(beam('units kN m mm; pin 0; pin 6; EI value="1000 kN m2"'), 'deflection', 2, 3);
  expect(table[0]).toEqual(['x (m)', 'deflection at 2 (mm per kN)']);
});

test('a reaction where there is no support lists the supports', () => {
  const issues = issuesOf(() => ask.influence(beam('pin 0; pin 6; EI value=1'), 'reaction', 3));
  expect(issues[0]).toMatchObject({ code: 'no-support', kind: 'unavailable', column: 'at' });
  expect(issues[0]?.detail?.supports).toEqual(['0', '6']);
});

function issuesOf(run: () => unknown): BeamProblem['issues'] {
  try {
    run();
  } catch (problem) {
    if (problem instanceof BeamProblem) return problem.issues;
    throw problem;
  }
  throw new Error('nothing was thrown');
}
