/**
 * Envelopes and patterns. Published coefficients (handbook CO-08, CO-09, CO-11 from AISC Manual Table 3-23 cases 34-36; Hicks,
 * Civil Engineering Formulas, Table 2.1): three equal spans, L = 7.8 m, w = 12.5 kN/m, E = 210 GPa, I = 125e6 mm4.
 */
import { ask, BeamProblem } from '../../../src/index';
import { beam, column, expectNear } from './beams';

const THREE =
  'units kN m mm; pin 0; pin 7.8; pin 15.6; pin 23.4; uniform 0 23.4 "12.5 kN/m" case=Q; E value="210 GPa"; I value="125e6 mm4"';
const WL2 = 12.5 * 7.8 ** 2;

test('pattern moments of three equal spans: two neighbours loaded -7/60 wL^2 over a support, ends loaded for the end span', () => {
  const table = ask.envelope(beam(THREE), 'moment', 'Q', 'Q');
  const at = (x: number): (number | string)[] => table.find((row) => row[0] === x) as (number | string)[];
  expectNear(at(7.8)[1] as number, (-7 / 60) * WL2, WL2); // CO-11
  expectNear(at(15.6)[1] as number, (-7 / 60) * WL2, WL2);
  // highest over a support: only the far end span loaded, +wL^2/60 (CO-11 is -wL^2/30 with the sum of all -1/10)
  expectNear(at(7.8)[2] as number, (1 / 60) * WL2, WL2);
  // CO-09: end spans loaded, R = 0.45 wL, so the span moment is R^2/(2w) = 0.10125 wL^2
  expectNear(Math.max(...column(table, 2)), (0.45 ** 2 / 2) * WL2);
  // middle span alone: wL^2/8 - wL^2/20
  const middle = table.filter((row) => (row[0] as number) > 7.8 && (row[0] as number) < 15.6);
  expectNear(Math.max(...middle.map((row) => row[2] as number)), (1 / 8 - 1 / 20) * WL2);
});

test('pattern deflection of the end span is CO-09: 17.4807... mm at 0.47926 L', () => {
  const table = ask.envelope(beam(THREE), 'deflection', 'Q', 'Q');
  const worst = table.slice(1).reduce((a, b) => ((b[2] as number) > (a[2] as number) ? b : a));
  expectNear(worst[2] as number, 17.480743834673056186);
  expect(
    [3.7382228537231822, 23.4 - 3.7382228537231822].some((x) => Math.abs(x - (worst[0] as number)) < 1e-6),
  ).toBe(true);
});

test('without a pattern the case acts as a whole: CO-08', () => {
  const table = ask.envelope(beam(THREE), 'moment', 'Q');
  const row = table.find((one) => one[0] === 7.8) as (number | string)[];
  expectNear(row[1] as number, -0.1 * WL2);
  expectNear(row[2] as number, -0.1 * WL2);
});

const MIXED =
  'pin 0; spring 5 value=900; pin 9; fixed 14; uniform 0 14 2 case=G; varying 1 11 3 7 case=Q; point 3 value=9 case=Q; couple 12 value=-6 case=Q; ' +
  'point 10 value=-8 case=W; settlement 9 value=0.004 case=S; EI 0 9 1000; EI 9 14 2500';

test('every combination and every subset of spans, by brute force, is inside and touched', () => {
  const combinations = [['1.35 G + 1.5 Q'], ['G - W'], [''], ['1.35 G + 1.5 Q + S']];
  const rows = ask.envelope(beam(MIXED), 'moment', combinations, 'Q', 9).slice(1) as number[][];
  // the parts of Q by hand: its loads in each span on their own
  const law = (x: number): number => 3 + (4 * (x - 1)) / 10;
  const parts = [
    `varying 1 5 ${law(1)} ${law(5)} case=A; point 3 value=9 case=A`,
    `varying 5 9 ${law(5)} ${law(9)} case=B`,
    `varying 9 11 ${law(9)} ${law(11)} case=C; couple 12 value=-6 case=C`,
  ].join('; ');
  const split = MIXED.replace(
    'varying 1 11 3 7 case=Q; point 3 value=9 case=Q; couple 12 value=-6 case=Q',
    parts,
  );
  const low = rows.map(() => Infinity);
  const high = rows.map(() => -Infinity);
  for (const base of ['1.35 G', 'G - W', '1.35 G + S']) {
    const factor = base === 'G - W' ? 0 : 1.5;
    for (let mask = 0; mask < 8; mask++) {
      const on = ['A', 'B', 'C'].filter((_, i) => (mask >> i) & 1).map((name) => ` + ${factor} ${name}`);
      const open = beam(split, { combination: base + on.join('') });
      rows.forEach(([x], i) => {
        const left = rows[i + 1]?.[0] === x;
        const value = ask.value(open, 'moment', left ? `${x}-` : x) as number;
        low[i] = Math.min(low[i] as number, value);
        high[i] = Math.max(high[i] as number, value);
      });
    }
  }
  const scale = Math.max(...high.map(Math.abs), ...low.map(Math.abs));
  rows.forEach(([, lowest, highest], i) => {
    expectNear(lowest as number, low[i] as number, scale);
    expectNear(highest as number, high[i] as number, scale);
  });
});

