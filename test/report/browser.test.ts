import {spawnSync} from 'node:child_process';
import {mkdtempSync, readFileSync, rmSync, writeFileSync} from 'node:fs';
import {createServer, type Server} from 'node:http';
import {createRequire} from 'node:module';
import type {AddressInfo} from 'node:net';
import {tmpdir} from 'node:os';
import {join} from 'node:path';
import type {Browser, BrowserContextOptions, Locator, Page} from 'playwright-core';
import {afterAll, beforeAll, describe, expect, test} from 'vitest';
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
import {
  AXE_VIOLATIONS,
  CAUTIONS_BOTTOM,
  FOCUS_TOP,
  HEADING_LEVELS,
  IDS,
  type Ids,
  PICTURES,
  type PictureFacts,
  SIDEWAYS,
  TEXT_PLACES,
  TEXT_SIZES,
  type TextPlaces,
  VERDICT_BOTTOM,
  VERDICT_EDGE,
} from './in-page.ts';

/* What only a browser can tell: the bars of the report, in Chromium. */

const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
const CSP = "default-src 'none'; style-src 'unsafe-inline'; img-src data:";

const SAMPLES: Readonly<Record<string, SampleSpec>> = {
  'still-hour': STILL_HOUR,
  'day-with-jump': DAY_WITH_JUMP,
  'float-minutes': FLOAT_MINUTES,
  'height-blunder': HEIGHT_BLUNDER,
};

const LOOKS: Readonly<Record<string, BrowserContextOptions>> = {
  desktop: {viewport: {width: 1280, height: 720}},
  dark: {viewport: {width: 1280, height: 720}, colorScheme: 'dark'},
  phone: {viewport: {width: 390, height: 844}},
};

let browser: Browser;
let server: Server;
let folder = '';
const html: Record<string, string> = {};

