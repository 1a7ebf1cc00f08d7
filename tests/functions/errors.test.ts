/** Wrong rows and arguments: which error, and a sentence that names the place. Asked of the built bundle. */
import { CANTILEVER, RICH, SIMPLE, TEMPLATE, TEMPLATE_NAMES } from './beams';
import { BLANK, BLANK_BEHAVIOURS, failure, OMITTED, rows, spill } from './host';

const b = BLANK;
/** SIMPLE with one row put in place of another (1-based). */
const changed = (row: number, cells: unknown[]): unknown[][] =>
  SIMPLE.map((old, i) => (i === row - 1 ? rows(cells)[0]! : old));

const WRONG: [string, string, unknown[], RegExp[]][] = [
  [
    'an item that is not known, with the word probably meant',
    'DEFLECTION',
    [changed(3, ['pinn', 6]), 3],
    [/row 3/i, /pinn/, /pin/],
  ],
  ['a row with numbers and no item', 'DEFLECTION', [changed(3, [b, 6]), 3], [/row 3/i]],
  [
    'a unit of the wrong dimension',
    'DEFLECTION',
    [changed(6, ['uniform', 0, 6, 12, b, 'kN']), 3],
    [/row 6/i, /kN/],
  ],
  ['a missing unit', 'DEFLECTION', [changed(4, ['E', b, b, 210]), 3], [/row 4/i, /unit/i]],
  ['a gap in EI', 'DEFLECTION', [changed(5, ['I', 0, 4, 8360, b, 'cm4']), 3], [/4/, /6/]],
  ['x outside the beam', 'DEFLECTION', [SIMPLE, 6.5], [/6\.5/, /0/, /6/]],
  ['x that is no position', 'DEFLECTION', [SIMPLE, 'middle'], [/middle/]],
  ['a case that no row has', 'DEFLECTION', [SIMPLE, 3, 'G + W'], [/W/, /G/, /Q/]],
  ['a combination that is none', 'DEFLECTION', [SIMPLE, 3, 'G +* Q'], [/combination/i]],
  [
    'a name that is not known',
    'MAXDEFLECTION',
    [TEMPLATE, OMITTED, [['L', 'q', 'Iy']], [[6, 17, 8360]]],
    [/\bw\b/, /\bq\b/],
  ],
  [
    'names and values of different size',
    'MAXDEFLECTION',
    [TEMPLATE, OMITTED, TEMPLATE_NAMES, [[6, 17]]],
    [/names|values/i, /3/, /2/],
  ],
  ['a quantity that is none', 'PEAK', [SIMPLE, 'deflektion'], [/deflektion/, /deflection/]],
  ['a sense that is none', 'PEAK', [SIMPLE, 'moment', 'biggest'], [/biggest/, /largest/]],
  [
    'an error cell inside the table',
    'DEFLECTION',
    [
      changed(6, ['uniform', 0, 6, { type: 'Error', basicType: 'Error', basicValue: '#DIV/0!' }, b, 'kN/m']),
      3,
    ],
    [/row 6/i, /#DIV\/0!/],
  ],
  [
    'a boolean where a number should be',
    'DEFLECTION',
    [changed(6, ['uniform', 0, 6, true, b, 'kN/m']), 3],
    [/row 6/i],
  ],
  ['points that are no count', 'PROFILE', [SIMPLE, 'many'], [/points/, /many/]],
  ['a limit that is none', 'USED', [SIMPLE, 'span/'], [/limit/i, /span\//]],
  ['a table of blanks', 'DEFLECTION', [rows([], []), 0], [/./]],
  [
    'units without a units row',
    'DEFLECTION',
    [rows(['pin', 0], ['pin', 6], ['EI', b, b, 5, b, 'kN m2']), 3],
    [/units/i],
  ],
];

describe.each(BLANK_BEHAVIOURS)('with blank cells as %p', (blanks) => {
  it.each(WRONG)('%s is #VALUE!', (_, id, args, words) => {
    const { code, message } = failure(id, args, blanks);
    expect(code).toBe('#VALUE!');
    for (const word of words) expect(message).toMatch(word);
    expect(message).not.toMatch(/fault of Spanrow/);
  });

  it('no support at a position is #N/A and lists the supports', () => {
    const { code, message } = failure('REACTION', [SIMPLE, 2], blanks);
    expect(code).toBe('#N/A');
    expect(message).toMatch(/2/);
    expect(message).toMatch(/0.*6/);
  });

  it('a beam that is free to move is #N/A and says how', () => {
    const loose = rows(['pin', 0], ['EI', b, b, 1000], ['point', 4, b, 1]);
    const { code, message } = failure('DEFLECTION', [loose, 2], blanks);
    expect(code).toBe('#N/A');
    expect(message).toMatch(/rotat|turn|move|free|unstable/i);
  });

  it('the words reach the reader where a host hides them: READBACK never fails', () => {
    const said = spill('READBACK', [changed(3, ['pinn', 6])], blanks)
      .map((row) => row.join(' '))
      .join('\n');
    expect(said).toMatch(/row 3/i);
    expect(said).toMatch(/pinn/);
  });
});

it('a wrong x in a range fails the whole range, with its own value named', () => {
  expect(
    failure('DEFLECTION', [
      SIMPLE,
      [
        [1, 2],
        [3, 99],
      ],
    ]).message,
  ).toMatch(/99/);
});

it('several faults: the first is worded and the others are counted', () => {
  const table = rows(['pinn', 0], ['pin', 6], ['uniformm', 0, 6, 1], ['EI', b, b, 1]);
  expect(failure('DEFLECTION', [table, 1]).message).toMatch(/1 more/);
});

it('FREQUENCY without a units row is refused: gravity would be a guess', () => {
  expect(failure('FREQUENCY', [CANTILEVER]).message).toMatch(/units/i);
});

it('no limit to test against is said, not answered', () => {
  expect(failure('USED', [RICH]).message).toMatch(/limit/i);
});
