/** One sentence per row, and the cautions that the table's own numbers give. */
import { showNumber } from '../../../src/rows';
import { built, cautionsOf, METRIC, PLAIN } from './helpers';

type Rows = readonly (readonly unknown[])[];

function readings(rows: Rows, names: Record<string, unknown> = {}): Record<number, string> {
  const result = built(rows, names);
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return Object.fromEntries(result.readings.map(({ row, text }) => [row, text]));
}

test('every item in words', () => {
  const said = readings(
    [
      ['units', 'kN', 'm', 'mm'],
      ['fixed', 0],
      ['pin', 6],
      ['spring', 8, '', 1, '', 'kN/mm'],
      ['rotational spring', 8, '', 2, '', 'kNm/rad'],
      ['guided', 12],
      ['settlement', 6, '', 5, '', '', 'S'],
      ['rotation', 0, '', -0.001],
      ['foundation', '', '', 1, '', 'MPa'],
      ['hinge', 3],
      ['shear release', 10],
      ['E', '', '', 200, '', 'GPa'],
      ['I', 0, 6, 5000, 4000, 'cm4'],
      ['I', 6, 12, '4000*(1+x/L)', '', 'cm4'],
      ['GA', '', '', '3 MN'],
      ['point', 2, '', -10, '', '', 'Q'],
      ['couple', 5, '', 10],
      ['uniform', '', '', 100, '', 'kgf/m'],
      ['varying', 0, 4, 2, -1],
      ['curvature', '', '', -0.001],
      ['axial', '', '', -5],
      ['camber', '', '', 20],
      ['limit', '', '', 'span/300', '', '', '1.5 Q'],
      ['limit', '', '', '10 mm'],
      ['axis', 'down'],
    ],
    { L: 12 },
  );
  expect(said).toEqual({
    1: 'forces in kN, lengths in m, moments in kN·m, deflections in mm.',
    2: 'fixed at 0 m, deflection and rotation held.',
    3: 'pin at 6 m, deflection held.',
    4: 'spring support of 1 kN/mm (1000 kN/m) at 8 m.',
    5: 'rotational spring of 2 kNm/rad at 8 m.',
    6: 'guided at 12 m, rotation held, free to deflect.',
    7: 'the support at 6 m is displaced 5 mm downwards, case S.',
    8: 'the held rotation at 0 m is turned 0.001 rad counter-clockwise, always acting.',
    9: 'elastic foundation of 1 MPa (1000 kN/m²) over the whole beam, 0 m to 12 m.',
    10: 'hinge at 3 m, bending moment released.',
    11: 'shear release at 10 m, shear force released.',
    12: 'E = 200 GPa (2e8 kN/m²) over the whole beam, 0 m to 12 m.',
    13: 'I = 5000 cm⁴ (5e-5 m⁴) at 0 m to 4000 cm⁴ (4e-5 m⁴) at 6 m.',
    14: 'I = 4000*(1+x/L) (6000 cm⁴ (6e-5 m⁴) at 6 m to 8000 cm⁴ (8e-5 m⁴) at 12 m).',
    15: 'GA = 3 MN (3000 kN) over the whole beam, 0 m to 12 m.',
    16: 'point load 10 kN upwards at 2 m, case Q.',
    17: 'couple 10 kN·m clockwise at 5 m, always acting.',
    18: 'uniform load 100 kgf/m (0.980665 kN/m) downwards over the whole beam, 0 m to 12 m, always acting.',
    19: 'varying load 2 kN/m downwards at 0 m to 1 kN/m upwards at 4 m, always acting.',
    20: 'free curvature 0.001 1/m hogging over the whole beam, 0 m to 12 m, always acting.',
    21: 'axial force 5 kN in compression along the whole beam, always acting.',
    22: 'camber 20 mm upwards over the whole beam, 0 m to 12 m, deflections are net of it, always acting.',
    23: 'deflection limit span/300, under 1.5 Q.',
    24: 'deflection limit 10 mm, with everything acting.',
    25: 'y points down: forces, settlements and deflections are positive down, rotations and couples clockwise.',
  });
});

test('directions are told the same whichever way y points', () => {
  const rows = (sign: number, axis: string) => [
    ...METRIC,
    ['axis', axis],
    ['point', 3, '', 5 * sign],
    ['couple', 3, '', 5 * sign],
  ];
  const down = readings(rows(1, 'down'));
  const up = readings(rows(-1, 'up'));
  expect([up[7], up[8]]).toEqual([down[7], down[8]]);
  expect(down[7]).toBe('point load 5 kN downwards at 3 m, always acting.');
  expect(up[6]).toBe(
    'y points up: forces, settlements and deflections are positive up, rotations and couples counter-clockwise.',
  );
});

