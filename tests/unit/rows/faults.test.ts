/** What is wrong is named with its row, its column and its kind; nothing is silently skipped. */
import { compileTable } from '../../../src/rows';
import { faults, issuesOf, METRIC, modelOf, PLAIN } from './helpers';

describe('cells', () => {
  test.each([
    [['', 3, '', 5], '4 Item no-item'],
    [[0, 3], '4 Item no-item'],
    [[null, 0, 0, 0, 0, 'kN'], '4 Item no-item'],
    [[5, 3], '4 Item item-not-word'],
    [[true, 3], '4 Item item-not-word'],
    [[{ error: '#REF!' }, 3], '4 Item cell-error'],
    [['#REF!', 3], '4 Item cell-error'],
    [['unifrom', 3], '4 Item unknown-item'],
    [['pin', '#N/A'], '4 At cell-error'],
    [['pin', { type: 'Error', basicValue: '#DIV/0!' }], '4 At cell-error'],
    [['pin', true], '4 At cell-boolean'],
    [['point', 3, '', false], '4 Value cell-boolean'],
    [['point', 3, 4, 5], '4 To unused-cell'],
    [['pin', 3, '', 5], '4 Value unused-cell'],
    [['pin', 3, '', '', '', 'kN'], '4 Unit unused-cell'],
    [['pin', 3, '', '', '', '', 'G'], '4 Case unused-cell'],
    [['uniform', '', '', 1, 2], '4 End value unused-cell'],
    [['axial', 3, '', 1], '4 At unused-cell'],
    [['hinge', 3, { error: '#NUM!' }], '4 To cell-error'],
    [['EI', '', '', 1, '', '', 'G'], '4 Case unused-cell'],
    [['limit', 3, '', 5], '4 At unused-cell'],
    [['axis', 'down', 3], '4 To unused-cell'],
    [['point', 3, '', '1,234'], '4 Value ambiguous-number'],
    [['point', 3, '', 'abc def'], '4 Value missing-operator'],
    [['point', 3, '', '1/0'], '4 Value not-finite'],
    [['point', 3, '', '1e308*10'], '4 Value not-finite'],
    [['point', 3, '', 'x+1'], '4 Value x-not-allowed'],
    [['point', 'x'], '4 At x-not-allowed'],
    [['uniform', '', '', '2*x'], '4 Value x-not-allowed'],
    [['varying', '', '', '2*x', 5], '4 End value end-with-law'],
    [['point', 3, '', 5, '', '', '1st'], '4 Case bad-case'],
    [['point', 3, '', 5, '', '', 7], '4 Case bad-case'],
    [['point', 3, '', 5, '', '', true], '4 Case bad-case'],
    [['point', 3, '', 5, '', '', { error: '#REF!' }], '4 Case cell-error'],
  ])('%p', (row, fault) => {
    expect(faults([...PLAIN, row])).toContain(fault);
    expect(faults([...PLAIN, row])).toHaveLength(1);
  });

  test('every issue of a table is collected', () => {
    expect(
      faults([
        ['pin', true],
        ['roler', 6],
        ['point', 'x', '', 'foo(1)'],
        [0, 0, 4],
        ['EI', '', '', -1],
      ]),
    ).toEqual([
      '2 Item unknown-item',
      '4 Item no-item',
      '1 At cell-boolean',
      '3 At x-not-allowed',
      '3 Value unknown-function',
      '5 Value not-positive',
    ]);
  });

  test('an error in a note is nobody\u2019s concern', () => {
    expect(faults([...PLAIN, ['pin', 3, '', '', '', '', '', { error: '#REF!' }]])).toEqual([]);
  });
});

describe('stretches', () => {
  test.each([
    [['uniform', 3, '', 1], '4 To to-blank'],
    [['uniform', 3, 0, 1], '4 To to-blank'],
    [['uniform', 3, null, 1], '4 To to-blank'],
    [['uniform', -3, 0, 1], '4 To to-blank'],
    [['curvature', 1, '', 1], '4 To to-blank'],
    [['uniform', 4, 2, 1], '4 To reversed'],
    [['uniform', 2, 2, 1], '4 To no-length'],
  ])('%p', (row, fault) => {
    expect(faults([...PLAIN, row])).toEqual([fault]);
  });

  test('a stretch that ends at 0 says so with a written 0', () => {
    const model = modelOf([
      ['pin', -6],
      ['pin', 0],
      ['EI', '', '', 1],
      ['uniform', -3, '0', 1],
    ]);
    expect(model.loads[0]).toMatchObject({ from: -3, to: 0 });
  });

  test('names that evaluate to 0..0 are no whole beam: a schedule must not grow a load by accident', () => {
    expect(faults([...PLAIN, ['uniform', 0, 'c', 1]], { c: 0 })).toEqual(['4 To no-length']);
    expect(faults([...PLAIN, ['uniform', 'a', '', 1]], { a: 0 })).toEqual(['4 To to-blank']);
  });
});

