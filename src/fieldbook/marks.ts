import {InputError} from '../errors.ts';
import {readCsv} from './csv.ts';
import {decodeText} from './decode-text.ts';
import type {Mark} from './mark.ts';
import {markFrom} from './mark-from-entry.ts';
import {markShape, type SharedEntry, sharedFields} from './mark-shape.ts';
import {mappingFromRow, readColumns} from './marks-csv.ts';
import {bare, nearestNames} from './nearest-name.ts';
import type {Node, Place} from './node.ts';
import {list, mapping, required, type Shape} from './shape.ts';
import {marksFromSinex, readSinex} from './sinex.ts';
import {readYaml} from './yaml.ts';

/**
 * The marks of a file: SINEX when it says so in its first line, else CSV or YAML by the ending of
 * its name, else by its looks.
 *
 * @param path  how messages call the file; its ending may decide the format
 * @throws InputError for the first thing that is wrong, or when the file holds no mark
 */
export function readMarks(bytes: Uint8Array, path: string): Mark[] {
  const text = decodeText(bytes, path);
  const marks = marksOf(text, path);
  if (marks.length === 0) throw new InputError('expected at least one mark, found none', {path});
  refuseRepeated(marks, path);
  return marks;
}

function marksOf(text: string, path: string): Mark[] {
  if (text.startsWith('%=SNX')) return marksFromSinex(readSinex(text, path));
  if (/\.(ya?ml)$/i.test(path)) return marksFromYaml(text, path);
  if (/\.(csv|tsv)$/i.test(path)) return marksFromCsv(text, path);
  if (/\.(snx|sinex)$/i.test(path)) return marksFromSinex(readSinex(text, path));
  return beginsWithKey(text) ? marksFromYaml(text, path) : marksFromCsv(text, path);
}

/** Whether the first line that says something is a key with its colon, and no header of columns. */
function beginsWithKey(text: string): boolean {
  const first = text.split(/\r\n|\n|\r/).find((line) => /^\s*[^\s#]/.test(line)) ?? '';
  return /^[\w ]+:(?:\s|$)/.test(first);
}

function marksFromYaml(text: string, path: string): Mark[] {
  const fileShape = mapping(
    {
      ...sharedFields,
      marks: required('marks', list(asNode(), {most: 100_000}), 'one item per mark'),
    },
    '"marks:", and below it "- name: PILLAR 4"',
  );
  const {marks, ...shared} = fileShape.read(readYaml(text, path), {path, trail: ''});
  return marks.map((node) => markFromNode(node, shared, path));
}

function marksFromCsv(text: string, path: string): Mark[] {
  const table = readCsv(text, path);
  const columns = readColumns(table.header, path);
  return table.rows.map((row) =>
    markFromNode(mappingFromRow(row, columns, path), NOTHING_SHARED, path),
  );
}

function markFromNode(node: Node, shared: SharedEntry, path: string): Mark {
  const place = {path, trail: trailOf(node)};
  return markFrom(markShape.read(node, place), {node, place, shared});
}

/** Messages about a mark begin with its name, since one file holds many. */
function trailOf(node: Node): string {
  if (node.kind !== 'mapping') return 'mark';
  const name = node.entries.find(({key}) => key === 'name')?.value;
  return name?.kind === 'scalar' && name.text !== '' ? `mark ${name.text}` : 'mark';
}

const NOTHING_SHARED: SharedEntry = {
  frame: undefined,
  coordinateEpoch: undefined,
  verticalDatum: undefined,
  geoidModel: undefined,
  projection: undefined,
  tolerance: undefined,
};

/** A node left as it is, to be read once the name in it is known. */
function asNode(): Shape<Node> {
  return {
    example: '{name: PILLAR 4, latitude: 48.1, longitude: 16.2}',
    hint: '',
    schema: markShape.schema,
    read: (node: Node, _place: Place) => node,
  };
}

function refuseRepeated(marks: readonly Mark[], path: string): void {
  const seen = new Map<string, Mark>();
  for (const mark of marks) {
    const first = seen.get(bare(mark.name));
    if (first !== undefined) {
      throw new InputError(
        `mark "${mark.name}" is also on line ${first.lineNumber}${first.name === mark.name ? '' : ` as "${first.name}"`}; keep one, or give the other another name`,
        {path, lineNumber: mark.lineNumber},
      );
    }
    seen.set(bare(mark.name), mark);
  }
}

/** The mark of a name, or the names that come near it. */
export type MarkSearch =
  | {readonly kind: 'found'; readonly mark: Mark}
  | {readonly kind: 'not found'; readonly near: readonly string[]};

/**
 * Finds a mark by its name, else by one of its other names.
 *
 * Case, blanks, hyphens and underscores do not matter; a name that is merely near is suggested,
 * never taken.
 */
export function findMark(marks: readonly Mark[], name: string): MarkSearch {
  const wanted = bare(name);
  const mark =
    marks.find((known) => bare(known.name) === wanted) ??
    onlyOne(marks.filter((known) => known.otherNames.some((other) => bare(other) === wanted)));
  if (mark !== undefined) return {kind: 'found', mark};
  return {
    kind: 'not found',
    near: nearestNames(
      name,
      marks.map((known) => known.name),
    ),
  };
}

function onlyOne(marks: readonly Mark[]): Mark | undefined {
  return marks.length === 1 ? marks[0] : undefined;
}
