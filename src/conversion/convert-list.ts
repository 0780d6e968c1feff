import {InputError, UsageError} from '../errors.ts';
import {combinedFactor, elevationFactor} from '../geodesy/ground-factor.ts';
import type {Conversion} from './conversion.ts';
import type {Form, FormKind, Triple} from './form.ts';
import {columnTitle, formOfHeader, type ListLayout, layoutOf} from './list-layout.ts';
import {
  angleText,
  lengthText,
  type NumberStyle,
  type ReadNumber,
  readAngle,
  readPlainNumber,
} from './number-text.ts';
import {joinCells, type Separator, separatorOf, splitCells} from './separated.ts';

export interface ListRequest {
  /** For messages. */
  readonly path: string;
  /** Names of the columns of a list without a header; null: the first line is the header. */
  readonly columns: readonly string[] | null;
  /** Plans the conversion once the header has said what the numbers are. */
  readonly plan: (header: FormKind | undefined) => Conversion;
  readonly style: NumberStyle;
  /** Whether the columns of convergence and scale are wanted, in a grid. */
  readonly factors: boolean;
  /** Called for every row that has no answer. */
  readonly refuse: (lineNumber: number, reason: string) => void;
}

export interface ListCounts {
  readonly converted: number;
  readonly refused: number;
  /** Lines beginning with #, which are copied. */
  readonly comments: number;
  readonly blank: number;
}

/** What the first line of a list has settled. */
export interface PreparedList {
  readonly separator: Separator;
  readonly layout: ListLayout;
  readonly conversion: Conversion;
}

/**
 * Converts a list line by line: text in, text out, nothing kept but the unfinished last line.
 *
 * The separator is that of the first line: comma, semicolon, tab or blanks. Columns that are no
 * coordinates are copied as they stand. A row without an answer is handed to `refuse` and left out.
 */
export class ListConverter {
  readonly #request: ListRequest;
  #prepared: PreparedList | null = null;
  #rest = '';
  #lineNumber = 0;
  #converted = 0;
  #refused = 0;
  #comments = 0;
  #blank = 0;

  constructor(request: ListRequest) {
    this.#request = request;
  }

