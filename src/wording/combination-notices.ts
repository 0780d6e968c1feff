import {formatDuration, formatLength} from './numbers.ts';
import {numberIn, type Sentence, textIn} from './sentence.ts';

/** What the combination of several occupations has to say. */
export const COMBINATION_SENTENCES: Readonly<Record<string, Sentence>> = {
  'single-occupation': (v) =>
    `Only one occupation of ${textIn(v, 'name')}: a blunder in its setup or height would show nowhere. Occupy it again, with a new setup, hours apart.`,
  'occupations-disagree': (v) =>
    `The ${numberIn(v, 'count')} occupations of ${textIn(v, 'name')} differ by more than their uncertainties explain, ${textIn(v, 'worst')} the most (${formatLength(numberIn(v, 'differenceM'))} from the mean). The uncertainty is enlarged to cover the differences; find out which occupation is wrong rather than average it away, by another one.`,
  'soon-repeated': (v) =>
    `The occupations of ${textIn(v, 'name')} lie ${formatDuration(Math.max(0, numberIn(v, 'apartS')))} apart: the same satellites, atmosphere and reflections, so that their agreement shows less than it seems.`,
  'shared-by-all': (v) =>
    `All occupations of ${textIn(v, 'name')} share: ${textIn(v, 'list')}. Repeating does not make these smaller, nor does it show them.`,
  'combined-without-frame': (v) =>
    `The frame of the positions of ${textIn(v, 'name')} is not stated; they are taken to be alike.`,
  'combined-not-at-mark': (v) =>
    `The positions of ${textIn(v, 'name')} are of the ${textIn(v, 'of')}, not of the mark: with other antenna heights they differ by these. State the antenna in field sheets and reduce anew.`,
  'results-left-out': (v) => `Left out: ${textIn(v, 'list')}.`,
};
