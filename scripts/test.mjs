/**
 * `npm test`: installs what is missing, then types, lint, format, build, and every test.
 *   npm test -- unit functions     only these kinds of test (and no other step than the build)
 * The last line is `N passed, N failed`, over all steps and tests; the exit status is 1 when anything failed.
 */
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const { HOW_TO_GET_CHROMIUM, ensureChromium, ensureInstalled, runTool } = require('./machine.cjs');

const kinds = process.argv.slice(2);
const whole = kinds.length === 0;
const wantsBrowser = whole || kinds.includes('browser');
const count = { passed: 0, failed: 0 };

function step(name, work) {
  const begun = Date.now();
  console.log(`\n== ${name}`);
  const good = work();
  count[good ? 'passed' : 'failed'] += 1;
  console.log(`== ${name}: ${good ? 'passed' : 'FAILED'} in ${((Date.now() - begun) / 1000).toFixed(1)} s`);
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
if (whole) {
  step('types', () => runTool('typescript/bin/tsc', ['--noEmit', '-p', '.']) === 0);
  step('lint', () => runTool('eslint/bin/eslint.js', ['.', '--max-warnings=0']) === 0);
  step('format', () => runTool('prettier/bin/prettier.cjs', ['--check', '--log-level=warn', '.']) === 0);
}
step('build', () => runTool('webpack-cli/bin/cli.js', []) === 0);
console.log('\n== tests');
// a missing browser fails its tests, it does not skip them
tests({ ...(chromium ? { CHROMIUM_PATH: chromium } : {}), SPANROW_NEED_BROWSER: '1' });
if (wantsBrowser && !chromium) console.log(`\n${HOW_TO_GET_CHROMIUM}`);
console.log(`\n${count.passed} passed, ${count.failed} failed`);
process.exit(count.failed === 0 ? 0 : 1);
