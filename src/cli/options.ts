import type {Argv} from 'yargs';
import {parseCoordinateEpoch} from '../geodesy/coordinate-epoch.ts';

/*
 * The options of the commands, as yargs sees them: names, groups and help. They are plain strings
 * and numbers here; settings.ts turns them into typed values, joins them with the field sheet and
 * the defaults, and remembers where each came from.
 */

const READING = 'Reading the log:';
const SCREENING = 'Which epochs are used:';
const REFERENCE = 'Reference, frame and height:';
const DECISION = 'What is asked of the record:';
const PRESENTATION = 'How the report looks:';
const FORMS = 'Which coordinates:';
const FRAMES = 'Frames and epochs:';
const CONVERTED = 'How the result is written:';
const OUTPUT = 'Outputs (nothing is written unasked; - is standard output):';

/** Three real examples behind the options of a command, each on a line of its own. */
function withExamples<T>(args: Argv<T>, examples: readonly (readonly [string, string])[]): Argv<T> {
  const lines = examples.map(([command, says]) => `  ${command}\n      ${says}`);
  return args.epilogue(`Examples:\n${lines.join('\n')}`);
}

export function contentsExamples<T>(args: Argv<T>): Argv<T> {
  return withExamples(args, [
    ['stillmark contents day1.nmea', 'list sentences, rate, gaps, fixes and rejected lines'],
    ['stillmark contents morning.log evening.log.gz', 'join two files in time order'],
    ['stillmark contents walk.nmea', 'number the periods during which the receiver stood'],
  ]);
}

export function reduceExamples<T>(args: Argv<T>): Argv<T> {
  return withExamples(args, [
    ['stillmark reduce day1.nmea --report day1.html', 'position, uncertainty and a report'],
    ['stillmark reduce base.txt --columns time,x,y,z --start 2026-05-04T10:00:00', 'a bare table'],
    ['stillmark reduce walk.nmea --stand 2 --result stop2.json', 'one stop of a longer log'],
  ]);
}

export function checkExamples<T>(args: Argv<T>): Argv<T> {
  return withExamples(args, [
    ['stillmark check am.nmea --marks marks.yaml --mark P7 --tolerance 20mm', 'the first setup'],
    [
      'stillmark check am.nmea --sheet am.yaml --marks site.yaml --report am.html',
      'the rest from the field sheet, with a report',
    ],
    [
      'stillmark check am.nmea pm.nmea --mark P7 --marks site.csv --fix fixed',
      'two files, fixed only',
    ],
  ]);
}

export function combineExamples<T>(args: Argv<T>): Argv<T> {
  return withExamples(args, [
    ['stillmark combine am.json pm.json', 'two occupations of a mark as one position'],
    ['stillmark combine day1/*.json day2/*.json --result network.json', 'all marks of a network'],
    ['stillmark combine p7-a.json p7-b.json p9.json', 'with the distance between two marks'],
  ]);
}

export function combineOptions<T>(args: Argv<T>) {
  return args
    .positional('results', {
      type: 'string',
      array: true,
      demandOption: true,
      describe: 'result files of reduce or check, in any order',
    })
    .options({
      result: {type: 'string', group: OUTPUT, describe: 'write everything computed, as JSON'},
    });
}

export function convertExamples<T>(args: Argv<T>): Argv<T> {
  return withExamples(args, [
    ['stillmark convert 50.1,9.2,210.5 --from geodetic --to UTM', 'one position, its zone found'],
    [
      'stillmark convert --list marks.csv --to geodetic --angles dms --output marks-dms.csv',
      'a list whose header names x, y and z',
    ],
    [
      'stillmark convert --list marks.csv --from-frame ITRF2020 --from-epoch 2026.4 ' +
        '--to-frame ETRF2000 --to-epoch 2010.0 --motion "at rest in ETRF2000"',
      'another frame and epoch',
    ],
  ]);
}

