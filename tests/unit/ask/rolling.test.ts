/**
 * Axle trains: handbook MV-01 (AISC Manual Table 3-23 case 41; Civil Engineering Formulas Fig. 2.18: two equal wheels),
 * the 6-24-24 kip train on a 40 ft span (CE 331 course note, Problem 8.39: 323 k-ft), closed forms, and a search by brute
 * force over many positions and sections, which the exact answer may exceed but never miss.
 */
import { ask, type Quantity } from '../../../src/index';
import { beam, expectNear } from './beams';

const WHEELS = [
  [0, 60],
  [3, 60],
];

describe('two equal wheels on a simple span', () => {
  const span = beam('units kN m mm; pin 0; pin 16; EI value="1e5 kN m2"');

  test('MV-01: absolute maximum moment P(L-a/2)^2/(2L), under a wheel at (L-a/2)/2 from one end', () => {
    expectNear(ask.rolling(span, 'moment', 'anywhere', WHEELS), 394.21875);
    const section = ask.rolling(span, 'moment', 'anywhere', WHEELS, '', 'section');
    expectNear(Math.min(section, 16 - section), 7.25);
    const first = ask.rolling(span, 'moment', 'anywhere', WHEELS, '', 'position');
    expect([section, section - 3, section + 3].some((x) => Math.abs(x - first) < 1e-9)).toBe(true);
  });

  test('MV-01: maximum end reaction P(2-a/L), one wheel on the support', () => {
    expectNear(ask.rolling(span, 'reaction', 0, WHEELS), 108.75);
    expectNear(ask.rolling(span, 'reaction', 16, WHEELS), 108.75);
    expectNear(ask.rolling(span, 'reaction', 'anywhere', WHEELS), 108.75);
    expectNear(ask.rolling(span, 'reaction', 0, WHEELS, 'largest', 'position'), 0);
  });

  test('maximum shear is the end reaction, at the support', () => {
    expectNear(ask.rolling(span, 'shear', 'anywhere', WHEELS, 'highest'), 108.75);
    expectNear(ask.rolling(span, 'shear', 'anywhere', WHEELS, 'lowest'), -108.75);
  });

  test('moment at midspan: both wheels on the influence line P(L/4) + P(L/2-a)/2', () => {
    expectNear(ask.rolling(span, 'moment', 8, WHEELS), 60 * 4 + (60 * 5) / 2);
  });
});

test('CE 331 Problem 8.39: 6-24-24 kip at 12 and 16 ft on 40 ft, 323 k-ft (own closed form 323.2666...)', () => {
  const span = beam('units kip ft in; pin 0; pin 40; EI value="1e6 kip ft2"');
  const axles = [
    [0, 6],
    [12, 24],
    [28, 24],
  ];
  // Worst under the middle axle, the resultant of the two heavy axles' neighbour and it mirrored about midspan:
  // R = 54 kip at (12*24 + 28*24)/54 from the first axle; M = R (L/2 - e/2)^2 / L - 6*12 with e = 520/27... evaluated below.
  const R = 54;
  const resultant = (12 * 24 + 28 * 24) / R;
  const e = resultant - 12;
  const expected = (R * (20 - e / 2) ** 2) / 40 - 6 * 12;
  expectNear(expected, 323.266666666667, 323, 1e-14 / Number.EPSILON);
  expectNear(ask.rolling(span, 'moment', 'anywhere', axles), expected);
});

test('one wheel: PL/4 at midspan, and PL^3/(48EI) under it', () => {
  const span = beam('pin 0; pin 8; EI value=2000');
  expectNear(ask.rolling(span, 'moment', 'anywhere', [[0, 10]]), 20);
  expectNear(ask.rolling(span, 'moment', 'anywhere', [[0, 10]], 'largest', 'section'), 4);
  expectNear(ask.rolling(span, 'deflection', 'anywhere', [[0, 10]]), (10 * 8 ** 3) / 48 / 2000);
  expectNear(ask.rolling(span, 'deflection', 4, [[0, 10]]), (10 * 8 ** 3) / 48 / 2000);
  // slope: at the end it is largest for a load at L/sqrt(3) from the far end: P L^2 / (9 sqrt(3) EI)
  expectNear(ask.rolling(span, 'slope', 0, [[0, 10]]), (10 * 64) / (9 * Math.sqrt(3) * 2000));
  expectNear(
    ask.rolling(span, 'slope', 0, [[0, 10]], '', 'position'),
    8 - 8 / Math.sqrt(3),
    8,
    1e-7 / Number.EPSILON,
  );
});

test('two equal spans, one wheel: hogging over the middle support PL/(6 sqrt(3)) at L/sqrt(3)', () => {
  // from M_B = -P L z (1 - z^2)/4, stationary at z = 1/sqrt(3)
  const two = beam('pin 0; pin 7; pin 14; EI value=900');
  expectNear(ask.rolling(two, 'moment', 7, [[0, 12]], 'lowest'), (-12 * 7) / (6 * Math.sqrt(3)));
  expectNear(ask.rolling(two, 'moment', 'anywhere', [[0, 12]], 'lowest'), (-12 * 7) / (6 * Math.sqrt(3)));
});

