/**
 * The built functions in the embedded spreadsheet's own engine: blanks both ways, spills, other sheets, names, errors with their words.
 * The beam of most tests: simple span L = 6 m, w = 12 kN/m, E = 210 GPa, I = 8360 cm4; mid-span deflection 5 w L^4 / (384 E I), the
 * textbook formula, here in the test's own arithmetic.
 */
import { loadBundle, loadWorkbench, snapshotOf, type Headless } from '../helpers/workbench';

const workbench = loadWorkbench();
const bundle = loadBundle(workbench);
let open: Headless[] = [];

function start(blankCells: 'zero' | 'empty' = 'zero'): Headless['book'] {
  const headless = workbench.createHeadless(bundle, { blankCells });
  open.push(headless);
  return headless.book;
}
afterEach(() => {
  for (const one of open) one.dispose();
  open = [];
});

const BEAM = [
  ['units', 'kN', 'm', 'mm', null, null, null],
  ['pin', 0, null, null, null, null, null],
  ['pin', 6, null, null, null, null, null],
  [null, null, null, null, null, null, null],
  ['E', null, null, 210, null, 'GPa', null],
  ['I', null, null, 8360, null, 'cm4', null],
  ['uniform', null, null, 12, null, 'kN/m', 'Q'],
];
const MID_SPAN = ((5 * 12 * 6 ** 4) / (384 * 210e6 * 8360e-8)) * 1000; // mm
// a dozen roundings between the rows and the answer
const TOLERANCE = 64 * Number.EPSILON * MID_SPAN;

/** The value in a cell of the first sheet, by zero-based row and column. */
function at(book: Headless['book'], row: number, column: number, sheet = book.sheets()[0]!) {
  return book.valueAt(sheet, row, column);
}

test.each(['zero', 'empty'] as const)('a deflection is right with blank cells as %s', async (blankCells) => {
  const book = start(blankCells);
  await book.open(snapshotOf({ One: [...BEAM, ['=SPANROW.DEFLECTION(A1:G7,3)']] }));
  expect(Math.abs(Number(at(book, 7, 0)) - MID_SPAN)).toBeLessThan(TOLERANCE);
});

test('changing the habit of blank cells and computing again changes no value', async () => {
  const book = start('zero');
  await book.open(workbench.demoWorkbook());
  const before = JSON.stringify(book.contents().sheets);
  const calls = book.host.spent.calls;
  book.host.blankCells = 'empty';
  await book.recalculate();
  expect(book.host.spent.calls).toBeGreaterThan(calls + 200);
  expect(JSON.stringify(book.contents().sheets)).toBe(before);
});

test('a change of a load recalculates, and undo brings the value back', async () => {
  const book = start();
  await book.open(snapshotOf({ One: [...BEAM, ['=SPANROW.DEFLECTION(A1:G7,3)', '=A8*2']] }));
  book.workbook.getActiveSheet().getRange('D7').setValue({ v: 24, t: 2 });
  await book.settle();
  expect(Math.abs(Number(at(book, 7, 0)) - 2 * MID_SPAN)).toBeLessThan(2 * TOLERANCE);
  expect(Math.abs(Number(at(book, 7, 1)) - 4 * MID_SPAN)).toBeLessThan(4 * TOLERANCE);
  book.workbook.undo();
  await book.settle();
  expect(Math.abs(Number(at(book, 7, 0)) - MID_SPAN)).toBeLessThan(TOLERANCE);
});

test('a range of positions spills in its shape, blocked cells give #SPILL! and recover', async () => {
  const book = start();
  await book.open(snapshotOf({ One: [...BEAM, [0, 3, 6], ['=SPANROW.MOMENT(A1:G7,A8:C8)']] }));
  const sheet = book.sheets()[0]!;
  expect(book.spillOf(sheet, 8, 0)).toEqual({ startRow: 8, startColumn: 0, endRow: 8, endColumn: 2 });
  const middle = (12 * 6 ** 2) / 8; // w L^2 / 8
  expect(Math.abs(Number(at(book, 8, 1)) - middle)).toBeLessThan(64 * Number.EPSILON * middle);
  book.workbook.getActiveSheet().getRange('B9').setValue('in the way');
  await book.settle();
  expect(at(book, 8, 0)).toBe('#SPILL!');
  book.workbook.getActiveSheet().getRange('B9').clear();
  await book.settle();
  expect(at(book, 8, 0)).toBe(0);
  expect(Math.abs(Number(at(book, 8, 1)) - middle)).toBeLessThan(64 * Number.EPSILON * middle);
});

test('rows on another sheet, by reference and by name', async () => {
  const book = start();
  await book.open(
    snapshotOf(
      {
        One: [["=SPANROW.DEFLECTION('Roof beams'!A1:G7,3)", '=SPANROW.DEFLECTION(RoofBeam,3)']],
        'Roof beams': BEAM,
      },
      { RoofBeam: "'Roof beams'!$A$1:$G$7" },
    ),
  );
  expect(Math.abs(Number(at(book, 0, 0)) - MID_SPAN)).toBeLessThan(TOLERANCE);
  expect(at(book, 0, 1)).toBe(at(book, 0, 0));
  book.workbook.getSheetByName('Roof beams')!.getRange('D7').setValue({ v: 6, t: 2 });
  await book.settle();
  expect(Math.abs(Number(at(book, 0, 0)) - MID_SPAN / 2)).toBeLessThan(TOLERANCE);
  expect(at(book, 0, 1)).toBe(at(book, 0, 0));
});