test('without units there are none', () => {
  const said = readings([...PLAIN, ['uniform', 1, 3, 2], ['settlement', 6, '', -0.01], ['point', 3]]);
  expect(said[4]).toBe('uniform load 2 downwards from 1 to 3, always acting.');
  expect(said[5]).toBe('the support at 6 is displaced 0.01 upwards, always acting.');
  expect(said[6]).toBe('point load 0 at 3, always acting.');
});

test('values that carry units are told in the units of the table', () => {
  expect(readings([...METRIC, ['point', 'a', '', 'P']], { P: '2 MN', a: '200 cm' })[6]).toBe(
    'point load 2000 kN downwards at 2 m, always acting.',
  );
});

describe('cautions', () => {
  const codes = (...rows: unknown[][]) =>
    cautionsOf([...METRIC, ...rows]).map(({ row, code }) => `${row} ${code}`);
  const withE = (value: unknown, unit: string) =>
    cautionsOf(METRIC.map((row) => (row[0] === 'E' ? ['E', '', '', value, '', unit] : row))).map(
      ({ code }) => code,
    );

  test('an ordinary beam earns none', () => {
    expect(
      codes(['point', 3, '', 10], ['limit', '', '', 'span/300'], ['limit', '', '', 20], ['point', 8, '', 1]),
    ).toEqual([]);
    expect(
      cautionsOf([
        ['fixed', 0],
        ['EI', '', '', 1],
        ['point', 60, '', 1],
      ]),
    ).toEqual([]);
  });

  test('E outside 0.1 to 1000 GPa', () => {
    expect(withE(0.1, 'GPa')).toEqual([]);
    expect(withE(1000, 'GPa')).toEqual([]);
    expect(withE(29000, 'ksi')).toEqual([]);
    expect(withE(0.0999, 'GPa')).toEqual(['modulus-unlikely']);
    expect(withE(1001, 'GPa')).toEqual(['modulus-unlikely']);
    expect(withE(21000, 'kN/m2')).toEqual(['modulus-unlikely']);
  });

  test('a load outside every span, far out', () => {
    expect(codes(['point', 60, '', 10])).toEqual(['6 load-far-out']);
    expect(codes(['uniform', -20, -10, 10])).toEqual(['6 load-far-out']);
    expect(codes(['uniform', 0, 8, 10])).toEqual([]);
    expect(codes(['couple', 12.1, '', 10])).toEqual(['6 load-far-out']);
  });

  test('numbers stored as text, zeros, limits without their span', () => {
    expect(codes(['point', '3', '', '1 234,5'])).toEqual(['6 number-as-text', '6 number-as-text']);
    expect(codes(['point', 3, '', '12,5 kN'])).toEqual(['6 number-as-text']);
    expect(codes(['uniform'])).toEqual(['6 zero-value']);
    expect(codes(['limit', '', '', 700])).toEqual(['6 limit-unlikely']);
  });

  test('cautions follow the member', () => {
    const rows = [...METRIC, ['point', 'a', '', 'P']];
    expect(cautionsOf(rows, { a: 3, P: 1 })).toEqual([]);
    expect(cautionsOf(rows, { a: 30, P: 1 }).map(({ code }) => code)).toEqual(['load-far-out']);
  });

  test('releases at the ends release nothing and are left out', () => {
    const result = built([...PLAIN, ['hinge', 0], ['point', 8, '', 1], ['shear release', 8]]);
    expect(result).toMatchObject({ ok: true, model: { releases: [] } });
    expect(cautionsOf([...PLAIN, ['hinge', 0]]).map(({ code }) => code)).toEqual(['release-at-end']);
  });
});

test('numbers for sentences', () => {
  const pairs: [number, string][] = [
    [0, '0'],
    [-0, '0'],
    [12, '12'],
    [1 / 3, '0.333333'],
    [-2.5, '-2.5'],
    [123456.7, '123457'],
    [9999999.9, '10000000'],
    [2.1e8, '2.1e8'],
    [0.0001, '0.0001'],
    [8.36e-5, '8.36e-5'],
    [1e-5, '1e-5'],
    [-1e21, '-1e21'],
  ];
  for (const [value, text] of pairs) expect(showNumber(value)).toBe(text);
});
