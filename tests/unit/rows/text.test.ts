import { readTextRows } from '../../../src/rows/text';

const rows = (text: string) => readTextRows(text).rows;

test('the example of the contract (2.6)', () => {
  const text =
    'pin 0; pin 6; uniform 0 6 "12 kN/m" case=Q; E value="210 GPa"; I value="8360 cm4"; units kN m mm';
  expect(readTextRows(text)).toEqual({
    issues: [],
    rows: [
      // a written 0 stays text, because it is no blank
      { Item: 'pin', At: '0' },
      { Item: 'pin', At: 6 },
      { Item: 'uniform', At: '0', To: 6, Value: '12 kN/m', Case: 'Q' },
      { Item: 'E', Value: '210 GPa' },
      { Item: 'I', Value: '8360 cm4' },
      { Item: 'units', At: 'kN', To: 'm', Value: 'mm' },
    ],
  });
});

test('line breaks, remarks, blank rows', () => {
  expect(rows('pin 0\r\n\n# held ; here\npin 3;')).toEqual([
    { Item: 'pin', At: '0' },
    {},
    { Item: '# held' },
    { Item: 'here' },
    { Item: 'pin', At: 3 },
    {},
  ]);
});

test('a quotation mark in a remark swallows no rows', () => {
  expect(rows('# "as built; pin 0')).toEqual([{ Item: '# "as built' }, { Item: 'pin', At: '0' }]);
});

test('quotes: blanks, separators and quotation marks inside; typographic ones', () => {
  expect(rows('point 1 value="2; 3"')).toEqual([{ Item: 'point', At: 1, Value: '2; 3' }]);
  expect(rows('point "12\' 6 1/2""" value=3')).toEqual([{ Item: 'point', At: '12\' 6 1/2"', Value: 3 }]);
  expect(rows('point \u201c3 m\u201d value=3')).toEqual([{ Item: 'point', At: '3 m', Value: 3 }]);
  expect(rows('point "" value=3 note="a b"')).toEqual([{ Item: 'point', At: null, Value: 3, Note: 'a b' }]);
});

test('the inch mark inside a cell opens no quote', () => {
  expect(rows(`pin 12'-6"; pin 25'`)).toEqual([
    { Item: 'pin', At: `12'-6"` },
    { Item: 'pin', At: `25'` },
  ]);
});

test('items of two words need no quotes', () => {
  expect(rows('rotational spring 0; shear release 3; point load 4 value=2; point 5')).toEqual([
    { Item: 'rotational spring', At: '0' },
    { Item: 'shear release', At: 3 },
    { Item: 'point load', At: 4, Value: 2 },
    { Item: 'point', At: 5 },
  ]);
});

test('named cells', () => {
  expect(rows('varying at=1 to=3 value=5 end=7 unit=kN/m case=G note=x')).toEqual([
    { Item: 'varying', At: 1, To: 3, Value: 5, 'End value': 7, Unit: 'kN/m', Case: 'G', Note: 'x' },
  ]);
});

test('what cannot be read is named', () => {
  expect(readTextRows('pin 0; point "3 m').issues).toEqual([
    { code: 'unclosed-quote', kind: 'invalid', row: 2, found: '"3 m' },
  ]);
  expect(readTextRows('a b c d e f g h i').issues).toEqual([
    { code: 'too-many-cells', kind: 'invalid', row: 1, found: 'i' },
  ]);
  expect(readTextRows('point 3 at=4').issues).toEqual([
    { code: 'cell-twice', kind: 'invalid', row: 1, column: 'At', found: '4' },
  ]);
});
