/**
 * The workbench in a real browser: the demo opens, formulas are typed and computed, errors have words, files are saved and opened again,
 * and nothing leaves the machine.
 */
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import {
  describeInBrowser,
  launchBrowser,
  openWatched,
  serveFolder,
  type Served,
  type Watched,
} from '../helpers/browser';

jest.setTimeout(180_000);

describeInBrowser('workbench', () => {
  let browser: Browser;
  let served: Served;
  let watched: Watched;
  let page: Page;
  let folder: string;

  beforeAll(async () => {
    folder = mkdtempSync(path.join(tmpdir(), 'spanrow-'));
    [browser, served] = await Promise.all([launchBrowser(), serveFolder()]);
    watched = await openWatched(browser, `${served.origin}/workbench/index.html`, { colorScheme: 'dark' });
    page = watched.page;
    await page.waitForSelector('html[data-ready]', { timeout: 120_000 });
  });
  afterAll(async () => {
    await watched?.close();
    await browser?.close();
    await served?.close();
    rmSync(folder, { recursive: true, force: true });
  });
  /** Tests share one page, as a person does; after each the console is still clean and nothing has left the machine. */
  afterEach(() => {
    const { complaints, outside, failures } = watched;
    expect({ complaints, outside, failures }).toEqual({ complaints: [], outside: [], failures: [] });
  });

  /** Goes to a cell of the open sheet by the name box, as a person who knows its address does. */
  async function goTo(address: string): Promise<void> {
    const box = page.locator('#grid input').first();
    await box.click();
    await box.fill(address);
    await box.press('Enter');
    await page.waitForFunction(
      (wanted) => document.querySelector('#foot .cell b')?.textContent === wanted,
      address,
    );
  }

  async function openSheet(name: string): Promise<void> {
    await page.locator('#grid').getByText(name, { exact: true }).last().click();
    await page.waitForTimeout(300);
  }

  async function type(address: string, text: string): Promise<void> {
    await goTo(address);
    await page.keyboard.type(text, { delay: 2 });
    await page.waitForTimeout(200);
    await page.keyboard.press('Enter');
  }

  /** What the status line says of a cell, once it says what is expected. */
  async function expectStatus(address: string, pattern: RegExp): Promise<string> {
    await goTo(address);
    let text = '';
    for (let tries = 0; tries < 100; tries++) {
      text = ((await page.locator('#foot .cell').textContent()) ?? '').slice(address.length);
      if (pattern.test(text)) return text;
      await page.waitForTimeout(100);
    }
    throw new Error(`${address}: expected ${String(pattern)}, the status line says "${text}"`);
  }

  /** Rests the pointer on a place of the grid, coming from elsewhere. */
  async function hover(x: number, y: number): Promise<void> {
    const grid = (await page.locator('#grid').boundingBox())!;
    await page.mouse.move(grid.x + 200, grid.y + 700);
    await page.mouse.move(grid.x + x, grid.y + y, { steps: 5 });
  }

  async function save(): Promise<string> {
    const [download] = await Promise.all([page.waitForEvent('download'), page.click('#save')]);
    const file = path.join(folder, `${Date.now()}-${download.suggestedFilename()}`);
    await download.saveAs(file);
    return file;
  }

  test('the demo opens computed; a typed formula gives its value; a changed load changes it', async () => {
    await openSheet('Canopy beam');
    const there = await expectStatus('E20', /^19\.38957/);
    await type('K20', '=SPANROW.DEFLECTION(B6:I17,3.6,"G + S")');
    expect(await expectStatus('K20', /^\d/)).toBe(there);
    await type('E14', '12');
    // 6 kN/m more on a simple span: w x (L^3 - 2 L x^2 + x^3) / (24 E I), the handbook's line for it
    const more = ((6 * 3.6 * (9 ** 3 - 2 * 9 * 3.6 ** 2 + 3.6 ** 3)) / (24 * 210e6 * 23130e-8)) * 1000;
    const after = Number(await expectStatus('K20', /^29\./));
    expect(Math.abs(after - Number(there) - more)).toBeLessThan(1e-9);
    await expectStatus('E20', /^29\./);
    expect(await page.locator('#bar h1').textContent()).toMatch(/\(changed\)/);
    await type('E14', '6');
    await expectStatus('E20', /^19\.38957/);
  });

  test('a row that is not understood gives an error with a sentence, below and on hover', async () => {
    await openSheet('Canopy beam');
    await type('B8', 'pinn');
    const words = await expectStatus('E20', /pinn/);
    expect(words).toMatch(/row 3/i); // third row of the beam's range
    expect(words).toMatch(/Did you mean pin\?/);
    await hover(450, 492); // over E20
    await page
      .getByText(/pinn.*Did you mean pin/)
      .last()
      .waitFor({ timeout: 10_000 });
    await type('B8', 'pin');
    await expectStatus('E20', /^19\.38957/);
  });

  test('typing the name of a function offers it with our words', async () => {
    await openSheet('Read me');
    await goTo('F20');
    await page.keyboard.type('=SPANROW.DEFL', { delay: 20 });
    await page.getByText('SPANROW.DEFLECTION').first().waitFor();
    await page
      .getByText(/Deflection of a beam at x/)
      .first()
      .waitFor();
    await page.keyboard.press('Escape');
    await page.keyboard.press('Escape');
  });

  test('a schedule is filled down from one row', async () => {
    await openSheet('Joist schedule');
    const third = await expectStatus('M10', /^8\.7/);
    await type('S8', '=SPANROW.MAXDEFLECTION(JoistRows,"G + Q",$E$7:$L$7,$E8:$L8)');
    await expectStatus('S8', /^6\.09/);
    const box = page.locator('#grid input').first();
    await box.click();
    await box.fill('S8:S67');
    await box.press('Enter');
    await page.keyboard.press('Control+d');
    expect(await expectStatus('S10', /^\d/)).toBe(third);
    expect(await expectStatus('S67', /^\d/)).toBe(await expectStatus('M67', /^\d/));
  });

  test('selecting a result shows its beam in the pane', async () => {
    await openSheet('Gallery');
    await goTo('E22');
    await page.locator('#pane svg').first().waitFor();
    await page.locator('#pane').getByText('B6:I19').first().waitFor();
    await openSheet('Joist schedule');
    await goTo('M9');
    await page
      .locator('#pane')
      .getByText(/B6:I16/)
      .first()
      .waitFor();
  });

  test('saved, changed and opened again, the workbook is what it was', async () => {
    await openSheet('Canopy beam');
    const value = await expectStatus('E20', /^19\.38957/);
    const file = await save();
    expect(readFileSync(file).subarray(0, 2).toString()).toBe('PK');
    await type('E14', '12');
    await expectStatus('E20', /^29\./);
    await page.locator('input[type=file]').setInputFiles(file);
    await page.waitForFunction(() => !document.querySelector('#bar h1')?.textContent?.includes('(changed)'));
    await openSheet('Canopy beam');
    expect(await expectStatus('E20', /^19\./)).toBe(value);
    expect(await page.locator('#notice').isHidden()).toBe(true); // nothing was lost, so nothing is said
  });

  test('in the workbook that was opened, errors have their words on hover too', async () => {
    await openSheet('Canopy beam');
    await type('B9', 'pinn');
    await expectStatus('E20', /Row 4/);
    await hover(450, 492);
    await page
      .getByText(/pinn.*Did you mean pin/)
      .last()
      .waitFor({ timeout: 10_000 });
    await type('B9', 'pin');
    await expectStatus('E20', /^19\./);
  });

  test('a file that is no workbook is refused in words and the open one stays', async () => {
    await page.locator('input[type=file]').setInputFiles({
      name: 'letter.xlsx',
      mimeType: 'application/octet-stream',
      buffer: Buffer.from('Dear reader'),
    });
    await page.getByText(/letter\.xlsx was not opened: it is not an \.xlsx file/).waitFor();
    expect(await page.locator('#bar h1').textContent()).toMatch(/covered-market\.xlsx/);
    await page.locator('#notice button').click();
    expect(await page.locator('#notice').isHidden()).toBe(true);
  });

  test('blank cells as on the web give the same values as on the desktop', async () => {
    await openSheet('Canopy beam');
    const value = await expectStatus('E20', /^19\./);
    await page.selectOption('#blank-cells', 'empty');
    await page.waitForFunction(() =>
      /SPANROW calls/.test(document.querySelector('#foot .spent')?.textContent ?? ''),
    );
    expect(await expectStatus('E20', /^19\./)).toBe(value);
  });

  test('the toolbar and the divider are reached and worked by keyboard alone', async () => {
    const reached: string[] = [];
    await page.focus('#open');
    for (let step = 0; step < 4; step++) {
      reached.push(await page.evaluate(() => document.activeElement?.id ?? ''));
      await page.keyboard.press('Tab');
    }
    expect(reached).toEqual(['open', 'save', 'blank-cells', 'colours']);
    await page.focus('#divider');
    const width = () =>
      page.locator('#pane').evaluate((pane) => Math.round(pane.getBoundingClientRect().width));
    expect(await width()).toBe(400);
    await page.keyboard.press('ArrowLeft');
    expect(await width()).toBe(420);
    await page.keyboard.press('End');
    expect(await width()).toBe(320);
    await page.keyboard.press('Home');
    expect(await width()).toBe(600);
    expect(await page.getAttribute('#divider', 'aria-valuenow')).toBe('600');
    await page.keyboard.press('F6'); // from the divider to the next region and around
    await page.keyboard.press('F6');
    expect(await page.evaluate(() => document.activeElement?.closest('#bar, #grid, #pane')?.id)).toBeTruthy();
  });

  test('light and dark: as the system asks, and as switched', async () => {
    await page.selectOption('#colours', 'system');
    const dark = () => page.evaluate(() => document.documentElement.dataset.theme);
    expect(await dark()).toBe('dark');
    await page.selectOption('#colours', 'light');
    expect(await dark()).toBe('light');
    await page.selectOption('#colours', 'system');
    expect(await dark()).toBe('dark');
    await page.emulateMedia({ colorScheme: 'light' });
    await page.waitForFunction(() => document.documentElement.dataset.theme === 'light');
  });
});
