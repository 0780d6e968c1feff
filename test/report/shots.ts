import {mkdirSync, writeFileSync} from 'node:fs';
import {resolve} from 'node:path';
import type {Browser} from 'playwright-core';
import {afterAll, beforeAll, test} from 'vitest';
import {renderReport} from '../../src/report/report.ts';
import {openBrowser} from './browser.ts';
import {
  DAY_WITH_JUMP,
  FLOAT_MINUTES,
  HEIGHT_BLUNDER,
  type SampleSpec,
  STILL_HOUR,
  sample,
} from './fixtures.ts';

/*
 * Pictures of the report for the eye: four sample occupations on a desktop, in the dark, on a phone
 * and on A4, into shots/ beside package.json.
 *
 * Run with: npx vitest run --config test/report/shots.config.ts
 */

const SHOTS = resolve(import.meta.dirname, '../../shots');

const SAMPLES: Readonly<Record<string, SampleSpec>> = {
  'still-hour': STILL_HOUR,
  'day-with-jump': DAY_WITH_JUMP,
  'float-minutes': FLOAT_MINUTES,
  'height-blunder': HEIGHT_BLUNDER,
};

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
  mkdirSync(SHOTS, {recursive: true});
});
afterAll(() => browser.close());

test.each(Object.entries(SAMPLES))('%s', async (name, spec) => {
  const {result, series} = sample(spec);
  const html = await renderReport(result, series);
  const path = `${SHOTS}/${name}.html`;
  writeFileSync(path, html);
  const looks = {
    desktop: {viewport: {width: 1280, height: 900}},
    dark: {viewport: {width: 1280, height: 900}, colorScheme: 'dark'},
    phone: {viewport: {width: 390, height: 844}, deviceScaleFactor: 2},
  } as const;
  for (const [look, options] of Object.entries(looks)) {
    const context = await browser.newContext(options);
    const page = await context.newPage();
    await page.goto(`file://${path}`);
    await page.screenshot({path: `${SHOTS}/${name}-${look}.png`, fullPage: true});
    await context.close();
  }
  const page = await browser.newPage();
  await page.goto(`file://${path}`);
  await page.pdf({
    path: `${SHOTS}/${name}-a4.pdf`,
    format: 'A4',
    preferCSSPageSize: false,
    displayHeaderFooter: false,
  });
  await page.close();
});
