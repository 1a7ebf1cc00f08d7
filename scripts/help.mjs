/**
 * `npm run docs`: writes the table of worksheet functions anew into the documents that hold it, between the lines
 * `<!-- functions: begin -->` and `<!-- functions: end -->`, from the comments above the functions. With `--check` it
 * only says whether they are up to date (exit status 1 when not).
 */
import fs from 'node:fs';
import path from 'node:path';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const { readFunctionDocs } = require('./function-docs.cjs');
const { documentsWithTable, withTable } = require('./help-pages.cjs');
const { root } = require('./machine.cjs');

const docs = readFunctionDocs(root);
let stale = 0;
for (const file of documentsWithTable(root)) {
  const text = fs.readFileSync(file, 'utf8');
  const fresh = withTable(text, docs);
  if (fresh === text) continue;
  stale += 1;
  console.log(
    `${path.relative(root, file)}: ${process.argv.includes('--check') ? 'out of date, run npm run docs' : 'written anew'}`,
  );
  if (!process.argv.includes('--check')) fs.writeFileSync(file, fresh);
}
process.exit(process.argv.includes('--check') && stale > 0 ? 1 : 0);
