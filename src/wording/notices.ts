import {AGREEMENT_SENTENCES} from './agreement.ts';
import {ANTENNA_SENTENCES} from './antenna-notices.ts';
import {COMBINATION_SENTENCES} from './combination-notices.ts';
import {LOG_SENTENCES} from './log-notices.ts';
import {
  counted,
  formatDuration,
  formatGivenLength,
  formatLength,
  formatPercent,
  formatRate,
  formatUtc,
} from './numbers.ts';
import {type NoticeValues, numberIn, type Sentence, textIn} from './sentence.ts';

/*
 * One sentence per code: what is so, and what to do about it. A jump is "the positions jumped",
 * never "the tripod moved".
 */
export const RECORD_SENTENCES: Readonly<Record<string, Sentence>> = {
  'too-short': () =>
    'The record is too short to see errors that change more slowly than it lasts, so no 95 % figure is given: only the scatter of single epochs. Log at least a few minutes.',
  'few-cells': () =>
    'Too few epochs are spread over the record to tell how sure its mean is. Log more often or longer.',
  'mostly-gaps': () =>
    'More than half of the record is missing: whether it sat still cannot be told from what is left.',
  'no-spread': (v) =>
    `The values of ${textIn(v, 'axes')} never change: held, frozen or coarser than their noise. The mean is known no better than half a step of the digits.`,
  'resolution-dominates': (v) =>
    `The digits of ${textIn(v, 'axes')} are coarser than the noise, so averaging cannot look between them, and movement is not tested there. Log more decimals.`,
  'slow-errors': (v) =>
    `The record lasts less than about six times as long as its errors do (${textIn(v, 'axes')}): the 95 % figure leans on an assumed model of the noise. Only a second occupation, hours later, really checks it.`,
  'few-looks': (v) =>
    `The record is worth fewer than four independent looks (${textIn(v, 'axes')}): its mean is little surer than a single look.`,
  travelling: () =>
    'The receiver was travelling during this record, so no mean is given. `stillmark contents` lists the periods during which it stood; take one with --stand N.',
  'no-usable-epoch': (v) =>
    `None of the ${numberIn(v, 'read')} epochs read passes the screening rules. Look at the counts of what each rule left out, and loosen the rule that was meant for other data.`,
  'leap-seconds-used': (v) =>
    `The log gives GPS time; UTC was made with the leap seconds of ${textIn(v, 'source')}.`,
  'leap-seconds-expired': (v) =>
    `The log gives GPS time later than the leap-second table reaches (${textIn(v, 'source')}): UTC may be off by a second. Get a newer stillmark.`,
  'fix-class-minority': (v) =>
    `Only ${formatPercent(numberIn(v, 'share'))} of the valid epochs are ${textIn(v, 'fixClass')} and were kept; the rest were left out by their flag. Log until the fix holds, or choose another class with --fix.`,
  'fix-class-unknown': () =>
    'The log does not say what kind of fix its positions are, so no uncertainty of a positioning service is included.',
  'record-not-clean': (v) =>
    `${formatPercent(numberIn(v, 'share'))} of the epochs lie far from their neighbours: this record is not clean. Look at the figure over time before using the mean.`,
  'screening-moves-mean': (v) =>
    `Screening moves the mean by ${formatLength(numberIn(v, 'horizontalM'))} in plan, more than its own uncertainty. Make sure that what was left out deserved it.`,
  'receiver-sigma-differs': (v) =>
    numberIn(v, 'ratio') > 1
      ? `The positions scatter by ${formatLength(numberIn(v, 'observedM'))} in plan, ${numberIn(v, 'ratio').toFixed(1)} times what the receiver states of itself (${formatLength(numberIn(v, 'statedM'))}). Its own figures are too good; they are not used here.`
      : `The positions scatter by ${formatLength(numberIn(v, 'observedM'))} in plan, far less than the ${formatLength(numberIn(v, 'statedM'))} that the receiver states of itself: it may be smoothing, or its figures include what a record cannot see.`,
  'output-smoothed': () =>
    'From one epoch to the next the positions hardly move against their scatter over the record: the receiver smooths its output at rest. Many epochs then say little more than a few; turn smoothing off for such work.',
  'base-not-included': () =>
    'The uncertainty of the base or network is not included: nobody gave it. The 95 % figures are relative to the base until the field sheet states it.',
  'centring-not-included': () => 'The uncertainty of centring over the mark is not included.',
  'service-included': (v) =>
    `The 95 % figures include what the positioning service itself leaves uncertain (${textIn(v, 'from')}): a record of autonomous fixes repeats its own errors and cannot see them.`,
  'setups-agree': (v) =>
    `This setup and ${textIn(v, 'name')}, ${apartWords(v)}, agree within what both are worth: they differ by ${differenceWords(v)}.`,
  'setups-disagree': (v) =>
    `This setup and ${textIn(v, 'name')}, ${apartWords(v)}, differ by ${differenceWords(v)}: more than both uncertainties explain. One of the two setups, or the base between them, is wrong; a third setup tells which.`,
  'setups-not-tested': (v) =>
    `This setup and ${textIn(v, 'name')} differ by ${differenceWords(v)}; whether that is much cannot be told, because one of them has no uncertainty.`,
  'setup-with-other-coordinates': (v) =>
    `The result ${textIn(v, 'name')} compares with other coordinates of ${textIn(v, 'mark')} and was not used. Check both logs with the same marks file.`,
  'geoid-outside': (v) =>
    `The geoid grid ${textIn(v, 'model')} says nothing at this position: it reaches from ${degreesIn(v, 'southDeg')} to ${degreesIn(v, 'northDeg')} in latitude and from ${degreesIn(v, 'westDeg')} to ${degreesIn(v, 'eastDeg')} in longitude. No height above the geoid is given; name a grid that covers the place.`,
  'geoid-not-applied': () =>
    "The log gives heights above the receiver's own geoid and no separation, so the geoid named cannot be applied: the receiver's separation must be known first. Have the receiver print it.",
  'separations-compared': (v) =>
    `The separation used is ${numberIn(v, 'separationM').toFixed(3)} m (${textIn(v, 'model') || textIn(v, 'from')}); the receiver prints ${numberIn(v, 'receiverM').toFixed(3)} m, ${formatLength(Math.abs(numberIn(v, 'differenceM')))} ${numberIn(v, 'differenceM') > 0 ? 'less' : 'more'}. Heights printed by the receiver differ from these by that much.`,
  'receiver-geoid-compared': () =>
    "The height compared with the mark rests on the receiver's own geoid model, which the log does not name and prints rounded. State the separation, or name the geoid grid of the mark's height system.",
  'step-material': (v) =>
    `The positions jumped by ${formatLength(numberIn(v, 'sizeM'))} at ${formatUtc(textIn(v, 'utc'))} UTC${beside(v)}. Each side has its own mean; find out which setup is the right one and measure again.`,
  'steps-small': (v) =>
    `${counted(numberIn(v, 'count'), 'small jump')} of the positions found, the largest ${formatLength(numberIn(v, 'sizeM'))} at ${formatUtc(textIn(v, 'utc'))} UTC${beside(v)}; all are below what matters for this record.`,
  'drift-material': (v) =>
    `The positions drift (${axisRates(v)}), by more over the record than may be overlooked. Check that tripod and tribrach were firm, and measure again.`,
  'settling-material': (v) =>
    `The positions settle by ${formatLength(numberIn(v, 'sizeM'))} toward a final value, two thirds of it in the first ${formatDuration(numberIn(v, 'timeConstantS'))}. Leave the start out with --settle, or let the setup rest longer before logging.`,
  'settling-small': (v) =>
    `The positions settle by ${formatLength(numberIn(v, 'sizeM'))} in the first ${formatDuration(numberIn(v, 'timeConstantS'))} or so, less than what matters for this record.`,
  gaps: (v) =>
    `${counted(numberIn(v, 'count'), 'gap')}, the longest ${formatDuration(numberIn(v, 'longestS'))} from ${formatUtc(textIn(v, 'fromUtc'))} UTC.`,
  'segments-not-compared': (v) =>
    `The record falls into ${numberIn(v, 'segments')} parts with different means, so it is not compared with ${textIn(v, 'mark') || 'the mark'} as a whole.`,
  assumed: (v) =>
    `Taken for granted because nobody stated it: ${textIn(v, 'assumption')}. State the frame and coordinate epoch of the log (--frame, --coordinate-epoch) and of ${textIn(v, 'mark')}.`,
  'no-tolerance': () =>
    'No tolerance was given, so there is nothing to decide: give --tolerance with its reason.',
  'tolerance-out-of-reach': (v) =>
    `No offset, not even zero, could be accepted against ${formatGivenLength(numberIn(v, 'toleranceM'))} (${textIn(v, 'of')}) with the uncertainty of this record${reachWords(v)}`,
  'time-needed': (v) =>
    `A 95 % horizontal radius of ${formatGivenLength(numberIn(v, 'wantM'))} would take a record of about ${formatDuration(numberIn(v, 'aboutS'))}; allow ${formatDuration(numberIn(v, 'allowS'))}. Base, antenna and mark add to it.`,
  'time-not-known': (v) =>
    `How long a 95 % horizontal radius of ${formatGivenLength(numberIn(v, 'wantM'))} would take cannot be told from this record: it is too far from what the record reaches, or the record too short.`,
};

