/** functions.js as a file: what it needs, what it weighs, what language it is in. */
import vm from 'node:vm';
import zlib from 'node:zlib';
import { parse } from 'acorn';
import { BUNDLE, loadBundle } from './host';

it('is ES2020: hosts of three years ago run it', () => {
  expect(() => parse(BUNDLE, { ecmaVersion: 2020, sourceType: 'script' })).not.toThrow();
  // the check can fail
  expect(() => parse('class A { static {} }', { ecmaVersion: 2020 })).toThrow();
});

it('runs where there is nothing but CustomFunctions: no page, no timer, no network', () => {
  expect(loadBundle().size).toBe(21);
});

it('holds no eval and makes no function from text, so a strict content policy holds', () => {
  const context = { CustomFunctions: { associate: () => undefined, Error: class {}, ErrorCode: {} } };
  const strict = vm.createContext(context, { codeGeneration: { strings: false, wasm: false } });
  expect(() => vm.runInContext(BUNDLE, strict)).not.toThrow();
  expect(BUNDLE).not.toMatch(/\beval\(|new Function\(/);
});

it('weighs at most 130 kB gzip', () => {
  expect(zlib.gzipSync(BUNDLE, { level: 9 }).length).toBeLessThanOrEqual(130_000);
});
