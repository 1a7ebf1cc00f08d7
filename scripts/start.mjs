/**
 * `npm start`: installs what is missing, builds, and serves the workbench, so that the add-in can be used without Excel.
 *   npm start -- --port=8100     another port than 8080 (a port in use moves on to the next free one)
 *   npm start -- --no-build      serve dist/ as it is
 */
import path from 'node:path';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const { ensureInstalled, root, runTool } = require('./machine.cjs');
const { serve } = require('./serve.cjs');

const option = (name) => process.argv.find((one) => one.startsWith(`--${name}=`))?.split('=')[1];

ensureInstalled();
if (!process.argv.includes('--no-build')) {
  console.log('Building ...');
  const status = runTool('webpack-cli/bin/cli.js', []);
  if (status !== 0) process.exit(status);
}
const { origin } = await serve({
  folder: path.join(root, 'dist'),
  port: Number(option('port') ?? 8080),
  front: '/workbench/',
});
console.log(
  `\nThe workbench with its demo workbook: ${origin}/workbench/\nHelp pages: ${origin}/help/\nStop with Ctrl+C.`,
);
