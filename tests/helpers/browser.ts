/**
 * Browser tests: find Chromium, serve a folder on the loopback address, open a page and record what it must not do.
 *
 * A machine without Chromium skips these tests and says so; with SPANROW_NEED_BROWSER=1 (the project's own checks) a missing
 * browser is a failure instead.
 */
import { createServer, type Server } from 'node:http';
import { existsSync, promises as fs } from 'node:fs';
import type { AddressInfo } from 'node:net';
import path from 'node:path';
import { chromium, type Browser, type BrowserContextOptions, type Page } from 'playwright-core';

/** The folder that `npm run build` writes. */
export const DIST = process.env.SPANROW_DIST ?? path.resolve(__dirname, '../../dist');

const CANDIDATES = [
  process.env.CHROMIUM ?? process.env.CHROMIUM_PATH ?? '',
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/snap/bin/chromium',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
  'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe',
];

/** Path of a Chromium-based browser, or null. */
export function findBrowser(): string | null {
  for (const candidate of CANDIDATES) if (candidate !== '' && existsSync(candidate)) return candidate;
  try {
    const own = chromium.executablePath(); // playwright's own download, if somebody fetched it
    if (existsSync(own)) return own;
  } catch {
    // playwright has no download for this platform
  }
  return null;
}

/** `describe`, or `describe.skip` (named so) where there is no browser. */
export function describeInBrowser(name: string, body: () => void): void {
  if (findBrowser() !== null || process.env.SPANROW_NEED_BROWSER === '1') describe(name, body);
  else describe.skip(`${name} (skipped: no Chromium on this machine)`, body);
}

/** Starts Chromium so that neither the page nor the browser itself can reach anything but this machine. */
export async function launchBrowser(): Promise<Browser> {
  const executablePath = findBrowser();
  if (executablePath === null) throw new Error('No Chromium found: set CHROMIUM to the browser to use.');
  return chromium.launch({
    executablePath,
    headless: true,
    args: [
      '--headless=new',
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE 127.0.0.1',
    ],
  });
}

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.xml': 'application/xml; charset=utf-8',
  '.xlsx': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
};

export interface Served {
  readonly origin: string;
  close(): Promise<void>;
}

/** Serves a folder read-only on 127.0.0.1 at a free port. Query strings are ignored; nothing outside the folder is reachable. */
export async function serveFolder(root: string = DIST): Promise<Served> {
  const server: Server = createServer((request, response) => {
    const name = decodeURIComponent((request.url ?? '/').split('?')[0] ?? '/');
    const file = path.join(root, path.normalize(name.endsWith('/') ? `${name}index.html` : name));
    if (!file.startsWith(path.resolve(root))) {
      response.writeHead(403).end();
      return;
    }
    fs.readFile(file).then(
      (bytes) => {
        response.writeHead(200, {
          'content-type': TYPES[path.extname(file)] ?? 'application/octet-stream',
          'cache-control': 'no-store',
        });
        response.end(bytes);
      },
      () => response.writeHead(404).end(),
    );
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    origin: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    close: () =>
      new Promise((resolve) => {
        server.closeAllConnections();
        server.close(() => resolve());
      }),
  };
}

export interface Watched {
  readonly page: Page;
  /** warnings, errors and uncaught exceptions of the page, in order */
  readonly complaints: readonly string[];
  /** addresses asked for that are not of the served origin (data: and blob: are in the page already) */
  readonly outside: readonly string[];
  /** answers of 400 and above */
  readonly failures: readonly string[];
  close(): Promise<void>;
}

/** Opens an address in a fresh context and keeps the record that tests assert on: a clean console and no request that leaves. */
export async function openWatched(
  browser: Browser,
  address: string,
  options: BrowserContextOptions = {},
): Promise<Watched> {
  const context = await browser.newContext({
    viewport: { width: 1400, height: 900 },
    acceptDownloads: true,
    ...options,
  });
  const page = await context.newPage();
  const complaints: string[] = [];
  const outside: string[] = [];
  const failures: string[] = [];
  const { origin } = new URL(address);
  page.on('console', (message) => {
    if (['warning', 'error', 'assert'].includes(message.type()))
      complaints.push(`${message.type()}: ${message.text()}`);
  });
  page.on('pageerror', (error) => complaints.push(`uncaught: ${error.message}`));
  context.on('request', (request) => {
    const url = request.url();
    if (!url.startsWith(`${origin}/`) && !/^(data|blob):/.test(url)) outside.push(url);
  });
  page.on('response', (response) => {
    if (response.status() >= 400) failures.push(`${response.status()} ${response.url()}`);
  });
  await page.goto(address);
  return { page, complaints, outside, failures, close: () => context.close() };
}