test('the train rolls either way: turning the train over changes nothing', () => {
  const span = beam('fixed 0; pin 5; hinge 7; pin 11; EI 0 5 1000; EI 5 11 1500');
  const train = [
    [0, 3],
    [2, 8],
    [2.5, 5],
  ];
  const turned = train.map(([offset, force]) => [-(offset as number), force]);
  for (const quantity of ['moment', 'shear', 'deflection', 'slope']) {
    for (const at of [3.3, 'anywhere']) {
      const one = ask.rolling(span, quantity, at, train);
      expectNear(ask.rolling(span, quantity, at, turned), one);
    }
  }
});

test('axles off the beam do not count; an axle on the very end does', () => {
  const cantilever = beam(
    'fixed 0; EI value=100; point 4 value=0; EI value=100'.replace('; EI value=100', ''),
  );
  expectNear(
    ask.rolling(
      cantilever,
      'moment',
      0,
      [
        [0, 5],
        [6, 50],
      ],
      'lowest',
    ),
    -50 * 4,
  );
  expectNear(
    ask.rolling(
      cantilever,
      'moment',
      0,
      [
        [0, 5],
        [4, 50],
      ],
      'lowest',
    ),
    -50 * 4,
  );
  // exactly as long as the beam: both ends at once
  const balanced = beam('pin 2; pin 6; EI 0 8 100');
  expectNear(
    ask.rolling(
      balanced,
      'reaction',
      2,
      [
        [0, 10],
        [8, 10],
      ],
      'highest',
    ),
    15,
  );
});

/** Effect at a section under the train at t, from the beam loaded with `point` rows. */
function loaded(
  text: string,
  axles: readonly (readonly number[])[],
  t: number,
  way: 1 | -1,
  start: number,
  end: number,
) {
  const points = axles
    .map(([offset, force]) => ({ x: t + way * ((offset as number) - (axles[0]?.[0] as number)), force }))
    .filter(({ x }) => x >= start && x <= end)
    .map(({ x, force }) => `; point ${x} value=${force}`);
  return beam(text + points.join(''));
}

const SEARCHED: [string, string, number, number][] = [
  ['two spans and overhang', 'pin 0; spring 4 value=400; pin 9; EI 0 4 1000; EI 4 11 1400', 0, 11],
  ['axis up', 'fixed 0; pin 6; pin 10; EI value=1000; axis up', 0, 10],
  [
    'rotational spring at a middle support',
    'pin 0; pin 4; "rotational spring" 4 value=900; pin 9; EI value=1000',
    0,
    9,
  ],
  ['on a foundation', 'pin 0; foundation 0 8 60; EI 0 8 300', 0, 8],
  ['in compression', 'pin 0; pin 5; pin 9; EI value=400; axial value=-50', 0, 9],
];

describe.each(SEARCHED)('%s: nothing found by brute force is worse', (_name, text, start, end) => {
  const axles = [
    [0, 4],
    [1.2, 9],
    [3.1, 6],
  ];
  test.each(['moment', 'shear', 'deflection', 'slope'] as const)('%s anywhere', (quantity: Quantity) => {
    for (const sense of ['highest', 'lowest']) {
      let brute = -Infinity;
      const sign = sense === 'highest' ? 1 : -1;
      const steps = 24;
      for (const way of [1, -1] as const) {
        for (let i = 0; i <= steps; i++) {
          const t = start - 3.1 + ((end - start + 6.2) * i) / steps;
          const here = loaded(text, axles, t, way, start, end);
          if (here.model.loads.every((load) => load.kind === 'axial')) continue;
          brute = Math.max(brute, sign * ask.peak(here, quantity, sense));
        }
      }
      const exact = sign * ask.rolling(beam(text), quantity, 'anywhere', axles, sense);
      expect(exact).toBeGreaterThanOrEqual(brute - 1e-9 * Math.abs(brute));
      // and it is reached: the train at the position found, or (for shear, where an axle stands on a support) a hair beside it
      const t = ask.rolling(beam(text), quantity, 'anywhere', axles, sense, 'position');
      const nudges = quantity === 'shear' ? [-1e-7, 0, 1e-7] : [0];
      const reached = nudges.flatMap((nudge) =>
        ([1, -1] as const).map((way) => {
          const inside = loaded(text, axles, t + nudge, way, start, end);
          const bare = inside.model.loads.every((load) => load.kind === 'axial');
          return bare ? -Infinity : sign * ask.peak(inside, quantity, sense);
        }),
      );
      expectNear(Math.max(...reached), exact, Math.abs(exact), 1e-6 / Number.EPSILON);
    }
  });
});

test('axles that are not two columns of numbers are refused with their row', () => {
  const span = beam('pin 0; pin 8; EI value=2000');
  expect(() =>
    ask.rolling(span, 'moment', 4, [
      [0, 5],
      [1, 'heavy'],
    ]),
  ).toThrow(/axles/i);
  expect(() => ask.rolling(span, 'moment', 4, 5)).toThrow(/axles/i);
  expect(() => ask.rolling(span, 'moment', 'anywere', [[0, 5]])).toThrow(/anywhere/);
});
