import type {Setting} from '../../occupation/result.ts';
import type {Sky} from '../../occupation/series/sky.ts';
import {parseDurationS} from '../../time/parse-duration.ts';
import {signalFinding, skyFinding} from '../../wording/findings.ts';
import {formatDuration, joined} from '../../wording/numbers.ts';
import {signalPanels} from '../charts/signal.ts';
import {STRENGTH_FLOORS_DB_HZ, skyChart, TRACK_FLOORS_DB_HZ} from '../charts/sky.ts';
import type {ReportContext} from '../context.ts';
import {absent, type FigureOrReason, type LegendKey} from './figure.ts';

const SKY = 'The sky above the antenna';
const SIGNAL = 'Signals, satellites and corrections over time';
/** A horizon that stands this high over a whole eighth of the circle is worth a word. */
const BLOCKED_DEG = 20;

export function skyFigure({series, result}: ReportContext): FigureOrReason {
  if (series.sky === null) {
    const table = result.inputs.every(({kind}) => kind === 'table');
    return absent(
      SKY,
      table ? 'a table of positions names no satellites' : 'the log has no GSV sentences',
    );
  }
  const chart = skyChart(series.sky);
  const tracks = series.sky.kind === 'tracks';
  const legend = tracks
    ? strengthKeys(TRACK_FLOORS_DB_HZ, 'width')
    : strengthKeys(STRENGTH_FLOORS_DB_HZ, 'ramp');
  if (!tracks) legend.push({shape: 'line-estimate', text: 'lowest signal heard'});
  return {
    kind: 'figure',
    id: 'sky',
    title: SKY,
    finding: skyFinding(series.sky.systems, blockedToward(series.sky)),
    note: `${joined(series.sky.systems.map(({name, satellites}) => `${name} ${satellites}`))}. Zenith in the middle, horizon at the rim. ${
      tracks
        ? 'Wider paths: stronger signal (median of the path); dotted: none heard. Names stand at the ends.'
        : 'Cells show the median signal strength.'
    }`,
    wide: chart,
    narrow: null,
    legend,
    readout: [],
  };
}

function strengthKeys(floors: readonly number[], kind: 'width' | 'ramp'): LegendKey[] {
  return floors.map((floor, k) => {
    const last = k === floors.length - 1;
    const text = k === 0 ? `under ${floors[1]}` : last ? `${floor}+ dB-Hz` : `${floor}+`;
    return {shape: `${kind}-${k}`, text};
  });
}

/** The eighth of the circle with the highest lowest signal, when that is high. */
function blockedToward(sky: Sky) {
  if (sky.kind !== 'cells') return null;
  let worst: {azimuthDeg: number; elevationDeg: number} | null = null;
  for (let azimuthDeg = 0; azimuthDeg < 360; azimuthDeg += 45) {
    const inside = sky.horizon.filter(
      (sector) => Math.abs(((sector.azimuthDeg - azimuthDeg + 540) % 360) - 180) <= 22.5,
    );
    const elevationDeg = Math.min(...inside.map((sector) => sector.elevationDeg ?? 90));
    if (elevationDeg >= BLOCKED_DEG && elevationDeg > (worst?.elevationDeg ?? 0)) {
      worst = {azimuthDeg, elevationDeg};
    }
  }
  return worst;
}

export function signalFigure({series, result}: ReportContext): FigureOrReason {
  const {startUtc} = series;
  if (series.signal === null || startUtc === null) {
    return absent(SIGNAL, 'the record says nothing about satellites, signals or corrections');
  }
  const {wide, narrow} = series.signal;
  const shared = {
    spanS: series.spanS,
    startUtc,
    maxHdop: settingNumber(result.settings['max-hdop']),
    maxCorrectionAgeS: settingSeconds(result.settings['max-age']),
  };
  const of = (pick: (bin: (typeof wide.bins)[number]) => number | undefined) =>
    wide.bins.flatMap((bin) => pick(bin) ?? []);
  const satellites = of((bin) => bin.satellites?.least);
  const hdops = of((bin) => bin.hdop?.most);
  const ages = of((bin) => bin.correctionAgeS?.most);
  return {
    kind: 'figure',
    id: 'signal',
    title: SIGNAL,
    finding: signalFinding({
      fewestSatellites: satellites.length === 0 ? null : Math.min(...satellites),
      worstHdop: hdops.length === 0 ? null : Math.max(...hdops),
      oldestCorrectionS: ages.length === 0 ? null : Math.max(...ages),
    }),
    note: `All epochs read, in bins of ${formatDuration(wide.binS)}. Times are UTC.`,
    wide: signalPanels({...shared, bins: wide, narrow: false}),
    narrow: signalPanels({...shared, bins: narrow, narrow: true}),
    legend: [
      {shape: 'line-data', text: 'median'},
      {
        shape: 'block-pale',
        text: wide.has.carrierToNoise ? 'least to most; C/N0: 5 to 95 %' : 'least to most',
      },
      ...(shared.maxHdop === null && shared.maxCorrectionAgeS === null
        ? []
        : ([{shape: 'dot-ink', text: 'limit'}] as const)),
    ],
    readout: [],
  };
}

function settingNumber(setting: Setting | undefined): number | null {
  return typeof setting?.value === 'number' ? setting.value : null;
}

function settingSeconds(setting: Setting | undefined): number | null {
  return typeof setting?.value === 'string' ? (parseDurationS(setting.value) ?? null) : null;
}
