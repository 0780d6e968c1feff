import {gzipSync} from 'node:zlib';
import {HtmlValidate} from 'html-validate';
import {beforeAll, describe, expect, test} from 'vitest';
import type {ReportOptions} from '../../src/report/options.ts';
import {renderReport} from '../../src/report/report.ts';
import {
  DAY_WITH_JUMP,
  FLOAT_MINUTES,
  HEIGHT_BLUNDER,
  type SampleSpec,
  STILL_HOUR,
  sample,
} from './fixtures.ts';

async function reportOf(spec: SampleSpec, options: Partial<ReportOptions> = {}): Promise<string> {
  const {result, series} = sample(spec);
  return renderReport(result, series, options);
}

let hour = '';
let day = '';
beforeAll(async () => {
  hour = await reportOf(STILL_HOUR);
  day = await reportOf({...DAY_WITH_JUMP, stepM: 0, gap: false});
});

describe('the file', () => {
  test('a day at 1 Hz takes at most 300,000 bytes, 60,000 compressed', () => {
    const bytes = Buffer.from(day);
    expect(bytes.length).toBeLessThanOrEqual(300_000);
    expect(gzipSync(bytes, {level: 9}).length).toBeLessThanOrEqual(60_000);
  });

  test('bytes do not follow the epochs: a day is at most 1.3 times an hour', () => {
    expect(day.length / hour.length).toBeLessThanOrEqual(1.3);
  });

  test('a second report in one process has the same bytes', async () => {
    const between = await reportOf(FLOAT_MINUTES);
    expect(between).not.toBe(hour);
    expect(await reportOf(STILL_HOUR)).toBe(hour);
  });

  test('there is no script, no handler, no address to fetch', () => {
    for (const html of [hour, day]) {
      const scripts = [...html.matchAll(/<script\b[^>]*>/gi)].map(([tag]) => tag);
      expect(scripts).toEqual(['<script type="application/json" id="result">']);
      expect(html).not.toMatch(/\son[a-z]+\s*=/i);
      expect(html).not.toMatch(/javascript:/i);
      expect(html).not.toMatch(/\b(?:src|href|action|data|poster)\s*=\s*["']?(?:https?:)?\/\//i);
      expect(html).not.toMatch(/@import|url\((?!#)/i);
      expect(html).not.toMatch(/<(?:link|iframe|object|embed|base|form)\b/i);
      expect(html).toContain("default-src 'none'; style-src 'unsafe-inline'; img-src data:");
    }
  });

  test('it names no host, no folder and no moment of making', () => {
    expect(hour).not.toMatch(/\/(?:home|Users|tmp|work|root)\//);
    expect(hour).not.toContain(String(new Date().getFullYear() + 1));
  });

  test('it is valid HTML', async () => {
    const validator = new HtmlValidate({
      extends: ['html-validate:recommended'],
      rules: {
        // Matters of style: inline widths of the read-out, blanks, and roles that name regions.
        'no-inline-style': 'off',
        'long-title': 'off',
        'no-trailing-whitespace': 'off',
        'prefer-native-element': 'off',
      },
    });
    for (const html of [hour, await reportOf(HEIGHT_BLUNDER), await reportOf(DAY_WITH_JUMP)]) {
      const report = await validator.validateString(html);
      const messages = report.results.flatMap(({messages: all}) =>
        all.map(({ruleId, message, line}) => `${line}: ${ruleId}: ${message}`),
      );
      expect(messages).toEqual([]);
    }
  });

  test('no more than sixteen pictures are drawn', async () => {
    const causes = await reportOf(HEIGHT_BLUNDER);
    expect([...causes.matchAll(/<svg\b/g)].length).toBeLessThanOrEqual(16);
    expect([...hour.matchAll(/<svg\b/g)].length).toBeGreaterThan(9);
  });

  test('the title carries the headline number', () => {
    expect(hour).toMatch(/<title>Skerry 4: [\d.]+\u00a0mm from the mark<\/title>/);
  });
});

describe('the numbers', () => {
  const blockOf = (html: string) => {
    const text = /<script type="application\/json" id="result">(.*?)<\/script>/s.exec(html)?.[1];
    return JSON.parse(text ?? '');
  };

  test('the data block is the result itself', () => {
    expect(blockOf(hour)).toEqual(JSON.parse(JSON.stringify(sample(STILL_HOUR).result)));
  });

  test('the file to save is the same result', () => {
    const encoded =
      /href="data:application\/json;charset&#x3D;utf-8,([^"]+)"/.exec(hour)?.[1] ?? '';
    const text = decodeURIComponent(encoded.replace(/&#x27;/g, "'").replace(/&#x3D;/g, '='));
    expect(JSON.parse(text)).toEqual(blockOf(hour));
  });

  test('the key numbers and the checks are those of the result', () => {
    const {comparison, position} = blockOf(hour);
    const mm = (valueM: number) => (valueM * 1000).toFixed(1);
    const keys = [...hour.matchAll(/<dd><b>([^<]+)<\/b>/g)].map(([, text]) => text);
    expect(keys).toEqual([
      mm(comparison.offsetM.horizontal),
      `+${mm(comparison.offsetM.up)}`,
      mm(position.uncertainty95M.horizontalRadius),
      expect.stringMatching(/^\d+(\.\d)?$/),
    ]);
    const row =
      /Distance from the mark in plan.*?<td class="num"[^>]*>([^<]+)<.*?<td class="num"[^>]*>([^<]+)</s;
    expect(row.exec(hour)?.slice(1)).toEqual([mm(comparison.offsetM.horizontal), '20.0']);
  });

  test('cells of numbers are numbers', () => {
    for (const html of [hour, day]) {
      const cells = [...html.matchAll(/<td class="num"[^>]*>([^<]*)</g)].map(([, text]) => text);
      expect(cells.length).toBeGreaterThan(60);
      for (const text of cells) expect(text).toMatch(/^-?\d+(\.\d+)?$/);
    }
  });

  test('nothing is printed that is no number', async () => {
    const {html} = {html: hour.replace(/<script.*?<\/script>/s, '')};
    expect(html).not.toMatch(/NaN|undefined|Infinity|\[object|>-0(\.0*)?</);
  });

  test('the rows of the screening add up to the epochs read', () => {
    const table = /What happened to each epoch.*?<\/table>/s.exec(hour)?.[0] ?? '';
    const counts = [...table.matchAll(/<td class="num"[^>]*>(\d+)<\/td>/g)].map(([, n]) =>
      Number(n),
    );
    const total = counts.pop();
    expect(counts.reduce((a, b) => a + b, 0)).toBe(total);
  });

  test('feet are those that were asked for, and said to be', async () => {
    const feet = await reportOf(STILL_HOUR, {units: 'us-ft'});
    const {position} = blockOf(feet);
    expect(feet).toContain('US survey feet of exactly 1200/3937 m');
    // NIST: 1 US survey foot = 1200/3937 m.
    const height = (position.geodetic.ellipsoidalHeightM * 3937) / 1200;
    expect(feet).toContain(`>${height.toFixed(4)}<`);
    expect(feet).not.toMatch(/<td[^>]*>mm<\/td>/);
  });

  test('angles are in degrees, minutes and seconds when asked for', async () => {
    expect(await reportOf(STILL_HOUR, {angles: 'dms'})).toMatch(
      /57°\u00a012′\u00a004\.4\d+″\u00a0N/,
    );
  });
});

describe('the clock of a place', () => {
  test('stands beside UTC wherever a person reads a time, and nowhere without being asked', async () => {
    const plain = await reportOf(DAY_WITH_JUMP);
    expect(plain).not.toContain('Europe/Berlin');
    const zoned = await reportOf(DAY_WITH_JUMP, {timeZone: 'Europe/Berlin'});
    const spans = zoned.match(/\d\d:\d\d:\d\d UTC \([^)]* to [^)]* in Europe\/Berlin\)/g) ?? [];
    expect(spans.length).toBeGreaterThan(0);
    expect(zoned).toMatch(/the axis begins at \d\d:\d\d in Europe\/Berlin/);
    expect(zoned).toMatch(/at \d\d:\d\d:\d\d UTC \(\d\d:\d\d:\d\d in Europe\/Berlin\)/);
  });
});

describe('what comes from outside', () => {
  const hostile =
    '"><img src=x onerror=alert(1)></title></script>{{constructor}} $& \u0001\u202e\u0645\u0631\u062d\u0628\u0627 ';

  test('is shown as text, without control characters', async () => {
    const text = hostile + 'x'.repeat(200);
    const {result, series} = sample({
      ...HEIGHT_BLUNDER,
      names: {mark: text, file: text},
      candidates: HEIGHT_BLUNDER.candidates.map((one) => ({...one, title: text, advice: text})),
    });
    const html = await renderReport(
      {
        ...result,
        notices: [{code: 'x', severity: 'concern', about: [], values: {}, text}],
        fieldSheet: [{section: text, item: text, value: text}],
        settings: {[text]: {value: text, from: 'command line'}},
        budget: result.budget.map((row) => ({...row, source: text, from: text, id: text})),
      },
      series,
      {title: text, preparedFor: text, remarks: text},
    );
    expect(html).not.toContain('<img');
    expect(html).not.toContain('\u0001');
    expect(html).not.toMatch(/<\/script>(?!\s*<\/body>)/);
    expect(html).toContain('{{constructor}} $&amp;');
    expect([...html.matchAll(/<title>/g)]).toHaveLength(1);
    const style = /<style>(.*?)<\/style>/s.exec(html)?.[1] ?? '';
    expect(style).not.toContain('<');
    const report = await new HtmlValidate({
      extends: ['html-validate:recommended'],
      rules: {
        'no-inline-style': 'off',
        'long-title': 'off',
        'no-trailing-whitespace': 'off',
        'prefer-native-element': 'off',
      },
    }).validateString(html);
    expect(report.results.flatMap(({messages}) => messages.map(({message}) => message))).toEqual(
      [],
    );
  });
});

describe('what a record does not have', () => {
  const odd: Readonly<Record<string, {spec: SampleSpec; says: RegExp[]}>> = {
    'one epoch': {
      spec: {...STILL_HOUR, seconds: 1, satellites: false, leftOut: 0},
      says: [/a histogram needs at least/, /too short to follow its mean/],
    },
    'two epochs': {
      spec: {...STILL_HOUR, seconds: 2, satellites: false, leftOut: 0},
      says: [/a histogram needs at least/],
    },
    'sixty epochs': {spec: {...STILL_HOUR, seconds: 60, leftOut: 0}, says: [/Figure 2/]},
    'all epochs left out': {
      spec: {...STILL_HOUR, leftOut: 2},
      says: [/no epoch passed the screening/, /no one mean|no mean position/],
    },
    'no scatter at all': {
      spec: {...STILL_HOUR, whiteM: 0, slowM: 0},
      says: [/without any scatter/],
    },
    'scatter of metres': {
      spec: {...FLOAT_MINUTES, seconds: 1200, whiteM: 2},
      says: [/of mean, m</],
    },
    'no mark': {spec: {...STILL_HOUR, mark: false}, says: [/no known mark was given/]},
    'a mark without tolerance': {
      spec: {...STILL_HOUR, toleranceM: null},
      says: [/no tolerance was given/],
    },
    'no GSV': {spec: {...STILL_HOUR, satellites: false}, says: [/the log has no GSV sentences/]},
    'a bare table': {
      spec: {...STILL_HOUR, satellites: false, quality: false},
      says: [/a table of positions names no satellites/, /says nothing about satellites/],
    },
    'plan only': {spec: {...STILL_HOUR, heights: false}, says: [/not in the log/]},
    'offsets far below zero': {
      spec: {...STILL_HOUR, offsetM: {east: -812.4, north: -0.7, up: -2.2}},
      says: [/to the mark/, /from its mean/],
    },
    'a week': {
      spec: {...STILL_HOUR, seconds: 7 * 86_400, intervalS: 15, slowS: 3000},
      says: [/>6 May</],
    },
    'twenty a second': {
      spec: {...STILL_HOUR, seconds: 900, intervalS: 0.05, satellites: false},
      says: [/one every 0.1|one every/],
    },
    'coarse digits': {spec: {...STILL_HOUR, resolutionM: 0.0185}, says: [/Digits of the log/]},
    'a drift that matters': {spec: {...STILL_HOUR, driftM: 0.05}, says: [/fitted drift/]},
    'a jump': {spec: DAY_WITH_JUMP, says: [/Each part has its own mean/, /no one mean to settle/]},
  };

  test.each(Object.entries(odd))('%s draws or says why', async (_, {spec, says}) => {
    const html = await reportOf(spec);
    const page = html.replace(/<script.*?<\/script>/s, '').replace(/href="data:[^"]*/g, '');
    for (const words of says) expect(page).toMatch(words);
    expect(page).not.toMatch(/NaN|undefined|Infinity|\[object/);
    // A picture without any mark would be an empty frame.
    for (const [, svg] of page.matchAll(/<svg\b[^>]*>(.*?)<\/svg>/gs)) {
      expect(svg).toMatch(/<(?:path|rect|line)\b/);
    }
    for (const svg of page.matchAll(/<figure\b.*?<\/figure>/gs)) expect(svg[0]).toContain('<svg');
  });
});
