import type {GeoidGrid, ParsedGeoidGrid, RefusedGeoidGrid} from './geoid-grid.ts';

/** The header, by key in lower case with single blanks. */
type Header = ReadonlyMap<string, string>;

/** The order of the values, from `data ordering`; format 1.x knows only the first. */
interface Ordering {
  readonly northFirst: boolean;
  readonly westFirst: boolean;
  readonly rowWise: boolean;
}

class Refusal extends Error {}

/**
 * A geoid grid in the text format of the International Service for the Geoid, versions 1.0 to 2.0.
 *
 * The header ends with `end_of_head`; keys and values stand about `=` or `:`. Latitudes and
 * longitudes are decimal degrees or degrees°minutes'seconds". Bounds mean edges of cells in version
 * 1.x and nodes in 2.0; which it is follows from the counts of rows and columns, and a file where
 * neither fits is refused.
 * Source: ISG Format Specifications, version 2.0 (2020), and 1.0; from memory, bounds checked
 * against the service's own reader by the source of the reference values.
 */
export function parseIsg(text: string, name: string): ParsedGeoidGrid | RefusedGeoidGrid {
  try {
    return {kind: 'geoid grid', grid: gridOf(text, name)};
  } catch (error) {
    if (error instanceof Refusal) {
      return {kind: 'refused', message: `${name} is no ISG grid: ${error.message}`};
    }
    throw error;
  }
}

function gridOf(text: string, name: string): GeoidGrid {
  const end = /^end_of_head.*$/im.exec(text);
  if (end === null) throw new Refusal('need a line "end_of_head"');
  const header = headerOf(text.slice(0, end.index));
  requireSupported(header);
  const rowCount = count(header, 'nrows');
  const columnCount = count(header, 'ncols');
  const lat = nodesOf(header, 'lat', rowCount);
  const lon = nodesOf(header, 'lon', columnCount);
  const values = text
    .slice(end.index + end[0].length)
    .trim()
    .split(/\s+/);
  if (values.length !== rowCount * columnCount) {
    throw new Refusal(
      `need ${rowCount * columnCount} values after the header, found ${values.length}`,
    );
  }
  return {
    name: header.get('model name') ?? name,
    southDeg: lat.first,
    westDeg: lon.first,
    latitudeStepDeg: lat.step,
    longitudeStepDeg: lon.step,
    rowCount,
    columnCount,
    undulationM: southWestFirst(values, rowCount, columnCount, header),
  };
}

function headerOf(text: string): Header {
  const header = new Map<string, string>();
  for (const line of text.split(/\r?\n/)) {
    const parts = /^\s*([A-Za-z][A-Za-z ()]*?)\s*[:=]\s*(.*?)\s*$/.exec(line);
    if (parts === null) continue;
    header.set((parts[1] ?? '').toLowerCase().replace(/\s+/g, ' '), parts[2] ?? '');
  }
  return header;
}

/** Refuses what would give wrong numbers: other units, projected or scattered data, other versions. */
function requireSupported(header: Header): void {
  const version = header.get('isg format') ?? '';
  if (!/^(1(\.\d+)?|2\.0)$/.test(version)) {
    throw new Refusal(`need ISG format 1.x or 2.0, found "${version}"`);
  }
  requireWord(header, 'data format', /^grid$/i, 'grid');
  requireWord(header, 'coord type', /^geodetic$/i, 'geodetic');
  requireWord(header, 'data units', /^met(er|re)s?$/i, 'meters');
  requireWord(header, 'units', /^met(er|re)s?$/i, 'meters');
  requireWord(header, 'coord units', /^(deg|dms)$/i, 'deg or dms');
}

function requireWord(header: Header, key: string, allowed: RegExp, words: string): void {
  const value = header.get(key);
  if (value !== undefined && value !== '---' && !allowed.test(value)) {
    throw new Refusal(`need ${key} ${words}, found "${value}"`);
  }
}

