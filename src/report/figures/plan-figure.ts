import {planFinding} from '../../wording/findings.ts';
import {counted, formatGivenLength, formatLength} from '../../wording/numbers.ts';
import {RAMP} from '../charts/chart.ts';
import {planView, shadesFor} from '../charts/plan-view.ts';
import {
  hasMark,
  horizontalToleranceM,
  type ReportContext,
  referenceName,
  singlePosition,
} from '../context.ts';
import {absent, type FigureOrReason, type LegendKey} from './figure.ts';

const TITLE = 'Plan view of the single epochs';

export function planFigure(context: ReportContext): FigureOrReason {
  const {result, series, options} = context;
  const {east, north} = series.histograms;
  if (series.plan === null || east === null || north === null) {
    return absent(TITLE, 'no epoch passed the screening, so there is nothing to draw');
  }
  const position = singlePosition(context);
  const toleranceM = horizontalToleranceM(context);
  const scatter = result.scatter?.aboutMean ?? null;
  const view = planView({
    cells: series.plan,
    meanM: position === null ? null : {east: east.meanM, north: north.meanM},
    meanEllipse: position?.ellipse95 ?? null,
    epochEllipse: position === null ? null : scaledTo95(scatter?.observed.ellipse ?? null),
    mark: hasMark(context) ? {toleranceM} : null,
    referenceName: referenceName(context),
    units: options.units,
  });
  const legend: LegendKey[] = [...densityKeys(view.classFloors)];
  if (position?.ellipse95) legend.push({shape: 'line-estimate', text: '95 % of the mean'});
  if (position !== null && scatter?.observed.ellipse) {
    legend.push({shape: 'dash-estimate', text: '95 % of single epochs, if normal'});
  }
  if (view.toleranceShown && toleranceM !== null) {
    legend.push({shape: 'dot-ink', text: `limit ${formatGivenLength(toleranceM)}`});
  }
  const outside = series.plan.outside;
  const notes = [
    'True to scale, north up.',
    `Cells of ${cellText(series.plan.cellEastM, series.plan.cellNorthM)}.`,
    view.markShown === 'beyond the frame' ? 'The mark lies beyond the frame.' : '',
    outside > 0 ? `${counted(outside, 'epoch')} outside the frame.` : '',
  ];
  return {
    kind: 'figure',
    id: 'plan',
    title: TITLE,
    finding: planFinding({
      mark: hasMark(context),
      distanceM: position === null ? null : (result.comparison?.offsetM.horizontal ?? null),
      azimuthDeg: result.comparison?.azimuthDeg ?? null,
      r95M: scatter?.observed.r95M ?? null,
    }),
    note: notes.filter((note) => note !== '').join(' '),
    wide: view.chart,
    narrow: null,
    legend,
    readout: [],
  };
}

/** √5.991: the ellipse of one standard deviation becomes that which holds 95 %. */
const ELLIPSE_95 = 2.447746830680816;

function scaledTo95(ellipse: {semiMajorM: number; semiMinorM: number; azimuthDeg: number} | null) {
  if (ellipse === null) return null;
  return {
    semiMajorM: ellipse.semiMajorM * ELLIPSE_95,
    semiMinorM: ellipse.semiMinorM * ELLIPSE_95,
    azimuthDeg: ellipse.azimuthDeg,
  };
}

function densityKeys(floors: readonly number[]): LegendKey[] {
  const shades = shadesFor(floors.length);
  return floors.map((floor, k) => {
    const next = floors[k + 1];
    const to = next === undefined ? '+' : next - 1 > floor ? `–${next - 1}` : '';
    const unit = k === floors.length - 1 ? ' epochs per cell' : '';
    return {
      shape: `ramp-${RAMP.indexOf(shades[k] as (typeof RAMP)[number])}` as const,
      text: `${floor}${to}${unit}`,
    };
  });
}

function cellText(eastM: number, northM: number): string {
  if (Math.abs(eastM - northM) < eastM * 1e-6) return cell(eastM);
  return `${cell(eastM)} east by ${cell(northM)} north, whole steps of the log`;
}

function cell(sizeM: number): string {
  const rounded = Number(sizeM.toPrecision(3));
  return rounded < 1 ? formatGivenLength(rounded) : formatLength(rounded);
}
