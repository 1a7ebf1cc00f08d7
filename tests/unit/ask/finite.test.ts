/** Whatever the beam and the arguments, every question answers with finite numbers and text in a rectangle, or throws BeamProblem. */
import fc from 'fast-check';
import { ask, BeamProblem, openBeam } from '../../../src/index';

const position = fc.constantFrom(0, 1, 2.5, 4, 6, 9, 10, 10.0000001);
const size = fc.constantFrom(-1e6, -30, -1e-9, 0, 1e-12, 2, 45, 1e9, '1/0', 'x', 'a');
const row = fc.oneof(
  fc.tuple(fc.constantFrom('pin', 'fixed', 'guided', 'hinge', 'shear release'), position),
  fc.tuple(
    fc.constantFrom('spring', 'rotational spring', 'point', 'couple', 'settlement', 'rotation'),
    position,
    fc.constant(null),
    size,
  ),
  fc.tuple(
    fc.constantFrom('uniform', 'varying', 'curvature', 'camber', 'foundation', 'GA'),
    position,
    position,
    size,
    size,
  ),
  fc.tuple(fc.constant('axial'), fc.constant(null), fc.constant(null), size),
  fc.tuple(
    fc.constant('limit'),
    fc.constant(null),
    fc.constant(null),
    fc.constantFrom(5, 'span/300', 0, 'span/0'),
  ),
);
const section = fc.constantFrom(
  [['EI', 0, 10, 500]],
  [
    ['EI', 0, 4, 1e-3],
    ['EI', 4, 10, 1e6],
  ],
  [
    ['E', 0, 10, 200],
    ['I', 0, 10, '3+x'],
  ],
);
const table = fc
  .tuple(fc.array(row, { maxLength: 6 }), section)
  .map(([rows, ei]) =>
    [['pin', 0], ...rows, ...ei].map((cells) => [
      ...(cells as unknown[]),
      ...new Array<null>(8 - cells.length).fill(null),
    ]),
  );
const loose = fc.oneof(
  fc.double(),
  fc.string(),
  fc.constantFrom(
    null,
    '',
    0,
    true,
    '3-',
    'moment',
    'deflection',
    'anywhere',
    [[1, 2]],
    [
      [0, 5],
      [2, 5],
    ],
  ),
);

test('finite or refused, never anything else', () => {
  let answered = 0;
  fc.assert(
    fc.property(table, loose, loose, loose, (beam, a, b, c) => {
      const questions: (() => unknown)[] = [
        () => ask.value(openBeam({ beam }), 'deflection', 5),
        () => ask.value(openBeam({ beam }), 'shear', a),
        () => ask.maxDeflection(openBeam({ beam })),
        () => ask.peak(openBeam({ beam }), a, b, c),
        () => ask.reaction(openBeam({ beam }), a, b),
        () => ask.reactions(openBeam({ beam })),
        () => ask.profile(openBeam({ beam }), 5),
        () => ask.regions(openBeam({ beam })),
        () => ask.check(openBeam({ beam }), a),
        () => ask.used(openBeam({ beam }), 'span/250'),
        () => ask.stiffnessFactor(openBeam({ beam }), 3),
        () => ask.requiredI(openBeam({ beam }), 3),
        () => ask.envelope(openBeam({ beam }), 'moment', a, b, 3),
        () => ask.influence(openBeam({ beam }), 'moment', 3, 3),
        () => ask.influence(openBeam({ beam }), a, b, c),
        () =>
          ask.rolling(openBeam({ beam }), 'moment', 3, [
            [0, 5],
            [2, 5],
          ]),
        () => ask.rolling(openBeam({ beam }), a, b, c),
        () => ask.frequency(openBeam({ beam })),
        () => ask.readback({ beam, names: a, values: b }),
      ];
      for (const question of questions) {
        try {
          finite(question());
          answered++;
        } catch (problem) {
          if (!(problem instanceof BeamProblem)) throw problem;
          expect(problem.issues.length).toBeGreaterThan(0);
          expect(problem.message.length).toBeGreaterThan(10);
        }
      }
    }),
    { seed: 20, numRuns: 60 },
  );
  expect(answered).toBeGreaterThan(60); // read-back alone always answers: the rest must be answered now and then too
});

function finite(result: unknown): void {
  if (Array.isArray(result)) {
    const widths = new Set((result as unknown[][]).map((cells) => cells.length));
    expect(widths.size).toBe(1);
    for (const cell of (result as unknown[][]).flat())
      if (typeof cell !== 'string') expect(Number.isFinite(cell)).toBe(true);
  } else expect(Number.isFinite(result)).toBe(true);
}
