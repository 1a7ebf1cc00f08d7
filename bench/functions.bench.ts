/**
 * The worksheet functions of the built bundle against the least a host must do to deliver a call: JSON.parse of its
 * arguments. Every call gets arguments freshly parsed, as a host's would be, so nothing can be recognised by identity.
 */
import fs from 'node:fs';
import path from 'node:path';
import { seeded } from '../tests/helpers/random';
import { measure, ratio, show } from './timing';

type Call = (...args: unknown[]) => unknown;
type Cells = unknown[][];

const dist = path.resolve(__dirname, '../dist');

/** The functions of dist/functions.js, run as a page's script runs: in the same realm, without a context between. */
function loadFunctions(): Record<string, Call> {
  const registered: Record<string, Call> = {};
  const shim = {
    associate: (id: string, body: Call) => {
      registered[id] = body;
    },
    Error: class {
      constructor(
        readonly code: string,
        readonly message: string,
      ) {}
    },
    ErrorCode: { invalidValue: '#VALUE!', notAvailable: '#N/A' },
  };
  const code = fs.readFileSync(path.join(dist, 'functions.js'), 'utf8');
  // eslint-disable-next-line @typescript-eslint/no-implied-eval -- our own build output
  (new Function('CustomFunctions', code) as (host: unknown) => void)(shim);
  return registered;
}

const pad = (row: unknown[]): unknown[] => [...row, ...Array<unknown>(8 - row.length).fill(0)];

/** Eight rows as the desktop delivers them: blanks are 0. */
const BEAM: Cells = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 6],
  ['E', 0, 0, 210, 0, 'GPa'],
  ['I', 0, 0, 8360, 0, 'cm4'],
  ['uniform', 0, 6, 12, 0, 'kN/m', 'G'],
  ['point', 2.5, 0, 20, 0, 'kN', 'Q'],
  ['limit', 0, 0, 'span/360', 0, 0, 'G + Q'],
].map(pad);

const TEMPLATE: Cells = [
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 'L'],
  ['E', 0, 0, '210 GPa'],
  ['I', 0, 0, 'Iy', 0, 'cm4'],
  ['uniform', 0, 'L', 'g*b', 0, 'kN/m', 'G'],
  ['uniform', 0, 'L', 'q*b', 0, 'kN/m', 'Q'],
  ['limit', 0, 0, 'span/360', 0, 0, 'Q'],
].map(pad);
const NAMES: Cells = [['L', 'Iy', 'g', 'q', 'b']];

/** A pool of parsed argument lists of one text: a call takes one and changes what makes it new. */
function pool(args: unknown[]): { text: string; next(): unknown[] } {
  const text = JSON.stringify(args);
  const parsed = Array.from({ length: 2048 }, () => JSON.parse(text) as unknown[]);
  let i = 0;
  return { text, next: () => parsed[i++ & 2047]! };
}

const parse = (text: string) => measure(() => (JSON.parse(text) as unknown[]).length);
const one = (result: unknown): number =>
  Array.isArray(result) ? (result as number[][])[0]![0]! : (result as number);

function heap(): number {
  global.gc?.();
  return process.memoryUsage().heapUsed;
}

function speed(functions: Record<string, Call>): void {
  const deflection = functions.DEFLECTION!;
  const maxDeflection = functions.MAXDEFLECTION!;
  const random = seeded(11);
  const xs = Array.from({ length: 4096 }, () => 6 * random());
  let n = 0;

  console.log('functions: a call against JSON.parse of its arguments');
  const warm = pool([BEAM, [[1.25]], null, null, null]);
  const warmParse = parse(warm.text);
  const warmCall = measure(() => {
    const args = warm.next();
    (args[1] as number[][])[0]![0] = xs[n++ & 4095]!;
    return one(deflection(...args));
  });
  show(`JSON.parse of ${warm.text.length} characters`, warmParse);
  show('warm: the same table, another x', warmCall);
  ratio('warm call / JSON.parse', warmCall.median / warmParse.median, { atMost: 1 });

  const member = pool([TEMPLATE, null, NAMES, [[6.125, 8360.5, 3.5, 5.25, 2.75]]]);
  const memberParse = parse(member.text);
  const memberCall = measure(() => {
    const args = member.next();
    (args[3] as number[][])[0]![0] = 4 + 1e-7 * n++;
    return one(maxDeflection(...args));
  });
  show(`JSON.parse of ${member.text.length} characters`, memberParse);
  show('cold member: the same template, new values, largest deflection', memberCall);
  ratio('cold member / JSON.parse', memberCall.median / memberParse.median, { atMost: 8 });

  const cold = pool([BEAM, [[1.25]], null, null, null]);
  const coldCall = measure(() => {
    const args = cold.next();
    (args[0] as Cells)[6]![1] = 1 + 1e-7 * n++; // the position of the point load
    return one(deflection(...args));
  });
  show('cold table: never seen', coldCall);
  ratio('cold table / JSON.parse', coldCall.median / warmParse.median, { atMost: 30 });
}

