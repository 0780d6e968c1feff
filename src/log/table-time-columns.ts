import {type InputError, UsageError} from '../errors.ts';
import {parseDate} from '../time/parse-time.ts';
import type {LogFinding, TableOptions} from './contents.ts';
import {finding} from './findings.ts';
import type {NamedColumns} from './table-columns.ts';
import type {CalendarColumns, TimeColumns} from './table-layout.ts';
import type {Meaning} from './table-names.ts';
import {kindOf} from './table-texts.ts';

/** The columns that date the rows, and their scale. */
export interface ChosenTime {
  readonly time: TimeColumns;
  readonly timeScale: 'utc' | 'gps';
  readonly findings: readonly LogFinding[];
}

/**
 * The first complete way of dating a row, in the order of this function: the ones that say most
 * about the moment stand first. The scale comes from the columns, else from the options, else it
 * is UTC, and a finding says so.
 */
export function timeColumns(
  columns: NamedColumns,
  options: TableOptions,
  hasDate: boolean,
): ChosenTime {
  const time = chosenTime(columns, options, hasDate);
  if (time === undefined) throw missingTime(columns, hasDate);
  const findings: LogFinding[] = [];
  if (time.kind === 'date') {
    findings.push(finding('date-without-time', 'note', {column: columns.names[time.field] ?? ''}));
  }
  const {scale, stated} = scaleOf(time, columns);
  const given = options.timeScale;
  if (scale !== null && given !== null && scale !== given) {
    throw new UsageError(
      `--time-scale ${given} contradicts the table, whose ${stated} means ${scale === 'gps' ? 'GPS time' : 'UTC'}`,
    );
  }
  const timeScale = scale ?? given ?? 'utc';
  if (scale === null && given === null && time.kind !== 'elapsed') {
    findings.push(
      finding('time-scale-assumed', 'note', {
        timeScale: 'utc',
        columns: timeNames(time, columns).join(', '),
      }),
    );
  }
  return {time, timeScale, findings};
}

function chosenTime(
  columns: NamedColumns,
  options: TableOptions,
  hasDate: boolean,
): TimeColumns | undefined {
  const timeHolds = kindOf(columns.samples('time'));
  const dateHolds = kindOf(columns.samples('date'));
  if (timeHolds === 'date and time') return {kind: 'date and time', field: columns.field('time')};
  if (dateHolds === 'date and time') return {kind: 'date and time', field: columns.field('date')};
  const clock = columns.has('timeOfDay') ? 'timeOfDay' : timeHolds === 'clock' ? 'time' : undefined;
  if (dateHolds === 'date' && clock !== undefined) {
    return {
      kind: 'date and clock',
      dateField: columns.field('date'),
      clockField: columns.field(clock),
    };
  }
  if (dateHolds === 'date' && columns.has('secondOfDay')) {
    return {
      kind: 'date and seconds',
      dateField: columns.field('date'),
      seconds: columns.number('secondOfDay'),
    };
  }
  if (columns.has('gpsWeek', 'secondOfWeek')) {
    return {
      kind: 'gps week',
      week: columns.number('gpsWeek'),
      seconds: columns.number('secondOfWeek'),
    };
  }
  if (columns.has('gpsSeconds')) return {kind: 'gps seconds', value: columns.number('gpsSeconds')};
  if (columns.has('unixSeconds')) return {kind: 'unix', value: columns.number('unixSeconds')};
  if (columns.has('year', 'month', 'day', 'hour')) {
    return {kind: 'calendar', parts: calendarColumns(columns)};
  }
  if (columns.has('year', 'dayOfYear') && (columns.has('secondOfDay') || clock !== undefined)) {
    return {
      kind: 'day of year',
      year: columns.number('year'),
      day: columns.number('dayOfYear'),
      seconds: columns.numberOrNull('secondOfDay'),
      clockField: columns.has('secondOfDay') || clock === undefined ? null : columns.field(clock),
    };
  }
  if (columns.has('modifiedJulianDate')) {
    return {kind: 'modified Julian date', value: columns.number('modifiedJulianDate')};
  }
  if (columns.has('year', 'dayOfYear')) {
    return {
      kind: 'day of year',
      year: columns.number('year'),
      day: columns.number('dayOfYear'),
      seconds: null,
      clockField: null,
    };
  }
  // With --start or --date given, the time column counts from it even beside a plain date.
  if (options.startGpsSeconds !== null && columns.has('elapsed')) {
    return {kind: 'elapsed', value: columns.number('elapsed')};
  }
  if (options.startGpsSeconds !== null && timeHolds === 'number' && dateHolds !== 'date') {
    return {kind: 'elapsed', value: columns.number('time')};
  }
  if (dateHolds === 'date' && timeHolds === 'none' && !columns.has('elapsed')) {
    return {kind: 'date', field: columns.field('date')};
  }
  if (timeHolds === 'date') return {kind: 'date', field: columns.field('time')};
  if (columns.has('year', 'month', 'day'))
    return {kind: 'calendar', parts: calendarColumns(columns)};
  if (columns.has('decimalYear'))
    return {kind: 'decimal year', value: columns.number('decimalYear')};
  // A year with decimals can only be a decimal year.
  if (columns.samples('year').some((text) => /^\d{4}[.,]\d+$/.test(text))) {
    return {kind: 'decimal year', value: columns.number('year')};
  }
  if (clock !== undefined && hasDate) return {kind: 'clock', field: columns.field(clock)};
  return undefined;
}

