/**
 * The functions in a spreadsheet host: 10,000 joists, each its own beam from one template, computed by the embedded spreadsheet. Printed: the
 * time of a whole recalculation, and how much of it was spent inside our functions (the rest is the host's).
 */
import { loadBundle, loadWorkbench } from '../tests/helpers/workbench';

const FORMULAS = 10_000;
const ROUNDS = 3;
const NAMES = ['L', 'w', 'Ij'];
const TEMPLATE = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 'L'],
  ['E', null, null, 11, null, 'GPa'],
  ['I', null, null, 'Ij', null, 'cm4'],
  ['uniform', 0, 'L', 'w', null, 'kN/m', 'G'],
];

type Stored = Record<number, Record<number, { v?: string | number; t?: number; f?: string }>>;

/** Template in A1:F6, names in H1:J1, values below them, the formula in K. */
function cells(): Stored {
  const matrix: Stored = {};
  const put = (row: number, column: number, value: string | number) => {
    (matrix[row] ??= {})[column] = { v: value, t: typeof value === 'number' ? 2 : 1 };
  };
  TEMPLATE.forEach((row, r) => row.forEach((value, c) => value !== null && put(r, c, value)));
  NAMES.forEach((name, c) => put(0, 7 + c, name));
  for (let index = 0; index < FORMULAS; index++) {
    const row = 1 + index;
    const values = [3 + (index % 97) * 0.03, 1 + (index % 89) * 0.02, 3000 + (index % 83) * 50];
    values.forEach((value, c) => put(row, 7 + c, value));
    matrix[row]![10] = { f: `=SPANROW.MAXDEFLECTION($A$1:$F$6,,$H$1:$J$1,$H${row + 1}:$J${row + 1})` };
  }
  return matrix;
}

export async function bench(): Promise<void> {
  const workbench = loadWorkbench();
  const headless = workbench.createHeadless(loadBundle(workbench));
  const { book } = headless;
  const open = performance.now();
  await book.open({
    id: 'bench',
    sheetOrder: ['s'],
    sheets: { s: { id: 's', name: 'Schedule', cellData: cells(), rowCount: FORMULAS + 10, columnCount: 20 } },
  });
  console.log(
    `\nworkbench: ${FORMULAS} formulas opened and computed in ${(performance.now() - open).toFixed(0)} ms`,
  );
  const sheet = book.workbook.getActiveSheet();
  for (let round = 1; round <= ROUNDS; round++) {
    book.host.spent = { calls: 0, milliseconds: 0 };
    const before = Number(book.valueAt(book.sheets()[0]!, FORMULAS, 10));
    const started = performance.now();
    const cpu = process.cpuUsage();
    sheet.getRange('D4').setValue({ v: 11 + round, t: 2 }); // the template's E: every formula depends on it
    await book.settle();
    const whole = performance.now() - started;
    const { user, system } = process.cpuUsage(cpu);
    const after = Number(book.valueAt(book.sheets()[0]!, FORMULAS, 10));
    if (!(after < before)) throw new Error(`the values did not follow: ${before} -> ${after}`);
    const { calls, milliseconds } = book.host.spent;
    console.log(
      `  recalculation ${round}: ${whole.toFixed(0)} ms (${((user + system) / 1000).toFixed(0)} ms of processor time), ${calls} calls, ${milliseconds.toFixed(0)} ms (${((100 * milliseconds) / whole).toFixed(0)} %) inside the functions, ` +
        `${((1000 * milliseconds) / calls).toFixed(1)} µs a call`,
    );
  }
  headless.dispose();
}
