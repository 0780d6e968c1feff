import type {Combination} from './combination.ts';
import {distance} from './combining/mark-distance.ts';
import {noticeMark} from './combining/notice-mark.ts';
import {
  byTimeAndContent,
  type NamedResult,
  occupationOf,
  reasonToLeaveOut,
  refuseTwice,
} from './combining/occupations.ts';
import {solvedMark} from './combining/solved-mark.ts';
import type {NoticeList} from './notices.ts';
import {withoutNegativeZero} from './plain-numbers.ts';

/**
 * One position per mark from the results of several occupations.
 *
 * Method: per axis, weights by the inverse variance of what an occupation does not share with all
 * others of its mark. The variance of the weighted mean takes each shared contribution (same source
 * and id: base, tape, frame, service) as one error, which no repetition makes smaller. Agreement: the
 * weighted squares of the differences against chi-square, plan and height apart; where that is less
 * likely than 5 %, the part that is not shared is enlarged by the root of squares over degrees of
 * freedom (R. T. Birge 1932, Phys. Rev. 40, 207).
 * East and north keep their covariance in what is told of the mean and of distances.
 * The order of the results does not matter.
 *
 * @throws UsageError when results of one mark differ in frame, epoch or point, or one stands twice
 */
export function combineResults(
  results: readonly NamedResult[],
  program: Combination['program'],
  notices: NoticeList,
): Combination {
  const ordered = [...results].sort(byTimeAndContent);
  refuseTwice(ordered);
  const leftOut: {name: string; because: string}[] = [];
  const usable = ordered.flatMap((one) => {
    const because = reasonToLeaveOut(one.result);
    if (because === null) return [occupationOf(one)];
    leftOut.push({name: one.name, because});
    return [];
  });
  const names = [...new Set(usable.map(({mark}) => mark))].sort();
  const solved = names.map((name) =>
    solvedMark(
      name,
      usable.filter(({mark}) => mark === name),
    ),
  );
  for (const one of solved) noticeMark(one.mark, notices);
  if (leftOut.length > 0) {
    const list = leftOut.map(({name, because}) => `${name} (${because})`).join('; ');
    notices.add('caution', 'results-left-out', ['leftOut'], {list});
  }
  return withoutNegativeZero({
    schema: 'stillmark.combination/1',
    program,
    marks: solved.map(({mark}) => mark),
    distances: solved.flatMap((from, i) => solved.slice(i + 1).map((to) => distance(from, to))),
    leftOut,
    notices: notices.notices,
  });
}
