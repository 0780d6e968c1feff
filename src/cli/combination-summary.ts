import type {Combination, CombinedMark, MarkDistance} from '../occupation/combination.ts';
import {
  coordinateDecimals,
  degreeDecimals,
  fixed,
  formatPercent,
  formatUncertainty,
  formatUtc,
  joined,
  shownUncertaintyM,
} from '../wording/numbers.ts';
import {noticeLines, type TerminalStyle} from './terminal.ts';

/** One position per mark, how its occupations agree, and the distances between marks. */
export function combinationSummary(combination: Combination, style: TerminalStyle): string {
  const {marks, distances, notices} = combination;
  const blocks = [
    ...marks.map(markLines),
    distanceLines(distances),
    marks.length === 0 ? ['None of these results gives a position that could be combined.'] : [],
    noticeLines(notices, style, true),
  ];
  const text = blocks
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n');
  return `${text.replaceAll('\u00a0', ' ')}\n`;
}

function markLines(mark: CombinedMark): string[] {
  const {geodetic, uncertainty95M: u, occupations} = mark;
  const plan = coordinateDecimals(u.horizontalRadius);
  const degrees = degreeDecimals(plan);
  const heights = coordinateDecimals(u.up);
  const north = `${fixed(Math.abs(geodetic.latitudeDeg), degrees)}° ${geodetic.latitudeDeg < 0 ? 'S' : 'N'}`;
  const east = `${fixed(Math.abs(geodetic.longitudeDeg), degrees)}° ${geodetic.longitudeDeg < 0 ? 'W' : 'E'}`;
  const epoch = mark.coordinateEpoch === null ? '' : `, epoch ${mark.coordinateEpoch.toFixed(2)}`;
  const columns = ['east', 'north', 'up', 'plan'].map((name) => `${name} mm`.padStart(11)).join('');
  return [
    `${mark.name}  ${north}  ${east}  ellipsoidal height ${fixed(geodetic.ellipsoidalHeightM, heights)} m`,
    `  of the ${mark.of}; ${mark.frame ?? 'frame not stated'}${epoch}`,
    `  95 %: ${formatUncertainty(u.horizontalRadius)} in plan, ${formatUncertainty(u.up)} in height; ${agreementText(mark)}`,
    `  ${'occupation minus the mean'.padEnd(44)}${columns}   weight`,
    ...occupations.map((one) => {
      const {east: e, north: n, up, horizontal} = one.differenceM;
      const cells = [e, n, up, horizontal].map((m) => fixed(m * 1000, 1).padStart(11)).join('');
      const share = formatPercent((one.weight.east + one.weight.north) / 2);
      return `  ${`${one.name}  ${formatUtc(one.startUtc).slice(0, 16)}`.padEnd(44)}${cells}${share.padStart(9)}`;
    }),
  ];
}

function agreementText({agreement, accident, enlargedBy, occupations}: CombinedMark): string {
  if (agreement === 'not tested') return 'one occupation, so nothing tests it';
  const p = Math.min(accident.plan ?? 1, accident.up ?? 1);
  const many = `the ${occupations.length} occupations ${agreement === 'agrees' ? 'agree' : 'disagree'}`;
  const chance = `so much difference by accident: ${p < 0.001 ? 'below 0.1 %' : formatPercent(p)}`;
  const factor = Math.max(enlargedBy.plan, enlargedBy.up);
  return `${many} (${chance}${factor > 1 ? `; enlarged by ${factor.toFixed(1)}` : ''})`;
}

function distanceLines(distances: readonly MarkDistance[]): string[] {
  if (distances.length === 0) return [];
  const names = distances.map(({from, to}) => `${from} to ${to}`);
  const width = Math.max(12, ...names.map((name) => name.length));
  return [
    `${'between marks'.padEnd(width)}     distance m   95 % mm  ell. height m  95 % mm     azimuth`,
    ...distances.map(({spatialM, heightDifferenceM, azimuthDeg, uncertainty95M}, i) =>
      [
        (names[i] ?? '').padEnd(width),
        fixed(spatialM, 4).padStart(15),
        fixed(shownUncertaintyM(uncertainty95M.spatial) * 1000, 1).padStart(10),
        fixed(heightDifferenceM, 4).padStart(13),
        fixed(shownUncertaintyM(uncertainty95M.height) * 1000, 1).padStart(10),
        `${fixed(azimuthDeg, 4)}°`.padStart(12),
      ].join(''),
    ),
    cancelText(distances),
  ].filter((line) => line !== '');
}

function cancelText(distances: readonly MarkDistance[]): string {
  const all = [...new Set(distances.flatMap(({cancels}) => cancels))].sort();
  return all.length === 0 ? '' : `  shared, and cancelled between marks: ${joined(all)}`;
}
