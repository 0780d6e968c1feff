import {intervalSentences} from '../../wording/interval.ts';
import type {ReportContext} from '../context.ts';

/** What the 95 % figure means, for a reader who knows no statistics; null without one. */
export function intervalMeaning({result}: ReportContext): string | null {
  const {position, budget, epochs, notices} = result;
  if (position === null) return null;
  const looks = Object.values(position.independentLooks ?? {}).filter((count) => count !== null);
  return intervalSentences({
    radius95M: position.uncertainty95M?.horizontalRadius ?? null,
    epochs: epochs.used,
    looks: looks.length === 0 ? null : Math.min(...looks),
    leansOnModel: notices.some(({code}) => code === 'slow-errors'),
    leftOut: budget.filter((line) => line.standardUncertaintyM === null).length,
  });
}