/** Why a value is missing, for the notices that explain nulls. */
export const MISSING_SENTENCES: Readonly<Record<string, Sentence>> = {
  'not-given': () => 'Not given: facts of the occupation that no field sheet or option stated.',
  'nothing-compared': () => 'Nothing was compared: `check` compares with a known mark.',
  'frame-not-stated': () =>
    'The frame or coordinate epoch of the positions was not stated; under corrections it is that of the base or network. Give --frame and --coordinate-epoch.',
  'no-settling': () => 'No settling was found.',
  'grid-not-asked': () => 'No grid coordinates were asked for.',
  'nothing-to-explain': () =>
    'The offset is within its uncertainty and the tolerances: there is nothing to explain.',
  'frame-not-transformed': () =>
    'Nothing was transformed: the frame of the log or of the mark was not stated, or the record has no ellipsoidal height.',
  'grid-factor-unknown': () =>
    'A factor of the grid that has no single value there, or needs an ellipsoidal height.',
  'budget-row-not-shared': () => 'A contribution to the budget that no other occupation shares.',
  'budget-row-not-included': () => 'A contribution to the budget that nobody gave is not included.',
  'geoid-model-not-named': () => 'Which geoid model the separation comes from is not stated.',
  'no-receiver-separation': () => 'The log prints no geoid separation to compare with.',
  'no-orthometric-height': () =>
    'No orthometric height: the log gives no geoid separation, and none was stated.',
  'no-ellipsoidal-height': () =>
    'No ellipsoidal height: the log gives no geoid separation with its altitudes, and none is guessed.',
  'up-not-known': () => 'Nothing is known of the height component.',
  'no-receiver-sigma': () => 'The log carries no standard deviations of the receiver.',
  'resolution-unknown': () => 'Too few epochs to tell the interval, or digits of the log unknown.',
  'input-without-time': () => 'An input without a single dated epoch.',
  'all-fix-classes': () => 'Every fix class was kept.',
  'no-tolerance-reason': () => 'No reason was given for a tolerance (--tolerance-reason).',
  'setting-off': () => 'A rule that is switched off.',
  'not-known-from-this-record': () => 'A value that this record cannot tell.',
};

