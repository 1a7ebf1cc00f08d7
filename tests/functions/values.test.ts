/** What the functions of the built bundle give, checked against closed forms; every call with blanks as 0 and as null. */
import { CANTILEVER, RICH, SIMPLE, SIMPLE_EI, simpleMid, TEMPLATE, TEMPLATE_NAMES } from './beams';
import { BLANK, BLANK_BEHAVIOURS, call, METADATA, number, OMITTED, rows, spill } from './host';

/** The engine's own promise for well-conditioned beams (relative), times a margin of ten. */
const CLOSE = 1e-11;
const near = (found: number, wanted: number): void => {
  expect(Math.abs(found - wanted)).toBeLessThanOrEqual(CLOSE * Math.abs(wanted));
};

/** The row of a spilled diagram at x (an exact extreme may stand a rounding beside a round number). */
const at = (table: unknown[][], x: number): number[] =>
  table.find((row) => typeof row[0] === 'number' && Math.abs(row[0] - x) < 1e-9) as number[];

describe.each(BLANK_BEHAVIOURS)('with blank cells as %p', (blanks) => {
  it('DEFLECTION, SLOPE, MOMENT and SHEAR of a simple span', () => {
    near(number('DEFLECTION', [SIMPLE, 3], blanks), simpleMid(17));
    near(number('DEFLECTION', [SIMPLE, 3, 'G + 0.3 Q'], blanks), simpleMid(12 + 0.3 * 5));
    near(number('SLOPE', [SIMPLE, 0], blanks), (17 * 6 ** 3) / (24 * SIMPLE_EI)); // wL³/24EI, clockwise at the left end
    near(number('MOMENT', [SIMPLE, 3, '1.35 G + 1.5 Q'], blanks), ((1.35 * 12 + 1.5 * 5) * 36) / 8);
    near(number('SHEAR', [SIMPLE, 0], blanks), 51);
    near(number('SHEAR', [SIMPLE, 6], blanks), -51); // the left-hand limit at the far end
  });

  it('MAXDEFLECTION and PEAK', () => {
    near(number('MAXDEFLECTION', [SIMPLE], blanks), simpleMid(17));
    near(number('PEAK', [SIMPLE, 'deflection', OMITTED, 'position'], blanks), 3);
    near(number('PEAK', [SIMPLE, 'moment', 'highest'], blanks), (17 * 36) / 8);
    near(number('PEAK', [SIMPLE, 'shear', 'lowest'], blanks), -51);
  });

  it('REACTION and REACTIONS', () => {
    near(number('REACTION', [SIMPLE, 6, OMITTED, 'Q'], blanks), 15);
    near(number('REACTION', [CANTILEVER, 0], blanks), 3);
    // the force at the tip bends the end of the beam clockwise; the support answers counter-clockwise
    near(number('REACTION', [CANTILEVER, 0, 'couple'], blanks), -6);
    const [header, ...supports] = spill('REACTIONS', [SIMPLE], blanks);
    expect(header).toHaveLength(4);
    expect(supports.map((row) => row[0])).toEqual([0, 6]);
    for (const row of supports) near(row[2] as number, 51);
  });

  it('a cantilever in one consistent system, without units', () => {
    near(number('DEFLECTION', [CANTILEVER, 2], blanks), (3 * 8) / (3 * 1000)); // PL³/3EI
    near(number('MOMENT', [CANTILEVER, 0], blanks), -6);
  });

  it('CHECK, USED, REQUIREDI, STIFFNESSFACTOR', () => {
    const usedFraction = simpleMid(17) / (6000 / 300);
    near(number('USED', [SIMPLE], blanks), usedFraction);
    near(number('USED', [SIMPLE, 'span/360', 'Q'], blanks), simpleMid(5) / (6000 / 360));
    near(number('STIFFNESSFACTOR', [SIMPLE], blanks), usedFraction);
    near(number('REQUIREDI', [SIMPLE], blanks), 8360 * usedFraction);
    const table = spill('CHECK', [SIMPLE], blanks);
    expect(table.length).toBeGreaterThanOrEqual(2);
    expect(table.flat()).toContain(usedFraction > 1 ? 'exceeded' : 'within');
  });

  it('PROFILE ends where the beam ends and shows both sides of a jump', () => {
    const profile = spill('PROFILE', [RICH], blanks);
    expect(profile[0]).toHaveLength(5);
    const body = profile.slice(1) as number[][];
    expect(body[0]![0]).toBe(0);
    expect(body.at(-1)![0]).toBe(9);
    for (const support of [4, 8]) expect(body.filter((row) => row[0] === support)).toHaveLength(2);
  });

  it('ENVELOPE over combinations', () => {
    const band = spill('ENVELOPE', [SIMPLE, 'moment', [['G'], ['1.35 G + 1.5 Q'], ['0.9 G']]], blanks);
    const middle = at(band, 3);
    near(middle[1]!, (0.9 * 12 * 36) / 8);
    near(middle[2]!, ((1.35 * 12 + 1.5 * 5) * 36) / 8);
  });

  it('INFLUENCE and ROLLING: the middle of a simple span takes PL/4', () => {
    const line = spill('INFLUENCE', [SIMPLE, 'moment', 3], blanks);
    near(at(line, 3)[1]!, 6 / 4);
    near(number('ROLLING', [SIMPLE, 'moment', 3, [[0, 10]]], blanks), (10 * 6) / 4);
    near(number('ROLLING', [SIMPLE, 'moment', 'anywhere', [[0, 10]], OMITTED, 'section'], blanks), 3);
  });

  it('FREQUENCY of a simple span is π/2 √(EI g/(w L⁴)) to the accuracy of the method', () => {
    // the static shape gives 0.0 to 0.1 % above the exact value for a uniform mass (standard result)
    const exact = (Math.PI / 2) * Math.sqrt((SIMPLE_EI * 9.80665) / (17 * 6 ** 4));
    const found = number('FREQUENCY', [SIMPLE], blanks);
    expect(found / exact).toBeGreaterThan(1);
    expect(found / exact).toBeLessThan(1.001);
  });

  it('a template member is the beam with the numbers written in', () => {
    const member = number('MAXDEFLECTION', [TEMPLATE, 'G', TEMPLATE_NAMES, [[6, 17, 8360]]], blanks);
    near(member, simpleMid(17));
    // a column of names does as well as a row
    near(
      number('MAXDEFLECTION', [TEMPLATE, OMITTED, [['L'], ['w'], ['Iy']], [[6], [17], [8360]]], blanks),
      simpleMid(17),
    );
  });

  it('one cell of text is a beam', () => {
    const text = 'pin 0; pin 6; uniform 0 6 "17 kN/m"; E value="210 GPa"; I value="8360 cm4"; units kN m mm';
    near(number('DEFLECTION', [text, 3], blanks), simpleMid(17));
  });

  it('x as a range spills in its shape, also as text and one-sided', () => {
    expect(
      spill(
        'SHEAR',
        [
          SIMPLE,
          [
            [0, 3],
            ['6-', '1.5 m'],
          ],
        ],
        blanks,
      ).map((row) => row.map((v) => Math.round((v as number) * 1e6) / 1e6)),
    ).toEqual([
      [51, 0],
      [-51, 25.5],
    ]);
    expect(spill('DEFLECTION', [SIMPLE, [[1, 2, 3]]], blanks)[0]).toHaveLength(3);
    expect(spill('DEFLECTION', [SIMPLE, [[1], [2], [3]]], blanks)).toHaveLength(3);
  });

  it('optional arguments left out, blank, and named are one and the same', () => {
    const wanted = number('PEAK', [SIMPLE, 'moment', 'largest', 'value'], blanks);
    expect(number('PEAK', [SIMPLE, 'moment'], blanks)).toBe(wanted);
    expect(number('PEAK', [SIMPLE, 'moment', BLANK, BLANK, BLANK, BLANK, BLANK], blanks)).toBe(wanted);
    expect(number('PEAK', [SIMPLE, ' Moment ', 'LARGEST', 'Value'], blanks)).toBe(wanted);
    expect(number('USED', [SIMPLE, BLANK, BLANK, BLANK, BLANK], blanks)).toBe(
      number('USED', [SIMPLE], blanks),
    );
  });

  it('READBACK says a sentence for each row', () => {
    const sentences = spill('READBACK', [RICH], blanks).map((row) => String(row[0]));
    expect(sentences.join('\n')).toMatch(/hinge/i);
    expect(sentences.join('\n')).toMatch(/10 kN\/m/);
    expect(sentences.length).toBeGreaterThan(10);
  });

  it('REGIONS lays out the working', () => {
    const table = spill('REGIONS', [SIMPLE], blanks);
    expect(table.length).toBeGreaterThan(3);
    expect(table.flat().some((cell) => typeof cell === 'string' && /s/.test(cell))).toBe(true);
  });
});

