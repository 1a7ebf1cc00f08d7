/**
 * `npm run bench [-- name]`: every bench of this folder, or those whose name holds the word. Needs a build.
 * Ratios are taken inside one run, so they mean the same on a slow machine; absolute times do not.
 */
const fs = require('node:fs');
const os = require('node:os');
const path = require('node:path');
const { spawnSync } = require('node:child_process');
const { transformSync } = require('@swc/core');

// the benches are TypeScript like everything they measure
require.extensions['.ts'] = (module, file) => {
  const { code } = transformSync(fs.readFileSync(file, 'utf8'), {
    filename: file,
    swcrc: false,
    sourceMaps: 'inline',
    jsc: {
      parser: { syntax: 'typescript' },
      target: 'es2020',
      assumptions: { setPublicClassFields: true },
    },
    module: { type: 'commonjs' },
  });
  module._compile(code, file);
};

async function main() {
  const words = process.argv.slice(2);
  const files = fs
    .readdirSync(__dirname)
    .filter(
      (file) =>
        file.endsWith('.bench.ts') && (words.length === 0 || words.some((word) => file.includes(word))),
    );
  console.log(
    `Node ${process.versions.node}, ${os.cpus().length} x ${os.cpus()[0].model.trim()}, load ${os.loadavg()[0].toFixed(1)}`,
  );
  if (files.length > 1) {
    // each in a process of its own: what one bench teaches the compiler must not slow or speed the next
    let status = 0;
    for (const file of files) {
      status ||=
        spawnSync(process.execPath, [...process.execArgv, __filename, file], { stdio: 'inherit' }).status ??
        1;
    }
    process.exit(status);
  }
  for (const file of files) await require(path.join(__dirname, file)).bench();
  process.exit(0);
}

main().catch((fault) => {
  console.error(fault);
  process.exit(1);
});
