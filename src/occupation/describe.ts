import type {Epochs, Satellites} from '../epochs/epochs.ts';
import type {Ellipsoid} from '../geodesy/ellipsoid.ts';
import {geodeticFromEnu} from '../geodesy/local.ts';
import {moments} from '../statistics/moments.ts';
import {isoUtc} from '../time/gps-time.ts';
import {epochAccount, type Resolution, satelliteSummary} from './account.ts';
import type {ContentsResult, RejectedExample, Standing} from './contents-result.ts';
import {keptIndices, type LocalColumns, localColumns, selected} from './local-columns.ts';
import {standingPeriods} from './motion.ts';
import type {InputAccount, Notice, PerAxis} from './result.ts';
import {type ScreenRules, screenByRules} from './screen.ts';

/** Only what can never be a measurement is left out when a log is described. */
const VALID_EPOCHS: ScreenRules = {
  fix: 'any',
  minSatellites: null,
  maxHdop: null,
  maxPdop: null,
  maxAgeS: null,
  maxSigmaM: null,
  fromGpsSeconds: null,
  toGpsSeconds: null,
  settleS: 0,
};

export interface DescribeInput {
  readonly program: ContentsResult['program'];
  readonly inputs: readonly InputAccount[];
  readonly epochs: Epochs;
  readonly satellites: Satellites;
  readonly resolution: Resolution;
  readonly rejectedLines: readonly RejectedExample[];
  readonly notices: readonly Notice[];
  readonly ellipsoid: Ellipsoid;
}

/** What the logs contain, without averaging or judging anything. */
export function describeContents(input: DescribeInput): ContentsResult {
  const {epochs, resolution, ellipsoid} = input;
  const {reason} = screenByRules(epochs, VALID_EPOCHS);
  return {
    schema: 'stillmark.contents/1',
    program: input.program,
    inputs: input.inputs,
    epochs: epochAccount(epochs, reason, resolution, ellipsoid),
    standing: standingOf(epochs, ellipsoid),
    satellites: satelliteSummary(input.satellites),
    rejectedLines: input.rejectedLines,
    notices: input.notices,
  };
}

/** The standing periods of a record, as `contents` numbers them and `--stand` takes them. */
export function standingOf(epochs: Epochs, ellipsoid: Ellipsoid): Standing[] {
  const {reason} = screenByRules(epochs, VALID_EPOCHS);
  const columns = localColumns(epochs, reason, ellipsoid);
  if (columns === undefined) return [];
  const kept = keptIndices(reason);
  const track = {
    gpsSeconds: selected(epochs.gpsSeconds, kept),
    eastM: selected(columns.eastM, kept),
    northM: selected(columns.northM, kept),
  };
  return standingPeriods(track).map(({first, last}, index) => {
    const during = kept.subarray(first, last + 1);
    const fromGpsSeconds = track.gpsSeconds[first]!;
    const toGpsSeconds = track.gpsSeconds[last]!;
    return {
      number: index + 1,
      fromUtc: isoUtc(fromGpsSeconds, 3),
      toUtc: isoUtc(toGpsSeconds, 3),
      durationS: Number((toGpsSeconds - fromGpsSeconds).toFixed(3)),
      epochs: during.length,
      ...meanAndScatter(columns, during),
    };
  });
}

function meanAndScatter(
  columns: LocalColumns,
  during: Uint32Array,
): Pick<Standing, 'mean' | 'scatterM'> {
  const east = moments(selected(columns.eastM, during));
  const north = moments(selected(columns.northM, during));
  const up = moments(selected(columns.upM, during));
  const mean = geodeticFromEnu(
    {
      eastM: east?.mean ?? 0,
      northM: north?.mean ?? 0,
      upM: columns.heightKind === 'none' ? 0 : (up?.mean ?? 0),
    },
    columns.frame,
  );
  const ellipsoidalHeightM = columns.heightKind === 'ellipsoidal' ? mean.ellipsoidalHeightM : null;
  const scatterM: PerAxis<number | null> = {
    east: east?.standardDeviation ?? null,
    north: north?.standardDeviation ?? null,
    up: columns.heightKind === 'none' ? null : (up?.standardDeviation ?? null),
  };
  return {mean: {...mean, ellipsoidalHeightM}, scatterM};
}
