/**
 * `npm run pictures`: takes the pictures of the documents anew, from our own screens: the built workbench with the demo workbook, in
 * Chromium. Needs a build.
 */
import fs from 'node:fs';
import path from 'node:path';
import { createRequire } from 'node:module';
import { chromium } from 'playwright-core';

const require = createRequire(import.meta.url);
const { root, findChromium } = require('./machine.cjs');
const { serve } = require('./serve.cjs');

const target = path.join(root, 'docs/pictures');
fs.mkdirSync(target, { recursive: true });

/** name, sheet, selected cell, width and height of the window, colours, part of the page or null for the whole */
const PICTURES = [
  ['canopy', 'Canopy beam', 'E20', 1400, 960, 'light', null],
  ['pane', 'Purlin', 'E19', 1400, 1000, 'light', '#pane'],
  ['schedule', 'Joist schedule', 'M11', 1400, 760, 'light', null],
  ['dark', 'Gallery', 'E22', 1400, 960, 'dark', null],
];

const served = await serve({ folder: process.env.SPANROW_DIST ?? path.join(root, 'dist'), port: 0 });
const browser = await chromium.launch({
  executablePath: findChromium(),
  args: [
    '--headless=new',
    '--no-sandbox',
    '--disable-gpu',
    '--disable-background-networking',
    '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE 127.0.0.1',
  ],
});
try {
  for (const [name, sheet, cell, width, height, colorScheme, part] of PICTURES) {
    const page = await browser.newPage({ viewport: { width, height }, colorScheme });
    await page.goto(`${served.origin}/workbench/`);
    await page.waitForSelector('html[data-ready]', { timeout: 120_000 });
    const grid = page.locator('#grid');
    await grid.getByText(sheet, { exact: true }).last().click();
    await page.waitForTimeout(500);
    const box = grid.locator('input').first();
    await box.click();
    await box.fill(cell);
    await page.keyboard.press('Enter');
    await page.locator('#pane svg').first().waitFor();
    await page.waitForTimeout(1500);
    const file = path.join(target, `${name}.png`);
    await (part ? page.locator(part) : page).screenshot({ path: file });
    console.log(`${path.relative(root, file)}  ${(fs.statSync(file).size / 1024).toFixed(0)} kB`);
    await page.close();
  }
} finally {
  await browser.close();
  await served.close();
}
