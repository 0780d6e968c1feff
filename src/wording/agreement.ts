import {type Sentence, textIn} from './sentence.ts';

/*
 * Two questions with two answers: is the offset inside what was asked for, and is it no more than
 * the stated uncertainties of mark and occupation explain? Each pair of answers means something of
 * its own. `where`: in plan, in height, or both.
 */
export const AGREEMENT_SENTENCES: Readonly<Record<string, Sentence>> = {
  'accept-agrees': () =>
    'Mark and occupation agree within their stated uncertainties, and the offset is inside the tolerance.',
  'accept-disagrees': (v) =>
    `Inside the tolerance, yet ${textIn(v, 'where')} the offset is more than the stated uncertainties explain: one of them is too small, or something small is wrong. Good enough for what was asked; do not build on the uncertainties before a second, independent setup.`,
  'accept-untested': () => 'The mark was taken as exact, because no uncertainty is stated for it.',
  'reject-agrees': () =>
    'Outside the tolerance, although the offset is no more than the stated uncertainties explain: they are too large for this tolerance, and nothing is shown to be wrong. Use a better known mark or a longer record before anybody moves anything.',
  'reject-disagrees': (v) =>
    `Outside the tolerance, and ${textIn(v, 'where')} the offset is more than the stated uncertainties explain: the mark, its coordinates or this setup is wrong. Set up anew, independently, before using either.`,
  'reject-untested': () =>
    'The mark was taken as exact, because no uncertainty is stated for it: part of the offset may be its own. State it in the marks file if it is known.',
  'cannot-tell-agrees': () =>
    'The offset is no more than the stated uncertainties explain; a longer record, or a second one hours later, can decide about the tolerance.',
  'cannot-tell-disagrees': (v) =>
    `Whether the offset is inside the tolerance is open, yet ${textIn(v, 'where')} it is more than the stated uncertainties explain: something is wrong that a longer record does not cure. Look for the cause first.`,
  'cannot-tell-untested': () =>
    'The mark was taken as exact, because no uncertainty is stated for it. State it in the marks file if it is known.',
};
