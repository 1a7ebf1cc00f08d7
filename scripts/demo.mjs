/**
 * `npm run demo`: computes the demo workbook with the built functions and writes it where the repository keeps it,
 *   workbench/demo/covered-market.xlsx   for spreadsheet programs and for `npm run recalculate`
 *   workbench/demo/covered-market.json   what the workbench opens with
 * What is in the workbook stands in workbench/demo/*.ts. Run it again after changing those or the functions.
 */
import { writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { loadWorkbench } from './workbench.mjs';

const { root } = createRequire(import.meta.url)('./machine.cjs');
const workbench = loadWorkbench();
const { book, dispose } = workbench.createHeadless(workbench.bundle);
await book.open(workbench.demoWorkbook());
const contents = book.contents();
const errors = contents.sheets.flatMap(({ name, cells }) =>
  cells
    .filter(({ value }) => typeof value === 'string' && value.startsWith('#'))
    .map(({ row, column, value }) => `${name}!${workbench.cellName(row, column)} ${value}`),
);
if (errors.length > 0) {
  console.error(`The demo has errors: ${errors.join(', ')}`);
  process.exit(1);
}
const { bytes } = await workbench.writeXlsx(contents);
dispose();
const place = (name) => path.join(root, 'workbench/demo', name);
writeFileSync(place('covered-market.xlsx'), bytes);
writeFileSync(place('covered-market.json'), `${JSON.stringify(contents.snapshot)}\n`);
console.log(`workbench/demo/covered-market.xlsx ${bytes.length} bytes, ${contents.sheets.length} sheets`);
