import {addFloatStretches} from './disturbances.ts';
import {sentence} from './nmea-fields.ts';
import {type NmeaOptions, nmeaSentences, type SentenceType} from './nmea-writer.ts';
import {type SimulatedOccupation, selectEpochs} from './occupation.ts';
import {above, HARBOUR_NMEA, harbourScenario} from './quillmere.ts';
import {type Random, randomFrom} from './random.ts';
import {simulate} from './simulate.ts';

/** Seconds from the first epoch (23:52:00 on the last day of 2016) to the leap second. */
const LEAP_S = 480;
const DURATION_S = 780;
const SEED = 20161231;

const SENTENCES: readonly (readonly [SentenceType, number])[] = [
  ['GGA', 1],
  ['GNS', 5],
  ['GST', 2],
  ['VTG', 1],
  ['GLL', 1],
  ['GSA', 10],
  ['GSV', 30],
  ['DTM', 120],
];

/** A line, what stands at its end, and the second of the record that it belongs to. */
interface Line {
  readonly text: string;
  readonly end: string;
  readonly atS: number;
}

/**
 * A log with everything that can be wrong with one and still be a log: thirteen minutes over QUAY
 * across midnight and the leap second that ended 2016. Bytes above 127 stand for themselves.
 */
export function uglyLog(): Uint8Array {
  const random = randomFrom(SEED, 'ugliness');
  const bursts = burstsOf(occupation());
  const disordered = runBack(repeat(bursts));
  const lines = disordered.flatMap((burst) => burst.map((line) => dirty(line, random)));
  const opening = '\u00ef\u00bb\u00bflogger 3 awake, battery 12.4 V\r\n\r\n';
  const text = opening + lines.map(({text, end}) => text + end).join('');
  // The battery fails within a sentence.
  return Uint8Array.from(text.slice(0, text.length - 31), (character) => character.charCodeAt(0));
}

/** Fixed, with half a minute of float and half a minute in which the output stands still. */
function occupation(): SimulatedOccupation {
  const scenario = harbourScenario('ugly', DURATION_S, 1);
  const float = {count: 1, shortestS: 30, longestS: 31, sdM: 0.2, tauS: 15, flagged: true};
  const noisy = addFloatStretches(simulate(scenario, SEED), float, randomFrom(SEED, 'float'));
  const frozenFrom = 560;
  const freeze = (column: Float64Array) =>
    column.map((value, i) => (i > frozenFrom && i < frozenFrom + 30 ? column[frozenFrom]! : value));
  return {
    ...noisy,
    eastM: freeze(noisy.eastM),
    northM: freeze(noisy.northM),
    upM: freeze(noisy.upM),
  };
}

/** The sentences, one list an epoch; a date comes no sooner than after three minutes. */
function burstsOf(occupation: SimulatedOccupation): Line[][] {
  const bursts: Line[][] = [];
  for (let atS = 0; atS < DURATION_S; atS++) {
    const one = selectEpochs(occupation, (i) => i === atS);
    const dated: [SentenceType, number][] = atS % 60 === 0 && atS >= 180 ? [['ZDA', 1]] : [];
    if (atS % 30 === 0 && atS >= 210) dated.push(['RMC', 1]);
    const due = [...SENTENCES.filter(([, everyS]) => atS % everyS === 0), ...dated];
    const texts = epochSentences(one, atS, due);
    const spoken = atS < 20 ? withoutFix(texts) : atS < 60 ? autonomous(texts) : texts;
    const all = atS >= 300 && atS < 340 ? withSecondTalker(spoken) : spoken;
    bursts.push(all.map((text) => ({text, end: lineEnd(atS), atS})));
  }
  return bursts;
}

function epochSentences(
  one: SimulatedOccupation,
  atS: number,
  sentences: NmeaOptions['sentences'],
): string[] {
  const before = atS <= LEAP_S;
  const options: NmeaOptions = {
    ...HARBOUR_NMEA,
    place: above('QUAY', 1.61),
    date: before ? {year: 2016, month: 12, day: 31} : {year: 2017, month: 1, day: 1},
    minuteDecimals: 7,
    heightDecimals: 3,
    systems: ['gps', 'glonass'],
    sentences,
    startS: before ? 86400 - LEAP_S + Math.min(atS, LEAP_S - 1) : atS - LEAP_S - 1,
  };
  const texts = nmeaSentences({...one, elapsedS: Float64Array.of(0)}, options);
  if (atS !== LEAP_S) return texts;
  return texts.map((text) => resealed(text.replace('235959.00', '235960.00')));
}

/** The sentence again with the checksum that it should have. */
function resealed(text: string): string {
  return sentence(text.slice(1, text.lastIndexOf('*')));
}

