import { findCalls, replaceBeam } from '../../taskpane/formula/calls';
import { moveFormula } from '../../taskpane/formula/move';
import { parseFormula } from '../../taskpane/formula/parse';
import { FUNCTIONS, ownFunction } from '../../taskpane/formula/functions';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import files from '../../functions/files.json';

test('calls are found however deep they are nested, in the order they are written', () => {
  const calls = findCalls(
    '=IF(A1>0, -SPANROW.MAXDEFLECTION(B4:I11,"G")*2, SUM({1,2}, spanrow.moment(Roof!B4:I9, C2+1)))&" mm"',
  );
  expect(calls.map((call) => [call.fn, call.beamText])).toEqual([
    ['MAXDEFLECTION', 'B4:I11'],
    ['MOMENT', 'Roof!B4:I9'],
  ]);
});

test('a call whose beam holds another call gives both', () => {
  const calls = findCalls('=SPANROW.SHEAR(B4:I11, SPANROW.PEAK(B4:I11,"moment",,"position"))');
  expect(calls.map((call) => call.fn)).toEqual(['SHEAR', 'PEAK']);
  expect(calls[1]?.args.sense).toBeUndefined(); // an omitted argument is no argument
  expect(calls[1]?.args.give).toMatchObject({ kind: 'text', value: 'position' });
});

test('the stored form of a file is the same function', () => {
  expect(findCalls('=_xldudf_SPANROW_DEFLECTION(B4:I11,3)')[0]?.fn).toBe('DEFLECTION');
  expect(ownFunction('SPANROW.NOSUCH')).toBeNull();
  expect(ownFunction('OTHER.DEFLECTION')).toBeNull();
});

test('quoted text is never taken for a call, and a broken formula has none', () => {
  expect(findCalls('="SPANROW.DEFLECTION(B4:I11,3)"')).toEqual([]);
  expect(findCalls('=SPANROW.DEFLECTION(B4:I11,3')).toEqual([]);
});

test('precedence as in a spreadsheet: -2^2 is (-2)^2, % binds to its number', () => {
  expect(parseFormula('=-2^2')).toMatchObject({
    kind: 'binary',
    operator: '^',
    left: { kind: 'unary', operator: '-' },
  });
  expect(parseFormula('=1+2*3%')).toMatchObject({
    operator: '+',
    right: { operator: '*', right: { kind: 'unary', operator: '%' } },
  });
});

test('a beam argument is replaced in every call that names it, and nowhere else', () => {
  expect(
    replaceBeam('=SPANROW.USED(B4:I11)+SUM(B4:I11)+SPANROW.PEAK(B4:I11,"shear")', 'B4:I11', 'B4:I12'),
  ).toBe('=SPANROW.USED(B4:I12)+SUM(B4:I11)+SPANROW.PEAK(B4:I12,"shear")');
});

test('a formula that moves with its row takes its own row along and leaves the rest', () => {
  expect(moveFormula('=D5*1.5+$E5+F$5+D6+Loads!D5+SUM(A5:C5)', 4, 7)).toBe(
    '=D8*1.5+$E8+F$5+D6+Loads!D5+SUM(A8:C8)',
  );
  expect(moveFormula('=D5*"D5"', 4, 7)).toBe('=D8*"D5"');
});

test('the pane lists every worksheet function with its parameters in the order of the real one', () => {
  const found: Record<string, string[]> = {};
  for (const file of files) {
    const source = readFileSync(path.join(__dirname, '../..', file), 'utf8');
    const pattern = /@customfunction ([A-Z]+)[\s\S]*?export function \w+\(([\s\S]*?)\):/g;
    for (const [, id = '', list = ''] of source.matchAll(pattern)) {
      const parameters = [...list.matchAll(/(\w+)\??:/g)].map(([, name = '']) => name);
      if (parameters.length > 0) found[id] = parameters;
    }
  }
  expect(Object.keys(found).length).toBeGreaterThan(15);
  expect(FUNCTIONS).toEqual(found);
});
