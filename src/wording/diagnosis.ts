import {CAUSES} from './causes.ts';
import {counted, formatLength, joined} from './numbers.ts';
import type {NoticeValues} from './sentence.ts';

/*
 * What an offset is consistent with. Titles follow "Consistent with:", so they are phrases; advice is
 * one or two sentences that say what to measure, independently. Nothing here says "caused by".
 */

/** The blunder as a phrase, such as "the antenna height of 2.00 m not taken off". */
export function causeTitle(code: string, values: NoticeValues): string {
  return wordsOf(code).title(values);
}

/** What to measure, and nothing to correct before. */
export function causeAdvice(code: string, values: NoticeValues): string {
  return wordsOf(code).advice(values);
}

function wordsOf(code: string) {
  const words = CAUSES[code];
  if (words === undefined) throw new Error(`diagnosis: no words for cause ${code}`);
  return words;
}

/** Why a cause of the catalogue could not be tested, after "Not tested:". */
const REASONS: Readonly<Record<string, string>> = {
  'no-antenna-height': 'no antenna height was given',
  'no-plate-radius': 'the radius of the slant plate was not given',
  'no-phase-centre': 'the heights of phase centre and slant mark were not given',
  'no-height-reading': 'no usable reading of the antenna height was given',
  'no-separation': 'no geoid separation is known',
  'separation-in-log': 'the separation field of the log is not empty',
  'one-separation': 'fewer than two geoid separations are known',
  'no-closing-height': 'the antenna height was not measured before and after',
  'height-change-used': 'the change of the antenna height was already allowed for',
  'axes-not-compared': 'it would only show in components that were not compared',
  'no-plan': 'the mark has no plan position',
  'no-ellipsoidal-height': 'no ellipsoidal height is known',
  'no-grid': 'the place lies on no grid that is known here',
  'cannot-happen-here': 'it cannot happen with these values',
  'no-frame': 'no other frame in use here differs',
  'no-velocity': 'the velocity of the mark was not given',
  'no-epochs': 'the coordinate epochs were not given',
  'no-other-mark': 'no other mark was checked',
  'other-mark-fits': 'another mark checked on the same day fits',
  'set-ups-agree': 'turning the tribrach or pole changed nothing',
  'no-second-session': 'no second session half a tide apart was given',
  'no-nearby-mark': 'no nearby mark was listed',
  'no-offset-point': 'no offset point was laid off',
  'no-declination': 'the magnetic declination was not given',
  'no-resolution': 'the resolution of the log is not known',
  'beyond-its-size': 'the offset is not of the size that it leaves',
  'leaves-no-offset': 'it shifts no mean',
};

export function notTestedReason(because: string): string {
  const reason = REASONS[because];
  if (reason === undefined) throw new Error(`diagnosis: no words for reason ${because}`);
  return reason;
}

export interface AccidentalFacts {
  readonly tested: number;
  readonly matches: number;
  readonly withinM: number;
  readonly of: 'plan' | 'height' | 'plan and height';
}

/** How easily an offset matches something in the list by accident. */
export function accidentalSentence({tested, matches, withinM, of}: AccidentalFacts): string {
  const where = of === 'plan and height' ? 'in plan and height' : `in ${of}`;
  return `${counted(tested, 'everyday mistake')} of the catalogue could be tested. An offset ${where} of up to ${formatLength(withinM)} from some other cause would match ${matchesWords(matches)} of their predictions by accident; those fitted to the offset always match and are not counted.`;
}

function matchesWords(matches: number): string {
  if (matches < 0.001) return 'fewer than 0.001';
  return matches < 0.1 ? `about ${Number(matches.toPrecision(1))}` : `about ${matches.toFixed(1)}`;
}

/** One line for a pair: "two mistakes together: …, and …". */
export function pairTitle(
  plan: {readonly code: string; readonly values: NoticeValues},
  height: {readonly code: string; readonly values: NoticeValues},
): string {
  return `two mistakes at once: ${joined([causeTitle(plan.code, plan.values), causeTitle(height.code, height.values)])}`;
}

/** Above the list, when nothing in it fits. */
export const NOTHING_FITS =
  'No everyday mistake that could be tested leaves this offset. Occupy the mark again with a new set-up, and check another mark, before anything is changed.';
