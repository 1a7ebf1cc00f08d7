import { compileTable } from '../../../src/rows';
import { cautionsOf, faults, modelOf, PLAIN } from './helpers';

test('without a header: fewer columns than eight are fine, a ninth is an error', () => {
  expect(faults(PLAIN)).toEqual([]);
  expect(faults(PLAIN.map((row) => [...row, ...Array<string>(9 - row.length).fill('')]))).toEqual([
    '- - ninth-column',
  ]);
});

test('a header in any order, with columns of the user\u2019s own', () => {
  const rows = [
    ['Mark', ' END value', 'VALUE', 'item', 'Checked', 'a t', 'To'],
    ['B1', '', '', 'pin', 'yes', 0, ''],
    ['B1', '', '', 'pin', 'no', 6, ''],
    ['B1', '', 10, 'EI', { error: '#REF!' }, '', ''],
    ['B1', 4, 2, 'varying', true, 1, 5],
  ];
  const table = compileTable(rows);
  expect(table.layout).toEqual({
    header: true,
    columns: [null, 'End value', 'Value', 'Item', null, 'At', 'To'],
    ignored: ['Mark', 'Checked'],
  });
  expect(table.rows.map((row) => row.kind)).toEqual(['header', 'item', 'item', 'item', 'item']);
  expect(modelOf(rows).loads).toMatchObject([{ row: 5, from: 1, to: 5, law: { start: 2, end: 4 } }]);
});

test('blank rows and remarks may stand before the header', () => {
  const rows = [
    ['# Beam B12'],
    [0, null, ''],
    ['Item', 'At', 'Value'],
    ['pin', 0],
    ['pin', 6],
    ['EI', '', 1],
  ];
  expect(faults(rows)).toEqual([]);
  expect(compileTable(rows).rows.map((row) => row.kind)).toEqual([
    'remark',
    'blank',
    'header',
    'item',
    'item',
    'item',
  ]);
});

test('a foreign column does not make a row non-blank, nor does its text count', () => {
  const rows = [
    ['Item', 'At', 'Value', 'Mine'],
    ['pin', 0],
    ['pin', 6],
    ['EI', '', 1],
    ['', '', '', 'just a word'],
    ['', 0, 0, 99],
  ];
  expect(faults(rows)).toEqual([]);
});

test('a row with only a note is a remark', () => {
  const rows = [...PLAIN, ['', '', '', '', '', '', '', 'as built']];
  expect(compileTable(rows).rows[3]!.kind).toBe('remark');
  expect(faults(rows)).toEqual([]);
});

test('remarks', () => {
  expect(faults([...PLAIN, ['# pin', 3, 4, 5], ['// pin', { error: '#REF!' }]])).toEqual([]);
});

test('faults of a header', () => {
  expect(faults([['Item', 'Att', 'To', 'Value'], ...PLAIN])).toEqual(['1 - header-incomplete']);
  expect(
    faults([
      ['Item', 'At', 'Value', 'value'],
      ['pin', 0],
    ]),
  ).toContain('1 Value duplicate-column');
  expect(faults([...PLAIN, ['Item', 'At']])).toContain('4 Item header-late');
});

test('a misspelt heading is ignored with a caution', () => {
  const rows = [
    ['Item', 'At', 'To', 'Value', 'Csae'],
    ['pin', 0],
    ['pin', 6],
    ['EI', '', '', 1, 'G'],
  ];
  expect(cautionsOf(rows)).toMatchObject([
    { code: 'ignored-heading', row: 1, found: 'Csae', suggestion: 'Case' },
  ]);
});

test('rows tell what was in their cells', () => {
  expect(compileTable([['point load', 3, 0, ' 5 kN ']]).rows).toEqual([
    { row: 1, kind: 'item', item: 'point', cells: { Item: 'point load', At: 3, To: 0, Value: '5 kN' } },
  ]);
});

test('one cell of text', () => {
  const table = compileTable([
    ['pin 0; pin 6; # note\n EI value=1; point 3 value=2 case=Q; limit value=span/300 case="1.5 Q"'],
  ]);
  expect(table.rows.map((row) => [row.row, row.kind, row.item])).toEqual([
    [1, 'item', 'pin'],
    [2, 'item', 'pin'],
    [3, 'remark', null],
    [4, 'item', 'EI'],
    [5, 'item', 'point'],
    [6, 'item', 'limit'],
  ]);
  const result = table.build(new Map());
  expect(result).toMatchObject({
    ok: true,
    cautions: [],
    model: {
      loads: [{ row: 5, kind: 'point', at: 3, force: 2 }],
      limits: [{ combination: { factors: [1.5] } }],
    },
  });
  expect(faults([['pin 0; piin 6; EI value=1']])).toEqual(['2 Item unknown-item']);
  expect(faults([['pin 0; pin "6; EI value=1']])).toContain('2 - unclosed-quote');
});

test('a stretch written 0 0 in a text is the whole beam; -3 0 is a stretch that ends at 0', () => {
  const text = 'pin -6; pin 0; EI value=1; uniform 0 0 2; uniform -3 0 4';
  expect(modelOf([[text]]).loads).toMatchObject([
    { from: -6, to: 0, law: { start: 2 } },
    { from: -3, to: 0, law: { start: 4 } },
  ]);
});
