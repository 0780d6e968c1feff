import type {Conversion} from '../conversion/conversion.ts';
import {
  columnNames,
  type ListCounts,
  type PreparedList,
  tripleTexts,
} from '../conversion/convert-list.ts';
import type {Form, Triple} from '../conversion/form.ts';
import type {NumberStyle} from '../conversion/number-text.ts';
import {combinedFactor, elevationFactor} from '../geodesy/ground-factor.ts';
import {frameChangeStep} from '../occupation/frame-change.ts';
import {frameParametersText, framePlaceText, ROTATION_CONVENTION} from '../wording/frame-steps.ts';
import {counted, fixed, joined} from '../wording/numbers.ts';
import {type TerminalStyle, wrapped} from './terminal.ts';

/** One position before and after, the factors of its grid, and every step between frames. */
export function conversionSummary(
  given: Triple,
  conversion: Conversion,
  style: NumberStyle,
): string {
  const {from, to, plan} = conversion;
  const found = conversion.convert(given);
  const lines = [
    `from   ${from.name}${placeText(conversion.given)}`,
    ...numberLines(given, from, style),
    `to     ${to.name}${placeText(plan)}`,
    ...numberLines(found, to, style),
    ...gridLines(given, conversion),
    ...stepLines(given, conversion),
  ];
  return `${lines.join('\n')}\n`;
}

function placeText(place: {readonly frame: string; readonly epoch: number | null} | null): string {
  return place === null ? '' : `, ${framePlaceText(place.frame, place.epoch)}`;
}

const NAME_WIDTH = 24;

function line(name: string, value: string): string {
  return `       ${name.padEnd(NAME_WIDTH)}${value}`;
}

function numberLines(values: Triple, form: Form, style: NumberStyle): string[] {
  const names = columnNames(form, style);
  const texts = tripleTexts(values, form, style);
  const width = Math.max(...texts.map((text) => text.length));
  return names.flatMap((name, i) =>
    texts[i] === '' ? [] : [line(name, (texts[i] ?? '').padStart(width))],
  );
}

function gridLines(given: Triple, {to, geodeticAfter}: Conversion): string[] {
  if (to.projectionAt === null) return [];
  const place = geodeticAfter(given);
  const {definition, factors} = to.projectionAt(place);
  const {convergenceDeg, pointScale} = factors(place);
  const lines = [line('convergence_deg', convergenceDeg.toFixed(8))];
  if (to.isZoneOfPlace) lines.unshift(line('grid', definition.name));
  if (pointScale === undefined) {
    return [...lines, line('point_scale', 'depends on the direction: the grid is not conformal')];
  }
  lines.push(line('point_scale', pointScale.toFixed(10)));
  if (Number.isNaN(place.ellipsoidalHeightM)) return lines;
  const elevation = elevationFactor(place, definition.ellipsoid);
  return [
    ...lines,
    line('elevation_factor', elevation.toFixed(10)),
    line('combined_factor', combinedFactor(pointScale, elevation).toFixed(10)),
  ];
}

function stepLines(given: Triple, conversion: Conversion): string[] {
  const trace = conversion.trace(given);
  if (trace.length === 0) return [];
  const lines = trace.map(frameChangeStep).flatMap((step) => {
    const between = step.from === step.to ? step.from : `${step.from} to ${step.to}`;
    const {x, y, z} = step.ecefM;
    const parameters = frameParametersText(step.parameters);
    return [
      `       ${between}, ${step.what}, at ${step.epoch.toFixed(3)}`,
      ...(parameters === '' ? [] : [`         ${parameters}`]),
      `         x, y, z ${[x, y, z].map((value) => value.toFixed(5)).join('  ')}`,
      `         source: ${step.source}`,
    ];
  });
  const {east, north, up} = conversion.plan?.standardUncertaintyM ?? {east: 0, north: 0, up: 0};
  const sigma = [east, north, up].map((value) => fixed(value * 1000, 1)).join(', ');
  return [
    `steps  rotations follow the ${ROTATION_CONVENTION}`,
    ...lines,
    `       standard uncertainty of these steps, east, north, up: ${sigma} mm`,
  ];
}

/** What became of a list: rows, frames and what the steps between them are worth. */
export function listSummary(
  counts: ListCounts,
  {conversion: {from, to, plan}, layout}: PreparedList,
  style: TerminalStyle,
): string {
  const left = [
    counts.refused > 0 ? `${counted(counts.refused, 'row')} refused, named above` : '',
    counts.comments > 0 ? `${counted(counts.comments, 'comment line')} copied` : '',
    counts.blank > 0 ? `${counted(counts.blank, 'blank line')} left out` : '',
  ].filter((text) => text !== '');
  const sentences = [
    `${joined([`${counted(counts.converted, 'row')} converted from ${from.name} to ${to.name}`, ...left])}.`,
  ];
  if (layout.vagueHeight !== null && from.kind !== 'local') {
    sentences.push(
      `The heights in the column "${layout.vagueHeight}" were taken as ellipsoidal; heights above the geoid need its separation added first.`,
    );
  }
  if (plan !== null) {
    const steps = plan.steps.map((step) =>
      'to' in step ? `${step.from} to ${step.to}` : `motion in ${step.frame}`,
    );
    const {east, north, up} = plan.standardUncertaintyM;
    const sigma = [east, north, up].map((value) => fixed(value * 1000, 1)).join(', ');
    sentences.push(
      steps.length === 0
        ? `Frame: ${framePlaceText(plan.frame, plan.epoch)}, as given.`
        : `Frame: ${framePlaceText(plan.frame, plan.epoch)}, by way of ${joined(steps)}; standard uncertainty of these steps, east, north, up: ${sigma} mm.`,
    );
  }
  return sentences
    .flatMap((sentence) => wrapped(sentence, style))
    .map((text) => `${text}\n`)
    .join('');
}
