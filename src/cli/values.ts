import {UsageError} from '../errors.ts';
import {readLength} from '../fieldbook/quantity.ts';
import {parseAngle} from '../geodesy/angle.ts';
import {type Ellipsoid, parseEllipsoid, WGS84} from '../geodesy/ellipsoid.ts';
import type {Geodetic} from '../geodesy/types.ts';
import type {CivilDate} from '../time/calendar.ts';
import {parseDurationS} from '../time/parse-duration.ts';
import {
  joinDateAndTime,
  momentOf,
  parseDate,
  parseDateTime,
  parseTimeOfDay,
} from '../time/parse-time.ts';
import {isTimeZone} from '../wording/time-zone.ts';

/*
 * What people write behind an option, as typed values. Each function names the option in what it
 * refuses, so that the message needs no other context.
 */

export function lengthOption(option: string, text: string | undefined): number | null {
  if (text === undefined) return null;
  const read = readLength(text);
  if (read.kind === 'refused') throw new UsageError(`--${option}: ${read.message}`);
  if (!(read.lengthM > 0))
    throw new UsageError(`--${option}: need a length above zero, found "${text}"`);
  return read.lengthM;
}

export function durationOption(option: string, text: string | undefined): number | null {
  if (text === undefined) return null;
  const seconds = parseDurationS(text);
  if (seconds === undefined) {
    throw new UsageError(
      `--${option}: need a time with its unit (s, min, h or d), such as 90s or 5min, found "${text}"`,
    );
  }
  return seconds;
}

export function numberOption(option: string, value: number | undefined): number | null {
  if (value === undefined) return null;
  if (!Number.isFinite(value) || value < 0)
    throw new UsageError(`--${option}: need a number from 0 up`);
  return value;
}

export function countOption(option: string, value: number | undefined): number | null {
  const count = numberOption(option, value);
  if (count !== null && (!Number.isInteger(count) || count < 1)) {
    throw new UsageError(`--${option}: need a whole number from 1 up, found ${count}`);
  }
  return count;
}

/** A date as YYYY-MM-DD. */
export function dateOption(option: string, text: string | undefined): CivilDate | null {
  if (text === undefined) return null;
  const read = parseDate(text);
  if (read.kind === 'refused') {
    throw new UsageError(
      `--${option}: need a date as YYYY-MM-DD, found "${text}" (${read.reason})`,
    );
  }
  return read.date;
}

/** A UTC date and time, as GPS seconds. */
export function momentOption(option: string, text: string | undefined): number | null {
  if (text === undefined) return null;
  const moment = utcMoment(text);
  if (moment === null) {
    throw new UsageError(
      `--${option}: need a UTC date and time such as 2026-05-04T10:00:00, found "${text}"`,
    );
  }
  return moment;
}

/** A UTC date and time, or a time of day on the date of the record's first epoch. */
export function momentOrTimeOption(
  option: string,
  text: string | undefined,
  firstDate: CivilDate | null,
): number | null {
  if (text === undefined) return null;
  const clock = parseTimeOfDay(text);
  if (clock.kind === 'refused') return momentOption(option, text);
  if (firstDate === null) return null;
  const {year, month, day} = firstDate;
  const joined = joinDateAndTime(`${year}-${two(month)}-${two(day)}`, text);
  const moment = joined.kind === 'refused' ? joined : momentOf(joined, 'utc');
  if (moment.kind === 'refused')
    throw new UsageError(`--${option}: "${text}" is not a time on that day`);
  return moment.gpsSeconds;
}

function two(value: number): string {
  return String(value).padStart(2, '0');
}

function utcMoment(text: string): number | null {
  const read = parseDateTime(text);
  if (read.kind === 'refused') return null;
  const moment = momentOf(read, 'utc');
  return moment.kind === 'refused' ? null : moment.gpsSeconds;
}

/** A zone of the IANA database, for display. */
export function timeZoneOption(option: string, text: string | undefined): string | null {
  if (text === undefined) return null;
  if (isTimeZone(text)) return text;
  throw new UsageError(
    `--${option}: need a time zone such as Europe/Berlin or Australia/Sydney, found "${text}"`,
  );
}

/** Latitude, longitude and ellipsoidal height, separated by commas. */
export function placeOption(option: string, text: string | undefined): Geodetic | null {
  if (text === undefined) return null;
  const parts = text.split(',').map((part) => part.trim());
  const [latitudeText, longitudeText, heightText] = parts;
  if (
    parts.length !== 3 ||
    latitudeText === undefined ||
    longitudeText === undefined ||
    heightText === undefined
  ) {
    throw new UsageError(
      `--${option}: need latitude,longitude,ellipsoidal height such as 50.1,9.2,210.5, found "${text}"`,
    );
  }
  const latitude = parseAngle(latitudeText, 'latitude');
  const longitude = parseAngle(longitudeText, 'longitude');
  if (latitude.kind === 'refused') throw new UsageError(`--${option}: ${latitude.message}`);
  if (longitude.kind === 'refused') throw new UsageError(`--${option}: ${longitude.message}`);
  const ellipsoidalHeightM = Number(heightText.replace(/\s*m$/, ''));
  if (heightText === '' || !Number.isFinite(ellipsoidalHeightM)) {
    throw new UsageError(
      `--${option}: need the ellipsoidal height in metres, found "${heightText}"`,
    );
  }
  return {latitudeDeg: latitude.degrees, longitudeDeg: longitude.degrees, ellipsoidalHeightM};
}

export function ellipsoidOption(text: string | undefined): Ellipsoid {
  if (text === undefined) return WGS84;
  const read = parseEllipsoid(text);
  if (read.kind === 'refused') throw new UsageError(`--ellipsoid: ${read.message}`);
  return read.ellipsoid;
}

/** What the parser hands over as lists by design. */
const REPEATABLE = new Set(['log', '_', 'with', 'position']);

/** An option that was given twice reaches us as a list; saying it twice is a mistake to name. */
export function requireSingle(options: Readonly<Record<string, unknown>>): void {
  for (const [name, value] of Object.entries(options)) {
    if (!REPEATABLE.has(name) && Array.isArray(value)) {
      throw new UsageError(`--${name} is given ${value.length} times; give it once`);
    }
  }
}