it('VERSION names the add-in and its version', () => {
  expect(call('VERSION', [])).toMatch(/^Spanrow \d+\.\d+\.\d+/);
});

it('VERIFY runs at least 40 published values, all within 1e-9 of what is published or of its printed digits', () => {
  const [header, ...cases] = spill('VERIFY', []);
  expect(header!.length).toBeGreaterThanOrEqual(5);
  expect(cases.length).toBeGreaterThanOrEqual(40);
});

describe('blank cells as 0 and as null give the same, for every function', () => {
  const axles = [
    [0, 10],
    [1.5, 12],
  ];
  const CALLS: [string, unknown[]][] = [
    [
      'DEFLECTION',
      [
        RICH,
        [
          [0, 2.5],
          [7, 9],
        ],
        'G + Q',
      ],
    ],
    ['SLOPE', [RICH, [['5-', '5+']]]],
    ['MOMENT', [RICH, [['2-', '2+']]]],
    ['SHEAR', [RICH, 4]],
    ['MAXDEFLECTION', [RICH]],
    ['PEAK', [RICH, 'moment', 'lowest', 'position']],
    ['REACTION', [RICH, 4, 'force']],
    ['REACTIONS', [RICH, 'G']],
    ['PROFILE', [RICH, 11]],
    ['REGIONS', [RICH]],
    ['CHECK', [RICH, 'span/250']],
    ['USED', [RICH, 'span/250']],
    ['REQUIREDI', [SIMPLE]],
    ['STIFFNESSFACTOR', [RICH, 'span/250', 'G + Q']],
    ['ENVELOPE', [RICH, 'deflection', [['G'], ['G + Q']], 'Q', 11]],
    ['INFLUENCE', [RICH, 'reaction', 4, 11]],
    ['ROLLING', [RICH, 'moment', 2, axles]],
    ['FREQUENCY', [SIMPLE, 'G']],
    ['READBACK', [RICH]],
    ['VERIFY', []],
    ['VERSION', []],
  ];

  it('covers every function', () => {
    expect(CALLS.map(([id]) => id).sort()).toEqual(METADATA.functions.map((one) => one.id).sort());
  });

  it.each(CALLS)('%s', (id, args) => {
    const [asZero, asNull] = BLANK_BEHAVIOURS.map((blanks) => call(id, args, blanks));
    expect(JSON.stringify(asZero)).toBe(JSON.stringify(asNull));
    // a call again is a call the same
    expect(JSON.stringify(call(id, args, null))).toBe(JSON.stringify(asNull));
    // a result is whole: numbers finite, spills rectangular
    const table = Array.isArray(asNull) ? (asNull as unknown[][]) : [[asNull]];
    for (const row of table) {
      expect(row).toHaveLength(table[0]!.length);
      for (const cell of row) {
        if (typeof cell === 'number') expect(Number.isFinite(cell)).toBe(true);
        else expect(['string', 'boolean']).toContain(typeof cell);
      }
    }
  });
});

