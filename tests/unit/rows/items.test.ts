/** Every item of the contract (2.1 to 2.3) in terms of the model, and every way a host may deliver a blank cell. */
import { compileTable } from '../../../src/rows';
import { METRIC, modelOf, PLAIN } from './helpers';

const BARE = { held: false, clamped: false, spring: 0, rotationalSpring: 0 };

describe('supports', () => {
  test.each([
    [['pin', 3], { held: true }],
    [['fixed', 3], { held: true, clamped: true }],
    [['guided', 3], { clamped: true }],
    [['spring', 3, '', 40], { spring: 40 }],
    [['rotational spring', 3, '', 50], { rotationalSpring: 50 }],
  ])('%p', (row, expected) => {
    const model = modelOf([...PLAIN, row]);
    expect(model.supports).toHaveLength(3);
    expect(model.supports[1]).toEqual({ ...BARE, at: 3, rows: [4], ...expected });
  });

  test('rows at one place become one support', () => {
    const model = modelOf([
      ...PLAIN,
      ['rotational spring', 6, '', 5],
      ['pin', 6],
      ['guided', 3],
      ['spring', 3, '', 7],
    ]);
    expect(model.supports).toEqual([
      { ...BARE, at: 0, held: true, rows: [1] },
      { ...BARE, at: 3, clamped: true, spring: 7, rows: [6, 7] },
      { ...BARE, at: 6, held: true, rotationalSpring: 5, rows: [2, 4, 5] },
    ]);
  });

  test('releases and foundation', () => {
    const model = modelOf([
      ...PLAIN,
      ['shear release', 4],
      ['hinge', 2],
      ['foundation', 1, 3, 9],
      ['foundation', 3, 5, 8],
    ]);
    expect(model.releases).toEqual([
      { at: 2, kind: 'moment', row: 5 },
      { at: 4, kind: 'shear', row: 4 },
    ]);
    expect(model.foundations).toEqual([
      { from: 1, to: 3, stiffness: 9, row: 6 },
      { from: 3, to: 5, stiffness: 8, row: 7 },
    ]);
  });

  test('a hinge over an inner support stays a hinge (two simple spans)', () => {
    expect(modelOf([...PLAIN, ['pin', 3], ['hinge', 3]]).releases).toEqual([
      { at: 3, kind: 'moment', row: 5 },
    ]);
  });
});

describe('loads', () => {
  const load = (row: unknown[]) => modelOf([...PLAIN, ['fixed', 2], row]).loads;
  const base = { row: 5, case: -1 };
  const line = (start: number, end: number) => ({ kind: 'linear', start, end });
  test.each([
    [['point', 3, '', 10], { kind: 'point', at: 3, force: 10 }],
    [['couple', 3, '', -10], { kind: 'couple', at: 3, couple: -10 }],
    [['uniform', 1, 5, 2], { kind: 'distributed', from: 1, to: 5, law: line(2, 2) }],
    [['uniform', '', '', 2], { kind: 'distributed', from: 0, to: 6, law: line(2, 2) }],
    [['varying', 1, 5, 2, 4], { kind: 'distributed', from: 1, to: 5, law: line(2, 4) }],
    [['varying', 1, 5, 2], { kind: 'distributed', from: 1, to: 5, law: line(2, 0) }],
    [['varying', 1, 5, '', 4], { kind: 'distributed', from: 1, to: 5, law: line(0, 4) }],
    [['curvature', '', '', 0.001], { kind: 'curvature', from: 0, to: 6, curvature: 0.001 }],
    [['axial', '', '', -30], { kind: 'axial', force: -30 }],
    [['camber', 0, 6, 0.02], { kind: 'camber', from: 0, to: 6, rise: 0.02 }],
    [['settlement', 6, '', 0.01], { kind: 'settlement', at: 6, displacement: 0.01 }],
    [['rotation', 2, '', 0.002], { kind: 'rotation', at: 2, angle: 0.002 }],
  ])('%p', (row, expected) => {
    expect(load(row)).toEqual([{ ...base, ...expected }]);
  });

  test('any smooth shape', () => {
    const [first] = load(['varying', 0, 6, '3*sin(pi*x/6)']);
    expect(first).toMatchObject({
      kind: 'distributed',
      from: 0,
      to: 6,
      law: { kind: 'function', text: '3*sin(pi*x/6)' },
    });
    if (first?.kind !== 'distributed' || first.law.kind !== 'function') throw new Error('a law was expected');
    expect(first.law.at(3)).toBe(3);
  });

  test('cases, in the order in which they appear; each load names its own', () => {
    const model = modelOf([
      ...PLAIN,
      ['point', 1, '', 1, '', '', 'Q'],
      ['point', 2, '', 1, '', '', 'G'],
      ['settlement', 6, '', 1, '', '', 'Q'],
      ['point', 3, '', 1],
      ['settlement', 6, '', 2, '', '', 'S_1'],
    ]);
    expect(model.cases).toEqual(['Q', 'G', 'S_1']);
    expect(model.loads.map((one) => one.case)).toEqual([0, 1, 0, -1, 2]);
  });

  test('axis up turns over what points along y and what turns, and nothing else', () => {
    const up = (row: unknown[]) => modelOf([...PLAIN, ['fixed', 2], row, ['axis', 'up']]).loads[0];
    expect(up(['point', 3, '', 10])).toMatchObject({ force: -10 });
    expect(up(['couple', 3, '', 10])).toMatchObject({ couple: -10 });
    expect(up(['uniform', 1, 5, 2])).toMatchObject({ law: line(-2, -2) });
    expect(up(['varying', 1, 5, 2, 4])).toMatchObject({ law: line(-2, -4) });
    expect(up(['settlement', 6, '', 3])).toMatchObject({ displacement: -3 });
    expect(up(['rotation', 2, '', 3])).toMatchObject({ angle: -3 });
    expect(up(['curvature', '', '', 3])).toMatchObject({ curvature: 3 });
    expect(up(['axial', '', '', 3])).toMatchObject({ force: 3 });
    expect(up(['camber', '', '', 3])).toMatchObject({ rise: 3 });
    const law = up(['varying', 0, 6, 'x+1']);
    if (law?.kind !== 'distributed' || law.law.kind !== 'function') throw new Error('a law was expected');
    expect(law.law.at(2)).toBe(-3);
    expect(modelOf([...PLAIN, ['axis', 'up']]).axis).toBe(-1);
    expect(modelOf([...PLAIN, ['axis', 'down']]).axis).toBe(1);
  });
});

