/** The rules that keep the layers apart really fire: each wrong line is refused, its right neighbour is not. */
import { execFileSync } from 'node:child_process';
import path from 'node:path';

const root = path.resolve(__dirname, '../..');

interface Case {
  /** an existing file, whose text is replaced */
  readonly file: string;
  readonly text: string;
  /** rule that must refuse it; null when nothing may */
  readonly rule: string | null;
}

const ARROW = 'import-x/no-restricted-paths';
const use = (from: string): string => `import * as used from '${from}';\nexport const kept = used;\n`;

const CASES: Record<string, Case> = {
  'rows may not import integrate': { file: 'src/rows/cell.ts', text: use('../integrate/solve'), rule: ARROW },
  'rows may not import ask': { file: 'src/rows/cell.ts', text: use('../ask/peak'), rule: ARROW },
  'rows may import the model': { file: 'src/rows/cell.ts', text: use('../beam/model'), rule: null },
  'integrate may not import rows': { file: 'src/integrate/solve.ts', text: use('../rows/cell'), rule: ARROW },
  'integrate may not import ask': { file: 'src/integrate/solve.ts', text: use('../ask/peak'), rule: ARROW },
  'beam may not import rows': { file: 'src/beam/model.ts', text: use('../rows/cell'), rule: ARROW },
  'ask may import integrate': { file: 'src/ask/peak.ts', text: use('../integrate/solve'), rule: null },
  'ask may not come in by the front door': { file: 'src/ask/peak.ts', text: use('../index'), rule: ARROW },
  'the engine may not import functions': {
    file: 'src/ask/peak.ts',
    text: use('../../functions/host'),
    rule: ARROW,
  },
  'functions may not pass the door by': {
    file: 'functions/values.ts',
    text: use('../src/open'),
    rule: ARROW,
  },
  'functions may use the door': { file: 'functions/values.ts', text: use('../src/index'), rule: null },
  'the pane may not pass the door by': {
    file: 'taskpane/load.ts',
    text: use('../src/solution'),
    rule: ARROW,
  },
  'the pane may not import functions': {
    file: 'taskpane/load.ts',
    text: use('../functions/host'),
    rule: ARROW,
  },
  'the engine reads no clock': {
    file: 'src/ask/peak.ts',
    text: 'export const now = Date.now();\n',
    rule: 'no-restricted-globals',
  },
  'the engine throws no dice': {
    file: 'src/ask/peak.ts',
    text: 'export const dice = Math.random();\n',
    rule: 'no-restricted-properties',
  },
  'the engine sees no page': {
    file: 'src/ask/peak.ts',
    text: 'export const page = document.title;\n',
    rule: 'no-restricted-globals',
  },
  'the pane may see the page': {
    file: 'taskpane/load.ts',
    text: 'export const page = document.title;\n',
    rule: null,
  },
  'a proxy of the host is loaded before it is read': {
    file: 'taskpane/load.ts',
    text: 'export async function read(): Promise<void> {\n  await Excel.run(async (context) => {\n    const range = context.workbook.getSelectedRange();\n    await context.sync();\n    console.log(range.address);\n  });\n}\n',
    rule: 'office-addins/load-object-before-read',
  },
};

/** One process lints all texts: loading the linter costs more than linting. */
const SCRIPT = `
const { ESLint } = require('eslint');
const cases = JSON.parse(require('fs').readFileSync(0, 'utf8'));
const eslint = new ESLint({ cwd: process.cwd() });
(async () => {
  const found = [];
  for (const { file, text } of cases) {
    const [result] = await eslint.lintText(text, { filePath: file });
    found.push(result.messages.map((message) => message.ruleId ?? message.message));
  }
  console.log(JSON.stringify(found));
})();
`;

let found: string[][] = [];
beforeAll(() => {
  const output = execFileSync(process.execPath, ['-e', SCRIPT], {
    cwd: root,
    input: JSON.stringify(Object.values(CASES)),
    encoding: 'utf8',
  });
  found = JSON.parse(output) as string[][];
}, 120_000);

it.each(Object.keys(CASES))('%s', (name) => {
  const rules = found[Object.keys(CASES).indexOf(name)]!;
  const { rule } = CASES[name]!;
  if (rule === null) expect(rules).toEqual([]);
  else expect(rules).toContain(rule);
});
