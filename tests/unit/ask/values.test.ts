/** Values, peaks, reactions and profiles in the reader's signs and units; words and positions as arguments; read-back. */
import { ask, BeamProblem, SIGNS, VERSION } from '../../../src/index';
import { version } from '../../../package.json';
import { beam, column, expectNear } from './beams';

const SI = 'units kN m mm; pin 0; pin 6; uniform 0 6 "12 kN/m"; E value="210 GPa"; I value="8360 cm4"';
const EI = 210e6 * 8360e-8;

describe('SS-01 (AISC Manual Table 3-23 case 1): full uniform load on a simple span', () => {
  test('deflection in mm, slope in rad, moment in kN m, shear in kN', () => {
    const open = beam(SI);
    expectNear(ask.value(open, 'deflection', 3) as number, ((5 * 12 * 6 ** 4) / (384 * EI)) * 1000);
    expectNear(ask.value(open, 'slope', 0) as number, (12 * 6 ** 3) / (24 * EI));
    expectNear(ask.value(open, 'moment', 3) as number, 54);
    expectNear(ask.value(open, 'shear', 0) as number, 36);
    expectNear(ask.maxDeflection(open), ((5 * 12 * 6 ** 4) / (384 * EI)) * 1000);
  });
  test('a range of x keeps its shape; blanks are 0, text positions are read', () => {
    const open = beam(SI);
    const table = ask.value(open, 'moment', [
      [0, 3],
      ['300 cm', null],
    ]) as number[][];
    expect(table).toHaveLength(2);
    expectNear(table[0]?.[1] as number, 54);
    expectNear(table[1]?.[0] as number, 54);
    expect(table[1]?.[1]).toBe(table[0]?.[0]);
    expectNear(ask.value(open, 'moment', [[3]]) as number, 54);
  });
});

test('sides of a jump: the right-hand limit unless asked, the left-hand one at the far end', () => {
  const open = beam('pin 0; pin 6; point 2 value=9; EI value=100');
  expectNear(ask.value(open, 'shear', '2-') as number, 6);
  expectNear(ask.value(open, 'shear', 2) as number, -3);
  expectNear(ask.value(open, 'shear', '2+') as number, -3);
  expectNear(ask.value(open, 'shear', 6) as number, -3);
});

test(`axis up: deflections ${SIGNS.up.deflection}, slopes and couples ${SIGNS.up.slope}; moments stay ${SIGNS.always.moment}`, () => {
  const down = beam('fixed 0; point 4 value=5; EI value=100');
  const up = beam('axis up; fixed 0; point 4 value=-5; EI value=100');
  for (const quantity of ['deflection', 'slope'] as const) {
    expectNear(ask.value(up, quantity, 3) as number, -(ask.value(down, quantity, 3) as number));
    expectNear(ask.peak(up, quantity, 'lowest'), -ask.peak(down, quantity, 'highest'));
  }
  for (const quantity of ['moment', 'shear'] as const) {
    expectNear(ask.value(up, quantity, 3) as number, ask.value(down, quantity, 3) as number);
  }
  expectNear(ask.reaction(up, 0), 5);
  expectNear(ask.reaction(down, 0), 5);
  // the root couple balances a load that turns the beam clockwise: it is counter-clockwise
  expectNear(ask.reaction(down, 0, 'couple'), -20);
  expectNear(ask.reaction(up, 0, 'couple'), 20);
});

test('peaks: sense, position, and words in any case with blanks', () => {
  const open = beam('pin 0; pin 6; point 2 value=9; EI value=100');
  expectNear(ask.peak(open, ' Moment ', 'HIGHEST', 'Value'), 12);
  expectNear(ask.peak(open, 'moment', '', 'position'), 2);
  expectNear(ask.peak(open, 'shear', 'lowest'), -3);
  expectNear(ask.peak(open, 'shear'), 6);
});

test('a wrong word lists the right ones and the nearest', () => {
  const open = beam('pin 0; pin 6; EI value=100');
  const issue = issueOf(() => ask.peak(open, 'deflexion'));
  expect(issue).toMatchObject({
    code: 'no-such-word',
    kind: 'invalid',
    column: 'quantity',
    suggestion: 'deflection',
  });
  expect(issue.expected).toBe('deflection, slope, moment, shear');
  expect(() => ask.peak(open, 'deflexion')).toThrow(/deflection/);
  expect(issueOf(() => ask.peak(open, 'moment', 'bigest')).column).toBe('sense');
  expect(issueOf(() => ask.peak(open, 'moment', '', 'place')).column).toBe('give');
  expect(issueOf(() => ask.reaction(open, 0, 'momnet')).column).toBe('part');
  expect(issueOf(() => ask.peak(open, null)).found).toBe('nothing');
});

