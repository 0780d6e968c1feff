import {describe, expect, test} from 'vitest';
import {loadAssets} from '../../src/report/assets.ts';
import {COLOUR, RAMP} from '../../src/report/charts/chart.ts';

/* Contrast of every colour of text and of lines on what lies below it, in both themes. */

const {css} = loadAssets();
const darkFrom = css.indexOf('prefers-color-scheme: dark');
const parts = {light: css.slice(0, darkFrom), dark: css.slice(darkFrom)};

function tokens(text: string): Map<string, string> {
  const found = new Map<string, string>();
  for (const [, name, value] of text.matchAll(/--([a-z0-9-]+):\s*(#[0-9a-f]{3,6})\s*;/g)) {
    found.set(name!, value!.length === 4 ? value!.replace(/[0-9a-f]/g, '$&$&') : value!);
  }
  return found;
}

const themes = {
  light: tokens(parts.light),
  dark: new Map([...tokens(parts.light), ...tokens(parts.dark)]),
};

/** WCAG 2.2, relative luminance and contrast ratio. */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((i) => {
    const value = Number.parseInt(hex.slice(i, i + 2), 16) / 255;
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
}

function contrast(a: string, b: string): number {
  const [high, low] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (high! + 0.05) / (low! + 0.05);
}

/** The colour that the dark style sheet gives to what is drawn in this one. */
function inDark(hex: string, property: 'fill' | 'stroke'): string | undefined {
  const pattern = new RegExp(
    `svg \\[${property}="${hex}"\\]\\s*\\{\\s*${property}:\\s*(#[0-9a-f]{6})`,
  );
  return pattern.exec(parts.dark)?.[1];
}

describe('contrast', () => {
  test('reference: WCAG 2.2, black on white is 21 to 1', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
    // From memory of the published examples: #777777 on white just fails 4.5.
    expect(contrast('#777777', '#ffffff')).toBeCloseTo(4.48, 2);
  });

  const texts = ['ink', 'muted', 'link', 'within', 'look', 'outside', 'open'];
  test.each(
    Object.entries(themes).flatMap(([theme, map]) =>
      texts.map((name) => [theme, name, map] as const),
    ),
  )('%s: text in %s reaches 4.5 on paper', (_, name, map) => {
    expect(contrast(map.get(name)!, map.get('paper')!)).toBeGreaterThanOrEqual(4.5);
  });

  test.each(
    Object.entries(themes).flatMap(([theme, map]) =>
      ['within', 'look', 'outside', 'open'].map((tone) => [theme, tone, map] as const),
    ),
  )('%s: all text of the answer reaches 4.5 on the tint of %s', (_, tone, map) => {
    const tint = map.get(`${tone}-bg`)!;
    for (const name of [tone, 'ink', 'muted', 'link']) {
      expect(contrast(map.get(name)!, tint)).toBeGreaterThanOrEqual(4.5);
    }
  });

  test.each(['data', 'estimate', 'flagged', 'third', 'ink', 'muted', 'axis'] as const)(
    'lines in the role %s reach 3 on paper, in the dark too',
    (role) => {
      expect(contrast(COLOUR[role], '#ffffff')).toBeGreaterThanOrEqual(3);
      const dark = inDark(COLOUR[role], 'stroke');
      expect(contrast(dark!, themes.dark.get('paper')!)).toBeGreaterThanOrEqual(3);
    },
  );

  test.each(['estimate', 'flagged', 'third', 'ink', 'muted', 'data'] as const)(
    'chart text in the role %s reaches 4.5, in the dark too',
    (role) => {
      expect(contrast(COLOUR[role], '#ffffff')).toBeGreaterThanOrEqual(4.5);
      expect(
        contrast(inDark(COLOUR[role], 'fill')!, themes.dark.get('paper')!),
      ).toBeGreaterThanOrEqual(4.5);
    },
  );

  test('every colour that a chart can use has its dark one', () => {
    for (const hex of [...Object.values(COLOUR), ...RAMP]) {
      expect(inDark(hex, 'fill'), hex).toMatch(/^#/);
    }
  });

  test('the ramp darkens step by step on paper and lightens step by step in the dark', () => {
    const light = RAMP.map(luminance);
    const dark = RAMP.map((hex) => luminance(inDark(hex, 'fill')!));
    expect(light).toEqual([...light].sort((a, b) => b - a));
    expect(dark).toEqual([...dark].sort((a, b) => a - b));
  });
});