function volume(functions: Record<string, Call>): void {
  console.log('functions: volume');
  const timed = (name: string, count: number, call: (i: number) => number): void => {
    const before = heap();
    const begun = process.hrtime.bigint();
    let sum = 0;
    for (let i = 0; i < count; i++) sum += call(i);
    const ms = Number(process.hrtime.bigint() - begun) / 1e6;
    if (!Number.isFinite(sum)) throw new Error('a result is not finite');
    const grown = (heap() - before) / 1e6;
    console.log(
      `  ${name.padEnd(64)} ${ms.toFixed(0).padStart(8)} ms, heap ${grown >= 0 ? '+' : ''}${grown.toFixed(1)} MB`,
    );
  };
  const DEFLECTION = functions.DEFLECTION!;
  const MAXDEFLECTION = functions.MAXDEFLECTION!;
  const copy = (cells: Cells): Cells => JSON.parse(JSON.stringify(cells)) as Cells;
  timed('100,000 warm calls', 100_000, (i) =>
    one(DEFLECTION(copy(BEAM), [[(i % 600) / 100]], null, null, null)),
  );
  const member = (i: number): number =>
    one(MAXDEFLECTION(copy(TEMPLATE), null, copy(NAMES), [[4 + 1e-4 * i, 8360, 3.5, 5.25, 2.75]]));
  timed('10,000 distinct members of a template', 10_000, member);
  timed('  the same again', 10_000, member);
  const table = (base: number) => (i: number) => {
    const cells = copy(BEAM);
    cells[6]![1] = 1 + 1e-5 * (base + i);
    return one(DEFLECTION(cells, [[1]], null, null, null));
  };
  timed('20,000 distinct tables', 20_000, table(0));
  timed('  20,000 more: the memo is full and must not grow', 20_000, table(20_000));
}

/** What the bench needs of the built headless spreadsheet. */
interface HeadlessModule {
  evaluateBundle(code: string, metadata: string): unknown;
  createHeadless(bundle: unknown): {
    readonly book: {
      readonly host: { spent: { calls: number; milliseconds: number } };
      open: (snapshot: unknown) => Promise<void>;
    };
    dispose: () => void;
  };
}

async function inHost(): Promise<void> {
  const file = path.join(dist, 'node/headless.js');
  if (!fs.existsSync(file)) throw new Error('dist/node/headless.js is missing: run "npm run build" first.');
  // eslint-disable-next-line @typescript-eslint/no-require-imports -- a built file
  const headless = require(file) as HeadlessModule;
  const bundle = headless.evaluateBundle(
    fs.readFileSync(path.join(dist, 'functions.js'), 'utf8'),
    fs.readFileSync(path.join(dist, 'functions.json'), 'utf8'),
  );
  const count = 10_000;
  const cellData: Record<number, Record<number, { v?: unknown; f?: string }>> = {};
  const put = (row: number, column: number, cell: { v?: unknown; f?: string }): void => {
    (cellData[row] ??= {})[column] = cell;
  };
  [BEAM, TEMPLATE].forEach((cells, block) =>
    cells.forEach((row, r) => row.forEach((v, c) => v !== 0 && put(r, 20 + 10 * block + c, { v }))),
  );
  NAMES[0]!.forEach((v, c) => put(9, 30 + c, { v }));
  for (let r = 0; r < count; r++) {
    put(r, 0, { v: (6 * r) / count });
    put(r, 1, { f: `=SPANROW.DEFLECTION($U$1:$AB$8,A${r + 1})` });
    [4 + r / count, 8360, 3.5, 5.25, 2.75].forEach((v, c) => put(r, 3 + c, { v }));
  }
  const snapshot = (extra: boolean): unknown => {
    const cells = JSON.parse(JSON.stringify(cellData)) as typeof cellData;
    if (extra) {
      for (let r = 0; r < count; r++)
        cells[r]![1] = { f: `=SPANROW.MAXDEFLECTION($AE$1:$AL$8,"G + Q",$AE$10:$AI$10,D${r + 1}:H${r + 1})` };
    }
    const sheet = { id: 's', name: 'S', rowCount: count + 10, columnCount: 60, cellData: cells };
    return {
      id: extra ? 'b' : 'a',
      name: 'bench',
      appVersion: '0',
      locale: 'enUS',
      styles: {},
      sheetOrder: ['s'],
      sheets: { s: sheet },
    };
  };
  console.log('functions: 10,000 formulas in the embedded spreadsheet');
  for (const [name, extra] of [
    ['DEFLECTION at 10,000 positions of one beam', false],
    ['MAXDEFLECTION of 10,000 members of a template', true],
  ] as const) {
    const { book, dispose } = headless.createHeadless(bundle);
    book.host.spent = { calls: 0, milliseconds: 0 };
    const begun = performance.now();
    await book.open(snapshot(extra));
    const whole = performance.now() - begun;
    const { calls, milliseconds } = book.host.spent;
    if (calls < count) throw new Error(`${calls} calls instead of ${count}`);
    console.log(
      `  ${name.padEnd(64)} ${whole.toFixed(0).padStart(8)} ms, ${milliseconds.toFixed(0)} ms of it in ${calls} calls`,
    );
    ratio('time in our functions / time in the host', milliseconds / (whole - milliseconds), {
      atMost: 0.25,
    });
    dispose();
  }
}

export async function bench(): Promise<void> {
  const functions = loadFunctions();
  speed(functions);
  volume(functions);
  await inHost();
}
