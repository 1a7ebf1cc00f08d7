/** The pane's port over the embedded spreadsheet: what taskpane/port.ts promises, kept by workbench/port.ts. */
import type { Area } from '../../taskpane/port';
import { loadBundle, loadWorkbench, snapshotOf, type Headless } from '../helpers/workbench';

const workbench = loadWorkbench();
const bundle = loadBundle(workbench);
const lightTheme = {
  choice: 'light',
  dark: false,
  choose: () => undefined,
  onChange: () => () => undefined,
} as const;

let headless: Headless;
let port: ReturnType<typeof workbench.createPort>;
let signals: ReturnType<typeof workbench.createSignals>;

const SHEET = [
  ['pin', 0, null, '=B1+1'],
  ['uniform', null, 12, '=SEQUENCE(2,2)'],
  [null, null, null, null, null],
];

beforeEach(async () => {
  headless = workbench.createHeadless(bundle);
  await headless.book.open(
    snapshotOf(
      { One: SHEET, 'Roof beams': [['=1/0', true, 'text']], Empty: [] },
      { Beam: "'Roof beams'!$A$1:$C$1", Half: '0.5', Word: '"a ""b"""', Twice: 'One!$B$1*2' },
    ),
  );
  signals = workbench.createSignals(headless.book);
  port = workbench.createPort(headless.book, signals, lightTheme);
});
afterEach(() => headless.dispose());

const area = (sheet: string, row: number, column: number, rows = 1, columns = 1): Area => ({
  sheet,
  row,
  column,
  rows,
  columns,
});

test('reading cuts to the used part; formulas and spilled values are told apart', async () => {
  const [block, outside, unknown, empty] = await port.read([
    area('One', 0, 0, 1000, 1000),
    area('One', 90, 90),
    area('None', 0, 0),
    area('Empty', 0, 0),
  ]);
  expect(block).toEqual({
    area: area('One', 0, 0, 3, 5),
    values: [
      ['pin', 0, null, 1, null],
      ['uniform', null, 12, 1, 2],
      [null, null, null, 3, 4],
    ],
    formulas: [
      ['', '', '', '=B1+1', ''],
      ['', '', '', '=SEQUENCE(2,2)', ''],
      ['', '', '', '', ''],
    ],
  });
  expect([outside, unknown, empty]).toEqual([null, null, null]);
  expect((await port.read([area('roof BEAMS', 0, 0, 1, 3)]))[0]?.values).toEqual([['#DIV/0!', true, 'text']]);
  expect(await port.used('One')).toEqual(area('One', 0, 0, 3, 5));
  expect(await port.used('Empty')).toBeNull();
  expect(await port.spill(area('One', 1, 3))).toEqual(area('One', 1, 3, 2, 2));
  expect(await port.spill(area('One', 0, 3))).toBeNull();
});

test('names: a range, a number, a text, a formula, none', async () => {
  expect(await port.name('beam', 'One')).toEqual({ kind: 'area', area: area('Roof beams', 0, 0, 1, 3) });
  expect(await port.name('Half', 'One')).toEqual({ kind: 'value', value: 0.5 });
  expect(await port.name('Word', 'One')).toEqual({ kind: 'value', value: 'a "b"' });
  expect(await port.name('Twice', 'One')).toEqual({ kind: 'formula', formula: '=One!$B$1*2' });
  expect(await port.name('Nothing', 'One')).toBeNull();
});

test('writing keeps types, leaves undefined cells alone, and is one undo step', async () => {
  const result = await port.write([
    {
      area: area('One', 5, 0, 2, 3),
      cells: [
        ['1/2', '007', 3.25],
        [true, undefined, { formula: '=C6*2' }],
      ],
    },
    { area: area('Empty', 0, 0), cells: [['=1+1']] },
  ]);
  expect(result).toEqual({ written: true });
  const [block, text] = await port.read([area('One', 5, 0, 2, 3), area('Empty', 0, 0)]);
  expect(block?.values).toEqual([
    ['1/2', '007', 3.25],
    [true, null, 6.5],
  ]);
  expect(block?.formulas[1]?.[2]).toBe('=C6*2');
  expect(text?.values).toEqual([['=1+1']]); // text exactly as it stands
  expect(text?.formulas).toEqual([['']]);
  headless.book.workbook.undo();
  await headless.book.settle();
  expect(await port.read([area('One', 5, 0, 2, 3), area('Empty', 0, 0)])).toEqual([null, null]);
});

