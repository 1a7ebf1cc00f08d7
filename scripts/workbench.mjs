/** Loads the built headless spreadsheet and the built functions; builds them first when they are not there. */
import { existsSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';

const require = createRequire(import.meta.url);
const { ensureInstalled, root, runTool } = require('./machine.cjs');

/** SPANROW_DIST names another build than the repository's own. */
const DIST = process.env.SPANROW_DIST ?? path.join(root, 'dist');
const HEADLESS = path.join(DIST, 'node/headless.js');
const FUNCTIONS = path.join(DIST, 'functions.js');
const METADATA = path.join(DIST, 'functions.json');

export function loadWorkbench() {
  if (![HEADLESS, FUNCTIONS, METADATA].every((file) => existsSync(file))) {
    ensureInstalled();
    console.error('Building ...');
    const status = runTool('webpack-cli/bin/cli.js', [], { stdio: ['ignore', 2, 2] });
    if (status !== 0) process.exit(2);
  }
  const headless = require(HEADLESS);
  const bundle = headless.evaluateBundle(readFileSync(FUNCTIONS, 'utf8'), readFileSync(METADATA, 'utf8'));
  return { ...headless, bundle };
}

/** Passes long work's progress on to a person, at most four times a second and only to a terminal or a log that can hold it. */
export function progress(words) {
  const started = Date.now();
  let last = started;
  return (done, all) => {
    const now = Date.now();
    if (now - last < 250 || now - started < 1000) return;
    last = now;
    process.stderr.write(`${words} ${done} of about ${all} ...\n`);
  };
}
