import { CannotFollow, evaluate, tableArea, type Place } from '../../taskpane/formula/evaluate';
import { parseFormula } from '../../taskpane/formula/parse';
import { shortAddress } from '../../taskpane/address';
import type { TableInfo } from '../../taskpane/port';
import { MemoryPort } from '../helpers/memory-port';

function setUp(): { port: MemoryPort; value: (formula: string) => Promise<unknown> } {
  const port = new MemoryPort('Main', 'Roof beams');
  port.fill('A1', [
    [1, 2, 'x'],
    [3, 4, null],
  ]);
  port.fill('B4', [['pin', 0]], 'Roof beams');
  port.names.set('span', { kind: 'value', value: 6 });
  port.names.set('beam', { kind: 'area', area: port.area('B4:C4', 'Roof beams') });
  port.names.set('twice', { kind: 'formula', formula: '=span*2' });
  port.names.set('loop', { kind: 'formula', formula: '=loop' });
  const place: Place = { port, home: port.area('E1'), read: [] };
  return {
    port,
    value: async (formula) => {
      const { values } = await evaluate(parseFormula(formula), place);
      return values.length === 1 && values[0]?.length === 1 ? values[0][0] : values;
    },
  };
}

test('references here and on another sheet, case of the sheet name ignored', async () => {
  const { value } = setUp();
  expect(await value('=A1:B2')).toEqual([
    [1, 2],
    [3, 4],
  ]);
  expect(await value("='roof BEAMS'!B4:C4")).toEqual([['pin', 0]]);
});

test('unused cells of a range come back as blanks, so that row numbers agree with the function', async () => {
  const { value } = setUp();
  expect(await value("='Roof beams'!A3:C4")).toEqual([
    [null, null, null],
    [null, 'pin', 0],
  ]);
});

test('names of cells, of values, of formulas; arithmetic and joining', async () => {
  const { value } = setUp();
  expect(await value('=beam')).toEqual([['pin', 0]]);
  expect(await value('=twice/A2+2^3-50%')).toBe(12 / 3 + 8 - 0.5);
  expect(await value('="pin 0; pin "&span&C1')).toBe('pin 0; pin 6x');
  expect(await value('={"pin",0;"pin",6}')).toEqual([
    ['pin', 0],
    ['pin', 6],
  ]);
});

test.each([
  ['=CHOOSE(1,A1)', 'function', 'CHOOSE'],
  ['=nothing', 'name', 'nothing'],
  ['=Nowhere!A1', 'sheet', 'Nowhere'],
  ['=Loads[Item]', 'table', 'Loads'],
  ['=#REF!', 'error', '#REF!'],
  ['=A1:B2+1', 'shape', ''],
  ['=loop', 'deep', 'loop'],
  ['=[Book.xlsx]S!A1', 'name', '[Book.xlsx]S!A1'],
])('%s cannot be followed and says why', async (formula, reason, what) => {
  const { value } = setUp();
  await expect(value(formula)).rejects.toMatchObject({ reason, what });
  await expect(value(formula)).rejects.toBeInstanceOf(CannotFollow);
});

test('a spill reference takes the spilled area', async () => {
  const { port, value } = setUp();
  port.spills.set('Main!A1', port.area('A1:A2'));
  expect(await value('=A1#')).toEqual([[1], [3]]);
});

describe('structured references', () => {
  const table: TableInfo = {
    name: 'Beams',
    area: { sheet: 'S', row: 2, column: 1, rows: 6, columns: 3 },
    header: true,
    totals: true,
    columns: ['Item', 'At', 'Value [kN]'],
  };
  const home = { sheet: 'S', row: 5, column: 9, rows: 1, columns: 1 };
  test.each([
    ['', 'B4:D7'],
    ['#All', 'B3:D8'],
    ['#Headers', 'B3:D3'],
    ['#Totals', 'B8:D8'],
    ['At', 'C4:C7'],
    ['[Item]:[At]', 'B4:C7'],
    ['[#All],[At]', 'C3:C8'],
    ['[#Headers],[#Data],[Item]:[At]', 'B3:C7'],
    ["Value '[kN']", 'D4:D7'],
    ['@At', 'C6'],
    ['@', 'B6:D6'],
    ['[#This Row],[At]', 'C6'],
  ])('Beams[%s] is %s', (specifier, expected) => {
    expect(shortAddress(tableArea(table, specifier, home))).toBe(expected);
  });
  test('an unknown column says so', () => {
    expect(() => tableArea(table, 'Load', home)).toThrow(CannotFollow);
  });
});
