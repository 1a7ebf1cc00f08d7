/** Random tables, from nearly right to nonsense: a whole result or the host's error with words that name a place, never anything else. */
import fc from 'fast-check';
import { BLANK, BLANK_BEHAVIOURS, call, HostError, METADATA, OMITTED } from './host';

/** The same tables every time, so that a red test is a change of ours; `SEED=7 RUNS=20000` looks further. */
const SEED = Number(process.env.SEED ?? 20261201);
const RUNS = Number(process.env.RUNS ?? 250);

const rich = (value: fc.Arbitrary<unknown>): fc.Arbitrary<unknown> =>
  value.map((basicValue) => ({ type: 'Double', basicType: 'Double', basicValue, numberFormat: 'General' }));

const position = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: 0, max: 10 }) },
  { weight: 1, arbitrary: fc.double() },
);
const amount = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: -50, max: 50, noNaN: true }) },
  { weight: 1, arbitrary: fc.double() },
);
const word = fc.constantFrom(
  'pin',
  'roller',
  'fixed',
  'guided',
  'spring',
  'rotational spring',
  'settlement',
  'rotation',
  'foundation',
  'hinge',
  'shear release',
  'E',
  'I',
  'EI',
  'GA',
  'point',
  'couple',
  'uniform',
  'udl',
  'varying',
  'curvature',
  'axial',
  'camber',
  'units',
  'axis',
  'limit',
  '# remark',
  'pinn',
  'Uniform ',
  '__proto__',
  'constructor',
);
const unit = fc.constantFrom(
  'kN',
  'kN/m',
  'm',
  'mm',
  'GPa',
  'cm4',
  'kN m2',
  'kip',
  'in',
  'rad',
  'furlong',
  '',
  'kN/',
  '12 kN',
);
const caseName = fc.constantFrom('G', 'Q', 'W', 'S1', 'x', 'G + Q', '1');
const text = fc.oneof(
  fc.constantFrom(
    'L',
    'w',
    'x',
    'L/2',
    '2*w',
    'sqrt(L)',
    'span/360',
    '12 kN/m',
    '12\'-6"',
    '1/0',
    '(((',
    '1e999',
    '3-',
    '-',
    '=A1',
    'down',
    'up',
    'toString',
  ),
  fc.string(),
);
const odd = fc.oneof(
  text,
  fc.boolean(),
  fc.constant(BLANK),
  fc.constant(''),
  fc.constant(null),
  rich(amount),
  unit,
  fc.constant({ type: 'Error', basicType: 'Error', basicValue: '#REF!' }),
  fc.constant({ type: 'Entity', text: 'a', properties: {} }),
  fc.constant({}),
  fc.constant(45678.5),
);

/** One row: its usual cells, and now and then something odd in one of them. */
const row = fc
  .tuple(
    word,
    position,
    fc.oneof(position, fc.constant(BLANK)),
    fc.oneof(amount, text),
    fc.oneof(amount, fc.constant(BLANK)),
    fc.oneof(fc.constant(BLANK), unit),
    fc.oneof(fc.constant(BLANK), caseName),
    fc.constant(BLANK),
  )
  .chain((cells) =>
    fc.option(fc.tuple(fc.nat(7), odd), { freq: 4 }).map((change) => {
      const out: unknown[] = [...cells];
      if (change) out[change[0]] = change[1];
      return out;
    }),
  );

const full = (...cells: unknown[]): unknown[] => [...cells, ...Array<unknown>(8 - cells.length).fill(BLANK)];

/** Rows that make a beam, so that a good part of the tables is answered. */
const BEAMS: unknown[][][] = [
  [full('pin', 0), full('fixed', 10), full('EI', BLANK, BLANK, 1000)],
  [
    full('units', 'kN', 'm', 'mm'),
    full('pin', 0),
    full('pin', 10),
    full('E', BLANK, BLANK, 210, BLANK, 'GPa'),
    full('I', BLANK, BLANK, 8000, BLANK, 'cm4'),
    full('uniform', 0, 10, '3 kN/m'),
    full('limit', BLANK, BLANK, 'span/300'),
  ],
];
const beam = fc.constantFrom(...BEAMS);
/** An amount with two decimals, as people write them. */
const plain = (min: number, max: number) =>
  fc.integer({ min: 100 * min, max: 100 * max }).map((n) => n / 100);
const safe = fc
  .oneof(
    fc.tuple(fc.constantFrom('pin', 'guided'), fc.integer({ min: 1, max: 9 })),
    fc.tuple(fc.constant('spring'), fc.integer({ min: 1, max: 9 }), fc.constant(BLANK), plain(1, 9999)),
    fc.tuple(
      fc.constantFrom('point', 'couple', 'point'),
      fc.integer({ min: 0, max: 10 }),
      fc.constant(BLANK),
      plain(-50, 50),
      fc.constant(BLANK),
      fc.constant(BLANK),
      fc.constantFrom('G', 'Q'),
    ),
    fc.tuple(
      fc.constant('varying'),
      fc.integer({ min: 0, max: 4 }),
      fc.integer({ min: 5, max: 10 }),
      plain(-50, 50),
      plain(1, 9),
    ),
  )
  .map((cells: unknown[]) => full(...cells));

