import type {PerAxis, Result} from '../../occupation/result.ts';
import type {TimeBins} from '../../occupation/series/time-bins.ts';
import {driftPower, movementFinding} from '../../wording/findings.ts';
import {counted, formatDuration, formatLength, proseNumber} from '../../wording/numbers.ts';
import {formatLocal} from '../../wording/time-zone.ts';
import {type OverTimeInput, overTime} from '../charts/over-time.ts';
import {clockAfter, secondsBetween} from '../charts/ticks.ts';
import {type ReportContext, referenceName} from '../context.ts';
import {type LengthUnit, offsetDecimals} from '../units.ts';
import {absent, type FigureOrReason, type LegendKey, type ReadoutBin} from './figure.ts';

const TITLE = 'East, north and up over time';

export function timeFigure(context: ReportContext): FigureOrReason {
  const {result, series} = context;
  const {startUtc} = series;
  if (series.overTime === null || startUtc === null) {
    return absent(TITLE, 'no epoch passed the screening, so there is nothing to draw');
  }
  const input = chartInput(context, startUtc);
  const wide = overTime({...input, bins: series.overTime.wide, narrow: false});
  const narrow = overTime({...input, bins: series.overTime.narrow, narrow: true});
  const {binS} = series.overTime.wide;
  const name = referenceName(context);
  const legend: LegendKey[] = [
    {shape: 'line-data', text: wide.hasBands ? 'median of a bin' : 'single epochs'},
    ...(wide.hasBands
      ? ([
          {shape: 'block-mid', text: '5 to 95 % of the epochs'},
          {shape: 'block-pale', text: 'least to most'},
        ] as const)
      : []),
    ...(name === 'mean' ? [] : ([{shape: 'line-ink', text: name}] as const)),
    ...(wide.showsDrift
      ? ([{shape: 'dash-estimate', text: 'fitted drift'}] as const)
      : ([
          {shape: 'dash-estimate', text: input.steps.length === 0 ? 'mean' : 'mean of each part'},
        ] as const)),
    ...(input.steps.length > 0 ? ([{shape: 'dash-flagged', text: 'jump'}] as const) : []),
    ...(series.overTime.wide.leftOut.length > 0
      ? ([{shape: 'block-flagged', text: 'left out'}] as const)
      : []),
    ...(input.gaps.length > 0 ? ([{shape: 'block-hole', text: 'no data'}] as const) : []),
  ];
  const bins = wide.hasBands
    ? `Bins of ${formatDuration(binS)}; every epoch used lies inside the light band.`
    : 'Each point of the line is one epoch.';
  return {
    kind: 'figure',
    id: 'time',
    title: TITLE,
    finding: movementFinding({
      verdict: result.stability.verdict,
      steps: result.stability.steps.map((step) => ({
        utc: step.utc,
        sizeM: Math.hypot(step.eastM, step.northM, step.upM ?? 0),
        material: step.material,
      })),
      recordS: series.spanS,
      driftM: largestDrift(result, series.spanS),
    }),
    note: `${driftPower(detectable(result))}${capital(wide.unit.name)} are equally tall in all panels. ${bins} Times are UTC${zoneNote(startUtc, context.options.timeZone)}. Point at the chart to read it.`,
    wide: wide.chart,
    narrow: narrow.chart,
    legend,
    readout: readout(series.overTime.narrow, series.spanS, startUtc, wide.unit),
  };
}

/** What the clock of the place shows where the axis begins. */
function zoneNote(startUtc: string, zone: string | null): string {
  if (zone === null) return '';
  return `; the axis begins at ${formatLocal(startUtc, zone).slice(11, 16)} in ${zone}`;
}

function capital(unit: string): string {
  return unit === 'mm' ? 'Millimetres' : unit === 'm' ? 'Metres' : 'Feet';
}

function chartInput(context: ReportContext, startUtc: string) {
  const {result, series, options} = context;
  const {histograms} = series;
  const rate = (axis: keyof PerAxis) => {
    const drift = result.stability.drift[axis];
    return drift?.material === true ? drift.rateMPerHour / 3600 : null;
  };
  return {
    spanS: series.spanS,
    startUtc,
    referenceName: referenceName(context),
    meanM: {
      east: histograms.east?.meanM ?? null,
      north: histograms.north?.meanM ?? null,
      up: histograms.up?.meanM ?? null,
    },
    driftMPerS: {east: rate('east'), north: rate('north'), up: rate('up')},
    parts: series.parts,
    steps: result.stability.steps
      .filter((step) => step.material)
      .map((step) => ({
        elapsedS: secondsBetween(startUtc, step.utc),
        label: `jump ${formatLength(Math.hypot(step.eastM, step.northM, step.upM ?? 0))}`,
      })),
    gaps: result.epochs.gaps.map(({fromUtc, toUtc}) => ({
      fromS: secondsBetween(startUtc, fromUtc),
      toS: secondsBetween(startUtc, toUtc),
    })),
    units: options.units,
  } satisfies Omit<OverTimeInput, 'bins' | 'narrow'>;
}

function largestDrift({stability}: Result, spanS: number): number | null {
  const totals = [stability.drift.east, stability.drift.north, stability.drift.up].flatMap(
    (drift) => (drift?.material ? [(Math.abs(drift.rateMPerHour) * spanS) / 3600] : []),
  );
  return totals.length === 0 ? null : Math.max(...totals);
}

function detectable({stability}: Result): number | null {
  const rates = [stability.drift.east, stability.drift.north].flatMap((drift) =>
    drift === null ? [] : [drift.detectableMPerHour],
  );
  return rates.length === 0 ? null : Math.max(...rates);
}

/** One reading per bin of the narrow form, holes included. */
function readout(bins: TimeBins, spanS: number, startUtc: string, unit: LengthUnit): ReadoutBin[] {
  const count = Math.max(1, Math.ceil(spanS / bins.binS - 1e-6));
  const byStart = new Map(bins.bins.map((bin) => [Math.round(bin.startS / bins.binS), bin]));
  return Array.from({length: count}, (_, k) => {
    const share = Math.min(1, Number((spanS / bins.binS - k).toFixed(3)));
    const bin = byStart.get(k);
    const clock = clockAfter(startUtc, k * bins.binS, bins.binS < 60);
    if (bin === undefined) return {share, text: `${clock} no epoch used`};
    const value = (median: number) =>
      proseNumber(median * unit.perM, offsetDecimals(median, unit), true);
    const up = bin.upM === null ? '' : `, up ${value(bin.upM.median)}`;
    const text = `${clock} east ${value(bin.eastM.median)}, north ${value(bin.northM.median)}${up} ${unit.name}, ${counted(bin.used, 'epoch')}`;
    return {share, text};
  });
}
