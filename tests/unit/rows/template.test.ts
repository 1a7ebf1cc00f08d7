/** One template for many members: names in number cells, values with and without units. */
import { compileTable } from '../../../src/rows';
import { faults, issuesOf, METRIC, modelOf } from './helpers';

const TEMPLATE = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 'L'],
  ['uniform', '', '', 'q*b'],
  ['point', 'L/3', '', 'P', '', '', 'Q'],
  ['E', '', '', 200, '', 'GPa'],
  ['I', '', '', 'I0*(1+x/L)', '', 'cm4'],
  ['limit', '', '', 'span/n'],
];
const NUMBERS = { L: 6, q: 4, b: 3, P: 10, I0: 5000, n: 300 };

test('names become numbers', () => {
  const table = compileTable(TEMPLATE);
  expect(table.issues).toEqual([]);
  expect(table.names).toEqual(['L', 'q', 'b', 'P', 'I0', 'n']);
  const model = modelOf(TEMPLATE, NUMBERS);
  expect(model).toMatchObject({
    start: 0,
    end: 6,
    loads: [{ law: { start: 12 } }, { at: 2, force: 10, case: 0 }],
    limits: [{ limit: { kind: 'fraction', divisor: 300 }, text: 'span/n' }],
  });
  const { law } = model.ei[0]!;
  expect(law.kind === 'function' && [law.at(0), law.at(6)]).toEqual([
    2e8 * (5000 * 1e-8),
    2e8 * (10000 * 1e-8),
  ]);
});

test('members do not disturb each other', () => {
  const table = compileTable(TEMPLATE);
  const at = (L: number) => {
    const result = table.build(new Map(Object.entries({ ...NUMBERS, L })));
    if (!result.ok) throw new Error('a model was expected');
    return result.model;
  };
  const [a, b] = [at(6), at(12)];
  expect([a.end, b.end]).toEqual([6, 12]);
  const [lawA, lawB] = [a.ei[0]!.law, b.ei[0]!.law];
  if (lawA.kind !== 'function' || lawB.kind !== 'function') throw new Error('laws in x were expected');
  expect(lawA.at(6)).toBe(20000);
  expect(lawB.at(6)).toBeCloseTo(15000, 9);
  expect(lawA.at(6)).toBe(20000);
});

test('a table without names is built once', () => {
  const table = compileTable(METRIC);
  expect(table.build(new Map())).toBe(table.build(new Map([['L', 3]])));
});