test('the extremes in the table are those of the peaks of each combination', () => {
  const combinations = ['G', 'G + Q', 'G - W'];
  for (const quantity of ['deflection', 'slope', 'moment', 'shear']) {
    const table = ask.envelope(beam(MIXED), quantity, [combinations], '', 2);
    const peaks = combinations.map((combination) => beam(MIXED, { combination }));
    const high = Math.max(...peaks.map((open) => ask.peak(open, quantity, 'highest')));
    const low = Math.min(...peaks.map((open) => ask.peak(open, quantity, 'lowest')));
    expectNear(Math.max(...column(table, 2)), high);
    expectNear(Math.min(...column(table, 1)), low);
  }
});

test('axis up turns the envelope of deflections over', () => {
  const down = ask.envelope(beam(THREE), 'deflection', 'Q', 'Q', 5);
  const up = ask.envelope(
    beam(THREE.replace('"12.5', 'axis').replace('axis kN/m"', '"-12.5 kN/m"') + '; axis up'),
    'deflection',
    'Q',
    'Q',
    5,
  );
  const worst = (table: (number | string)[][], i: number): number =>
    Math.max(...column(table, i).map(Math.abs));
  expectNear(worst(up, 1), worst(down, 2));
  expectNear(worst(up, 2), worst(down, 1));
});

test('second order: a pattern under a compression that each combination brings', () => {
  const text = 'pin 0; pin 5; pin 10; uniform 0 10 3 case=Q; axial value=-40 case=N; EI value=500';
  const table = ask.envelope(beam(text), 'deflection', [['Q + N'], ['Q + 2 N']], 'Q', 3);
  const one = beam('pin 0; pin 5; pin 10; uniform 0 5 3 case=Q; axial value=-40 case=N; EI value=500', {
    combination: 'Q + 2 N',
  });
  expectNear(
    Math.max(...column(table, 2)),
    ask.peak(one, 'deflection', 'highest'),
    undefined,
    1e-11 / Number.EPSILON,
  );
});

test('shear jumps stand twice, and every row is three finite numbers', () => {
  const table = ask.envelope(beam(MIXED), 'shear', 'G + Q', 'Q', 11);
  expect(table[0]).toEqual(['x', 'lowest shear', 'highest shear']);
  for (const row of table.slice(1)) expect(row.every((cell) => Number.isFinite(cell))).toBe(true);
  expect(table.filter((row) => row[0] === 3)).toHaveLength(2);
});

test('wrong combinations and patterns say which cell and which cases there are', () => {
  const first = issueOf(() => ask.envelope(beam(MIXED), 'moment', [['G'], ['G + R']]));
  expect(first).toMatchObject({ code: 'unknown-case', column: 'combinations', detail: { cell: 2 } });
  expect(issueOf(() => ask.envelope(beam(MIXED), 'moment', 'G', 'R'))).toMatchObject({
    code: 'unknown-case',
    column: 'pattern',
  });
  expect(issueOf(() => ask.envelope(beam(MIXED), 'momnet', 'G'))).toMatchObject({
    code: 'no-such-word',
    suggestion: 'moment',
  });
  expect(issueOf(() => ask.envelope(beam(MIXED), 'moment', 'G', '', 1.5))).toMatchObject({
    code: 'bad-points',
  });
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