test('an error carries its sentence, and loses it once the rows are right', async () => {
  const book = start();
  const wrong = BEAM.map((row, index) => (index === 1 ? ['pinn', ...row.slice(1)] : row));
  await book.open(
    snapshotOf({ One: [...wrong, ['=SPANROW.DEFLECTION(A1:G7,3)', '=SPANROW.REACTION(A1:G7,4)']] }),
  );
  const sheet = book.sheets()[0]!;
  expect(at(book, 7, 0)).toBe('#VALUE!');
  const words = book.messageAt(sheet, 7, 0) ?? '';
  expect(words).toMatch(/row 2/i);
  expect(words).toMatch(/pinn/);
  expect(words).toMatch(/pin\b/);
  book.workbook.getActiveSheet().getRange('A2').setValue('pin');
  await book.settle();
  expect(book.messageAt(sheet, 7, 0)).toBeNull();
  expect(at(book, 7, 1)).toBe('#N/A'); // right rows, but no support at 4
  expect(book.messageAt(sheet, 7, 1)).toMatch(/support/i);
});

test('a missing argument and too many arguments are told in words', async () => {
  const book = start();
  await book.open(snapshotOf({ One: [...BEAM, ['=SPANROW.DEFLECTION(A1:G7)', '=SPANROW.VERSION(1,2)']] }));
  const sheet = book.sheets()[0]!;
  expect(book.messageAt(sheet, 7, 0)).toMatch(/"x"/);
  expect(book.messageAt(sheet, 7, 1)).toMatch(/at most 0/);
});

test('an omitted argument in the middle is left out, not zero', async () => {
  const book = start();
  await book.open(
    snapshotOf({ One: [...BEAM, ['=SPANROW.USED(A1:G7,"span/250")', '=SPANROW.USED(A1:G7,"span/250",,,)']] }),
  );
  expect(typeof at(book, 7, 0)).toBe('number');
  expect(at(book, 7, 1)).toBe(at(book, 7, 0));
});

test('a cell holding an error inside the rows is told, not fatal to the workbook', async () => {
  const book = start();
  const rows = BEAM.map((row, index) =>
    index === 6 ? ['uniform', null, null, '=1/0', null, 'kN/m', 'Q'] : row,
  );
  await book.open(snapshotOf({ One: [...rows, ['=SPANROW.DEFLECTION(A1:G7,3)', '=1+1']] }));
  expect(at(book, 7, 0)).toBe('#VALUE!');
  expect(book.messageAt(book.sheets()[0]!, 7, 0)).toMatch(/row 7/i);
  expect(at(book, 7, 1)).toBe(2);
});

test('the schedule of the demo equals direct calls of the functions, joist by joist', async () => {
  const book = start();
  await book.open(workbench.demoWorkbook());
  const schedule = book.sheet('Joist schedule')!;
  const template = book.sheet('Joist template')!;
  const rows = Array.from({ length: 11 }, (_, r) =>
    Array.from({ length: 8 }, (_, c) => book.valueAt(template, 5 + r, 1 + c)),
  );
  const names = [Array.from({ length: 8 }, (_, c) => book.valueAt(schedule, 6, 4 + c))];
  const largest = bundle.functions.get('MAXDEFLECTION')!;
  const used = bundle.functions.get('USED')!;
  const seen = new Set<number>();
  for (let joist = 0; joist < 60; joist++) {
    const values = [Array.from({ length: 8 }, (_, c) => book.valueAt(schedule, 7 + joist, 4 + c))];
    expect(book.valueAt(schedule, 7 + joist, 12)).toBe(largest(rows, [['G + Q']], names, values));
    expect(book.valueAt(schedule, 7 + joist, 14)).toBe(used(rows, null, null, names, values));
    seen.add(Number(book.valueAt(schedule, 7 + joist, 12)));
  }
  expect(seen.size).toBeGreaterThan(40); // sixty joists, not one repeated
});

test('the demo has plausible results and no errors', async () => {
  const book = start();
  await book.open(workbench.demoWorkbook());
  for (const sheet of book.sheets())
    for (const { row, column, value } of book.cells(sheet))
      expect(`${sheet.getName()} ${row} ${column} ${String(value)}`).not.toMatch(/ #[A-Z]/);
  const schedule = book.sheet('Joist schedule')!;
  for (let joist = 0; joist < 60; joist++) {
    const span = Number(book.valueAt(schedule, 7 + joist, 4)) * 1000;
    const ratio = span / Number(book.valueAt(schedule, 7 + joist, 12));
    expect(ratio).toBeGreaterThan(250);
    expect(ratio).toBeLessThan(900);
  }
});