test('outside the beam the message states both ends', () => {
  const open = beam(SI);
  expect(() => ask.value(open, 'moment', 6.5)).toThrow(/0 m.*6 m/);
  expect(issueOf(() => ask.value(open, 'moment', [[1, 2, 7]])).code).toBe('outside-beam');
});

test('reactions: a row per support, kinds in words, blank where it cannot hold', () => {
  const open = beam(
    'units kN m mm; fixed 0; pin 4; spring 8 value="900 kN/m"; uniform 0 8 "3 kN/m"; EI value="2000 kN m2"',
  );
  const table = ask.reactions(open);
  expect(table[0]).toEqual(['position (m)', 'support', 'force (kN)', 'couple (kN·m)']);
  expect(table.slice(1).map((row) => [row[0], row[1]])).toEqual([
    [0, 'fixed'],
    [4, 'pin'],
    [8, 'spring'],
  ]);
  expect(table[2]?.[3]).toBe('');
  expectNear(
    column(table, 2).reduce((a, b) => a + b),
    24,
  );
  expectNear(ask.reaction(open, 4), table[2]?.[2] as number);
});

test('no support there, or none that holds a couple: #N/A with the supports that do', () => {
  const open = beam('fixed 0; pin 4; uniform 0 4 3; EI value=100');
  expect(issueOf(() => ask.reaction(open, 2))).toMatchObject({
    code: 'no-support',
    kind: 'unavailable',
    detail: { supports: ['0', '4'] },
  });
  expect(issueOf(() => ask.reaction(open, 4, 'couple'))).toMatchObject({
    code: 'no-support',
    detail: { supports: ['0'] },
  });
});

describe('profile', () => {
  const open = beam(
    'units kN m mm; pin 0; pin 6; point 2 value="9 kN"; couple 4 value="6 kN m"; EI value="100 kN m2"',
  );
  test('heading with units, breaks included, each jump twice, ends once, zeros clean', () => {
    const table = ask.profile(open, 5);
    expect(table[0]).toEqual(['x (m)', 'shear (kN)', 'moment (kN·m)', 'slope (rad)', 'deflection (mm)']);
    expect(column(table, 0)).toEqual([0, 1.5, 2, 2, 3, 4, 4, 4.5, 6]);
    expect(table[1]?.[4]).toBe(0);
    expect(table[table.length - 1]?.[4]).toBe(0);
    expect(table[table.length - 1]?.[2]).toBe(0);
    const [before, after] = table.filter((row) => row[0] === 4) as [number[], number[]];
    expectNear((after[2] as number) - (before[2] as number), 6);
  });
  test('41 steps when points is left out, and a count that is none is refused', () => {
    // 41 equally spaced, of which 2 and 4 fall between, and two jumps twice
    expect(ask.profile(open)).toHaveLength(1 + 41 + 4);
    for (const points of [1, 2.5, -3, 'many', 1e9])
      expect(issueOf(() => ask.profile(open, points)).code).toBe('bad-points');
  });
});

describe('readback', () => {
  test('a sentence per row, what is passed over, cautions, the standing caution last', () => {
    const lines = ask
      .readback({
        beam: [
          ['Item', 'At', 'To', 'Value', 'Our mark'],
          ['pin', 0, null, null, 'B1'],
          ['pin', 6, null, null, ''],
          ['# checked', null, null, null, ''],
          ['point', 9, null, 40, ''],
          ['EI', null, null, 100, ''],
        ],
      })
      .map((row) => row[0] as string);
    expect(lines[0]).toMatch(/^Row 2: /);
    expect(lines.join('\n')).toMatch(/Ignored: row 4, a remark/);
    expect(lines.join('\n')).toMatch(/Ignored: the column Our mark/);
    expect(lines.filter((line) => line.startsWith('Caution: '))).toEqual([
      expect.stringMatching(/slope/i),
      expect.stringMatching(/deflection/i),
      expect.stringMatching(/deflection/i),
      expect.stringMatching(/pulled up/),
    ]);
    expect(lines[lines.length - 1]).toMatch(/qualified engineer/);
  });
  test('errors come as text and nothing is ever thrown', () => {
    const cases: unknown[] = [
      null,
      '',
      0,
      [[]],
      [[null]],
      'pin',
      [['pin', '#DIV/0!']],
      'pin 0; EI 0 3 1',
      [[{}]],
      5,
      true,
      [['pin', 0], 3],
    ];
    for (const bad of cases) {
      const lines = ask.readback({ beam: bad });
      expect(lines.length).toBeGreaterThan(1);
      for (const row of lines) expect(row).toEqual([expect.any(String)]);
    }
    expect(ask.readback({ beam: 'pin 0; EI 0 3 1' }).flat().join(' ')).toMatch(/not held/);
  });
});

test('the version is that of the package', () => {
  expect(VERSION).toBe(`Spanrow ${version}`);
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
