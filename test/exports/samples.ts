import {readFileSync} from 'node:fs';
import {join} from 'node:path';
import {findMark, readMarks} from '../../src/fieldbook/marks.ts';
import {emptySheet} from '../../src/fieldbook/sheet.ts';
import {WGS84} from '../../src/geodesy/ellipsoid.ts';
import type {LogContents} from '../../src/log/contents.ts';
import {createLogReader} from '../../src/log/reader.ts';
import {inputAccount} from '../../src/occupation/account.ts';
import type {ContentsResult} from '../../src/occupation/contents-result.ts';
import {describeContents} from '../../src/occupation/describe.ts';
import {noticeList} from '../../src/occupation/notices.ts';
import {type Reduced, reduceOccupation} from '../../src/occupation/reduce.ts';
import type {Result} from '../../src/occupation/result.ts';
import {type SampleSpec, sample} from '../report/fixtures.ts';

const SAMPLES = join(import.meta.dirname, '../../sample-logs');
/** The wording of notices is tested elsewhere. */
const codeAsText = (code: string): string => code;

/** A result that the tests of the report invent; its zeros are those of a result. */
export function invented(spec: SampleSpec): Result {
  const text = JSON.stringify(sample(spec).result);
  return JSON.parse(text) as Result;
}

const PROGRAM = {name: 'stillmark', version: '0.0.0'} as const;

/** Reads one of the sample logs; `maxLines` cuts it for the sake of time. */
function readSample(name: string, maxLines?: number): LogContents {
  const text = readFileSync(join(SAMPLES, name), 'latin1');
  const cut = maxLines === undefined ? text : text.split('\n').slice(0, maxLines).join('\n');
  const reader = createLogReader({
    name,
    date: null,
    trustAbsentChecksum: false,
    table: {
      columns: null,
      timeScale: null,
      startGpsSeconds: null,
      semiMajorAxisM: WGS84.semiMajorAxisM,
      inverseFlattening: WGS84.inverseFlattening,
    },
  });
  reader.add(Buffer.from(cut, 'latin1'));
  return reader.finish();
}

function accountsOf(log: LogContents, name: string) {
  const file = {name, bytes: log.inputs[0]?.bytes ?? 0, sha256: 'f'.repeat(64)};
  return log.inputs.map((input) => inputAccount(input, file));
}

export interface SampleAsked {
  readonly name: string;
  readonly mark: string | null;
  readonly frame?: string;
  readonly maxLines?: number;
}

/** A reduction of a sample log, or its check when a mark of sample-logs/marks.yaml is named. */
export function reducedSample({name, mark, frame, maxLines}: SampleAsked): {
  readonly reduced: Reduced;
  readonly log: LogContents;
} {
  const log = readSample(name, maxLines);
  const marks = readMarks(readFileSync(join(SAMPLES, 'marks.yaml')), 'marks.yaml');
  const found = mark === null ? undefined : findMark(marks, mark);
  if (mark !== null && found?.kind !== 'found') throw new Error(`no mark ${mark}`);
  const reduced = reduceOccupation({
    command: mark === null ? 'reduce' : 'check',
    program: PROGRAM,
    inputs: accountsOf(log, name),
    log,
    ellipsoid: WGS84,
    rules: {
      fix: 'best',
      minSatellites: null,
      maxHdop: null,
      maxPdop: null,
      maxAgeS: null,
      maxSigmaM: null,
      fromGpsSeconds: null,
      toGpsSeconds: null,
      settleS: 0,
    },
    at: null,
    mark: found?.kind === 'found' ? found.mark : null,
    markName: mark,
    sheet: emptySheet(),
    asked:
      mark === null
        ? []
        : [
            {of: 'horizontal', toleranceM: 0.02, reason: 'a test'},
            {of: 'up', toleranceM: 0.03, reason: null},
          ],
    frame: frame === undefined ? null : {name: frame, from: 'option'},
    motion: null,
    geoid: {grid: null, stated: null},
    earlier: [],
    grid: null,
    coordinateEpoch: frame === undefined ? null : 2025,
    movementLimitM: null,
    wantM: null,
    settings: {fix: {value: 'best', from: 'default'}},
    marks: [],
    sayCause: {title: (code) => code, advice: (code) => code, pair: () => 'two at once'},
    say: codeAsText,
  });
  return {reduced, log};
}

export function contentsSample(name: string, maxLines?: number): ContentsResult {
  const log = readSample(name, maxLines);
  const notices = noticeList(codeAsText);
  for (const {severity, code, values} of log.findings) notices.add(severity, code, [], values);
  return describeContents({
    program: PROGRAM,
    inputs: accountsOf(log, name),
    epochs: log.epochs,
    satellites: log.satellites,
    resolution: log.resolution,
    rejectedLines: log.inputs.flatMap(({name: input, rejectedLines}) =>
      rejectedLines.map((line) => ({input, ...line})),
    ),
    notices: notices.notices,
    ellipsoid: WGS84,
  });
}
