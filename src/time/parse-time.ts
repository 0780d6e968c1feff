import {type CivilDate, civilFromDays, daysFromCivil, isCivilDate} from './calendar.ts';
import {GPS_EPOCH_DAY, gpsSecondsFromGpsCalendar, gpsSecondsFromUtc} from './gps-time.ts';

/** A refusal says in field terms what is wrong with the text. */
export interface RefusedTime {
  readonly kind: 'refused';
  readonly reason:
    | 'not a date'
    | 'not a time of day'
    | 'not a date and time'
    | 'day and month could be swapped'
    | 'two-digit year'
    | 'no such day'
    | 'no such time of day'
    | 'no such leap second'
    | 'time zone on a GPS time'
    | 'before GPS time began';
}

export interface ParsedDate {
  readonly kind: 'date';
  readonly date: CivilDate;
}

export interface ParsedTimeOfDay {
  readonly kind: 'time of day';
  readonly minuteOfDay: number;
  /** 0 ≤ s < 61; 60 and more only inside a leap second. */
  readonly secondOfMinute: number;
}

export interface ParsedDateTime {
  readonly kind: 'date and time';
  /** Moved to UTC when the text states an offset. */
  readonly date: CivilDate;
  readonly secondOfDay: number;
  /** Whether the text says Z or an offset from UTC. */
  readonly zoneStated: boolean;
}

export interface ParsedMoment {
  readonly kind: 'moment';
  readonly gpsSeconds: number;
}

const YEAR_FIRST = /^(\d{4})([-/.])(\d{1,2})\2(\d{1,2})$/;
const YEAR_FIRST_COMPACT = /^(\d{4})(\d{2})(\d{2})$/;
const YEAR_AND_DAY = /^(\d{4})-(\d{3})$/;
const YEAR_LAST = /^\d{1,2}[-/.]\d{1,2}[-/.]\d{4}$/;
const SHORT_YEAR = /^\d{1,2}[-/.]\d{1,2}[-/.]\d{1,2}$/;
const CLOCK = /^(\d{1,2}):(\d{2})(?::(\d{2}(?:[.,]\d+)?))?$/;
const CLOCK_COMPACT = /^(\d{2})(\d{2})(\d{2}(?:\.\d+)?)$/;
const ZONE = /(?:Z|UTC|([+-])(\d{2}):?([0-5]\d)?)$/i;

/**
 * A calendar date as tables write it: year first, `2026-05-04`, `2026/05/04`, `20260504` or the day
 * of the year `2026-124`.
 *
 * Dates with the year last (04.05.2026) are refused: day and month trade places between countries
 * and nothing in the text tells which is which.
 * Source: ISO 8601-1:2019 for the forms with `-` and without separators; from memory.
 */
export function parseDate(text: string): ParsedDate | RefusedTime {
  const trimmed = text.trim();
  const ordinal = YEAR_AND_DAY.exec(trimmed);
  if (ordinal !== null) return dateFromDayOfYear(Number(ordinal[1]), Number(ordinal[2]));
  const parts = YEAR_FIRST.exec(trimmed);
  if (parts !== null) return checkedDate(Number(parts[1]), Number(parts[3]), Number(parts[4]));
  const compact = YEAR_FIRST_COMPACT.exec(trimmed);
  if (compact !== null) {
    return checkedDate(Number(compact[1]), Number(compact[2]), Number(compact[3]));
  }
  if (YEAR_LAST.test(trimmed)) return refused('day and month could be swapped');
  return refused(SHORT_YEAR.test(trimmed) ? 'two-digit year' : 'not a date');
}

function dateFromDayOfYear(year: number, dayNumber: number): ParsedDate | RefusedTime {
  const date = civilFromDays(daysFromCivil({year, month: 1, day: 1}) + dayNumber - 1);
  return dayNumber >= 1 && date.year === year ? {kind: 'date', date} : refused('no such day');
}

