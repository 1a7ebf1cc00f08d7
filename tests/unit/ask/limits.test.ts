/** CHECK and USED: spans, chords, overhangs, several limits; closed forms from the handbook cases named beside them. */
import { ask, spansOf, spanName, BeamProblem } from '../../../src/index';
import { beam, expectNear } from './beams';

const EI = 'EI value="15288 kN m2"'; // 210 GPa x 72.8e6 mm4
const UNITS = 'units kN m mm';

test('spans lie between vertical supports, springs included; what sticks out counts twice', () => {
  const model = beam('pin 1; spring 4 value=10; "rotational spring" 5 value=3; pin 6; EI 0 8 1').model;
  const spans = spansOf(model);
  expect(spans.map((span) => [span.kind, span.from, span.to, span.length])).toEqual([
    ['overhang', 0, 1, 2],
    ['span', 1, 4, 3],
    ['span', 4, 6, 2],
    ['overhang', 6, 8, 4],
  ]);
  expect(spanName(model, spans[3] as (typeof spans)[number])).toBe('overhang 6 to 8 (counts as 2 × 2)');
  expect(spansOf(beam('fixed 0; EI 0 3 1').model).map((span) => span.kind)).toEqual(['cantilever']);
});

test('SS-21: a settled span is measured from the chord of its supports, 5wL^4/(384EI), and the whole sag is not', () => {
  const open = beam(
    `${UNITS}; pin 0; pin 6; settlement 0 value=4; settlement 6 value=19; uniform 0 6 "8 kN/m"; ${EI}`,
  );
  const bend = ((5 * 8 * 6 ** 4) / (384 * 15288)) * 1000;
  const [, row] = ask.check(open, 'span/360');
  expectNear(row?.[1] as number, bend);
  expectNear(row?.[2] as number, 3, 6, 1e-7 / Number.EPSILON);
  expectNear(row?.[4] as number, bend / (6000 / 360));
  expectNear(ask.value(open, 'deflection', 3) as number, bend + 11.5);
});

test('OH-01: the tip of an overhang from the level of its support, against twice its length', () => {
  // P a^2 (L+a)/(3EI), L = 8.2 m, a = 2.6 m, P = 21 kN, EI = 210 GPa x 141e6 mm4
  const open = beam(
    `${UNITS}; pin 0; pin 8.2; point 10.8 value="21 kN"; E value="210 GPa"; I value="141e6 mm4"; limit value=span/180`,
  );
  const table = ask.check(open);
  expect(table).toHaveLength(4);
  const overhang = table[2] as (number | string)[];
  expect(overhang[0]).toBe('overhang 8.2 to 10.8 m (counts as 2 × 2.6 m)');
  expectNear(overhang[1] as number, 17.259574468085106);
  expectNear(overhang[3] as number, (2 * 2600) / 180);
  expectNear(overhang[5] as number, 5200 / 17.259574468085106);
  const span = table[1] as (number | string)[];
  expectNear(span[1] as number, -7.9538757652330287);
  expect(table[3]?.[0]).toBe(`governs: ${overhang[0]}`);
});

test('springs: deflection is measured from the chord of the pressed supports', () => {
  const open = beam('spring 0 value=100; spring 6 value=300; uniform 0 6 5; EI value=900');
  const bend = (5 * 5 * 6 ** 4) / 384 / 900;
  expectNear(ask.check(open, 1)[1]?.[1] as number, bend);
  expectNear(ask.used(open, 0.1), bend / 0.1);
});

test('several limits, each under its own combination; the worst one governs and is named', () => {
  const open = beam(
    `${UNITS}; pin 0; pin 6; uniform 0 6 "3 kN/m" case=G; uniform 0 6 "5 kN/m" case=Q; ${EI}; ` +
      'limit value=span/360 case=Q; limit value=span/250 case="1.6 G + Q"; limit value="20 mm"',
  );
  const per = ((5 * 6 ** 4) / (384 * 15288)) * 1000;
  const table = ask.check(open);
  const used = table.slice(1).map((row) => row[4] as number);
  expectNear(used[0] as number, (5 * per) / (6000 / 360));
  expectNear(used[1] as number, ((1.6 * 3 + 5) * per) / 24);
  expectNear(used[2] as number, (8 * per) / 20);
  expectNear(ask.used(open), Math.max(...used.slice(0, 3)));
  expect(table[4]?.[7]).toBe('span/250 under 1.6 G + Q (row 8)');
  // the formula's own limit replaces the rows and is under the formula's combination
  const own = beam(
    `${UNITS}; pin 0; pin 6; uniform 0 6 "3 kN/m" case=G; uniform 0 6 "5 kN/m" case=Q; ${EI}; limit value=span/9999`,
    { combination: '2 G' },
  );
  expectNear(ask.used(own, 'span/300'), (6 * per) / 20);
  expect(ask.check(own, 'span/300')).toHaveLength(3);
  // a row without a combination of its own is under the formula's
  expectNear(ask.used(own), (6 * per) / (6000 / 9999));
});

test('axis up: the check is signed as the reader signs, the fraction is not', () => {
  const open = beam(`${UNITS}; axis up; pin 0; pin 6; uniform 0 6 "-8 kN/m"; ${EI}; limit value=span/360`);
  const row = ask.check(open)[1] as (number | string)[];
  expect(row[1] as number).toBeLessThan(0);
  expect(row[4] as number).toBeGreaterThan(0);
  expect(row[3] as number).toBeGreaterThan(0);
});

test('camber is net: an upward bow takes from the sag', () => {
  const bow = beam(`${UNITS}; pin 0; pin 6; uniform 0 6 "8 kN/m"; ${EI}; camber 0 6 value=5`);
  const bend = ((5 * 8 * 6 ** 4) / (384 * 15288)) * 1000;
  // at midspan; the largest net deflection is not there, since the bow is a parabola and the sag is not
  expectNear(ask.value(bow, 'deflection', 3) as number, bend - 5, bend);
  expect(ask.used(bow, 20)).toBeGreaterThanOrEqual((bend - 5) / 20 - 1e-12);
});

test('within and exceeded: a limit just met is met', () => {
  const open = beam('pin 0; pin 6; point 3 value=1; EI value=1');
  const sag = 216 / 48;
  expect(ask.check(open, sag)[1]?.[6]).toBe('within');
  expect(ask.check(open, sag * (1 - 1e-9))[1]?.[6]).toBe('exceeded');
});

test('no limit anywhere, and a limit by span without a span, are refused', () => {
  expect(code(() => ask.used(beam('pin 0; pin 6; EI value=1')))).toBe('no-limit');
  const bed = beam('foundation 0 6 5; EI 0 6 10; uniform 0 3 2');
  expect(code(() => ask.used(bed, 'span/300'))).toBe('no-span');
  expect(ask.used(bed, 1)).toBeGreaterThan(0);
});

function code(run: () => unknown): string {
  try {
    run();
  } catch (problem) {
    if (problem instanceof BeamProblem) return problem.issues[0]?.code ?? '';
    throw problem;
  }
  return 'nothing was thrown';
}
