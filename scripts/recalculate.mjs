/**
 * `npm run recalculate -- in.xlsx out.xlsx`: computes a workbook without Excel, prints every SPANROW formula with its value or error, and
 * writes the workbook with the new values.
 *   --blank=empty   blank cells reach the functions as on the web (empty) instead of as on the desktop (0)
 * Exit status: 0 all well, 1 some SPANROW formula gives an error, 2 the file could not be read or written.
 */
import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { loadWorkbench, progress } from './workbench.mjs';

const options = process.argv.slice(2).filter((one) => one.startsWith('--'));
const [source, target, more] = process.argv.slice(2).filter((one) => !one.startsWith('--'));
const blank = options.find((one) => one.startsWith('--blank='))?.slice('--blank='.length) ?? 'zero';
if (!source || !target || more || !['zero', 'empty'].includes(blank)) {
  console.error('npm run recalculate -- in.xlsx out.xlsx [--blank=empty]');
  process.exit(2);
}

function stop(words) {
  console.error(words);
  process.exit(2);
}

let bytes;
try {
  bytes = readFileSync(source);
} catch (error) {
  stop(`${source} could not be read: ${error.message}`);
}

const workbench = loadWorkbench();
const { callsSpanrow, cellName, createHeadless, readXlsx, writeXlsx } = workbench;
const read = await readXlsx(new Uint8Array(bytes), path.basename(source));
if (!read.ok) stop(`${source} was not opened: ${read.reason}`);

const { book, dispose } = createHeadless(workbench.bundle, { blankCells: blank });
const formulas = JSON.stringify(read.snapshot.sheets).match(/SPANROW\./g)?.length ?? 0;
const tell = progress('Computing:');
book.host.onCall = (calls) => tell(Math.min(calls, formulas), formulas);
await book.open(read.snapshot);

let count = 0;
let wrong = 0;
for (const sheet of book.sheets()) {
  for (const { row, column, value, formula, spill } of book.cells(sheet)) {
    if (formula === null || !callsSpanrow(formula)) continue;
    count += 1;
    const isError = typeof value === 'string' && /^#[A-Z/0!?_]+[!?A]?$/.test(value);
    if (isError) wrong += 1;
    const message = book.messageAt(sheet, row, column);
    const spilled = spill === null ? '' : `  (to ${cellName(spill.endRow, spill.endColumn)})`;
    console.log(
      `${sheet.getName()}!${cellName(row, column)}  ${value ?? ''}${spilled}${message ? `  ${message}` : ''}`,
    );
  }
}

const contents = book.contents();
const written = await writeXlsx(contents);
try {
  writeFileSync(target, written.bytes);
} catch (error) {
  stop(`${target} could not be written: ${error.message}`);
}
dispose();
for (const note of [...read.notes, ...written.notes]) console.error(`Not in ${target}: ${note}`);
console.log(`${count} SPANROW formulas, ${wrong} with errors. Written: ${target}`);
process.exit(wrong > 0 ? 1 : 0);
