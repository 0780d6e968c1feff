import type {CombinedMark, CombinedOccupation} from '../combination.ts';
import type {NoticeList} from '../notices.ts';

const AXES = ['east', 'north', 'up'] as const;
const MS_PER_HOUR = 3_600_000;
/** Two occupations closer in time share satellites, atmosphere and reflections: common practice. */
const SOON_HOURS = 1;

export function noticeMark(mark: CombinedMark, notices: NoticeList): void {
  const {name, occupations, agreement, shared, frame, of} = mark;
  if (of !== 'mark') notices.add('caution', 'combined-not-at-mark', ['marks[].of'], {name, of});
  if (frame === null) notices.add('caution', 'combined-without-frame', ['marks[].frame'], {name});
  if (agreement === 'not tested') {
    notices.add('caution', 'single-occupation', ['marks[].agreement'], {name});
    return;
  }
  if (agreement === 'disagrees') {
    const worst = [...occupations].sort((a, b) => worstError(b) - worstError(a))[0]!;
    notices.add('concern', 'occupations-disagree', ['marks[].agreement'], {
      name,
      count: occupations.length,
      worst: worst.name,
      differenceM: Math.hypot(worst.differenceM.horizontal, worst.differenceM.up),
    });
  }
  const apartHours = hoursApart(occupations);
  if (apartHours < SOON_HOURS) {
    notices.add('caution', 'soon-repeated', ['marks[].occupations'], {
      name,
      apartS: apartHours * 3600,
    });
  }
  if (shared.length > 0) {
    notices.add('note', 'shared-by-all', ['marks[].shared'], {name, list: shared.join(', ')});
  }
}

function worstError({normalisedError}: CombinedOccupation): number {
  return Math.max(...AXES.map((axis) => normalisedError[axis] ?? 0));
}

/** From the end of the first to the start of the last. */
function hoursApart(occupations: readonly CombinedOccupation[]): number {
  const [first] = occupations as [CombinedOccupation];
  const last = occupations[occupations.length - 1]!;
  return (Date.parse(last.startUtc) - Date.parse(first.endUtc)) / MS_PER_HOUR;
}