describe('values with units', () => {
  test('come in the units of the table, through any product', () => {
    const model = modelOf(
      TEMPLATE.map((row) => (row[0] === 'I' ? ['I', '', '', 'I0*(1+x/L)'] : row)),
      {
        L: '600 cm',
        q: '400 kgf/m2',
        b: '3 m',
        P: '10 kN',
        I0: '5000 cm4',
        n: 300,
      },
    );
    expect(model.end).toBe(6);
    expect(model.loads).toMatchObject([{ law: { start: 0.4 * 9.80665 * 3 } }, { at: 2, force: 10 }]);
    const { law } = model.ei[0]!;
    expect(law.kind === 'function' && law.at(6)).toBeCloseTo(20000, 8);
    // the I row's unit is known only from a name: REQUIREDI answers in the usual one
    expect(model.units!.secondMoment).toEqual({ unit: 'cm\u2074', perModelUnit: 1e8 });
  });

  test('units that cancel leave a mere number in the row\u2019s own unit', () => {
    const rows = [...METRIC, ['settlement', 6, '', 's*a/L']];
    expect(modelOf(rows, { s: 5, a: '3 m', L: '6 m' }).loads[0]).toMatchObject({ displacement: 0.0025 });
    expect(modelOf(rows, { s: 5, a: 3, L: 6 }).loads[0]).toMatchObject({ displacement: 0.0025 });
    expect(modelOf(rows, { s: '5 mm', a: 3, L: 6 }).loads[0]).toMatchObject({ displacement: 0.0025 });
  });

  test('dimensions are followed through functions, powers and sums', () => {
    const force = (text: string, names: Record<string, unknown>) =>
      modelOf([...METRIC, ['point', 3, '', text]], names).loads[0];
    expect(force('max(P, 2*P)', { P: '3 kN' })).toMatchObject({ force: 6 });
    expect(force('sqrt(P^2+H^2)', { P: '3 kN', H: '4000 N' })).toMatchObject({ force: 5 });
    expect(force('-P*cos(a)', { P: '3 kN', a: '0 deg' })).toMatchObject({ force: -3 });
    expect(force('M/h', { M: '6 kNm', h: '200 cm' })).toMatchObject({ force: 3 });
    expect(force('q*L^2/a', { q: '1 kN/m', L: '2 m', a: '1 m' })).toMatchObject({ force: 4 });
    expect(force('p*a^-1', { p: '6 kNm', a: '2 m' })).toMatchObject({ force: 3 });
  });

  test.each([
    [['point', 3, '', 'P'], { P: '3 kN/m' }, '6 Value wrong-dimension'],
    [['point', 3, '', 'P+q'], { P: '3 kN', q: '3 kN/m' }, '6 Value mixed-dimensions'],
    [['point', 3, '', 'max(P,q)'], { P: '3 kN', q: '3 kN/m' }, '6 Value mixed-dimensions'],
    [['point', 3, '', 'P*b', '', 'N'], { P: '3 kN', b: 2 }, '6 Value unit-twice'],
    [['point', 'a', '', 1], { a: '3 kN' }, '6 At wrong-dimension'],
    [['spring', 3, '', 'k'], { k: 5 }, '6 Value unit-missing'],
    [['spring', 3, '', 'k'], { k: '-5 kN/m' }, '6 Value not-positive'],
    [['spring', 3, '', 'k*n'], { k: '5 kN', n: '1 m' }, '6 Value wrong-dimension'],
    [['point', 3, '', 'P'], { P: '3 kNn' }, '- values unknown-unit'],
    [['point', 3, '', 'P'], { P: '3 kg' }, '- values foreign-unit'],
    [['point', 3, '', 'P'], { P: '1,234' }, '- values ambiguous-number'],
    [['point', 3, '', 'P'], { P: 'Q+1' }, '- values bad-value'],
    [['point', 3, '', 'P/a'], { P: 3, a: 0 }, '6 Value not-finite'],
    [['limit', '', '', 'span/n'], { n: -1 }, '6 Value bad-limit'],
    [['limit', '', '', 'd'], { d: 0 }, '6 Value bad-limit'],
    [['uniform', 'a', 'b', 1], { a: 3, b: 2 }, '6 To reversed'],
  ])('%p %p', (row, names, fault) => {
    expect(faults([...METRIC, row], names)).toEqual([fault]);
  });

  test('a value with a unit in a table without a units row', () => {
    expect(
      faults(
        [
          ['pin', 0],
          ['pin', 'L'],
          ['EI', '', '', 1],
        ],
        { L: '6 m' },
      ),
    ).toEqual(['- values units-row-missing']);
    expect(
      modelOf(
        [
          ['pin', 0],
          ['pin', 'L'],
          ['EI', '', '', 1],
        ],
        { L: '6,5' },
      ).end,
    ).toBe(6.5);
  });

  test('a stated unit and the same known one agree', () => {
    expect(modelOf([...METRIC, ['point', 3, '', 'P', '', 'N']], { P: '3 kN' }).loads[0]).toMatchObject({
      force: 3,
    });
  });
});

test('an unknown name lists the known ones and the one that was meant', () => {
  const [issue, ...more] = issuesOf([...METRIC, ['point', 3, '', 'P1*2']], { P_1: 3, q: 4 });
  expect(more).toEqual([]);
  expect(issue).toMatchObject({
    code: 'unknown-name',
    row: 6,
    column: 'Value',
    found: 'P1',
    suggestion: 'P_1',
    detail: { names: ['P_1', 'q'] },
  });
});

test('positions that are meant to be one are one', () => {
  const model = modelOf(
    [
      ['units', 'kip', 'ft', 'in'],
      ['pin', 0],
      ['pin', `12'-6"`],
      ['pin', 25],
      ['EI', '', '', 1, '', 'kip*ft2'],
      ['point', 12.5, '', 1],
      ['point', '3.81 m', '', 1],
      ['point', '150 in', '', 1],
      ['point', 'L/2', '', 1],
      ['point', 'L-L*0.5', '', 1],
      ['point', '0.1*3', '', 1],
      ['point', 0.3, '', 1],
    ],
    { L: 25 },
  );
  const places = model.loads.map((load) => (load.kind === 'point' ? load.at : NaN));
  expect(new Set(places.slice(0, 5))).toEqual(new Set([model.supports[1]!.at]));
  expect(places[5]).toBe(places[6]);
});

test('but two loads 1e-7 of the span apart stay two, also far from the origin', () => {
  const model = modelOf([
    ['pin', 60000],
    ['pin', 60006],
    ['EI', '', '', 1],
    ['point', 60003, '', 1],
    ['point', 60003 + 6e-7, '', 1],
  ]);
  expect(model.loads.map((load) => (load.kind === 'point' ? load.at : NaN))).toEqual([60003, 60003 + 6e-7]);
});