beforeAll(async () => {
  browser = await openBrowser();
  folder = mkdtempSync(join(tmpdir(), 'stillmark-report-'));
  for (const [name, spec] of Object.entries(SAMPLES)) {
    const {result, series} = sample(spec);
    html[name] = await renderReport(result, series);
    writeFileSync(join(folder, `${name}.html`), html[name]);
  }
  server = createServer((request, response) => {
    const page = html[request.url?.slice(1) ?? ''];
    response.writeHead(page === undefined ? 404 : 200, {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy': CSP,
    });
    response.end(page ?? '');
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
});

afterAll(async () => {
  await browser?.close();
  await new Promise((resolve) => server.close(resolve));
  rmSync(folder, {recursive: true, force: true});
});

interface Opened {
  readonly page: Page;
  readonly requests: string[];
  readonly complaints: string[];
}

/** Opens a sample, uses the page, and closes it. */
async function opened<T>(
  name: string,
  options: BrowserContextOptions,
  use: (opened: Opened) => Promise<T>,
  from: 'file' | 'server' = 'file',
): Promise<T> {
  const context = await browser.newContext(options);
  const page = await context.newPage();
  const requests: string[] = [];
  const complaints: string[] = [];
  page.on('request', (request) => requests.push(request.url()));
  page.on('console', (message) => complaints.push(message.text()));
  page.on('pageerror', (error) => complaints.push(String(error)));
  const {port} = server.address() as AddressInfo;
  await page.goto(
    from === 'file' ? `file://${folder}/${name}.html` : `http://127.0.0.1:${port}/${name}`,
  );
  const used = await use({page, requests, complaints});
  await context.close();
  return used;
}

/** What a reader sees, hidden text left out. */
function shownText(locator: Locator): Promise<string> {
  // biome-ignore lint/performance/useDomNodeTextContent: hidden text is not what a reader sees
  return locator.innerText();
}

const names = Object.keys(SAMPLES);
const everyLook = names.flatMap((name) => Object.keys(LOOKS).map((look) => [name, look] as const));

describe('the page in a browser', () => {
  test.each(everyLook)('%s on %s asks for nothing and complains of nothing', async (name, look) => {
    const {requests, complaints} = await opened(name, LOOKS[look]!, async (o) => o);
    expect(requests).toEqual([`file://${folder}/${name}.html`]);
    expect(complaints).toEqual([]);
  });

  test('it opens styled under its policy as a header', async () => {
    await opened(
      'still-hour',
      LOOKS.desktop!,
      async ({page, requests, complaints}) => {
        const edge = await page.evaluate(VERDICT_EDGE);
        expect(edge).toBe('6px');
        // The browser itself asks a server for its icon, which the policy refuses without a request.
        expect(requests.filter((url) => !url.endsWith('/favicon.ico'))).toHaveLength(1);
        expect(complaints.filter((text) => !text.includes('favicon'))).toEqual([]);
      },
      'server',
    );
  });

  test('without JavaScript the text is the same and the read-out, the large figure and saving work', async () => {
    const withScript = await opened('still-hour', LOOKS.desktop!, ({page}) =>
      shownText(page.locator('body')),
    );
    await opened('still-hour', {...LOOKS.desktop!, javaScriptEnabled: false}, async ({page}) => {
      expect(await shownText(page.locator('body'))).toBe(withScript);
      const strip = page.locator('.readout i').nth(40);
      await strip.scrollIntoViewIfNeeded();
      expect(await strip.locator('b').isVisible()).toBe(false);
      await strip.hover();
      expect(await strip.locator('b').isVisible()).toBe(true);
      expect(await shownText(strip)).toMatch(/^\d\d:\d\d(:\d\d)? east .*\sepochs?$/);
      const plot = page.locator('#large-time');
      await page.locator('#figure-time .enlarge').click();
      const box = await plot.boundingBox();
      expect(box?.width).toBeGreaterThan(1200);
      await plot.locator('.close').click();
      expect((await plot.boundingBox())?.width).toBeLessThan(720);
      const [download] = await Promise.all([
        page.waitForEvent('download'),
        page.locator('.save').click(),
      ]);
      expect(download.suggestedFilename()).toBe('skerry-4-result.json');
      const saved = JSON.parse(readFileSync(await download.path(), 'utf8'));
      expect(saved).toEqual(JSON.parse(JSON.stringify(sample(STILL_HOUR).result)));
    });
  });

  test.each(everyLook)('%s on %s has no violation that axe knows', async (name, look) => {
    const violations = await opened(name, LOOKS[look]!, async ({page}) => {
      // Evaluated by the debugger, not by the page: its policy allows no script.
      await page.evaluate(AXE);
      return page.evaluate<string[]>(AXE_VIOLATIONS);
    });
    expect(violations).toEqual([]);
  });

  test.each([1280, 700, 390, 360, 320])('nothing scrolls sideways at %i px', async (width) => {
    for (const name of names) {
      const over = await opened(name, {viewport: {width, height: 800}}, ({page}) =>
        page.evaluate<number>(SIDEWAYS),
      );
      expect(over).toBeLessThanOrEqual(0);
    }
  });

  test.each(names)('%s: the whole answer stands in the first window', async (name) => {
    for (const viewport of [
      {width: 1280, height: 720},
      {width: 390, height: 844},
    ]) {
      const bottom = await opened(name, {viewport}, ({page}) =>
        page.evaluate<number>(VERDICT_BOTTOM),
      );
      expect(bottom).toBeLessThanOrEqual(viewport.height);
    }
  });

  test.each(names)('%s: ids are unique and every reference has its end', async (name) => {
    const {twice, dangling, count} = await opened(name, LOOKS.desktop!, ({page}) =>
      page.evaluate<Ids>(IDS),
    );
    expect(twice).toEqual([]);
    expect(dangling).toEqual([]);
    expect(count).toBeLessThanOrEqual(5000);
  });

  test.each(names)('%s: each picture has one name and no role inside', async (name) => {
    const pictures = await opened(name, LOOKS.desktop!, ({page}) =>
      page.evaluate<PictureFacts[]>(PICTURES),
    );
    expect(pictures.length).toBeGreaterThan(7);
    for (const picture of pictures) expect(picture).toEqual({role: 'img', named: 2, inside: 0});
  });

  test.each([1280, 390])(
    'long and right-to-left names hold their place at %i px',
    async (width) => {
      const long = `${'Very-long-name-without-a-blank-'.repeat(7)} \u0645\u0631\u062d\u0628\u0627 \u05e9\u05dc\u05d5\u05dd`;
      const {result, series} = sample({...HEIGHT_BLUNDER, names: {mark: long, file: long}});
      html.long = await renderReport(result, series, {
        title: long,
        preparedFor: long,
        remarks: long,
      });
      writeFileSync(join(folder, 'long.html'), html.long);
      await opened('long', {viewport: {width, height: 800}}, async ({page}) => {
        expect(await page.evaluate<number>(SIDEWAYS)).toBeLessThanOrEqual(0);
        expect(await shownText(page.locator('body'))).toContain('Very-long-name');
      });
    },
  );

  test.each(names)(
    '%s: every tone has its shape and its word, every line its dash',
    async (name) => {
      await opened(name, LOOKS.desktop!, async ({page}) => {
        const table = page.locator('#checks table').first();
        const outcomes = await table.locator('tbody tr').allInnerTexts();
        expect(outcomes.length).toBeGreaterThan(5);
        // A filled square, triangle, disc or an empty ring, and the word behind it.
        for (const outcome of outcomes) expect(outcome).toMatch(/[■▲●○]\s*[a-z]{2,}/);
      });
      const figures = html[name]!.match(/<figure\b.*?<\/figure>/gs) ?? [];
      expect(figures.length).toBeGreaterThan(0);
      for (const figure of figures) {
        // Shape and dash are in the name of the key: no two of a figure differ by colour alone.
        const keys = [...figure.matchAll(/class="key ([a-z]+)-/g)].map(([whole]) => whole);
        const places = [...figure.matchAll(/class="key ([a-z0-9-]+)"/g)].map(([, key]) => key);
        expect(places.length).toBe(keys.length);
        expect(new Set(places).size).toBe(places.length);
      }
    },
  );

  test('the tab key goes through the page in its order, and every stop can be seen', async () => {
    await opened('height-blunder', LOOKS.desktop!, async ({page}) => {
      expect(
        await page.locator('[tabindex]:not([tabindex="0"]):not([tabindex="-1"])').count(),
      ).toBe(0);
      const stops: number[] = [];
      for (let k = 0; k < 12; k++) {
        await page.keyboard.press('Tab');
        const top = await page.evaluate<number>(FOCUS_TOP);
        stops.push(top);
      }
      // Down the page, contents first; a stop that cannot be seen has no place.
      expect(stops.every((top) => Number.isFinite(top))).toBe(true);
      expect(stops).toEqual([...stops].sort((a, b) => a - b));
      expect(new Set(stops).size).toBeGreaterThan(8);
    });
  });

  test('headings are nested without a leap', async () => {
    const levels = await opened('height-blunder', LOOKS.desktop!, ({page}) =>
      page.evaluate<number[]>(HEADING_LEVELS),
    );
    expect(levels[0]).toBe(1);
    expect(levels.filter((level) => level === 1)).toHaveLength(1);
    const leaps = levels.filter((level, i) => level - (levels[i - 1] ?? 0) > 1);
    expect(leaps).toEqual([]);
  });
});

describe('text in the pictures', () => {
  const fonts = ['Liberation Sans', 'DejaVu Sans'];
  const cases = names.flatMap((name) =>
    fonts.flatMap((font) =>
      (['desktop', 'phone'] as const).map((look) => [name, font, look] as const),
    ),
  );

  test.each(cases)('%s in %s on %s stays inside and apart', async (name, font, look) => {
    const {outside, overlaps, count} = await opened(name, LOOKS[look]!, async ({page}) => {
      await page.addStyleTag({
        content: `.plot svg, .plot svg text {font-family: "${font}" !important}`,
      });
      return page.evaluate<TextPlaces>(TEXT_PLACES);
    });
    expect(count).toBeGreaterThan(60);
    expect(outside).toEqual([]);
    expect(overlaps).toEqual([]);
  });

  test.each([1280, 390, 360])('is at least 10 px at %i px', async (width) => {
    for (const name of names) {
      const sizes = await opened(name, {viewport: {width, height: 800}}, ({page}) =>
        page.evaluate<number[]>(TEXT_SIZES),
      );
      expect(Math.min(...sizes)).toBeGreaterThanOrEqual(10);
    }
  });
});

describe('print', () => {
  /** Text of each printed page, line by line as it stands on the paper. */
  async function printed(name: string, format: 'A4' | 'Letter'): Promise<string[][]> {
    const path = join(folder, `${name}-${format}.pdf`);
    await opened(name, LOOKS.desktop!, ({page}) => page.pdf({format, path}));
    const {status, stdout} = spawnSync('pdftotext', ['-layout', path, '-'], {encoding: 'utf8'});
    if (status !== 0)
      throw new Error('the tests of the printed report need pdftotext (poppler-utils)');
    return stdout
      .split('\f')
      .slice(0, -1)
      .map((page) => page.split('\n').filter((line) => line.trim() !== ''));
  }

  test.each(names.flatMap((name) => (['A4', 'Letter'] as const).map((f) => [name, f] as const)))(
    '%s on %s: at most six pages, each numbered, no heading last',
    async (name, format) => {
      const pages = await printed(name, format);
      expect(pages.length).toBeGreaterThan(2);
      expect(pages.length).toBeLessThanOrEqual(6);
      for (const [i, lines] of pages.entries()) {
        expect(lines.join('\n')).toMatch(new RegExp(`\\b${i + 1}\\s*/\\s*${pages.length}$`, 'm'));
        // The last line but the footer is no heading of a section or figure.
        const body = lines.filter((line) => !/\b\d\s*\/\s*\d$/.test(line));
        expect(body.at(-1)).not.toMatch(/^\s*(\d{1,2}\s+[A-Z][a-z]+|Figure \d)/);
      }
    },
  );

  test.each(names)(
    '%s: page one holds answer, plan view, coordinates and cautions',
    async (name) => {
      // Height of A4 and Letter between the margins at 96 px per inch.
      for (const {width, height} of [
        {width: 703, height: 1024},
        {width: 725, height: 957},
      ]) {
        const bottom = await opened(name, {viewport: {width, height}}, async ({page}) => {
          await page.emulateMedia({media: 'print'});
          return page.evaluate<number>(CAUTIONS_BOTTOM);
        });
        expect(bottom).toBeLessThanOrEqual(height);
      }
    },
  );
});