function checkedDate(year: number, month: number, day: number): ParsedDate | RefusedTime {
  const date = {year, month, day};
  return isCivilDate(date) ? {kind: 'date', date} : refused('no such day');
}

/** A time of day as `hh:mm`, `hh:mm:ss.s` or `hhmmss.s`; a comma may stand for the point. */
export function parseTimeOfDay(text: string): ParsedTimeOfDay | RefusedTime {
  const trimmed = text.trim();
  const parts = CLOCK.exec(trimmed) ?? CLOCK_COMPACT.exec(trimmed);
  if (parts === null) return refused('not a time of day');
  const hour = Number(parts[1]);
  const minute = Number(parts[2]);
  const secondOfMinute = Number((parts[3] ?? '0').replace(',', '.'));
  if (hour > 23 || minute > 59 || secondOfMinute >= 61) return refused('no such time of day');
  return {kind: 'time of day', minuteOfDay: hour * 60 + minute, secondOfMinute};
}

/**
 * A date and time in one text, `2026-05-04T10:20:30.5Z`, with `T`, a blank or blanks between date
 * and time, and with Z, UTC, an offset (`+02:00`, `+0200`, `+02`) or nothing at the end.
 *
 * Source: ISO 8601-1:2019; the blank instead of T is common practice, no source.
 */
export function parseDateTime(text: string): ParsedDateTime | RefusedTime {
  const parts = /^(\S+?)(?:[T_]|\s+)(\S.*)$/i.exec(text.trim());
  if (parts === null) return refused('not a date and time');
  return joinDateAndTime(parts[1] ?? '', parts[2] ?? '');
}

/** Date and time of day from two fields of a table; the zone may stand behind the time. */
export function joinDateAndTime(dateText: string, timeText: string): ParsedDateTime | RefusedTime {
  const date = parseDate(dateText);
  if (date.kind === 'refused') return date;
  const zone = ZONE.exec(timeText.trim());
  const clockText = zone === null ? timeText : timeText.trim().slice(0, zone.index);
  const time = parseTimeOfDay(clockText);
  if (time.kind === 'refused') return time;
  const offsetMinutes = zone === null ? 0 : minutesOfZone(zone);
  if (Math.abs(offsetMinutes) > 14 * 60) return refused('no such time of day');

  const minutes = time.minuteOfDay - offsetMinutes;
  const dayShift = Math.floor(minutes / (24 * 60));
  const minuteOfDay = minutes - dayShift * 24 * 60;
  if (time.secondOfMinute >= 60 && minuteOfDay !== 24 * 60 - 1) {
    return refused('no such leap second');
  }
  return {
    kind: 'date and time',
    date: civilFromDays(daysFromCivil(date.date) + dayShift),
    secondOfDay: minuteOfDay * 60 + time.secondOfMinute,
    zoneStated: zone !== null,
  };
}

function minutesOfZone(zone: RegExpExecArray): number {
  const minutes = Number(zone[2] ?? 0) * 60 + Number(zone[3] ?? 0);
  return zone[1] === '-' ? -minutes : minutes;
}

/** The moment that a date and time means on a stated time scale. */
export function momentOf(
  {date, secondOfDay, zoneStated}: ParsedDateTime,
  timeScale: 'utc' | 'gps',
): ParsedMoment | RefusedTime {
  if (timeScale === 'gps' && zoneStated) return refused('time zone on a GPS time');
  const gpsSeconds =
    timeScale === 'gps'
      ? gpsSecondsFromGpsCalendar(date, secondOfDay)
      : gpsSecondsFromUtc(date, secondOfDay);
  if (gpsSeconds !== undefined) return {kind: 'moment', gpsSeconds};
  return refused(
    daysFromCivil(date) < GPS_EPOCH_DAY ? 'before GPS time began' : 'no such leap second',
  );
}

function refused(reason: RefusedTime['reason']): RefusedTime {
  return {kind: 'refused', reason};
}
