/** The built headless spreadsheet and the built functions, for tests: what they test is the files that ship. */
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

import type * as Exports from '../../workbench/headless';

export type Workbench = typeof Exports;
export type Headless = ReturnType<Workbench['createHeadless']>;
export type Bundle = ReturnType<Workbench['evaluateBundle']>;

const DIST = process.env.SPANROW_DIST ?? path.resolve(__dirname, '../../dist');

/** Loads dist/node/headless.js without the test runner's transformation: it is built code already, and large. */
export function loadWorkbench(): Workbench {
  const file = path.join(DIST, 'node/headless.js');
  if (!existsSync(file)) throw new Error('dist/node/headless.js is missing: run "npm run build" first.');
  const module = { exports: {} };
  // eslint-disable-next-line @typescript-eslint/no-implied-eval -- our own build output
  const run = new Function(
    'module',
    'exports',
    'require',
    '__dirname',
    '__filename',
    readFileSync(file, 'utf8'),
  ) as (...scope: unknown[]) => void;
  run(module, module.exports, require, path.dirname(file), file);
  return module.exports as Workbench;
}

export function loadBundle(workbench: Workbench): Bundle {
  const read = (name: string) => readFileSync(path.join(DIST, name), 'utf8');
  return workbench.evaluateBundle(read('functions.js'), read('functions.json'));
}

function cellOf(value: number | string | boolean): { f?: string; v?: number | string; t?: number } {
  if (typeof value === 'string' && value.startsWith('=')) return { f: value };
  if (typeof value === 'boolean') return { v: value ? 1 : 0, t: 3 };
  return { v: value, t: typeof value === 'number' ? 2 : 1 };
}

/** Cells as a snapshot of one or more sheets: rows of values, a text with "=" is a formula, null leaves a cell out. */
export function snapshotOf(
  sheets: Readonly<Record<string, readonly (readonly (number | string | boolean | null)[])[]>>,
  names: Readonly<Record<string, string>> = {},
): Parameters<Headless['book']['open']>[0] {
  const order = Object.keys(sheets);
  return {
    id: `test-${Math.random().toString(36).slice(2)}`,
    name: 'test.xlsx',
    sheetOrder: order,
    sheets: Object.fromEntries(
      order.map((name) => [
        name,
        {
          id: name,
          name,
          rowCount: 500,
          columnCount: 40,
          cellData: Object.fromEntries(
            (sheets[name] ?? []).map((row, r) => [
              r,
              Object.fromEntries(row.flatMap((value, c) => (value === null ? [] : [[c, cellOf(value)]]))),
            ]),
          ),
        },
      ]),
    ),
    resources: [
      {
        name: 'SHEET_DEFINED_NAME_PLUGIN',
        data: JSON.stringify(
          Object.fromEntries(
            Object.entries(names).map(([name, refersTo]) => [
              name,
              { id: name, name, formulaOrRefString: refersTo, localSheetId: 'AllDefaultWorkbook' },
            ]),
          ),
        ),
      },
    ],
  };
}
