import {type AngleKind, parseAngle} from '../geodesy/angle.ts';
import {isoUtc} from '../time/gps-time.ts';
import {momentOf, parseDate, parseDateTime, type RefusedTime} from '../time/parse-time.ts';
import {nearestName} from './nearest-name.ts';
import {described, type Node, type Place, quoted, refuse} from './node.ts';
import {type ReadLength, readLength, readNumber, readRate} from './quantity.ts';
import type {JsonSchema, Shape} from './shape.ts';

/** Words, as written; numbers and yes or no are words too where words are asked for. */
export function text(example: string): Shape<string> {
  return scalar({
    example,
    hint: '',
    schema: {type: ['string', 'number', 'boolean', 'null']},
    read: (written) => written,
  });
}

/** One of a few words. */
export function choice<const T extends string>(values: readonly [T, ...T[]]): Shape<T> {
  return scalar({
    example: values[0],
    hint: `: ${values.join(' | ')}`,
    schema: {enum: [...values, null]},
    read: (written, no) => {
      const value = values.find((known) => known === written);
      if (value !== undefined) return value;
      const near = nearestName(written, values);
      return no(
        near === undefined
          ? `expected one of ${values.map((known) => `"${known}"`).join(', ')}, found ${quoted(written)}; write one of them`
          : `found ${quoted(written)}; did you mean "${near}"?`,
      );
    },
  });
}

/** `yes` or `no`. */
export function yesNo(): Shape<boolean> {
  return scalar({
    example: 'yes',
    hint: ': yes | no',
    schema: {enum: ['yes', 'no', true, false, null]},
    read: (written, no) => {
      if (written === 'yes' || written === 'true') return true;
      if (written === 'no' || written === 'false') return false;
      return no(`expected yes or no, found ${quoted(written)}; write yes or no`);
    },
  });
}

interface Limits {
  readonly least: number;
  readonly most: number;
}

/** Quotes around a number are harmless, so an editor must not complain about them. */
const NUMBER_OR_ITS_TEXT = {type: ['number', 'string', 'null'], pattern: '^[+-]?\\d+(\\.\\d+)?$'};

/** A number without a unit. */
export function number(limits: Limits, example: string): Shape<number> {
  return scalar({
    example,
    schema: {...NUMBER_OR_ITS_TEXT, minimum: limits.least, maximum: limits.most},
    read: (written, no) => {
      const read = readNumber(written);
      if (read.kind === 'refused') return no(read.message);
      if (read.value < limits.least || read.value > limits.most) {
        return no(
          `expected a number from ${limits.least} to ${limits.most}, found ${written}; check the digits`,
        );
      }
      return read.value;
    },
  });
}

/** The epoch that coordinates belong to, as a decimal year. */
export function coordinateEpoch(): Shape<number> {
  const least = 1900;
  const most = 2100;
  return scalar({
    example: '2020.0',
    schema: {...NUMBER_OR_ITS_TEXT, minimum: least, maximum: most},
    read: (written, no) => {
      const read = readNumber(written);
      if (read.kind === 'number' && read.value >= least && read.value <= most) return read.value;
      const aside =
        read.kind === 'refused' && /decimal comma/.test(read.message)
          ? read.message
          : `expected a coordinate epoch, found ${quoted(written)}; write the decimal year, such as 2020.0`;
      return no(aside);
    },
  });
}

const LENGTH_PATTERN = '^[+-]?\\d+(\\.\\d+)?\\s*(m|cm|mm|ft|us-ft|in)$';
const RATE_PATTERN = '^[+-]?\\d+(\\.\\d+)?\\s*(m|cm|mm|ft|us-ft|in)\\s*/\\s*yr$';

/** A length with its unit, in metres. */
export function length(limits: Limits, example: string): Shape<number> {
  const reading = lengthReading(limits, example);
  return {...reading, read: (node, place) => reading.read(node, place).lengthM};
}

/** A length with its unit and the step of its last digit: a reading of a tape or staff. */
export function lengthReading(limits: Limits, example: string): Shape<ReadLength> {
  return scalar({
    example,
    schema: {type: ['string', 'null'], pattern: LENGTH_PATTERN},
    read: (written, no) => {
      const read = readLength(written);
      if (read.kind === 'refused') return no(read.message);
      if (read.lengthM < limits.least || read.lengthM > limits.most) {
        return no(
          `expected a length from ${limits.least} m to ${limits.most} m, found ${written}; check digits and unit`,
        );
      }
      return read;
    },
  });
}

/** A velocity component with its unit, in metres per year; plates move less than 0.3 m/yr. */
export function rate(): Shape<number> {
  return scalar({
    example: '21.3 mm/yr',
    schema: {type: ['string', 'null'], pattern: RATE_PATTERN},
    read: (written, no) => {
      const read = readRate(written);
      if (read.kind === 'refused') return no(read.message);
      if (Math.abs(read.lengthM) > 1) {
        return no(`expected at most 1 m/yr, found ${written}; check digits and unit`);
      }
      return read.lengthM;
    },
  });
}