const table = fc.oneof(
  { weight: 6, arbitrary: fc.tuple(beam, fc.array(safe, { maxLength: 4 })).map((parts) => parts.flat()) },
  { weight: 3, arbitrary: fc.tuple(beam, fc.array(row, { maxLength: 3 })).map((parts) => parts.flat()) },
  { weight: 2, arbitrary: fc.array(row, { minLength: 1, maxLength: 8 }) },
  {
    weight: 1,
    arbitrary: fc.array(fc.array(odd, { minLength: 3, maxLength: 3 }), { minLength: 1, maxLength: 6 }),
  },
  { weight: 1, arbitrary: text.map((one) => [[one]]) },
);

/** Mostly what a reader means, sometimes what a slip of the pen makes of it. */
const mostly = (good: unknown[], bad: unknown[]): fc.Arbitrary<unknown> =>
  fc.oneof(
    { weight: 6, arbitrary: fc.constantFrom(...good) },
    { weight: 1, arbitrary: fc.constantFrom(...bad) },
    { weight: 1, arbitrary: odd },
  );

const ARGUMENTS: Record<string, fc.Arbitrary<unknown>> = {
  x: mostly(
    [
      0,
      2.5,
      7,
      '10-',
      [
        [1, '3-'],
        [BLANK, 9],
      ],
    ],
    [11, -1, ''],
  ),
  at: mostly([0, 10, 'anywhere'], [5, '5 m', -1]),
  quantity: mostly(['deflection', 'slope', 'moment', 'shear'], ['reaction', 'couple', 'deflektion']),
  sense: mostly(['largest', 'highest', 'lowest', BLANK, OMITTED], ['most']),
  give: mostly(['value', 'position', BLANK, OMITTED], ['section']),
  part: mostly(['force', BLANK, OMITTED], ['couple', 'both']),
  points: mostly([BLANK, OMITTED, 5, 2], [1.5, 'many', 1e9, -1]),
  limit: mostly(['span/360', 20, '20'], [BLANK, OMITTED, 'L/', -1, 0]),
  combinations: mostly([BLANK, BLANK, [[BLANK]], 'Q', [['Q'], ['1.35 Q']]], [[[1, 2]], 'W', 'Q +']),
  pattern: mostly([BLANK, OMITTED], ['Q', 'Q, G', 'nothing']),
  axles: mostly(
    [
      [
        [0, 10],
        [1.5, 12],
      ],
      [[0, 10]],
    ],
    [BLANK, [['a', 'b']], [[0, 10, 5]]],
  ),
  combination: mostly(
    [BLANK, OMITTED],
    [
      'G',
      'G + 0.3 Q',
      'G +',
      [
        ['G', 1.35],
        ['Q', 1.5],
      ],
    ],
  ),
  names: mostly([BLANK, OMITTED], [[['L', 'w']], [['x'], ['w']], [['L', 'L']]]),
  values: mostly([BLANK, OMITTED], [[[6, 12]], [[6], ['12 kN/m']], [[BLANK, 'b']]]),
};

/** Words that say where: a row, a column, an argument, or a stretch of the beam. */
const PLACE =
  /\b(rows?|column|cell|x|at|beam|combinations?|names?|values?|quantity|sense|give|part|points|limits?|pattern|axles|support|position|table|unit|E|I|EI|GA)\b|\d/i;

const answered: Record<string, number> = {};

describe.each(METADATA.functions.filter((one) => one.parameters.length > 0))('$id', ({ id, parameters }) => {
  const given = fc.tuple(
    table,
    ...parameters.slice(1).map((one) => ARGUMENTS[one.name]!),
    fc.constantFrom(...BLANK_BEHAVIOURS),
  );

  it('answers wholly or says where it cannot', () => {
    answered[id] = 0;
    fc.assert(
      fc.property(given, (drawn) => {
        const args = drawn.slice(0, -1);
        const blanks = drawn.at(-1) as (typeof BLANK_BEHAVIOURS)[number];
        const result = call(id, args, blanks);
        if (result instanceof HostError) {
          expect(id).not.toBe('READBACK');
          expect(['#VALUE!', '#N/A']).toContain(result.code);
          expect(result.message).not.toMatch(/fault of Spanrow/);
          expect(result.message).toMatch(PLACE);
          expect(result.message).not.toMatch(/undefined|NaN|\[object/);
          return;
        }
        answered[id]! += 1;
        const cells = Array.isArray(result) ? (result as unknown[][]) : [[result]];
        for (const line of cells) {
          if (line.length !== cells[0]!.length) throw new Error('a ragged spill');
          for (const cell of line) {
            if (typeof cell === 'number' ? !Number.isFinite(cell) : typeof cell !== 'string')
              throw new Error(`a cell ${String(cell)}`);
          }
        }
      }),
      { numRuns: RUNS, seed: SEED },
    );
  });

  it('was answered often enough for that to mean something', () => {
    expect(answered[id]).toBeGreaterThan(RUNS / 20);
  });
});
