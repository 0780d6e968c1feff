import {UsageError} from '../errors.ts';
import {FRAMES, type Frame} from './frame-table.ts';

/** Upper case, without blanks and marks, so that "WGS 84 (G2296)" is WGS84(G2296). */
export function normalisedFrameName(text: string): string {
  return text.toUpperCase().replace(/[\s_\-/.:]/g, '');
}

const BY_NAME: ReadonlyMap<string, Frame> = new Map(
  FRAMES.map((frame) => [normalisedFrameName(frame.name), frame]),
);

/** Other spellings that mean exactly one frame. */
const SYNONYMS: ReadonlyMap<string, string> = new Map([
  ['RGF93V2B', 'ETRS89-FRA(RGF93v2b)'],
  ['OSNET2009', 'ETRS89-GBR(OSNet2009)'],
  ['CHTRS95', 'ETRS89-CHE(CHTRS95)'],
  ['ETRS89DREF912025', 'ETRS89-DEU(2025)'],
  ['ETRS89DREF912016', 'ETRS89-DEU(2016)'],
  ['KSAGRF', 'KSA-GRF17'],
  ['HBK94', 'Hartebeesthoek94'],
  ['NATRF2022E2020', 'NATRF2022'],
]);

/** Names that stand for several frames at once, with what to write instead. */
const ENSEMBLES: readonly (readonly [pattern: RegExp, advice: string])[] = [
  [
    /^(EPSG)?(WGS84|WGS1984|WORLDGEODETICSYSTEM1984|4326|4979)$/,
    'WGS 84 alone names realisations up to 2 m apart; write the one meant, such as WGS84(G2296), ' +
      'or the frame of the correction service, such as ITRF2020',
  ],
  [
    /^(EPSG)?(ETRS89|ETRS1989|4258|4937)$/,
    'ETRS89 alone names frames up to 0.1 m apart; write ETRF2000, ETRF2014, ETRF2020 or the ' +
      'national one, such as ETRS89-DEU(2025)',
  ],
  [
    /^(NAD83|NAD1983|NAD83\(86\)|NAD83\(1986\)|EPSG4269)$/,
    'NAD83 alone names frames up to 1 m apart; write NAD83(2011), NAD83(PA11), NAD83(MA11) or ' +
      'NAD83(CSRS)v7 with its version',
  ],
  [
    /^(NAD83\(?CSRS\)?|CSRS|NAD83\(CSRS98\))$/,
    'NAD83(CSRS) has seven versions; write NAD83(CSRS)v2 to NAD83(CSRS)v8',
  ],
  [/^ITRF$/, 'ITRF alone names 13 frames; write the year, such as ITRF2020 or ITRF2014'],
  [/^ITRS$/, 'ITRS is a system, its frames are the ITRFs; write the year, such as ITRF2020'],
  [/^ETRF$/, 'ETRF alone names 12 frames; write the year, such as ETRF2000 or ETRF2020'],
  [/^IGS$/, 'IGS alone names several frames; write the year, such as IGS20 or IGb14'],
  [/^GDA$/, 'GDA alone names two frames 1.8 m apart; write GDA94 or GDA2020'],
  [/^JGD$/, 'JGD alone names several frames; write JGD2000, JGD2011 or JGD2024'],
  [/^SIRGAS$/, 'SIRGAS alone names many solutions; write SIRGAS2000, or the ITRF of the solution'],
  [/^(NSRS|NATRF)$/, 'write NAD83(2011) or NATRF2022'],
];

const BEFORE_SATELLITES =
  /^(ED50|ED87|OSGB36|OSGB1936|NAD27|AGD66|AGD84|DHDN|NTF|TOKYO|PULKOVO1942|S42|MGI|CH1903\+?|RD|AMERSFOORT|SAD69|CAPE|NZGD49|TM65|WGS72)$/;
const GRID = /^(UTM|MGA|LAMBERT|OSGRID|SWEREF99TM|NZTM|EPSG\d+|\+PROJ)/;

/** The frame of that name, if it is one; no advice. */
export function findFrame(text: string): Frame | undefined {
  const name = normalisedFrameName(text);
  return BY_NAME.get(name) ?? BY_NAME.get(normalisedFrameName(SYNONYMS.get(name) ?? ''));
}

/**
 * The frame that a name means.
 *
 * @throws UsageError that says what to write, for ensembles, grids, old datums and unknown names
 */
export function frameNamed(text: string): Frame {
  const name = normalisedFrameName(text);
  if (name === '') throw new UsageError('need a reference frame, such as ITRF2020, found nothing');
  const found = findFrame(text);
  if (found !== undefined) return found;
  refuseEnsemble(text);
  // "ETRS89/ETRF2000", "ETRS89 (ETRF2014)": the realisation says it all.
  const realisation = /^ETRS89\(?(ETRF\d{2,4})\)?$/.exec(name)?.[1];
  const realised = realisation === undefined ? undefined : BY_NAME.get(realisation);
  if (realised !== undefined) return realised;
  if (BEFORE_SATELLITES.test(name)) {
    throw new UsageError(
      `${text} is a datum without published parameters of centimetres; transform the mark with the ` +
        'national service and write the frame it delivers, such as ETRF2000',
    );
  }
  if (GRID.test(name)) {
    throw new UsageError(
      `"${text}" is a grid or a code, not a reference frame; write the frame it belongs to, such ` +
        'as ETRF2000 or GDA2020',
    );
  }
  throw new UsageError(`unknown reference frame "${text}"; ${suggestion(name)}`);
}

/** @throws UsageError for a name that stands for several frames, whatever it is compared with */
export function refuseEnsemble(text: string): void {
  const name = normalisedFrameName(text);
  const ensemble = ENSEMBLES.find(([pattern]) => pattern.test(name));
  if (ensemble !== undefined) throw new UsageError(`"${text}" is not one frame: ${ensemble[1]}`);
}

function suggestion(name: string): string {
  // ITRF14 is nearer to ITRF94 by letters, and means ITRF2014.
  const shortYear = /^([A-Z]+)(\d\d)$/.exec(name);
  const longYear = BY_NAME.get(shortYear === null ? '' : `${shortYear[1]}20${shortYear[2]}`);
  if (longYear !== undefined) return `did you mean ${longYear.name}?`;
  const near = [...BY_NAME]
    .map(([key, frame]) => ({name: frame.name, distance: editDistance(name, key)}))
    .filter(({distance}) => distance <= 2)
    .sort((a, b) => a.distance - b.distance)
    .slice(0, 3)
    .map((candidate) => candidate.name);
  if (near.length > 0) return `did you mean ${near.join(', ')}?`;
  return (
    'write one of the ITRFs (ITRF2020), ETRFs (ETRF2000), NAD83(2011), NAD83(CSRS)v7, NATRF2022, ' +
    'GDA2020, SIRGAS2000, WGS84(G2296), or transform the mark with the national service first'
  );
}

/** Letters to insert, delete or replace. Source: Levenshtein (1966); Wagner & Fischer (1974). */
function editDistance(a: string, b: string): number {
  let previous = Array.from({length: b.length + 1}, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const replace = previous[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      current.push(Math.min(replace, previous[j]! + 1, current[j - 1]! + 1));
    }
    previous = current;
  }
  return previous[b.length]!;
}