describe('units', () => {
  test('numbers without a unit are in the units row; settlements, camber and limits in its deflection unit', () => {
    const model = modelOf([
      ...METRIC,
      ['point', 3, '', 10],
      ['settlement', 6, '', 5],
      ['camber', '', '', 20],
      ['limit', '', '', 12],
      ['curvature', '', '', 0.001],
    ]);
    expect(model.loads).toMatchObject([
      { force: 10 },
      { displacement: 0.005 },
      { rise: 0.02 },
      { curvature: 0.001 },
    ]);
    expect(model.limits).toEqual([
      { row: 9, limit: { kind: 'absolute', value: 0.012 }, combination: null, text: '12 mm' },
    ]);
    expect(model.units).toEqual({
      force: 'kN',
      length: 'm',
      deflection: 'mm',
      deflectionPerLength: 1000,
      gravity: 9.80665,
      secondMoment: { unit: 'cm\u2074', perModelUnit: 1e8 },
    });
    expect(model.ei).toEqual([
      { from: 0, to: 6, law: { kind: 'linear', start: 10000, end: 10000 }, rows: [4, 5] },
    ]);
    expect(model.modulus).toBe(2e8);
  });

  test.each([
    [['point', 3, '', 10, '', 'N'], { force: 0.01 }],
    [['point', 3, '', '10 kip'], { force: 44.482216152605 }],
    [['point', '300 cm', '', '10 kN'], { at: 3, force: 10 }],
    [['point', `12'-6"`, '', '1'], { at: 3.81 }],
    [['couple', 3, '', 1, '', 'ft-kip'], { couple: 0.3048 * 4.4482216152605 }],
    [
      ['uniform', '', '', 100, '', 'plf'],
      { law: { kind: 'linear', start: 1.4593902937206364, end: 1.4593902937206364 } },
    ],
    [['varying', '0 m', '6 m', '1 kN/m', '2 kN/m'], { law: { kind: 'linear', start: 1, end: 2 } }],
    [['settlement', 6, '', '1 in'], { displacement: 0.0254 }],
    [['curvature', '', '', 1, '', '1/mm'], { curvature: 1000 }],
    [['curvature', '', '', 1, '', 'mrad/m'], { curvature: 0.001 }],
    [['axial', '', '', '5 tf'], { force: 49.03325 }],
    [['camber', '', '', 1, '', 'cm'], { rise: 0.01 }],
  ])('%p', (row, expected) => {
    expect(modelOf([...METRIC, row]).loads[0]).toMatchObject(expected);
  });

  test('angles', () => {
    const rows = METRIC.map((row, i) => (i === 1 ? ['fixed', 0] : row));
    expect(modelOf([...rows, ['rotation', 0, '', 1, '', 'deg']]).loads[0]).toMatchObject({
      angle: Math.PI / 180,
    });
    expect(modelOf([...rows, ['rotation', 0, '', '2 mrad']]).loads[0]).toMatchObject({ angle: 0.002 });
    expect(modelOf([...rows, ['rotation', 0, '', 0.1]]).loads[0]).toMatchObject({ angle: 0.1 });
  });

  test('stiffnesses', () => {
    const model = modelOf([
      ...METRIC,
      ['spring', 3, '', 2, '', 'kN/mm'],
      ['rotational spring', 0, '', 180, '', 'kN\u00b7m/deg'],
      ['foundation', 1, 2, 5, '', 'N/mm2'],
      ['GA', '', '', '30 MN'],
    ]);
    expect(model.supports.map((s) => s.spring)).toEqual([0, 2000, 0]);
    expect(model.supports[0]!.rotationalSpring).toBeCloseTo((180 * 180) / Math.PI, 10);
    expect(model.foundations[0]!.stiffness).toBe(5000);
    expect(model.ga[0]!.law).toEqual({ kind: 'linear', start: 30000, end: 30000 });
  });

  test('no units row: nothing is converted', () => {
    const model = modelOf([...PLAIN, ['settlement', 6, '', 5]]);
    expect(model.units).toBeNull();
    expect(model.loads[0]).toMatchObject({ displacement: 5 });
  });

  test('without a deflection unit of its own the table shows deflections in its length unit', () => {
    const rows = METRIC.map((row, i) => (i === 0 ? ['units', 'kN', 'm'] : row));
    expect(modelOf(rows).units).toMatchObject({ deflection: 'm', deflectionPerLength: 1 });
  });

  test('row order never matters', () => {
    const rows = [...METRIC, ['point', 3, '', 10, '', '', 'Q'], ['limit', '', '', 'span/360', '', '', 'Q']];
    const strip = (value: unknown) =>
      JSON.stringify(value, (key, v: unknown) => (key === 'row' || key === 'rows' ? 0 : v));
    expect(strip(modelOf([...rows].reverse()))).toBe(strip(modelOf(rows)));
  });
});