export function convertOptions<T>(args: Argv<T>) {
  return args
    .positional('position', {
      type: 'string',
      array: true,
      default: [] as string[],
      describe: 'positions, the numbers of each set apart by commas',
    })
    .options({
      list: {type: 'string', group: FORMS, describe: 'list with a header line, plain or gzip'},
      columns: {
        type: 'string',
        group: FORMS,
        describe: 'names of the columns of a list without a header, comma separated',
      },
      from: {
        type: 'string',
        group: FORMS,
        describe:
          'geocentric, geodetic, local or a grid; a header of x, y, z or latitude … says it',
      },
      to: {
        type: 'string',
        group: FORMS,
        describe: 'the same; a grid is UTM, "UTM 33N", EPSG:25833 or a PROJ string',
      },
      at: {
        type: 'string',
        group: FORMS,
        describe: 'origin of local coordinates: latitude,longitude,ellipsoidal height',
      },
      ellipsoid: {
        type: 'string',
        group: FORMS,
        describe:
          'WGS84, GRS80, or semi-major axis and 1/f (default: that of the frame, else WGS84)',
      },
      'from-frame': {type: 'string', group: FRAMES, describe: 'frame of the given coordinates'},
      'from-epoch': {
        type: 'string',
        coerce: parseCoordinateEpoch,
        group: FRAMES,
        describe: 'their coordinate epoch, decimal year',
      },
      'to-frame': {type: 'string', group: FRAMES, describe: 'frame that is wanted'},
      'to-epoch': {
        type: 'string',
        coerce: parseCoordinateEpoch,
        group: FRAMES,
        describe: 'epoch that is wanted (default: of the frame, else of the given coordinates)',
      },
      motion: {
        type: 'string',
        group: FRAMES,
        describe: 'how the points move between epochs: "at rest in ETRF2014", "plate EURA", …',
      },
      output: {
        type: 'string',
        default: '-',
        group: CONVERTED,
        describe: 'file to write; - is standard output',
      },
      decimals: {
        type: 'number',
        default: 5,
        group: CONVERTED,
        describe: 'decimals of a metre; degrees get as many as say the same',
      },
      angles: {
        choices: ['deg', 'dms'] as const,
        default: 'deg' as const,
        group: CONVERTED,
        describe: 'decimal degrees, or degrees, minutes and seconds',
      },
      factors: {
        type: 'boolean',
        default: false,
        group: CONVERTED,
        describe:
          'convergence, point scale, elevation and combined factor in a list of grid positions',
      },
      quiet: {type: 'boolean', alias: 'q', default: false, describe: 'no summary and no progress'},
    });
}

export function inputOptions<T>(args: Argv<T>) {
  return args
    .positional('log', {
      type: 'string',
      array: true,
      demandOption: true,
      describe: 'log files, plain or gzip, joined in time order; - reads standard input',
    })
    .options({
      date: {
        type: 'string',
        group: READING,
        describe: 'date of the first epoch, YYYY-MM-DD, when the log carries none',
      },
      columns: {
        type: 'string',
        group: READING,
        describe: 'names of the columns of a table without a header, comma separated',
      },
      'time-scale': {
        choices: ['utc', 'gps'] as const,
        group: READING,
        describe: 'scale of the times in a table',
      },
      start: {
        type: 'string',
        group: READING,
        describe: 'UTC that a table counts its seconds from, such as 2026-05-04T10:00:00',
      },
      'accept-no-checksum': {
        type: 'boolean',
        default: false,
        group: READING,
        describe: 'believe sentences that carry no checksum',
      },
      ellipsoid: {
        type: 'string',
        group: READING,
        describe: 'WGS84 (default), GRS80, or semi-major axis in metres and 1/f: 6378137,298.2572',
      },
      quiet: {
        type: 'boolean',
        alias: 'q',
        default: false,
        describe: 'no notices and no progress on standard error',
      },
    });
}

