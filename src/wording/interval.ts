import {counted, formatUncertainty} from './numbers.ts';

export interface IntervalFacts {
  readonly radius95M: number | null;
  readonly epochs: number;
  /** Fewest of the directions. */
  readonly looks: number | null;
  /** Contributions that nobody gave. */
  readonly leftOut: number;
  /** The record is not much longer than its errors last. */
  readonly leansOnModel: boolean;
}

/** What the interval means, in two sentences for a reader who knows no statistics. */
export function intervalSentences(facts: IntervalFacts): string | null {
  const {radius95M, epochs, looks, leftOut, leansOnModel} = facts;
  if (radius95M === null || looks === null) return null;
  const but =
    leftOut === 0 ? '' : `, as far as what is listed as left out below does not move it further`;
  const worth = looks < 9.95 ? looks.toFixed(1) : String(Math.round(looks));
  return (
    `${leansOnModel ? 'If the errors are of the kind assumed, in' : 'In'} 19 of 20 such occupations the true point lies within ${formatUncertainty(radius95M)} of these coordinates in plan${but}. ` +
    `Neighbouring epochs repeat one another's errors, so ${counted(epochs, 'epoch')} tell no more than about ${worth} independent ones would; logging twice as fast would change nothing, logging longer or on another day does.`
  );
}