describe('no meaning hangs on blank versus 0', () => {
  const table: unknown[][] = [
    ['units', 'kN', 'm', 'mm'],
    ['axis', 'up'],
    [],
    ['fixed', 0],
    ['pin', 6],
    ['spring', 8, '', 1, '', 'kN/mm'],
    ['rotational spring', 8, '', 1, '', 'kNm/rad'],
    ['guided', 12],
    ['settlement', 6, '', 5, '', '', 'S'],
    ['rotation', 0, '', 0.001],
    ['foundation', '', '', 1, '', 'MPa'],
    ['hinge', 3],
    ['shear release', 10],
    ['E', '', '', 200, '', 'GPa'],
    ['I', 0, 6, 5000, 4000, 'cm4'],
    ['I', 6, 12, 4000, '', 'cm4'],
    ['GA', '', '', 3, 4, 'MN'],
    ['point', 2, '', 10, '', '', 'Q'],
    ['couple', 5, '', 10],
    ['uniform', '', '', 2],
    ['uniform', 0, 4, 2],
    ['varying', 0, 4, '', 2],
    ['varying', 2, 4, 2, ''],
    ['varying', '', '', 'x+1'],
    ['curvature', '', '', 0.001],
    ['axial', '', '', 5],
    ['camber', '', '', 20],
    ['limit', '', '', 'span/300', '', '', 'Q'],
    ['limit', '', '', 10],
    ['# remark'],
  ];

  const filled = (blank: unknown) =>
    table.map((row) =>
      Array.from({ length: 8 }, (_, i) =>
        row[i] === undefined || row[i] === '' || row[i] === 0 ? blank : row[i],
      ),
    );

  test('the whole language, with blanks as null, as "" and as 0', () => {
    const [first, ...others] = [null, '', 0, undefined].map((blank) =>
      JSON.stringify(modelOf(filled(blank))),
    );
    for (const other of others) expect(other).toBe(first);
    expect(JSON.parse(first!)).toMatchObject({ start: 0, end: 12, cases: ['S', 'Q'] });
  });

  test('and with a header row', () => {
    const heading = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'];
    const models = [null, '', 0].map((blank) => {
      const result = compileTable([heading, ...filled(blank)]).build(new Map());
      return JSON.stringify(result.ok ? result.model : result.issues);
    });
    expect(new Set(models).size).toBe(1);
  });
});