export function contentsOptions<T>(args: Argv<T>) {
  return args.options({
    result: {type: 'string', group: OUTPUT, describe: 'write what was found as JSON'},
  });
}

export function reduceOptions<T>(args: Argv<T>) {
  return args.options({
    sheet: {type: 'string', group: REFERENCE, describe: 'field sheet (YAML)'},
    at: {
      type: 'string',
      group: REFERENCE,
      describe: 'reference for east, north and up: latitude,longitude,ellipsoidal height',
    },
    frame: {type: 'string', group: REFERENCE, describe: 'frame of the positions in the log'},
    'coordinate-epoch': {
      type: 'string',
      coerce: parseCoordinateEpoch,
      group: REFERENCE,
      describe: 'coordinate epoch of the positions, decimal year (that of the base or network)',
    },
    grid: {
      type: 'string',
      group: REFERENCE,
      describe: 'map grid for the position: UTM, UTM 33N, EPSG:25833 or a PROJ string',
    },
    geoid: {
      type: 'string',
      group: REFERENCE,
      describe: 'geoid grid (GTX or ISG) for heights above the geoid',
    },
    'geoid-interpolation': {
      choices: ['bilinear', 'biquadratic'] as const,
      group: REFERENCE,
      describe: 'between the nodes of the geoid grid (default: bilinear)',
    },
    separation: {
      type: 'string',
      group: REFERENCE,
      describe: 'ellipsoidal minus orthometric height, such as --separation=44.667m',
    },
    fix: {
      choices: ['best', 'fixed', 'float', 'differential', 'autonomous', 'precise', 'any'] as const,
      group: SCREENING,
      describe: 'fix class to use (default: the best that lasts)',
    },
    'min-satellites': {type: 'number', group: SCREENING, describe: 'fewest satellites used'},
    'max-hdop': {type: 'number', group: SCREENING, describe: 'largest horizontal DOP'},
    'max-pdop': {type: 'number', group: SCREENING, describe: 'largest position DOP'},
    'max-age': {type: 'string', group: SCREENING, describe: 'largest correction age, such as 5s'},
    'max-sigma': {
      type: 'string',
      group: SCREENING,
      describe: "largest horizontal sigma by the receiver's own account, such as 30mm",
    },
    'from-utc': {type: 'string', group: SCREENING, describe: 'leave out what is earlier'},
    'to-utc': {type: 'string', group: SCREENING, describe: 'leave out what is later'},
    settle: {
      type: 'string',
      group: SCREENING,
      describe: 'leave out the start of the occupation, such as 5min',
    },
    stand: {
      type: 'number',
      group: SCREENING,
      describe: 'use only the N-th standing period that `contents` lists',
    },
    want: {
      type: 'string',
      group: DECISION,
      describe: 'wished 95 % horizontal radius, such as 10mm: how long would it take',
    },
    'movement-limit': {
      type: 'string',
      group: DECISION,
      describe: 'movement that matters, such as 5mm (default: from the uncertainty)',
    },
  });
}

export function checkOptions<T>(args: Argv<T>) {
  return args.options({
    marks: {type: 'string', group: REFERENCE, describe: 'marks file (YAML, CSV or SINEX)'},
    mark: {type: 'string', group: REFERENCE, describe: 'name of the mark that was occupied'},
    with: {
      type: 'string',
      array: true,
      nargs: 1,
      group: REFERENCE,
      describe: 'results of other checks of the day, to be set beside this one',
    },
    motion: {
      type: 'string',
      group: REFERENCE,
      describe: 'how the mark moves between epochs: "at rest in ETRF2014", "plate EURA", …',
    },
    tolerance: {
      type: 'string',
      group: DECISION,
      describe: 'horizontal radius to hold, such as 20mm',
    },
    'tolerance-up': {type: 'string', group: DECISION, describe: 'height difference to hold'},
    'tolerance-reason': {
      type: 'string',
      group: DECISION,
      describe: 'where the tolerance comes from, for the report',
    },
  });
}

