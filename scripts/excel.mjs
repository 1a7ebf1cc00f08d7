/**
 * `npm run excel`: builds for https://localhost:3000, serves dist/ there with a local certificate, and opens Excel with
 * the add-in, on Windows and Mac. Ctrl+C stops and takes the add-in out again. Nothing about its use is reported to anyone.
 */
import fs from 'node:fs';
import path from 'node:path';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const { ensureInstalled, root, run, runTool } = require('./machine.cjs');
const { serve } = require('./serve.cjs');
const { LOCAL_ORIGIN } = require('./origin.cjs');

const manifest = path.join(root, 'dist/manifest.xml');

if (process.platform !== 'win32' && process.platform !== 'darwin') {
  console.error(
    'Excel is opened this way on Windows and Mac only. Elsewhere: `npm start` shows the add-in in the workbench; for Excel on the ' +
      'web, build for your own https server (npm run build -- --env origin=https://host/path), serve dist/ there, and upload ' +
      'dist/manifest.xml under Add-ins > More Settings > Upload My Add-in.',
  );
  process.exit(1);
}

ensureInstalled();
if (runTool('webpack-cli/bin/cli.js', ['--env', 'only=addin', '--env', `origin=${LOCAL_ORIGIN}`]) !== 0)
  process.exit(1);

// asks the system once to trust a certificate that is made on this machine and never leaves it
const { getHttpsServerOptions } = require('office-addin-dev-certs');
const { key, cert } = await getHttpsServerOptions();
const server = await serve({ folder: path.join(root, 'dist'), port: 3000, fixed: true, tls: { key, cert } });
console.log(`Serving the add-in at ${server.origin}`);

const debugging = (action) =>
  run('npx', [
    '--yes',
    'office-addin-debugging',
    action,
    manifest,
    ...(action === 'start' ? ['desktop', '--no-debug'] : []),
  ]);
run('npx', ['--yes', 'office-addin-usage-data', 'off']);
if (!fs.existsSync(manifest) || debugging('start') !== 0) {
  await server.close();
  console.error(
    `Excel could not be opened with the add-in. It can be added by hand from ${manifest} while this address is served.`,
  );
  process.exit(1);
}
console.log('Excel is open with Spanrow. Ctrl+C takes it out again.');
process.on('SIGINT', () => {
  debugging('stop');
  void server.close().then(() => process.exit(0));
});
