/**
 * What the commands need to know of the machine they run on. Plain Node without a dependency: on a bare clone nothing
 * is installed yet.
 */
const { spawn, spawnSync } = require('node:child_process');
const fs = require('node:fs');
const path = require('node:path');

const root = path.resolve(__dirname, '..');

/** Runs a command in the repository with its output shown; gives its exit status. */
function run(command, args, options = {}) {
  const result = spawnSync(command, args, {
    cwd: root,
    stdio: 'inherit',
    shell: process.platform === 'win32',
    ...options,
  });
  if (result.error) throw result.error;
  return result.status ?? 1;
}

/** Runs a tool of node_modules by its script, without a shell or npx between. */
function runTool(script, args, options = {}) {
  return run(process.execPath, [path.join(root, 'node_modules', script), ...args], {
    shell: false,
    ...options,
  });
}

/** The same without waiting: resolves to its exit status and everything it said, so that two can run side by side. */
function startTool(script, args) {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [path.join(root, 'node_modules', script), ...args], { cwd: root });
    let said = '';
    for (const stream of [child.stdout, child.stderr]) stream.on('data', (part) => (said += part));
    child.on('error', reject);
    child.on('close', (status) => resolve({ status: status ?? 1, said }));
  });
}

/** Why the installed packages are not those of the lock file, in words; null when they are. */
function installationFault() {
  const installed = readJson('node_modules/.package-lock.json');
  if (!installed) return 'the packages are not installed';
  for (const [place, wanted] of Object.entries(readJson('package-lock.json').packages)) {
    if (place === '' || wanted.optional || wanted.peer) continue;
    const found = installed.packages[place]?.version;
    if (found !== wanted.version)
      return `${place} is ${found ?? 'missing'}, the lock file says ${wanted.version}`;
  }
  return null;
}

/** Installs exactly what the lock file says, when that is not what is there. */
function ensureInstalled() {
  const [major] = process.versions.node.split('.').map(Number);
  if (major < 20) throw new Error(`Node 20 or newer is needed, this is ${process.versions.node}.`);
  const fault = installationFault();
  if (fault === null) return;
  console.log(`Installing packages (${fault}) ...`);
  const status = run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
  if (status !== 0)
    throw new Error(
      'npm ci failed: its own words stand above. Without a package registry nothing can be built.',
    );
}

function readJson(file) {
  try {
    return JSON.parse(fs.readFileSync(path.join(root, file), 'utf8'));
  } catch {
    return null;
  }
}

const BROWSERS = [
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/snap/bin/chromium',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
  'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe',
];

/** Path of a Chromium-based browser: the one CHROMIUM names, else an installed one; null when there is none. */
function findChromium() {
  const named = process.env.CHROMIUM ?? process.env.CHROMIUM_PATH;
  return [named, ...BROWSERS].find((file) => file && fs.existsSync(file)) ?? null;
}

const HOW_TO_GET_CHROMIUM =
  'The browser tests need Chromium. Debian and Ubuntu: apt-get install chromium. Others: install Chromium, Chrome or Edge. ' +
  'When it stands somewhere unusual, set CHROMIUM to its path.';

/**
 * Finds Chromium. A container (root, with apt-get) without one gets Debian's package, because a bare machine should
 * need no second command; anybody else is told how to get it, since a test should not change a person's machine.
 */
function ensureChromium() {
  const found = findChromium();
  const bare = process.platform === 'linux' && process.getuid() === 0 && fs.existsSync('/usr/bin/apt-get');
  if (found || !bare || process.env.SPANROW_NO_INSTALL) return found;
  console.log("No Chromium here: installing Debian's ...");
  const quiet = {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  };
  run('apt-get', ['update', '-qq'], quiet);
  run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], quiet);
  return findChromium();
}

module.exports = {
  HOW_TO_GET_CHROMIUM,
  ensureChromium,
  ensureInstalled,
  findChromium,
  installationFault,
  root,
  run,
  runTool,
  startTool,
};
