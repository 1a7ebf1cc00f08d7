import { parseArea, nameCells, quoteSheet, shortAddress } from '../../taskpane/address';
import { tokenize } from '../../taskpane/formula/tokens';

const kinds = (formula: string): string[] => tokenize(formula).map((token) => `${token.kind}:${token.text}`);

test('a call with a range, a text and a number', () => {
  expect(kinds('=SPANROW.PEAK($B$4:I11, "G + ""Q""", 1.5E-3)')).toEqual([
    'function:SPANROW.PEAK',
    'open:(',
    'reference:$B$4:I11',
    'separator:,',
    'text:G + "Q"',
    'separator:,',
    'number:1.5E-3',
    'close:)',
  ]);
});

test('sheet names, quoted and plain, with an apostrophe inside', () => {
  const [first, , second] = tokenize("='Anna''s roof'!B4:I11+Roof!$C$2");
  expect([first?.sheet, first?.text]).toEqual(["Anna's roof", 'B4:I11']);
  expect([second?.sheet, second?.text]).toEqual(['Roof', '$C$2']);
});

test('whole columns, whole rows, a spill mark, a name that looks nearly like a cell', () => {
  expect(kinds('=F(B:I, 4:11, C5#, Beam_1, XFE1)')).toEqual([
    'function:F',
    'open:(',
    'reference:B:I',
    'separator:,',
    'reference:4:11',
    'separator:,',
    'reference:C5',
    'separator:,',
    'name:Beam_1',
    'separator:,',
    'name:XFE1', // one column past the last one (XFD), so it can only be a name
    'close:)',
  ]);
  expect(tokenize('=C5#')[0]?.spill).toBe(true);
});

test('structured references keep their specifier, escapes included', () => {
  const [token] = tokenize("=Beams[[#All],[It''em]:[Note]]");
  expect(token).toMatchObject({ kind: 'structured', text: 'Beams', specifier: "[#All],[It''em]:[Note]" });
});

test('array constants tell rows from columns; error words are words', () => {
  expect(kinds('={1,"a";2,#N/A}')).toEqual([
    'array-open:{',
    'number:1',
    'separator:,',
    'text:a',
    'row-separator:;',
    'number:2',
    'separator:,',
    'error:#N/A',
    'array-close:}',
  ]);
});

test('what is not closed is an error that says where', () => {
  expect(() => tokenize('=F("abc)')).toThrow('a quotation mark is not closed');
  expect(() => tokenize('=T[[a]')).toThrow('a bracket is not closed');
});

test.each([
  ['B4', 'B4'],
  ['$B$4:I11', 'B4:I11'],
  ['I11:B4', 'B4:I11'],
  ['B:I', 'B:I'],
  ['4:11', '4:11'],
])('address %s', (text, expected) => {
  const area = parseArea(text, 'S');
  expect(area && shortAddress(area)).toBe(expected);
});

test.each(['B', '4', 'XFE1', 'A0', 'A1048577', 'B4:I', 'B4:C5:D6', ''])('%s is no address', (text) => {
  expect(parseArea(text, 'S')).toBeNull();
});

test('cells are named in a sentence by joined stretches', () => {
  expect(nameCells(['B4', 'C4', 'D4', 'B5', 'C5', 'D5', 'F9'])).toBe('B4:D5, F9');
  expect(nameCells(['A1', 'C1', 'E1'], 2)).toBe('A1, C1 and 1 more');
});

test('sheet names are quoted where a formula needs it', () => {
  expect(quoteSheet('Roof')).toBe('Roof');
  expect(quoteSheet('Roof 2')).toBe("'Roof 2'");
  expect(quoteSheet("Anna's")).toBe("'Anna''s'");
  expect(quoteSheet('AB12')).toBe("'AB12'");
});
