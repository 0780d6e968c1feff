import {SECONDS_PER_DAY} from '../time/calendar.ts';

const HALF_DAY_S = SECONDS_PER_DAY / 2;

/** A jump of time beyond these is where a log may have been interrupted and taken up again. */
const JUMP_BACK_S = 1;
const JUMP_FORWARD_S = 60;

/** A stretch of epochs on one day, counted from 1970-01-01. */
export interface DayRun {
  readonly fromEpoch: number;
  readonly day: number;
}

/**
 * Finds the day of every epoch from times of day and the few dates that a log gives.
 *
 * Method: first the times are unrolled: a time of day that falls by more than half a day belongs to
 * the next day. A date then anchors the count of days; it holds for the epochs after it and, being
 * the first, for all epochs before it. A date that contradicts the count is believed when the next
 * date says the same, or when time jumped: then the log was interrupted there, and the count
 * changes where the jump was largest.
 */
export class DayTrack {
  #lastS = Number.NaN;
  #day = 0;
  /** Unrolled days, from the epochs on at which they begin. */
  readonly #days: DayRun[] = [];
  readonly #believed = new DateRuns();
  readonly #doubtful = new DateRuns();

  /** The day of a time near the last one, counted from the day of the first. */
  dayOf(timeOfDayS: number): number {
    if (timeOfDayS - this.#lastS < -HALF_DAY_S) return this.#day + 1;
    return timeOfDayS - this.#lastS > HALF_DAY_S ? this.#day - 1 : this.#day;
  }

  /** Moves on to the next time of the log; `epoch` is the index that its epoch has or would have. */
  advance(timeOfDayS: number, epoch: number): void {
    const day = this.dayOf(timeOfDayS);
    const stepS = (day - this.#day) * SECONDS_PER_DAY + timeOfDayS - this.#lastS;
    if (stepS < -JUMP_BACK_S || stepS > JUMP_FORWARD_S) {
      this.#believed.jump(epoch, Math.abs(stepS));
      this.#doubtful.jump(epoch, Math.abs(stepS));
    }
    this.#day = day;
    this.#lastS = timeOfDayS;
    const last = this.#days.at(-1);
    if (last === undefined || last.day !== day) this.#days.push({fromEpoch: epoch, day});
  }

  /**
   * The date of the time last advanced to.
   *
   * @param believed false for a date that comes without a valid position: receivers that have just
   *                 been switched on print the date of their clock
   */
  seeDate(dateDays: number, epoch: number, believed: boolean): void {
    const runs = believed ? this.#believed : this.#doubtful;
    runs.see(epoch, dateDays - this.#day);
  }

  /** Days since 1970-01-01 in stretches of epochs; `assumedFirstDay` if the log has no date. */
  runs(assumedFirstDay: number): DatedRuns {
    const believed = this.#believed.finish();
    const doubtful = this.#doubtful.finish();
    const first = this.#days.findLast(({fromEpoch}) => fromEpoch === 0)?.day ?? 0;
    const source = believed.length > 0 ? 'log' : doubtful.length > 0 ? 'doubtful' : 'assumed';
    const assumed = [{fromEpoch: 0, day: assumedFirstDay - first}];
    const shifts = source === 'log' ? believed : source === 'doubtful' ? doubtful : assumed;
    return {
      source,
      runs: sumOfRuns(this.#days, shifts),
      shifts,
      conflicts: this.#believed.conflicts,
    };
  }
}

export interface DatedRuns {
  /** Whether dates with a position were found, only others, or none. */
  readonly source: 'log' | 'doubtful' | 'assumed';
  readonly runs: readonly DayRun[];
  /** The same without the days counted from the first: what is added to those. */
  readonly shifts: readonly DayRun[];
  /** Dates that contradicted the others and were not believed. */
  readonly conflicts: number;
}

/** The differences between dates and unrolled days: one as long as nothing goes wrong. */
class DateRuns {
  readonly #runs: Array<{fromEpoch: number; day: number; dates: number}> = [];
  #pending: {fromEpoch: number; day: number; atJump: boolean} | undefined;
  #jumpEpoch = -1;
  #jumpS = 0;
  conflicts = 0;

  jump(epoch: number, sizeS: number): void {
    if (sizeS <= this.#jumpS) return;
    this.#jumpS = sizeS;
    this.#jumpEpoch = epoch;
  }

  see(epoch: number, shift: number): void {
    const current = this.#runs.at(-1);
    if (current === undefined) {
      this.#runs.push({fromEpoch: 0, day: shift, dates: 1});
    } else if (current.day === shift) {
      current.dates += 1;
      if (this.#pending !== undefined) this.conflicts += 1;
      this.#pending = undefined;
    } else if (this.#pending?.day === shift) {
      this.#change(this.#pending, 2);
    } else {
      if (this.#pending !== undefined) this.conflicts += 1;
      const atJump = this.#jumpEpoch >= 0;
      this.#pending = {fromEpoch: atJump ? this.#jumpEpoch : epoch, day: shift, atJump};
    }
    this.#jumpEpoch = -1;
    this.#jumpS = 0;
  }

  finish(): readonly DayRun[] {
    const pending = this.#pending;
    if (pending?.atJump === true) this.#change(pending, 1);
    else if (pending !== undefined) this.conflicts += 1;
    this.#pending = undefined;
    return this.#runs;
  }

  #change(
    {fromEpoch, day, atJump}: {fromEpoch: number; day: number; atJump: boolean},
    dates: number,
  ) {
    const current = this.#runs.at(-1);
    this.#pending = undefined;
    if (current !== undefined && current.dates === 1 && !atJump) {
      // The single date so far is the one that is wrong.
      current.day = day;
      current.dates = dates;
      this.conflicts += 1;
      return;
    }
    this.#runs.push({fromEpoch, day, dates});
  }
}

/** Adds two step functions of the epoch, the later of equal starts holding. */
function sumOfRuns(days: readonly DayRun[], shifts: readonly DayRun[]): DayRun[] {
  const starts = [...new Set([0, ...days.map(startOf), ...shifts.map(startOf)])];
  starts.sort((a, b) => a - b);
  let dayAt = 0;
  let shiftAt = 0;
  return starts.map((fromEpoch) => {
    while ((days[dayAt + 1]?.fromEpoch ?? Number.POSITIVE_INFINITY) <= fromEpoch) dayAt += 1;
    while ((shifts[shiftAt + 1]?.fromEpoch ?? Number.POSITIVE_INFINITY) <= fromEpoch) shiftAt += 1;
    return {fromEpoch, day: (days[dayAt]?.day ?? 0) + (shifts[shiftAt]?.day ?? 0)};
  });
}

function startOf({fromEpoch}: DayRun): number {
  return fromEpoch;
}
