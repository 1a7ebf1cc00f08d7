/**
 * The page that a host opens for the functions (taskpane.html): hidden, it registers every function and fetches nothing of
 * the pane; seen, it fetches the pane. The host's own script is stood in for, because it comes from the host's network.
 */
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { describeInBrowser, launchBrowser, serveFolder, type Served } from '../helpers/browser';

/** What the page needs of the host: functions to register with, and the news of the pane being shown. */
const HOST_SCRIPT = `
  window.registered = {};
  window.CustomFunctions = {
    associate: (id, body) => { window.registered[id] = body; },
    Error: class { constructor(code, message) { this.code = code; this.message = message; } },
    ErrorCode: { invalidValue: '#VALUE!', notAvailable: '#N/A' },
  };
`;
const HIDDEN = `Object.defineProperty(Document.prototype, 'visibilityState', { configurable: true, get: () => window.seen ? 'visible' : 'hidden' });`;

describeInBrowser('the page of the shared runtime', () => {
  let browser: Browser;
  let served: Served;
  beforeAll(async () => {
    browser = await launchBrowser();
    served = await serveFolder();
  }, 60_000);
  afterAll(async () => {
    await browser?.close();
    await served?.close();
  });

  async function open(
    hidden: boolean,
  ): Promise<{ context: BrowserContext; page: Page; asked: string[]; faults: string[] }> {
    const context = await browser.newContext({ viewport: { width: 350, height: 800 } });
    const page = await context.newPage();
    const asked: string[] = [];
    const faults: string[] = [];
    await page.route(/^https:\/\//, (route) =>
      route.fulfill({ contentType: 'text/javascript', body: HOST_SCRIPT }),
    );
    page.on('request', (request) => asked.push(new URL(request.url()).pathname.split('/').pop() ?? ''));
    page.on('pageerror', (error) => faults.push(error.message));
    if (hidden) await page.addInitScript(HIDDEN);
    await page.goto(`${served.origin}/taskpane.html`, { waitUntil: 'load' });
    return { context, page, asked, faults };
  }

  it('hidden: computes at once and fetches nothing of the pane; shown: fetches it', async () => {
    const { context, page, asked, faults } = await open(true);
    const deflection = await page.evaluate(() => {
      const { registered } = window as unknown as {
        registered: Record<string, (...args: unknown[]) => number[][]>;
      };
      const beam = [
        ['fixed', 0, null, null],
        ['point', 2, null, 3],
        ['EI', null, null, 1000],
      ];
      return registered.DEFLECTION!(beam, [[2]], null, null, null)[0]![0];
    });
    expect(deflection).toBeCloseTo(0.008, 15); // PL³/3EI
    // long enough for a fetch that should not be there to show itself
    await page.waitForTimeout(500);
    expect(asked).toContain('functions.js');
    expect(asked.filter((file) => /^pane\./.test(file))).toEqual([]);

    await page.evaluate(() => {
      (window as unknown as { seen: boolean }).seen = true;
      document.dispatchEvent(new Event('visibilitychange'));
    });
    await page.waitForFunction(() => document.querySelector('#pane')!.childElementCount > 0);
    expect(asked.filter((file) => /^pane\./.test(file)).sort()).toEqual(['pane.css', 'pane.js']);
    expect(faults).toEqual([]);
    await context.close();
  }, 60_000);

  it('shown without its host: says so in words', async () => {
    const { context, page, faults } = await open(false);
    await page.waitForSelector('#pane [role=alert]');
    expect((await page.textContent('#pane'))!.length).toBeGreaterThan(20);
    expect(faults).toEqual([]);
    await context.close();
  }, 60_000);

  it('a pane that cannot be fetched is said, and can be tried again', async () => {
    const context = await browser.newContext();
    const page = await context.newPage();
    await page.route(/^https:\/\//, (route) =>
      route.fulfill({ contentType: 'text/javascript', body: HOST_SCRIPT }),
    );
    let broken = true;
    await page.route('**/pane.js', (route) => (broken ? route.abort() : route.continue()));
    await page.goto(`${served.origin}/taskpane.html`);
    await page.waitForSelector('#pane [role=alert] button');
    broken = false;
    await page.click('#pane [role=alert] button');
    await page.waitForFunction(() => document.querySelector('#pane button') === null);
    await context.close();
  }, 60_000);
});
