/**
 * `npm test`: installs what is missing, then types, lint, format, build, and every test.
 *   npm test -- unit functions     only these kinds of test, after a build if they need one
 * The last line is `N passed, N failed`, over all steps and tests; the exit status is 1 when anything failed.
 */
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const { HOW_TO_GET_CHROMIUM, ensureChromium, ensureInstalled, runTool, startTool } = require('./machine.cjs');

const kinds = process.argv.slice(2);
const whole = kinds.length === 0;
const wantsBrowser = whole || kinds.includes('browser');
/** These kinds look at dist/; the others run from the source. */
const wantsBuild = whole || kinds.some((kind) => ['functions', 'workbench', 'browser'].includes(kind));
const count = { passed: 0, failed: 0 };

/** One step of the checks: its words are shown when it is done, since two steps run side by side. */
async function step(name, tool, args = []) {
  const begun = Date.now();
  const { status, said } = await startTool(tool, args);
  const good = status === 0;
  count[good ? 'passed' : 'failed'] += 1;
  const words = said.trim() === '' ? '' : `${said.trimEnd()}\n`;
  const seconds = ((Date.now() - begun) / 1000).toFixed(1);
  console.log(`\n${words}== ${name}: ${good ? 'passed' : 'FAILED'} in ${seconds} s`);
}

async function sourceChecks() {
  await step('types', 'typescript/bin/tsc', ['--noEmit', '-p', '.']);
  await step('lint', 'eslint/bin/eslint.js', ['.', '--max-warnings=0']);
  await step('format', 'prettier/bin/prettier.cjs', ['--check', '--log-level=warn', '.']);
}

function tests(env) {
  const report = path.join(os.tmpdir(), `spanrow-tests-${process.pid}.json`);
  const select = whole ? [] : ['--selectProjects', ...kinds];
  const status = runTool(
    'jest/bin/jest.js',
    ['--json', `--outputFile=${report}`, '--maxWorkers=2', ...select],
    {
      env: { ...process.env, ...env },
      // the report goes into the file; what people read comes on the error stream
      stdio: ['ignore', 'ignore', 'inherit'],
    },
  );
  if (!fs.existsSync(report)) {
    count.failed += 1; // the runner itself fell over
    return;
  }
  const result = JSON.parse(fs.readFileSync(report, 'utf8'));
  fs.rmSync(report);
  count.passed += result.numPassedTests;
  // a file that does not even load holds no failed test, but it is a failure
  const broken = result.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  );
  count.failed += result.numFailedTests + broken.length;
  if (status !== 0 && result.numFailedTests + broken.length === 0) count.failed += 1;
  const skipped = result.numPendingTests + result.numTodoTests;
  if (skipped > 0) console.log(`${skipped} tests were skipped: their own names say why.`);
}

ensureInstalled();
const chromium = wantsBrowser ? ensureChromium() : null;
await Promise.all([wantsBuild && step('build', 'webpack-cli/bin/cli.js'), whole && sourceChecks()]);
console.log('\n== tests');
// a missing browser fails its tests, it does not skip them
tests({ ...(chromium ? { CHROMIUM_PATH: chromium } : {}), SPANROW_NEED_BROWSER: '1' });
if (wantsBrowser && !chromium) console.log(`\n${HOW_TO_GET_CHROMIUM}`);
console.log(`\n${count.passed} passed, ${count.failed} failed`);
process.exit(count.failed === 0 ? 0 : 1);
