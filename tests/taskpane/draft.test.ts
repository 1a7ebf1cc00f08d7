import type { CellInput } from '../../taskpane/port';
import {
  adopt,
  difference,
  duplicateRow,
  History,
  insertRow,
  makeDraft,
  moveRow,
  overflows,
  removeRow,
  sameDraft,
  setCell,
  toCells,
  type Draft,
} from '../../taskpane/rows/draft';
import { rowText, rowsText } from '../../taskpane/rows/text-form';
import { exactNumber, formatNumber, readNumber } from '../../taskpane/numbers';

const HEAD = ['Item', 'At', 'Value'];
const draftOf = (values: unknown[][], formulas: string[][] = values.map((row) => row.map(() => ''))): Draft =>
  makeDraft([HEAD, ...values], [HEAD.map(() => ''), ...formulas], 1);
const items = (draft: Draft): unknown[] => draft.rows.map((row) => row[0]?.value);
const changes = (before: Draft, after: Draft): Record<string, CellInput> => {
  const found: Record<string, CellInput> = {};
  difference(before, after, 3).forEach((row, r) =>
    row.forEach((cell, c) => {
      if (cell !== undefined) found[`${r},${c}`] = cell;
    }),
  );
  return found;
};

const START = draftOf([
  ['pin', 0, null],
  [null, null, null],
  ['pin', 6, null],
  ['point', 3, 12],
  [null, null, null],
]);

test('blank rows are spare slots, not rows', () => {
  expect(items(START)).toEqual(['pin', 'pin', 'point']);
  expect(START.slots).toEqual([1, 3, 4]);
});

test('a changed cell is the only cell written', () => {
  expect(changes(START, setCell(START, 2, 2, { value: 15, formula: '' }))).toEqual({ '4,2': 15 });
});

test('adding takes the slot after the last row, and rows after it move one slot on', () => {
  const after = insertRow(START, 1, [
    { value: 'hinge', formula: '' },
    { value: 2, formula: '' },
    { value: null, formula: '' },
  ]);
  expect(items(after)).toEqual(['pin', 'hinge', 'pin', 'point']);
  expect(after.slots).toEqual([1, 3, 4, 5]);
  expect(overflows(after, 6)).toBe(false);
  expect(changes(START, after)).toEqual({
    '3,0': 'hinge',
    '3,1': 2,
    '4,0': 'pin',
    '4,1': 6,
    '4,2': null,
    '5,0': 'point',
    '5,1': 3,
    '5,2': 12,
  });
});

test('a full range overflows by one slot, but an empty new row needs no room yet', () => {
  const full = draftOf([
    ['pin', 0, null],
    ['pin', 6, null],
  ]);
  const empty = insertRow(full, 2);
  expect([empty.capacity, overflows(empty, 3)]).toEqual([4, false]);
  expect(overflows(setCell(empty, 2, 0, { value: 'hinge', formula: '' }), 3)).toBe(true);
  expect(sameDraft(full, empty)).toBe(true);
});

test('removing closes up and empties the last slot', () => {
  expect(changes(START, removeRow(START, 1))).toEqual({
    '3,0': 'point',
    '3,1': 3,
    '3,2': 12,
    '4,0': null,
    '4,1': null,
    '4,2': null,
  });
});

test('moving swaps contents between slots; a formula moves its own row along', () => {
  const before = draftOf(
    [
      ['pin', 0, null],
      ['point', 3, 12],
    ],
    [
      ['', '', ''],
      ['', '', '=B6*4'],
    ],
  );
  const after = moveRow(before, 1, 0);
  expect(items(after)).toEqual(['point', 'pin']);
  expect(changes(before, after)).toEqual({
    '1,0': 'point',
    '1,1': 3,
    '1,2': { formula: '=B5*4' },
    '2,0': 'pin',
    '2,1': 0,
    '2,2': null,
  });
});

test('a duplicate stands below its original', () => {
  expect(items(duplicateRow(START, 0))).toEqual(['pin', 'pin', 'pin', 'point']);
});

test('undo and redo walk through drafts; a new step forgets what was undone', () => {
  const history = new History(START);
  const one = removeRow(START, 0);
  history.push(one);
  expect(history.undo()).toBe(START);
  expect(history.redo()).toBe(one);
  history.undo();
  history.push(moveRow(START, 0, 1));
  expect(history.canRedo).toBe(false);
});

test('recalculated values are taken over, rows still empty stay', () => {
  const sheet = draftOf([['pin', 0, 99]]);
  const mine = insertRow(draftOf([['pin', 0, null]]), 1);
  const now = adopt(mine, sheet);
  expect(now.rows.length).toBe(2);
  expect(now.rows[0]?.[2]?.value).toBe(99);
});

test('the matrix for the engine has the shape of the range', () => {
  expect(toCells(START, HEAD)).toEqual([
    HEAD,
    ['pin', 0, null],
    [null, null, null],
    ['pin', 6, null],
    ['point', 3, 12],
    [null, null, null],
  ]);
});

test('the text form: in order while no cell is blank, then by key, quoted where needed', () => {
  expect(rowText({ Item: 'pin', At: 0 })).toBe('pin 0');
  expect(rowText({ Item: 'uniform', At: 0, To: 6, Value: '12 kN/m', Case: 'Q' })).toBe(
    'uniform 0 6 "12 kN/m" case=Q',
  );
  expect(rowText({ Item: 'E', Value: 210, Unit: 'GPa' })).toBe('E value=210 unit=GPa');
  expect(rowText({ Item: 'rotational spring', At: `12'-6"`, Note: 'a "new" one' })).toBe(
    `"rotational spring" 12'-6" note="a ""new"" one"`,
  );
  expect(rowsText([{ Item: 'pin', At: 0 }, {}, { Item: 'hinge', At: 2 }])).toBe('pin 0; hinge 2');
});

const COMMA = { decimal: ',', group: '.', list: ';' };
test.each([
  [12.345678, '12.35'],
  [-0.00123, '−0.00123'],
  [123456.789, '123457'],
  [0.00001234, '1.234×10⁻⁵'],
  [-98765432, '−9.877×10⁷'],
  [0, '0'],
  [Number.NaN, '–'],
])('%p is shown as %s', (value, expected) => {
  expect(formatNumber(value)).toBe(expected);
});

test("the host's separators are used for showing and for reading", () => {
  expect(formatNumber(12345.6, COMMA, 6)).toBe('12.345,6');
  expect(exactNumber(3.5, COMMA)).toBe('3,5');
  expect(readNumber('3,5', COMMA)).toBe(3.5);
  expect(readNumber('3.5', COMMA)).toBe(3.5);
  expect(readNumber('-1.5e3')).toBe(-1500);
  expect([readNumber('span/360'), readNumber(`12'-6"`), readNumber('12 kN'), readNumber('')]).toEqual([
    null,
    null,
    null,
    null,
  ]);
});
