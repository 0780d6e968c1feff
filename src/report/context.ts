import type {Position, Result} from '../occupation/result.ts';
import type {ChartSeries} from '../occupation/series.ts';
import type {ReportOptions} from './options.ts';

/** Everything a part of the page is made from. */
export interface ReportContext {
  readonly result: Result;
  readonly series: ChartSeries;
  readonly options: ReportOptions;
}

/** The one position of the record, or null where movement split it or nothing was used. */
export function singlePosition({result}: ReportContext): Position | null {
  return result.position;
}

/** What zero of the offsets is called on the page. */
export function referenceName({result}: ReportContext): 'mark' | 'reference' | 'mean' {
  if (result.comparison !== null || result.reference?.from === 'mark') return 'mark';
  return result.reference?.from === 'option' ? 'reference' : 'mean';
}

export function hasMark(context: ReportContext): boolean {
  return referenceName(context) === 'mark';
}

/** The horizontal tolerance asked for, if any. */
export function horizontalToleranceM({result}: ReportContext): number | null {
  return result.comparison?.requirements.find(({of}) => of === 'horizontal')?.toleranceM ?? null;
}
