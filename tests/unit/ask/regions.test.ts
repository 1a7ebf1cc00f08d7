/** REGIONS: the equations in the spill, read as text, must reproduce the beam; every condition must close. */
import { ask } from '../../../src/index';
import { beam, expectNear } from './beams';

type Table = readonly (readonly (number | string)[])[];

/** `12.5 + 3*s - 0.5*s^2` as a function, as a checker's cell would have it. */
function curve(text: string): (s: number) => number {
  const bare = text.replace(/^fitted: /, '').replace(/ \(within .*\)$/, '');
  const terms = bare
    .replace(/ - /g, ' + -')
    .split(' + ')
    .map((term) => {
      const [size, power] = term.split('*') as [string, string | undefined];
      const exponent = power === undefined ? 0 : power === 's' ? 1 : Number(power.slice(2));
      return { size: Number(size), exponent };
    });
  for (const { size, exponent } of terms)
    expect([Number.isFinite(size), Number.isInteger(exponent)]).toEqual([true, true]);
  return (s) => terms.reduce((sum, { size, exponent }) => sum + size * s ** exponent, 0);
}

const regionRows = (table: Table): (number | string)[][] => {
  const head = table.findIndex((row) => row[0] === 'region');
  const next = table.findIndex((row, i) => i > head && typeof row[0] !== 'number');
  return table.slice(head + 1, next).map((row) => [...row]);
};
const conditionRows = (table: Table): (number | string)[][] =>
  table.slice(table.findIndex((row) => row[0] === 'condition') + 1).map((row) => [...row]);

const BEAMS: Record<string, string> = {
  'two spans, overhang, couple, step':
    'units kN m mm; pin 0; pin 6; pin 10; uniform 0 8 "12 kN/m"; point 12 value="9 kN"; couple 3 value="7 kN m"; E value="210 GPa"; I 0 5 "8360 cm4"; I 5 12 "5000 cm4"',
  'axis up, varying, hinge, spring, settlement, rotation':
    'axis up; fixed 0; hinge 2; spring 4 value=800; pin 9; varying 1 7 -3 -9; settlement 9 value=-0.01; rotation 0 value=0.002; EI value=4000',
  'curvature, camber, shear flexibility':
    'units kN m mm; pin 0; pin 5; pin 9; uniform 0 9 "4 kN/m"; curvature 0 5 "0.0004 rad/m"; camber 0 5 value=6; EI value="3000 kN m2"; GA value="9000 kN"',
  'positions that start at 1000':
    'pin 1000; fixed 1007; point 1003 value=5; uniform 1002 1006 2; EI value=500',
  'linear EI and a load in x': 'fixed 0; pin 6; uniform 0 3 4; varying 0 6 "5*sin(x)"; EI 0 6 1000 3000',
  'a foundation': 'pin 0; foundation 0 6 80; EI 0 6 900; point 4 value=12',
  compression: 'pin 0; pin 6; uniform 0 6 3; EI value=900; axial value=-100',
};

describe.each(Object.entries(BEAMS))('%s', (_name, text) => {
  const open = beam(text);
  const table = ask.regions(open);

  test('the spill is a rectangle of text and finite numbers', () => {
    for (const row of table) {
      expect(row).toHaveLength(12);
      for (const cell of row) expect(typeof cell === 'string' || Number.isFinite(cell)).toBe(true);
    }
  });

  test('slope, deflection and M recomputed from the texts agree to 1e-6 of the peak', () => {
    const rows = regionRows(table);
    expect(rows.length).toBeGreaterThan(0);
    const near = (
      text_: string | number | undefined,
      quantity: 'deflection' | 'slope' | 'moment',
      from: number,
      to: number,
    ): void => {
      const f = curve(String(text_));
      const peak = Math.abs(ask.peak(open, quantity));
      for (let i = 0; i <= 6; i++) {
        const s = ((to - from) * i) / 6;
        const x = i === 6 ? `${to}-` : from + s;
        expectNear(f(s), ask.value(open, quantity, x) as number, peak, 1e-6 / Number.EPSILON);
      }
    };
    for (const row of rows) {
      const [from, to] = [row[1] as number, row[2] as number];
      near(row[11], 'deflection', from, to);
      near(row[10], 'slope', from, to);
      near(row[5], 'moment', from, to);
    }
  });

  test('EI v and EI v-prime with their constants are the integrals of M', () => {
    for (const row of regionRows(table)) {
      if (String(row[6]).startsWith('no polynomial')) continue;
      const ei = Number(String(row[3]).split(';')[0]);
      const h = (row[2] as number) - (row[1] as number);
      const first = curve(String(row[6]));
      const slope = curve(String(row[10]));
      expectNear(first(0), row[7] as number, Math.abs(first(0)) + Math.abs(first(h)), 1e-9 / Number.EPSILON);
      expectNear(first(h) / ei, slope(h), Math.abs(slope(h)) + Math.abs(slope(0)), 1e-8 / Number.EPSILON);
      const second = curve(String(row[8]));
      expectNear(
        second(0),
        row[9] as number,
        Math.abs(second(0)) + Math.abs(second(h)) + 1e-9,
        1e-9 / Number.EPSILON,
      );
    }
  });

  test('every condition closes', () => {
    const rows = conditionRows(table);
    expect(rows.length).toBeGreaterThan(3);
    const scales = {
      deflection: Math.abs(ask.peak(open, 'deflection')),
      slope: Math.abs(ask.peak(open, 'slope')),
      force: Math.abs(ask.peak(open, 'shear')) + Math.abs(ask.peak(open, 'moment')),
    };
    for (const [condition, , left, right, over] of rows as [string, number, number, number, number][]) {
      const scale = condition.startsWith('deflection')
        ? scales.deflection
        : /^(slope|rotation)/.test(condition)
          ? scales.slope
          : scales.force;
      expectNear(left - right, over, scale, 1e-12 / Number.EPSILON);
      // exact regions close to rounding; fitted ones to what the fit states, at most 1e-7 of the peak
      expectNear(over, 0, scale, 1e-6 / Number.EPSILON);
    }
  });
});

test('EI v-double-prime = -M with y down and +M with y up', () => {
  const down = ask.regions(beam('pin 0; pin 4; uniform 0 4 3; EI value=100'));
  expect(down[0]?.[0]).toContain("EI v'' = -M");
  expect(ask.regions(beam('axis up; pin 0; pin 4; uniform 0 4 -3; EI value=100'))[0]?.[0]).toContain(
    "EI v'' = M",
  );
  // hand-worked: w = 3, L = 4: EI v = wL^3 s/24 - wL s^3/12 + w s^4/24
  expect(regionRows(down)[0]?.slice(5, 10)).toEqual([
    '6*s - 1.5*s^2',
    '8 - 3*s^2 + 0.5*s^3',
    8,
    '8*s - s^3 + 0.125*s^4'.replace('- s^3', '- 1*s^3'),
    0,
  ]);
});

test('a region that has no polynomial says so and states how far its fit departs', () => {
  const [row] = regionRows(ask.regions(beam(BEAMS['linear EI and a load in x'] as string)));
  expect(row?.[6]).toBe('no polynomial: see slope and deflection');
  expect(row?.[11]).toMatch(/^fitted: .* \(within [\d.e-]+\)$/);
});