export function outputOptions<T>(args: Argv<T>) {
  return args.options({
    report: {type: 'string', group: OUTPUT, describe: 'one self-contained HTML page'},
    result: {type: 'string', group: OUTPUT, describe: 'everything computed, as JSON'},
    epochs: {type: 'string', group: OUTPUT, describe: 'one row per epoch, as CSV'},
    geojson: {type: 'string', group: OUTPUT, describe: 'position and 95 % ellipse, as GeoJSON'},
    kml: {type: 'string', group: OUTPUT, describe: 'position and 95 % ellipse, as KML'},
    sinex: {type: 'string', group: OUTPUT, describe: 'position and covariance, as SINEX'},
    title: {
      type: 'string',
      group: PRESENTATION,
      describe: 'title, instead of the name of the mark',
    },
    logo: {type: 'string', group: PRESENTATION, describe: 'logo (PNG or SVG), kept in the page'},
    'prepared-for': {type: 'string', group: PRESENTATION, describe: 'whom the report is for'},
    remarks: {
      type: 'string',
      group: PRESENTATION,
      describe: 'remarks of the one who hands it over',
    },
    units: {
      choices: ['m', 'ft', 'us-ft'] as const,
      group: PRESENTATION,
      describe: 'lengths in metres, international or US survey feet (default: metres)',
    },
    angles: {
      choices: ['deg', 'dms'] as const,
      group: PRESENTATION,
      describe: 'angles in decimal degrees, or degrees, minutes and seconds',
    },
    'time-zone': {
      type: 'string',
      group: PRESENTATION,
      describe: 'show the clock of a place beside UTC, such as Europe/Berlin',
    },
  });
}

/** What yargs yields, with every option that some command does not have left optional. */
export interface CommandArguments {
  readonly log: readonly string[];
  readonly date?: string | undefined;
  readonly columns?: string | undefined;
  readonly timeScale?: 'utc' | 'gps' | undefined;
  readonly start?: string | undefined;
  readonly acceptNoChecksum: boolean;
  readonly ellipsoid?: string | undefined;
  readonly quiet: boolean;
  readonly sheet?: string | undefined;
  readonly at?: string | undefined;
  readonly frame?: string | undefined;
  readonly coordinateEpoch?: number | undefined;
  readonly grid?: string | undefined;
  readonly geoid?: string | undefined;
  readonly geoidInterpolation?: 'bilinear' | 'biquadratic' | undefined;
  readonly separation?: string | undefined;
  readonly with?: readonly string[] | undefined;
  readonly motion?: string | undefined;
  readonly fix?: string | undefined;
  readonly minSatellites?: number | undefined;
  readonly maxHdop?: number | undefined;
  readonly maxPdop?: number | undefined;
  readonly maxAge?: string | undefined;
  readonly maxSigma?: string | undefined;
  readonly fromUtc?: string | undefined;
  readonly toUtc?: string | undefined;
  readonly settle?: string | undefined;
  readonly stand?: number | undefined;
  readonly want?: string | undefined;
  readonly movementLimit?: string | undefined;
  readonly marks?: string | undefined;
  readonly mark?: string | undefined;
  readonly tolerance?: string | undefined;
  readonly toleranceUp?: string | undefined;
  readonly toleranceReason?: string | undefined;
  readonly report?: string | undefined;
  readonly result?: string | undefined;
  readonly epochs?: string | undefined;
  readonly geojson?: string | undefined;
  readonly kml?: string | undefined;
  readonly sinex?: string | undefined;
  readonly title?: string | undefined;
  readonly logo?: string | undefined;
  readonly preparedFor?: string | undefined;
  readonly remarks?: string | undefined;
  readonly units?: 'm' | 'ft' | 'us-ft' | undefined;
  readonly angles?: 'deg' | 'dms' | undefined;
  readonly timeZone?: string | undefined;
}