describe('units', () => {
  test.each([
    [['uniform', '', '', 5, '', 'kN'], '6 Unit wrong-dimension'],
    [['uniform', '', '', '5 kN'], '6 Value wrong-dimension'],
    [['point', 3, '', 5, '', 'kNn'], '6 Unit unknown-unit'],
    [['point', 3, '', '5 kNn'], '6 Value unknown-unit'],
    [['point', 3, '', 5, '', 'kg'], '6 Unit foreign-unit'],
    [['point', 3, '', 5, '', 7], '6 Unit unit-not-text'],
    [['point', 3, '', 5, '', { error: '#REF!' }], '6 Unit cell-error'],
    [['point', 3, '', '5 kN', '', 'N'], '6 Value unit-twice'],
    [['point', '3 kN', '', 5], '6 At wrong-dimension'],
    [['spring', 3, '', 5], '6 Value unit-missing'],
    [['rotational spring', 6, '', 5], '6 Value unit-missing'],
    [['foundation', 0, 1, 5], '6 Value unit-missing'],
    [['GA', '', '', 5], '6 Value unit-missing'],
    [['GA', '', '', '5 MN', 4], '6 End value unit-missing'],
    [['GA', '', '', 'x+1'], '6 Value unit-missing'],
    [['units', 'kN', 'm', 'mm'], '6 Item setting-twice'],
    [['rotation', 0, '', '2 mm'], '6 Value wrong-dimension'],
  ])('%p', (row, fault) => {
    expect(faults([...METRIC, row])).toEqual([fault]);
  });

  test('a suggestion that fits the units row', () => {
    const [issue] = issuesOf([...METRIC, ['spring', 3, '', 5]]);
    expect(issue).toMatchObject({ suggestion: 'kN/m', found: '5' });
  });

  test.each([
    [['units', 'kN'], ['1 To units-incomplete']],
    [['units', 0, 'm', 'mm'], ['1 At units-incomplete']],
    [
      ['units', 'm', 'kN', 'mm'],
      ['1 At units-incomplete', '1 To units-incomplete'],
    ],
    [['units', 'kNn', 'm', 'mm'], ['1 At units-incomplete']],
    [['units', 'kN', 'm', 's'], ['1 Value units-incomplete']],
    [['units', 'kN', { error: '#REF!' }, 'mm'], ['1 To cell-error']],
  ])('%p', (row, expected) => {
    // A faulty units row is said once; the rows that state units do not repeat it.
    expect(faults([row, ...METRIC.slice(1)])).toEqual(expected);
  });

  test('a table that states units without a units row is asked for it, once', () => {
    expect(faults(METRIC.slice(1))).toEqual(['3 Unit units-row-missing']);
    expect(faults([...PLAIN, ['point', '3 m', '', '5 kN']])).toEqual(['4 At units-row-missing']);
    expect(faults([...PLAIN, ['point', `10'-6"`, '', 5]])).toEqual(['4 At units-row-missing']);
  });

  test.each([
    [['axis', 'sideways'], undefined],
    [['axis', 'upwards'], 'up'],
    [['axis', 'dwon'], 'down'],
    [['axis'], undefined],
    [['axis', 1], undefined],
  ])('%p', (row, suggestion) => {
    const [issue, ...more] = issuesOf([...PLAIN, row]);
    expect(more).toEqual([]);
    expect(issue).toMatchObject({ code: 'bad-axis', row: 4, column: 'At' });
    expect(issue!.suggestion).toBe(suggestion);
  });
});

