import {FixClass} from '../epochs/epochs.ts';

/**
 * What numbers in a quality column mean unless the table itself says otherwise: those of field 6 of
 * GGA.
 *
 * Source: NMEA 0183 version 4.11, GGA, GPS quality indicator; from memory, as described in gpsd's
 * "NMEA Revealed".
 */
export const GGA_QUALITIES: ReadonlyMap<number, FixClass> = new Map<number, FixClass>([
  [0, FixClass.none],
  [1, FixClass.autonomous],
  [2, FixClass.differential],
  [3, FixClass.precise],
  [4, FixClass.fixed],
  [5, FixClass.float],
  [6, FixClass.notMeasured],
  [7, FixClass.notMeasured],
  [8, FixClass.notMeasured],
]);

const WORDS: readonly (readonly [RegExp, FixClass])[] = [
  [/^(no(ne|fix)?|invalid)$/, FixClass.none],
  [/^(rtk)?(narrow)?fix(ed)?$/, FixClass.fixed],
  [/^(rtk)?float(ing)?$/, FixClass.float],
  [/^(dgps|dgnss|sbas|diff(erential)?)$/, FixClass.differential],
  [/^(single|spp|auto(nomous)?|standalone|gps|gnss)$/, FixClass.autonomous],
  [/^(ppp|precise)$/, FixClass.precise],
  [/^(dr|deadreckoning|estimated|manual|simulat(or|ed|ion)|notmeasured)$/, FixClass.notMeasured],
  [/^unknown$/, FixClass.unknown],
];

/** The class that a word in a quality column means; undefined for a word that means nothing. */
export function fixClassOfWord(word: string): FixClass | undefined {
  const plain = word.toLowerCase().replace(/[^a-z]/g, '');
  return WORDS.find(([pattern]) => pattern.test(plain))?.[1];
}

/**
 * The meaning of quality numbers as a comment above the table explains it, such as `Q=1:fix,2:float`;
 * undefined when no comment explains at least two of them.
 */
export function qualityLegend(comments: readonly string[]): Map<number, FixClass> | undefined {
  for (const comment of comments) {
    const legend = new Map<number, FixClass>();
    for (const [, number, word] of comment.matchAll(/\b(\d)\s*[:=]\s*([a-z][a-z -]*)/gi)) {
      const fixClass = fixClassOfWord(word ?? '');
      if (fixClass !== undefined) legend.set(Number(number), fixClass);
    }
    if (legend.size >= 2) return legend;
  }
  return undefined;
}