describe('every kind of cell', () => {
  const rich = (basicValue: unknown, type = 'FormattedNumber') => ({
    type,
    basicType: 'Double',
    basicValue,
    numberFormat: '0.00',
  });
  const formatted = SIMPLE.map((row) => row.map((cell) => (typeof cell === 'number' ? rich(cell) : cell)));

  it('numbers in formatted cells are numbers', () => {
    near(number('DEFLECTION', [formatted, [[rich(3)]]]), simpleMid(17));
  });

  it('text in a rich cell is text', () => {
    const table = SIMPLE.map((row) =>
      row.map((cell) => (cell === 'pin' ? { type: 'String', basicType: 'String', basicValue: 'pin' } : cell)),
    );
    near(number('DEFLECTION', [table, 3]), simpleMid(17));
  });

  it('an empty rich cell is blank', () => {
    const table = SIMPLE.map((row) =>
      row.map((cell) => (cell === BLANK ? { type: 'Empty', basicType: 'Empty', basicValue: '' } : cell)),
    );
    near(number('DEFLECTION', [table, 3]), simpleMid(17));
  });

  it('"" is blank', () => {
    const table = SIMPLE.map((row) => row.map((cell) => (cell === BLANK ? '' : cell)));
    near(number('DEFLECTION', [table, 3]), simpleMid(17));
  });

  it('numbers stored as text are read', () => {
    const table = SIMPLE.map((row) => row.map((cell) => (typeof cell === 'number' ? String(cell) : cell)));
    near(number('DEFLECTION', [table, '3']), simpleMid(17));
  });
});

describe('size', () => {
  it('5,000 rows are one table like any other', () => {
    const loads = Array.from({ length: 4992 }, (_, i) => [
      'point',
      (6 * (i + 1)) / 4993,
      BLANK,
      0.01,
      BLANK,
      'kN',
    ]);
    const table = [
      ...rows(
        ['units', 'kN', 'm', 'mm'],
        ['pin', 0],
        ['pin', 6],
        ['E', BLANK, BLANK, 210, BLANK, 'GPa'],
        ['I', BLANK, BLANK, 8360, BLANK, 'cm4'],
      ),
      ...rows(...loads),
      ...rows([], [], []),
    ];
    expect(table).toHaveLength(5000);
    expect(number('REACTION', [table, 0])).toBeCloseTo(24.96, 9);
  });

  it('a range of one cell, and a range far larger than the beam', () => {
    near(number('MOMENT', [[['fixed 0; point 2 value=3; EI value=1000']], 0]), -6);
    near(number('MOMENT', [[...CANTILEVER, ...rows(...Array<unknown[]>(2000).fill([]))], 0]), -6);
  });
});
