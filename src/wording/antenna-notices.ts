import {formatLength} from './numbers.ts';
import {numberIn, type Sentence, textIn} from './sentence.ts';

/** What the height readings of the field sheet say, and what to do about it. */
export const ANTENNA_SENTENCES: Readonly<Record<string, Sentence>> = {
  'antenna-readings-disagree': (v) =>
    `The ${textIn(v, 'when')} readings of the antenna height differ by ${formatLength(numberIn(v, 'spreadM'))}, more than ${formatLength(numberIn(v, 'limitM'))}. Level the setup and measure again.`,
  'antenna-units-disagree': (v) =>
    `The ${textIn(v, 'when')} antenna height read in the second unit differs by ${formatLength(numberIn(v, 'differenceM'), true)}: one of the two was misread. Read both again.`,
  'antenna-check-too-coarse': (v) =>
    `The second unit of the ${textIn(v, 'when')} antenna height was read too coarsely (to ${formatLength(2 * numberIn(v, 'roundingM'))}) to check the first.`,
  'antenna-check-same-unit': (v) =>
    `The check reading of the ${textIn(v, 'when')} antenna height is in the same unit as the first: it checks the reading, not the tape.`,
  'antenna-read-once': (v) =>
    `The ${textIn(v, 'when')} antenna height was read once only: nothing checks it. Read it again in a second unit.`,
  'antenna-height-changed': (v) =>
    `The antenna height changed by ${formatLength(numberIn(v, 'changeM'), true)} from opening to closing (used: ${textIn(v, 'heightUsed')}): the setup sank or was disturbed.`,
  'antenna-height-not-given': () =>
    'No antenna height was given: the position is that of the antenna reference point, not of the mark below it.',
  'antenna-height-not-applied': () =>
    'An antenna height was measured but not taken off, because the sheet does not say which point the log is of. State `log point`.',
  'antenna-log-point-not-stated': () =>
    'It is not stated which point the positions are of, nor the antenna height: they are taken as they stand. State `log point` and the antenna readings in a field sheet.',
  'antenna-phase-centre-not-given': () =>
    'The log is of the phase centre, but its height above the antenna reference point was not given: look it up in the calibration of the antenna.',
  'antenna-receiver-height-differs': (v) =>
    `The receiver took off ${formatLength(numberIn(v, 'enteredM'))}, but ${formatLength(numberIn(v, 'measuredM'))} was measured: the heights are off by ${formatLength(numberIn(v, 'differenceM'), true)}. Correct the one that was mistyped and measure again.`,
};