test("filled cells stand in the way unless they are one's own or confirmed; spilled-into cells count", async () => {
  const writing = {
    area: area('One', 1, 2, 2, 3),
    cells: [
      [1, 2, 3],
      [null, 5, undefined],
    ],
  };
  const refused = await port.write([writing]);
  expect(refused).toEqual({ written: false, occupied: ['C2', 'D2', 'E2', 'D3'] });
  expect((await port.read([area('One', 1, 2)]))[0]?.values).toEqual([[12]]);
  expect(await port.occupied(area('One', 0, 0, 2, 2))).toEqual(['A1', 'B1', 'A2']);
  expect(await port.write([writing], { own: [area('One', 1, 2, 2, 3)] })).toEqual({ written: true });
  expect((await port.read([area('One', 1, 2, 1, 3)]))[0]?.values).toEqual([[1, 2, 3]]);
  expect(await port.write([{ area: area('One', 0, 0), cells: [['fixed']] }], { confirmed: true })).toEqual({
    written: true,
  });
});

test('cells on a sheet that is not active are named with their sheet', async () => {
  const refused = await port.write([{ area: area('Roof beams', 0, 1), cells: [[1]] }]);
  expect(refused).toEqual({ written: false, occupied: ["'Roof beams'!B1"] });
});

test('writing below the last row makes room', async () => {
  expect(await port.write([{ area: area('One', 700, 45), cells: [[1]] }])).toEqual({ written: true });
  expect((await port.read([area('One', 700, 45)]))[0]?.values).toEqual([[1]]);
});

test('inserted cells push down what was there, and formulas follow', async () => {
  await port.insert(area('One', 0, 1, 2, 1));
  const [block] = await port.read([area('One', 0, 0, 3, 4)]);
  expect(block?.values.map((row) => row[1])).toEqual([null, null, 0]);
  expect(block?.formulas[0]?.[3]).toBe('=B3+1');
});

test('a new sheet gets a free name and does not come to the front', async () => {
  expect(await port.addSheet?.('Record')).toBe('Record');
  expect(await port.addSheet?.('record')).toBe('record 2');
  expect(await port.sheetNames()).toEqual(['One', 'Roof beams', 'Empty', 'Record', 'record 2']);
  expect(headless.book.workbook.getActiveSheet().getSheetName()).toBe('One');
});

test('selecting is heard with the sheet, the area and the active cell; changes and recalculation are heard', async () => {
  const heard: unknown[] = [];
  let changes = 0;
  const stops = [port.onSelection((selection) => heard.push(selection)), port.onChange(() => (changes += 1))];
  await port.select(area('Roof beams', 0, 1, 2, 2));
  await new Promise((resolve) => setTimeout(resolve, 20));
  const expected = { area: area('Roof beams', 0, 1, 2, 2), active: area('Roof beams', 0, 1) };
  expect(heard[heard.length - 1]).toEqual(expected);
  expect(await port.selection()).toEqual(expected);
  await port.write([{ area: area('One', 0, 1), cells: [[7]] }], { confirmed: true });
  await new Promise((resolve) => setTimeout(resolve, 20));
  expect(changes).toBeGreaterThan(0);
  expect((await port.read([area('One', 0, 3)]))[0]?.values).toEqual([[8]]);
  for (const stop of stops) stop();
  const before = changes;
  await port.write([{ area: area('One', 0, 1), cells: [[8]] }], { confirmed: true });
  await new Promise((resolve) => setTimeout(resolve, 20));
  expect(changes).toBe(before);
});

test('a sheet that is not there is told as a rejection, abilities are what the grid can do', async () => {
  await expect(port.select(area('None', 0, 0))).rejects.toThrow(/no sheet "None"/);
  await expect(port.write([{ area: area('None', 0, 0), cells: [[1]] }])).rejects.toThrow(/no sheet "None"/);
  expect((['insert', 'addSheet', 'undoGroup', 'select'] as const).every((one) => port.can(one))).toBe(true);
  expect((['pictures', 'charts', 'print', 'tables', 'addTable'] as const).some((one) => port.can(one))).toBe(
    false,
  );
});

test('after rows are inserted the sentence of an error is at its new place', async () => {
  const { book } = headless;
  await port.write([{ area: area('Empty', 3, 0), cells: [[{ formula: '=SPANROW.USED("pinn 0; pin 6")' }]] }]);
  const sheet = book.sheet('Empty')!;
  expect(book.messageAt(sheet, 3, 0)).toMatch(/pinn/);
  book.workbook.getSheetByName('Empty')!.insertRowsBefore(0, 2);
  await new Promise((resolve) => setTimeout(resolve, 20));
  await book.settle();
  expect(book.valueAt(sheet, 5, 0)).toBe('#VALUE!');
  expect(book.messageAt(sheet, 5, 0)).toMatch(/pinn/);
});