function calendarColumns(columns: NamedColumns): CalendarColumns {
  return {
    year: columns.number('year'),
    month: columns.number('month'),
    day: columns.number('day'),
    hour: columns.numberOrNull('hour'),
    minute: columns.numberOrNull('minute'),
    second: columns.numberOrNull('second'),
  };
}

function timeMeanings(time: TimeColumns): Meaning[] {
  switch (time.kind) {
    case 'date and time':
    case 'date':
    case 'date and clock':
    case 'date and seconds':
    case 'clock':
      return ['time', 'date', 'timeOfDay'];
    case 'gps week':
      return ['gpsWeek', 'secondOfWeek'];
    case 'gps seconds':
      return ['gpsSeconds'];
    case 'unix':
      return ['unixSeconds'];
    case 'calendar':
      return ['year', 'month', 'day', 'hour', 'minute', 'second'];
    case 'day of year':
      return ['year', 'dayOfYear', 'secondOfDay'];
    case 'modified Julian date':
      return ['modifiedJulianDate'];
    case 'decimal year':
      return ['decimalYear', 'year'];
    case 'elapsed':
      return ['elapsed', 'time'];
  }
}

function timeNames(time: TimeColumns, columns: NamedColumns): string[] {
  const used = new Set(columns.usedNames());
  return timeMeanings(time)
    .filter((meaning) => columns.has(meaning))
    .map((meaning) => columns.written(meaning))
    .filter((name) => used.has(name));
}

/** The scale that the columns state by their kind, their names or a zone in their values. */
function scaleOf(
  time: TimeColumns,
  columns: NamedColumns,
): {scale: 'utc' | 'gps' | null; stated: string} {
  const names = timeNames(time, columns).join(', ');
  if (time.kind === 'gps week' || time.kind === 'gps seconds') return {scale: 'gps', stated: names};
  if (time.kind === 'unix') return {scale: 'utc', stated: names};
  if (time.kind === 'elapsed') return {scale: null, stated: names};
  const meanings = timeMeanings(time);
  const scales = new Set(
    meanings.map((meaning) => columns.timeScale(meaning)).filter((scale) => scale !== null),
  );
  if (scales.size > 1) throw columns.error('the names of the time columns state UTC and GPS time');
  const zone = meanings.some((meaning) =>
    columns
      .samples(meaning)
      .some((text) => /\d\s*(Z|UTC|[+-]\d{2}:?\d{2})$/i.test(text) && text.includes(':')),
  );
  const [scale = null] = scales;
  if (zone && scale === 'gps') {
    throw columns.error(`the time column is named as GPS time and its values carry a time zone`);
  }
  return {scale: zone ? 'utc' : scale, stated: names};
}

function missingTime(columns: NamedColumns, hasDate: boolean): InputError {
  const numeric = columns.samples('time')[0];
  if (columns.has('elapsed')) {
    return columns.error(
      `the column "${columns.written('elapsed')}" counts from a start that is not given; give --start with the UTC of its zero`,
    );
  }
  const refused = refusedSample(columns);
  if (refused !== undefined) return columns.error(refused);
  if (columns.has('timeOfDay') && !hasDate) {
    return columns.error(
      'found a time of day without a date; give --date with the day of the first row',
    );
  }
  if (numeric !== undefined && kindOf(columns.samples('time')) === 'clock' && !hasDate) {
    return columns.error(
      `the column "${columns.written('time')}" holds times of day such as "${numeric}" without a date; give --date with the day of the first row`,
    );
  }
  if (numeric !== undefined) {
    return columns.error(
      `cannot tell what "${numeric}" in the column "${columns.written('time')}" counts; give --start, or name the column with --columns: unix, gps_seconds, tow (beside gps_week), seconds_of_day, hhmmss, mjd or decimal_year`,
    );
  }
  if (columns.has('secondOfWeek')) {
    return columns.error(
      `the column "${columns.written('secondOfWeek')}" needs a column gps_week beside it`,
    );
  }
  return columns.error(
    'need columns that date the rows, such as time, or date and time, or gps_week and tow',
  );
}

function refusedSample(columns: NamedColumns): string | undefined {
  for (const meaning of ['time', 'date'] as const) {
    const text = columns.samples(meaning)[0];
    if (text === undefined || kindOf(columns.samples(meaning)) !== 'other') continue;
    const [datePart = ''] = text.split(/[T\s]/);
    const parsed = parseDate(datePart);
    if (parsed.kind === 'refused' && parsed.reason !== 'not a date') {
      const advice = parsed.reason === 'no such day' ? 'check it' : 'write it as YYYY-MM-DD';
      return `cannot read the date "${text}" in the column "${columns.written(meaning)}": ${parsed.reason}; ${advice}`;
    }
  }
  return undefined;
}