const SENTENCES: ReadonlyMap<string, Sentence> = new Map(
  Object.entries({
    ...LOG_SENTENCES,
    ...ANTENNA_SENTENCES,
    ...AGREEMENT_SENTENCES,
    ...COMBINATION_SENTENCES,
    ...RECORD_SENTENCES,
    ...MISSING_SENTENCES,
  }),
);

/** The sentence of a notice; a code without one is a defect, which a test looks for. */
export function noticeText(code: string, values: NoticeValues): string {
  const sentence = SENTENCES.get(code);
  if (sentence === undefined) throw new Error(`noticeText: no sentence for the code ${code}`);
  return sentence(values);
}

function reachWords(values: NoticeValues): string {
  switch (textIn(values, 'record')) {
    case 'longer':
      return `: a record of about ${formatDuration(numberIn(values, 'aboutS'))} would be needed; allow ${formatDuration(numberIn(values, 'allowS'))}.`;
    case 'never':
      return ': what no record can see (base, antenna, frame, mark) is too much by itself, however long one logs. Look for the largest row of the budget.';
    default:
      return '; how long a record would have to be cannot be told from this one.';
  }
}

function differenceWords(values: NoticeValues): string {
  const {horizontalM, upM} = values;
  const parts = [
    typeof horizontalM === 'number' ? `${formatLength(horizontalM)} in plan` : '',
    typeof upM === 'number' ? `${formatLength(upM, true)} in height` : '',
  ].filter((part) => part !== '');
  return parts.join(' and ');
}

function apartWords(values: NoticeValues): string {
  const hours = numberIn(values, 'hoursEarlier');
  return `${formatDuration(Math.abs(hours) * 3600)} ${hours < 0 ? 'later' : 'earlier'}`;
}

function degreesIn(values: NoticeValues, name: string): string {
  return `${Number(numberIn(values, name).toFixed(4))}°`;
}

function beside(values: NoticeValues): string {
  const seen = textIn(values, 'beside');
  return seen === '' ? '' : ` (beside it in the log: ${seen})`;
}

function axisRates(values: NoticeValues): string {
  return ['east', 'north', 'up']
    .flatMap((axis) => {
      const rate = values[`${axis}MPerHour`];
      return typeof rate === 'number' ? [`${axis} ${formatRate(rate, true)}`] : [];
    })
    .join(', ');
}
