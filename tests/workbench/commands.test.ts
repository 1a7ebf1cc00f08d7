/** `npm run recalculate` as a person runs it, and the demo files of the repository against what the script would write. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { loadBundle, loadWorkbench, snapshotOf } from '../helpers/workbench';

jest.setTimeout(120_000);

const root = path.resolve(__dirname, '../..');
const DEMO = path.join(root, 'workbench/demo/covered-market.xlsx');
const workbench = loadWorkbench();
const bundle = loadBundle(workbench);
const folder = mkdtempSync(path.join(tmpdir(), 'spanrow-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function recalculate(...args: string[]) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    [path.join(root, 'scripts/recalculate.mjs'), ...args],
    { encoding: 'utf8' },
  );
  return { status, lines: stdout.trim().split('\n'), stderr };
}

test('the demo: every SPANROW formula with its value, the file written, status 0', async () => {
  const target = path.join(folder, 'out.xlsx');
  const { status, lines } = recalculate(DEMO, target);
  expect(status).toBe(0);
  expect(lines[lines.length - 1]).toMatch(/^281 SPANROW formulas, 0 with errors\. Written: /);
  expect(lines.some((line) => /^Canopy beam!E20 {2}19\.38957/.test(line))).toBe(true);
  expect(lines.filter((line) => line.startsWith('Joist schedule!'))).toHaveLength(240);
  const file = await workbench.readXlsx(new Uint8Array(readFileSync(target)), 'out.xlsx');
  expect(file.ok && Object.keys(file.snapshot.sheets)).toHaveLength(8);
});

test('a bad row: status 1, the sentence printed beside the cell; the web habit of blanks gives the same', async () => {
  const { book, dispose } = workbench.createHeadless(bundle);
  await book.open(
    snapshotOf({
      One: [
        ['pinn', 0],
        ['pin', 6],
        ['EI', null, null, 1e4],
        ['point', 3, null, 5],
        ['=SPANROW.DEFLECTION(A1:D4,3)', '=SPANROW.VERSION()'],
      ],
    }),
  );
  const { bytes } = await workbench.writeXlsx(book.contents());
  dispose();
  const source = path.join(folder, 'bad.xlsx');
  writeFileSync(source, bytes);
  for (const habit of ['zero', 'empty']) {
    const { status, lines } = recalculate(source, path.join(folder, 'bad-out.xlsx'), `--blank=${habit}`);
    expect(status).toBe(1);
    expect(lines[0]).toMatch(/^One!A5 {2}#VALUE! {2}Row 1.*pinn.*Did you mean pin\?/);
    expect(lines[lines.length - 1]).toMatch(/^2 SPANROW formulas, 1 with errors/);
  }
});

test('no file, a file that is none, a wrong option: status 2 and words', () => {
  expect(recalculate().status).toBe(2);
  expect(recalculate('a.xlsx', 'b.xlsx', '--blank=maybe').status).toBe(2);
  const missing = recalculate(path.join(folder, 'none.xlsx'), path.join(folder, 'b.xlsx'));
  expect(missing.status).toBe(2);
  expect(missing.stderr).toMatch(/could not be read/);
  const letter = path.join(folder, 'letter.xlsx');
  writeFileSync(letter, 'Dear reader');
  const refused = recalculate(letter, path.join(folder, 'b.xlsx'));
  expect(refused.status).toBe(2);
  expect(refused.stderr).toMatch(/not an \.xlsx file/);
});

test('the demo files are what `npm run demo` writes now: cells, formulas, formats, and computed numbers', async () => {
  const kept = JSON.parse(
    readFileSync(path.join(root, 'workbench/demo/covered-market.json'), 'utf8'),
  ) as ReturnType<typeof workbench.demoWorkbook>;
  const { book, dispose } = workbench.createHeadless(bundle);
  await book.open(workbench.demoWorkbook());
  const now = book.contents().snapshot;
  dispose();
  expect(kept.sheetOrder).toEqual(now.sheetOrder);
  for (const id of now.sheetOrder) {
    const cells = (sheet: (typeof now.sheets)[string] | undefined) =>
      Object.entries(sheet?.cellData ?? {}).flatMap(([row, columns]) =>
        Object.entries(columns ?? {}).map(([column, cell]) => ({
          place: `${id} ${row},${column}`,
          cell: cell as { f?: string; v?: unknown; s?: unknown },
        })),
      );
    const [before, after] = [cells(kept.sheets[id]), cells(now.sheets[id])];
    expect(before.map(({ place }) => place)).toEqual(after.map(({ place }) => place));
    before.forEach(({ place, cell }, index) => {
      const fresh = after[index]!.cell;
      expect([place, cell.f]).toEqual([place, fresh.f]);
      // numbers to nine digits: the last ones may move with the engine; texts that formulas give may be reworded
      if (typeof fresh.v === 'number')
        expect(Math.abs(Number(cell.v) - fresh.v)).toBeLessThanOrEqual(1e-9 * Math.abs(fresh.v));
      else if (!fresh.f) expect([place, cell.v]).toEqual([place, fresh.v]);
    });
  }
  const xlsx = await workbench.readXlsx(new Uint8Array(readFileSync(DEMO)), 'x.xlsx');
  if (!xlsx.ok) throw new Error(xlsx.reason);
  const first = xlsx.snapshot.sheets['sheet-2']!.cellData![19]![4]!;
  expect(first.v).toBe(kept.sheets.canopy!.cellData![19]![4]!.v);
});