function count(header: Header, key: string): number {
  const value = Number(header.get(key));
  if (Number.isInteger(value) && value >= 2) return value;
  throw new Refusal(`need ${key} of at least 2, found "${header.get(key) ?? 'nothing'}"`);
}

function degrees(header: Header, key: string): number {
  const text = header.get(key) ?? '';
  const dms = /^([-+]?)(\d+)°(\d+)'(\d+(?:\.\d+)?)"$/.exec(text);
  if (dms !== null) {
    const magnitude = (Number(dms[2]) * 3600 + Number(dms[3]) * 60 + Number(dms[4])) / 3600;
    return dms[1] === '-' ? -magnitude : magnitude;
  }
  if (/^[-+]?\d+(\.\d*)?$/.test(text)) return Number(text);
  throw new Refusal(`need ${key} in degrees, found "${text === '' ? 'nothing' : text}"`);
}

/** First node and step of one axis, from bounds that may be nodes or edges of cells. */
function nodesOf(header: Header, axis: 'lat' | 'lon', nodes: number) {
  const low = degrees(header, `${axis} min`);
  const high = degrees(header, `${axis} max`);
  const printed = degrees(header, `delta ${axis}`);
  const span = (high - low) / printed;
  // A step printed as 0.0167 for 1′ must not add up over the grid: the bounds give the exact one.
  const slack = 0.45;
  if (Math.abs(span - (nodes - 1)) < slack) return {first: low, step: (high - low) / (nodes - 1)};
  if (Math.abs(span - nodes) < slack) {
    const step = (high - low) / nodes;
    return {first: low + step / 2, step};
  }
  throw new Refusal(
    `need ${axis} bounds that fit ${nodes} nodes ${printed}° apart, found ${low} to ${high}`,
  );
}

function orderingOf(header: Header): Ordering {
  const text = header.get('data ordering');
  if (text === undefined || text === '---') {
    return {northFirst: true, westFirst: true, rowWise: true};
  }
  const parts = /^([NSWE])-to-([NSWE]),\s*([NSWE])-to-([NSWE])$/i.exec(text);
  const [outer = '', outerEnd = '', inner = '', innerEnd = ''] = (parts ?? [])
    .slice(1)
    .map((letter) => letter.toUpperCase());
  const pairs = `${outer}${outerEnd} ${inner}${innerEnd}`;
  if (!/^(NS|SN) (WE|EW)$|^(WE|EW) (NS|SN)$/.test(pairs)) {
    throw new Refusal(`need a data ordering such as "N-to-S, W-to-E", found "${text}"`);
  }
  return {
    northFirst: pairs.includes('NS'),
    westFirst: pairs.includes('WE'),
    rowWise: outer === 'N' || outer === 'S',
  };
}

function southWestFirst(
  values: readonly string[],
  rowCount: number,
  columnCount: number,
  header: Header,
): Float32Array {
  const {northFirst, westFirst, rowWise} = orderingOf(header);
  const noData = header.get('nodata');
  const undulationM = new Float32Array(rowCount * columnCount);
  for (let i = 0; i < values.length; i++) {
    const outer = Math.floor(i / (rowWise ? columnCount : rowCount));
    const inner = i % (rowWise ? columnCount : rowCount);
    const row = rowWise ? outer : inner;
    const column = rowWise ? inner : outer;
    const fromSouth = northFirst ? rowCount - 1 - row : row;
    const fromWest = westFirst ? column : columnCount - 1 - column;
    undulationM[fromSouth * columnCount + fromWest] = nodeValue(values[i]!, noData);
  }
  return undulationM;
}

function nodeValue(text: string, noData: string | undefined): number {
  const value = Number(text);
  if (!Number.isFinite(value)) throw new Refusal(`need numbers after the header, found "${text}"`);
  return noData !== undefined && value === Number(noData) ? Number.NaN : value;
}