describe('supports and releases', () => {
  test.each([
    [['fixed', 0], '4 Item support-conflict'],
    [['guided', 0], '4 Item support-conflict'],
    [['spring', 0, '', 5], '4 Item support-conflict'],
    [['settlement', 3, '', 5], '4 At settlement-unsupported'],
    [['rotation', 0, '', 5], '4 At rotation-unsupported'],
    [['shear release', 0], '4 At release-at-support'],
  ])('%p', (row, fault) => {
    expect(faults([...PLAIN, row])).toEqual([fault]);
  });

  test.each([
    [
      [
        ['spring', 3, '', 5],
        ['spring', 3, '', 5],
      ],
      '5 Item spring-twice',
    ],
    [
      [
        ['fixed', 3],
        ['rotational spring', 3, '', 1],
      ],
      '5 Item support-conflict',
    ],
    [
      [
        ['fixed', 3],
        ['hinge', 3],
      ],
      '5 At hinge-at-clamp',
    ],
    [
      [
        ['rotational spring', 0, '', 3],
        ['hinge', 0],
      ],
      '5 At hinge-at-clamp',
    ],
    [
      [
        ['pin', 3],
        ['shear release', 3],
      ],
      '5 At release-at-support',
    ],
    [
      [
        ['spring', 3, '', 5],
        ['shear release', 3],
      ],
      '5 At release-at-support',
    ],
    [
      [
        ['hinge', 3],
        ['shear release', 3],
      ],
      '5 At cut-in-two',
    ],
    [
      [
        ['hinge', 3],
        ['couple', 3, '', 5],
      ],
      '5 At load-at-release',
    ],
    [
      [
        ['shear release', 3],
        ['point', 3, '', 5],
      ],
      '5 At load-at-release',
    ],
  ])('%p', (rows, fault) => {
    expect(faults([...PLAIN, ...rows])).toEqual([fault]);
  });

  test('a force at a hinge and a couple at a shear release are clear', () => {
    expect(faults([...PLAIN, ['hinge', 3], ['point', 3, '', 5]])).toEqual([]);
    expect(faults([...PLAIN, ['shear release', 3], ['couple', 3, '', 5]])).toEqual([]);
  });

  test('the supports that could settle are listed', () => {
    expect(issuesOf([...METRIC, ['settlement', 3, '', 5]])[0]).toMatchObject({
      found: '3 m',
      detail: { supports: ['0 m', '6 m'] },
    });
  });

  test('nothing holds the beam', () => {
    expect(
      faults([
        ['EI', '', '', 1],
        ['point', 0, '', 1],
        ['point', 6, '', 1],
      ]),
    ).toEqual(['- - no-supports']);
    expect(
      faults([
        ['EI', '', '', 1],
        ['foundation', 0, 6, 1],
      ]),
    ).toEqual([]);
  });

  test('foundations over each other', () => {
    expect(issuesOf([...PLAIN, ['foundation', 0, 4, 1], ['foundation', 3, 6, 1]])).toMatchObject([
      { code: 'foundation-overlap', row: 5, detail: { from: '3', to: '4', rows: ['4', '5'] } },
    ]);
  });
});

describe('the beam as a whole', () => {
  test('no rows, no positions, no length', () => {
    expect(faults([])).toEqual(['- - no-rows']);
    expect(faults([[null, 0, '']])).toEqual(['- - no-rows']);
    expect(faults([['# nothing']])).toEqual(['- - no-rows']);
    expect(faults([['EI', '', '', 1]])).toEqual(['- - no-positions']);
    expect(
      faults([
        ['pin', 3],
        ['EI', '', '', 1],
      ]),
    ).toEqual(['- - no-length-beam']);
  });

  test('positions of any size', () => {
    expect(
      modelOf([
        ['pin', 1e6],
        ['pin', 1e6 + 6],
        ['EI', '', '', 1],
      ]),
    ).toMatchObject({ start: 1e6, end: 1e6 + 6 });
    expect(
      modelOf([
        ['pin', -4],
        ['pin', -1],
        ['EI', '', '', 1],
      ]),
    ).toMatchObject({ start: -4, end: -1 });
  });

  test('a law that is not positive or not finite', () => {
    expect(
      issuesOf([
        ['pin', 0],
        ['pin', 6],
        ['EI', '', '', '1-x'],
      ]),
    ).toMatchObject([{ code: 'bad-law', row: 3, column: 'Value', found: '-2', detail: { x: '3' } }]);
    expect(issuesOf([...PLAIN, ['varying', '', '', '1/x']])).toMatchObject([
      { code: 'bad-law', row: 4, detail: { x: '0' } },
    ]);
  });

  test('compiling is pure: the same cells give equal tables, and the cells stay as they were', () => {
    const cells = Object.freeze(METRIC.map((row) => Object.freeze([...row])));
    const before = JSON.stringify(cells);
    expect(JSON.stringify(compileTable(cells))).toBe(JSON.stringify(compileTable(cells)));
    expect(JSON.stringify(cells)).toBe(before);
  });
});