  /**
   * @returns the output for all lines that are complete
   * @throws InputError for a header that cannot be used, UsageError for a conversion that cannot
   */
  take(text: string): string {
    const lines = (this.#rest + text).split('\n');
    this.#rest = lines.pop() ?? '';
    return this.#convertLines(lines);
  }

  /** @returns the output for the last line, when no line end follows it */
  end(): string {
    const text = this.#rest === '' ? '' : this.#convertLines([this.#rest]);
    this.#rest = '';
    if (this.#prepared !== null) return text;
    throw new InputError('need a header line and a row for each position, found nothing', {
      path: this.#request.path,
    });
  }

  counts(): ListCounts {
    return {
      converted: this.#converted,
      refused: this.#refused,
      comments: this.#comments,
      blank: this.#blank,
    };
  }

  /** What the first line has settled; null before it. */
  prepared(): PreparedList | null {
    return this.#prepared;
  }

  #convertLines(lines: readonly string[]): string {
    const out: string[] = [];
    for (const ended of lines) {
      this.#lineNumber++;
      const line = ended.endsWith('\r') ? ended.slice(0, -1) : ended;
      if (line.startsWith('#')) {
        this.#comments++;
        out.push(line);
      } else if (line.trim() === '') {
        this.#blank++;
      } else if (this.#prepared === null) {
        this.#prepared = this.#prepare(line);
        out.push(headerText(this.#prepared, this.#request));
        if (this.#request.columns !== null) this.#row(line, this.#prepared, out);
      } else {
        this.#row(line, this.#prepared, out);
      }
    }
    return out.length === 0 ? '' : `${out.join('\n')}\n`;
  }

  #prepare(firstLine: string): PreparedList {
    const {columns, plan, path} = this.#request;
    const separator = separatorOf(firstLine);
    const names = columns ?? splitCells(withoutByteOrderMark(firstLine), separator);
    const conversion = plan(formOfHeader(names));
    try {
      return {separator, conversion, layout: layoutOf(names, conversion.from)};
    } catch (error) {
      if (!(error instanceof UsageError)) throw error;
      throw new InputError(error.message, {path, lineNumber: this.#lineNumber});
    }
  }

  #row(line: string, prepared: PreparedList, out: string[]): void {
    try {
      out.push(rowText(line, prepared, this.#request));
      this.#converted++;
    } catch (error) {
      if (!(error instanceof UsageError)) throw error;
      this.#refused++;
      this.#request.refuse(this.#lineNumber, error.message);
    }
  }
}

function withoutByteOrderMark(line: string): string {
  return line.charCodeAt(0) === 0xfeff ? line.slice(1) : line;
}

function headerText({separator, layout, conversion}: PreparedList, request: ListRequest): string {
  const names = columnNames(conversion.to, request.style).slice(0, hasHeight(layout) ? 3 : 2);
  const cells = layout.others.map((index) => layout.names[index] ?? '');
  cells.splice(layout.coordinatesAfter, 0, ...names, ...extraNames(conversion.to, request));
  return joinCells(cells, separator);
}

/** A height goes along where the list has one. */
function hasHeight({columns}: ListLayout): boolean {
  return columns[2] >= 0;
}

/** Column names that say what they hold and in which unit, and that can be read again. */
export function columnNames({axes, units}: Form, {angles}: NumberStyle): string[] {
  return axes.map((axis, i) => {
    const unit = units[i] === 'deg' && angles === 'dms' ? 'dms' : (units[i] ?? '');
    return columnTitle(axis, unit);
  });
}

const FACTOR_NAMES = ['convergence_deg', 'point_scale', 'elevation_factor', 'combined_factor'];

function extraNames(to: Form, {factors}: ListRequest): string[] {
  if (to.projectionAt === null) return [];
  const zone = to.isZoneOfPlace ? ['grid'] : [];
  return factors ? [...zone, ...FACTOR_NAMES] : zone;
}

function rowText(
  line: string,
  {separator, layout, conversion}: PreparedList,
  {style, factors}: ListRequest,
): string {
  const cells = splitCells(line, separator);
  if (line.includes('"') && line.split('"').length % 2 === 0) {
    throw new UsageError('a quote opens in this row and is never closed; close it');
  }
  if (cells.length !== layout.columnCount) {
    throw new UsageError(
      `need ${layout.columnCount} cells as in the header, found ${cells.length}; put text that ` +
        'holds the separator into quotes, and write numbers with a decimal point',
    );
  }
  const {from, to} = conversion;
  const given: Triple = [
    readCell(cells, layout, from, 0),
    readCell(cells, layout, from, 1),
    hasHeight(layout) ? readCell(cells, layout, from, 2) : Number.NaN,
  ];
  const texts = tripleTexts(conversion.convert(given), to, style);
  const wanted = hasHeight(layout) ? texts : texts.slice(0, 2);
  const extra = to.projectionAt === null ? [] : extraTexts(given, conversion, factors);
  const out = layout.others.map((index) => cells[index] ?? '');
  out.splice(layout.coordinatesAfter, 0, ...wanted, ...extra);
  return joinCells(out, separator);
}

function readCell(cells: readonly string[], layout: ListLayout, form: Form, i: 0 | 1 | 2): number {
  const text = (cells[layout.columns[i]] ?? '').trim();
  const unquoted = text.startsWith('"') ? text.slice(1, -1).trim() : text;
  const factor = layout.factors[i];
  // A blank height is a plan position.
  if (i === 2 && unquoted === '' && (form.kind === 'geodetic' || form.kind === 'grid')) {
    return Number.NaN;
  }
  return readCoordinate(unquoted, form, i, factor);
}

/**
 * One of the three numbers of a position, in the unit of its form.
 *
 * @param factor from the unit as written to that of the form
 * @throws UsageError that says what was expected
 */
export function readCoordinate(text: string, form: Form, i: 0 | 1 | 2, factor = 1): number {
  const axis = form.axes[i];
  const angle = form.units[i] === 'deg' && factor === 1;
  const read: ReadNumber = angle
    ? readAngle(text, i === 0 ? 'latitude' : 'longitude')
    : readPlainNumber(text, axis.replaceAll('_', ' '), unitWord(form.units[i]));
  if (typeof read === 'string') throw new UsageError(read);
  const value = read * factor;
  if (form.units[i] === 'deg' && Math.abs(value) > (i === 0 ? 90 : 360)) {
    throw new UsageError(`need a ${axis} in its range, found "${text}"`);
  }
  return value;
}

function unitWord(unit: string): string {
  return unit === 'm' ? 'metres' : unit;
}

/** The three numbers of a position as they are written; a height that is not known stays blank. */
export function tripleTexts(values: Triple, {kind}: Form, style: NumberStyle): string[] {
  if (kind === 'geodetic') {
    return [
      angleText(values[0], 'latitude', style),
      angleText(values[1], 'longitude', style),
      heightText(values[2], style),
    ];
  }
  return [lengthText(values[0], style), lengthText(values[1], style), heightText(values[2], style)];
}

function heightText(value: number, style: NumberStyle): string {
  return Number.isNaN(value) ? '' : lengthText(value, style);
}

/** Name of the zone, and what the grid does to bearings and lengths there. */
function extraTexts(given: Triple, conversion: Conversion, factors: boolean): string[] {
  const {to, geodeticAfter} = conversion;
  if (to.projectionAt === null || (!factors && !to.isZoneOfPlace)) return [];
  const place = geodeticAfter(given);
  const projection = to.projectionAt(place);
  const zone = to.isZoneOfPlace ? [projection.definition.name] : [];
  if (!factors) return zone;
  const {convergenceDeg, pointScale} = projection.factors(place);
  const elevation = Number.isNaN(place.ellipsoidalHeightM)
    ? undefined
    : elevationFactor(place, projection.definition.ellipsoid);
  const combined =
    elevation === undefined || pointScale === undefined
      ? undefined
      : combinedFactor(pointScale, elevation);
  const texts = [pointScale, elevation, combined].map((factor) => factor?.toFixed(10) ?? '');
  return [...zone, convergenceDeg.toFixed(8), ...texts];
}
