/**
 * Browser tests: find Chromium, serve a folder on the loopback address, open a page and record what it must not do.
 *
 * A machine without Chromium skips these tests and says so; with SPANROW_NEED_BROWSER=1 (the project's own checks) a missing
 * browser is a failure instead.
 */
import path from 'node:path';
import { chromium, type Browser, type BrowserContextOptions, type Page } from 'playwright-core';
import { findChromium, HOW_TO_GET_CHROMIUM } from '../../scripts/machine.cjs';
import { serve, type Served } from '../../scripts/serve.cjs';

export type { Served };

/** The folder that `npm run build` writes. */
export const DIST = process.env.SPANROW_DIST ?? path.resolve(__dirname, '../../dist');

/** `describe`, or `describe.skip` (named so) where there is no browser. */
export function describeInBrowser(name: string, body: () => void): void {
  if (findChromium() !== null || process.env.SPANROW_NEED_BROWSER === '1') describe(name, body);
  else describe.skip(`${name} (skipped: no Chromium on this machine)`, body);
}

/** Starts Chromium so that neither the page nor the browser itself can reach anything but this machine. */
export async function launchBrowser(): Promise<Browser> {
  const executablePath = findChromium();
  if (executablePath === null) throw new Error(HOW_TO_GET_CHROMIUM);
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

/** Serves a folder on 127.0.0.1 at a free port, as `npm start` does. */
export function serveFolder(root: string = DIST): Promise<Served> {
  return serve({ folder: root });
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