/** A receiver that still searches: times, and empty fields. */
function withoutFix(texts: readonly string[]): string[] {
  const time = texts[0]!.split(',')[1]!;
  return [
    sentence(`GNGGA,${time},,,,,0,00,,,M,,M,,`),
    sentence(`GNRMC,${time},V,,,,,,,,,,N,V`),
    sentence(`GNGLL,,,,,${time},V,N`),
    sentence('GNGSA,A,1,,,,,,,,,,,,,,,,1'),
  ];
}

/** Before corrections arrive: quality 1, no age, no station, and no separation. */
function autonomous(texts: readonly string[]): string[] {
  return texts
    .filter((text) => !text.startsWith('$GNGNS'))
    .map((text) => {
      if (text.startsWith('$GNGLL')) return resealed(text.replace(/,A,[RF]\*/, ',A,A*'));
      if (!text.startsWith('$GNGGA')) return text;
      const fields = text.slice(1, text.lastIndexOf('*')).split(',');
      return sentence([...fields.slice(0, 6), '1', ...fields.slice(7, 11), '', 'M', '', ''].join());
    });
}

/** The same positions once more by an older talker. */
function withSecondTalker(texts: readonly string[]): string[] {
  const again = texts.filter((text) => text.startsWith('$GNGGA'));
  return [...texts, ...again.map((text) => resealed(text.replace('$GN', '$GP')))];
}

function lineEnd(atS: number): string {
  if (atS < 240) return '\r\n';
  return atS < 420 ? '\n' : '\r\r\n';
}

/** Five bursts are written twice. */
function repeat(bursts: readonly Line[][]): Line[][] {
  return bursts.flatMap((burst, atS) => (atS >= 640 && atS < 645 ? [burst, burst] : [burst]));
}

/** Ten bursts come eight seconds too late. */
function runBack(bursts: readonly Line[][]): Line[][] {
  const late = bursts.slice(700, 710);
  return [...bursts.slice(0, 700), ...bursts.slice(710, 718), ...late, ...bursts.slice(718)];
}

/** What happens to a line between receiver and card, by the minute in which it was written. */
function dirty(line: Line, random: Random): Line {
  const {text, atS} = line;
  const minute = Math.floor(atS / 60);
  switch (minute) {
    case 1:
      return {...line, text: withTagBlock(text, atS, random)};
    case 2:
      return {...line, text: random.uniform() < 0.5 ? `[${stamp(atS)}] ${text}` : `RX ${text}`};
    case 3:
      return {...line, text: random.uniform() < 0.5 ? `${text} ,${1483228320 + atS}120` : text};
    case 4:
      return {...line, text: text.slice(0, -2) + text.slice(-2).toLowerCase()};
    case 6:
      return {...line, text: amongOthers(text, random)};
    case 8:
      return cutOrGlued(line, random);
    case 9:
      return {...line, text: miscounted(text, random)};
    case 10:
      return {...line, text: random.uniform() < 0.3 ? `${binary(random)}${text}` : text};
    default:
      return random.uniform() < 0.02 ? {...line, end: line.end + line.end} : line;
  }
}

function withTagBlock(text: string, atS: number, random: Random): string {
  if (random.uniform() < 0.5) return text;
  const block = sentence(`s:qh1,c:${1483228320 + atS}`).slice(1);
  return `\\${block}\\${text}`;
}

function stamp(atS: number): string {
  return `23:${String(52 + Math.floor(atS / 60))}:${String(atS % 60).padStart(2, '0')}.120`;
}

/** Sentences of ships, of the depth sounder and of the logger itself on the same line. */
function amongOthers(text: string, random: Random): string {
  const draw = random.uniform();
  if (draw < 0.15) {
    const report = sentence('AIVDM,1,1,,A,139KG9h0000O9LbLTb3>4?wn0<0T,0').replace('$', '!');
    return `${report}\n${text}`;
  }
  if (draw < 0.25) return `${sentence('PQHB,BATT,12.4,V')}\n${text}`;
  if (draw < 0.35) return `${sentence('SDDPT,4.2,0.3')}\n${text}`;
  return text;
}

/** Some lines end too soon; of those, some run into the next. */
function cutOrGlued(line: Line, random: Random): Line {
  if (random.uniform() >= 0.12) return line;
  const text = line.text.slice(0, Math.floor(random.between(8, line.text.length - 4)));
  return {...line, text, end: random.uniform() < 0.5 ? '' : line.end};
}

/** Some digits flip in transmission; some lines come from a program that writes no checksum. */
function miscounted(text: string, random: Random): string {
  const draw = random.uniform();
  if (draw < 0.15) return text.slice(0, text.lastIndexOf('*'));
  if (draw >= 0.3) return text;
  const at = text.search(/\d[^*]*\*/);
  return `${text.slice(0, at)}${(Number(text[at]) + 1) % 10}${text.slice(at + 1)}`;
}

/** Corrections on the same wire: a frame of any bytes. */
function binary(random: Random): string {
  const length = Math.floor(random.between(12, 40));
  const bytes = Array.from({length}, () => Math.floor(random.between(0, 256)));
  return String.fromCharCode(0xd3, 0, length, ...bytes);
}