/** A calendar day, as `YYYY-MM-DD`. */
export function date(): Shape<string> {
  return scalar({
    example: '2026-05-04',
    schema: {type: ['string', 'null'], pattern: '^\\d{4}-\\d{2}-\\d{2}$'},
    read: (written, no) => {
      const read = parseDate(written);
      if (read.kind === 'date' && /^\d{4}-\d{2}-\d{2}$/.test(written)) return written;
      const why = read.kind === 'refused' ? ` (${read.reason})` : '';
      return no(`expected a date, found ${quoted(written)}${why}; write YYYY-MM-DD, as 2026-05-04`);
    },
  });
}

/** A moment of the field day, on both scales that the rest of the program uses. */
export interface Moment {
  readonly gpsSeconds: number;
  /** ISO 8601, ending in Z. */
  readonly utc: string;
  /** As the sheet has it, perhaps in local time with its offset. */
  readonly written: string;
}

/** A date and time with Z or an offset from UTC. */
export function moment(): Shape<Moment> {
  return scalar({
    example: '2026-05-04T08:00:00Z',
    schema: {
      type: ['string', 'null'],
      pattern:
        '^\\d{4}-\\d{2}-\\d{2}[T ]\\d{1,2}:\\d{2}(:\\d{2}(\\.\\d+)?)?\\s*(Z|[+-]\\d{2}:?\\d{2})$',
    },
    read: (written, no) => {
      const write =
        'write date, time and Z or the offset from UTC, as 2026-05-04T08:00:00Z or 2026-05-04 10:00 +02:00';
      const found = (why: RefusedTime['reason'] | 'no Z and no offset from UTC') =>
        `expected a date and time, found ${quoted(written)} (${why}); ${write}`;
      const read = parseDateTime(written);
      if (read.kind === 'refused') return no(found(read.reason));
      if (!read.zoneStated) return no(found('no Z and no offset from UTC'));
      const at = momentOf(read, 'utc');
      if (at.kind === 'refused') return no(found(at.reason));
      return {gpsSeconds: at.gpsSeconds, utc: isoUtc(at.gpsSeconds), written};
    },
  });
}

/** A duration with its unit, kept as written for the option of the same name. */
export function duration(example: string): Shape<string> {
  const pattern = '^\\d+(\\.\\d+)?\\s*(s|min|h|d)$';
  return scalar({
    example,
    schema: {type: ['string', 'null'], pattern},
    read: (written, no) => {
      if (new RegExp(pattern).test(written)) return written;
      return no(
        `expected a duration with its unit, found ${quoted(written)}; write it in s, min, h or d, as ${example}`,
      );
    },
  });
}

/** A length above zero, kept as written for the option of the same name. */
export function lengthText(example: string): Shape<string> {
  const reading = length({least: 1e-5, most: 1e6}, example);
  return scalar({
    example,
    schema: reading.schema,
    read: (written, no) => {
      const read = readLength(written);
      if (read.kind === 'refused') return no(read.message);
      if (read.lengthM > 0) return written;
      return no(
        `expected a length above zero, found ${quoted(written)}; write for example ${example}`,
      );
    },
  });
}

interface ScalarShape<T> {
  readonly example: string;
  /** Default: the example. */
  readonly hint?: string;
  readonly schema: JsonSchema;
  /** `no` ends the reading with a message. */
  read(written: string, no: (message: string) => never): T;
}

/** A shape that is read from text alone. */
function scalar<T>({example, hint, schema, read}: ScalarShape<T>): Shape<T> {
  return {
    example,
    hint: hint ?? `, as ${example}`,
    schema,
    read: (node: Node, place: Place) => {
      if (node.kind !== 'scalar') {
        refuse(
          place,
          node.lineNumber,
          `expected one value, found ${described(node)}; write a value such as ${example}`,
        );
      }
      return read(node.text, (message) => refuse(place, node.lineNumber, message));
    },
  };
}

/** A latitude or longitude in degrees: decimal or degrees, minutes and seconds. */
export function angle(kind: AngleKind): Shape<number> {
  return scalar({
    example: kind === 'latitude' ? '48 12 30.1234 N' : '16 22 10.5678 E',
    schema: {type: ['number', 'string', 'null']},
    read: (written, no) => {
      refuseComma(written, no);
      const read = parseAngle(written, kind);
      if (read.kind === 'angle') return read.degrees;
      return no(`${read.message}; write decimal degrees or degrees, minutes and seconds`);
    },
  });
}

/** A bearing in degrees, clockwise from the north that stands beside it: 0 ≤ bearing < 360. */
export function bearing(): Shape<number> {
  return scalar({
    example: '123 45 10',
    schema: {type: ['number', 'string', 'null']},
    read: (written, no) => {
      refuseComma(written, no);
      const read = parseAngle(written, 'longitude');
      const digitsOnly = !/[a-z+-]/i.test(written);
      if (read.kind === 'angle' && digitsOnly && read.degrees < 360) return read.degrees;
      return no(
        `expected a bearing from 0 to below 360 degrees, clockwise, found ${quoted(written)}; write decimal degrees or degrees, minutes and seconds, as 123 45 10`,
      );
    },
  });
}

function refuseComma(written: string, no: (message: string) => never): void {
  const mended = written.replace(/(\d),(?=\d)/g, '$1.');
  if (mended !== written) no(`found a decimal comma in ${quoted(written)}; write ${mended}`);
}
