import {
  isAlias,
  isMap,
  isScalar,
  isSeq,
  LineCounter,
  parseDocument,
  type YAMLError,
  type YAMLMap,
} from 'yaml';
import {InputError} from '../errors.ts';
import type {ListNode, MappingEntry, MappingNode, Node, ScalarNode} from './node.ts';

/** Deepest nesting that a sheet or marks file can mean anything with. */
const MAX_DEPTH = 12;

/**
 * A YAML text as nodes with line numbers.
 *
 * Read with the failsafe schema: every scalar is text, so `NO`, `0012`, `1e3` and `12:30:00` stay
 * what was written. Stricter than YAML where YAML is a trap for people: no anchors, aliases, tags
 * or merge keys, no second document, no text that runs on to the next line without quotes, no `#`
 * that cuts a name short.
 *
 * Source: YAML Ain't Markup Language, version 1.2, revision 1.2.2 (2021), chapters 7 to 10.
 *
 * @throws InputError for the first thing that is wrong
 */
export function readYaml(text: string, path: string): MappingNode {
  refuseDeepFlow(text, path);
  const lines = new LineCounter();
  const document = parseDocument(text, {
    schema: 'failsafe',
    lineCounter: lines,
    prettyErrors: false,
  });
  const source: Source = {path, text, lines};
  const error = document.errors[0];
  if (error) throw translated(error, source, openQuote(document.contents));
  const strange = document.warnings[0];
  if (strange) throw translated(strange, source, undefined);
  if (document.contents === null) return {kind: 'mapping', entries: [], lineNumber: 1};
  if (!isMap(document.contents)) {
    fail(
      source,
      lineOf(document.contents, source),
      'expected lines of the form "key: value"; write a space after each colon, and no text before the first key',
    );
  }
  return mappingFrom(document.contents, source, 0);
}

interface Source {
  readonly path: string;
  readonly text: string;
  readonly lines: LineCounter;
}

function nodeFrom(value: unknown, source: Source, depth: number): Node {
  const lineNumber = lineOf(value, source);
  if (depth > MAX_DEPTH) {
    fail(source, lineNumber, `blocks are nested more than ${MAX_DEPTH} deep; remove brackets`);
  }
  if (isAlias(value)) {
    fail(
      source,
      lineNumber,
      `"*${value.source}" stands for a value written elsewhere; write the value out, or put text with * into quotes`,
    );
  }
  if ((isScalar(value) || isMap(value) || isSeq(value)) && value.anchor !== undefined) {
    fail(
      source,
      lineNumber,
      `"&${value.anchor}" names a value to be repeated; remove it, or put text with & into quotes`,
    );
  }
  if (isMap(value)) return mappingFrom(value, source, depth);
  if (isSeq(value)) {
    const items = value.items.map((item) => nodeFrom(item, source, depth + 1));
    return {kind: 'list', items, lineNumber} satisfies ListNode;
  }
  return scalarFrom(value, source, lineNumber);
}

function mappingFrom(value: YAMLMap, source: Source, depth: number): MappingNode {
  const entries = value.items.map((pair) => entryFrom(pair, source, depth));
  return {kind: 'mapping', entries, lineNumber: lineOf(value, source)};
}

function entryFrom(
  pair: {readonly key: unknown; readonly value: unknown},
  source: Source,
  depth: number,
): MappingEntry {
  const lineNumber = lineOf(pair.key, source);
  if (!isScalar(pair.key) || typeof pair.key.value !== 'string') {
    fail(source, lineNumber, 'expected a plain key before the colon, such as "mark: PILLAR 4"');
  }
  if (pair.key.value === '<<') {
    fail(source, lineNumber, '"<<" merges blocks; write the keys out');
  }
  // A key inside braces may stand without any value.
  const value: Node =
    pair.value === null
      ? {kind: 'scalar', text: '', lineNumber}
      : nodeFrom(pair.value, source, depth + 1);
  // An empty value is reported on the line of its key, wherever the parser looked for it.
  const blank = value.kind === 'scalar' && value.text === '';
  return {key: pair.key.value, lineNumber, value: blank ? {...value, lineNumber} : value};
}

function scalarFrom(value: unknown, source: Source, lineNumber: number): ScalarNode {
  if (!isScalar(value) || typeof value.value !== 'string') {
    fail(source, lineNumber, 'expected text here; put it into quotes');
  }
  const text = value.value;
  if (value.type !== 'PLAIN') return {kind: 'scalar', text: text.trim(), lineNumber};
  if (value.comment && /^\w/.test(value.comment) && cutsShort(value.comment, source, lineNumber)) {
    fail(
      source,
      lineNumber,
      `" #" begins a comment, so the value would end at "${text}"; put the value into quotes, or a space after #`,
    );
  }
  const written = value.range ? source.text.slice(value.range[0], value.range[1]) : text;
  if (written.includes('\n')) {
    fail(
      source,
      lineNumber + 1,
      'expected "key: value", found text that runs on from the line before; put long text into quotes, or check the colon and the indentation',
    );
  }
  return {kind: 'scalar', text: text === '~' || text === 'null' ? '' : text, lineNumber};
}

/** Whether a comment stands on the line of the value, and not below it. */
function cutsShort(comment: string, source: Source, lineNumber: number): boolean {
  const start = source.lines.lineStarts[lineNumber - 1] ?? 0;
  const line = source.text.slice(start).split('\n', 1)[0] ?? '';
  return line.includes(`#${comment.split('\n', 1)[0]}`);
}

function lineOf(value: unknown, source: Source): number {
  const start =
    isScalar(value) || isMap(value) || isSeq(value) || isAlias(value) ? value.range?.[0] : 0;
  return source.lines.linePos(start ?? 0).line;
}

function fail(source: Source, lineNumber: number, message: string): never {
  throw new InputError(message, {path: source.path, lineNumber});
}

/** What each complaint of the parser means to someone who fills in a sheet. */
const REMEDIES: Readonly<Record<string, string>> = {
  TAB_AS_INDENT: 'a tab indents this line; use spaces',
  MULTIPLE_DOCS: 'a line "---" begins a second sheet; keep one sheet per file and remove the line',
  BLOCK_AS_IMPLICIT_KEY: 'the value holds a colon and a space; put the value into quotes',
  MULTILINE_IMPLICIT_KEY:
    'expected "key: value", found no colon; write the key, a colon and a space',
  BAD_INDENT:
    'the indentation fits no line above; indent the keys of one block alike, and close brackets',
  BAD_SCALAR_START:
    'the value begins with a character that YAML keeps for itself; put it into quotes',
  BAD_DQ_ESCAPE: 'a backslash inside double quotes begins an escape; use single quotes',
  UNEXPECTED_TOKEN:
    'something follows a finished value; put the whole value into one pair of quotes',
  TAG_RESOLVE_FAILED: 'the value begins with "!", which YAML keeps for itself; put it into quotes',
  MISSING_CHAR: 'a quote, comma, colon or bracket is missing; add it',
};

function translated(error: YAMLError, source: Source, openedAt: number | undefined): InputError {
  const lineNumber = source.lines.linePos(error.pos[0]).line;
  const place = {path: source.path, lineNumber, cause: error};
  if (error.code === 'DUPLICATE_KEY') {
    const key = /^[^:\n]*/.exec(source.text.slice(error.pos[0]))?.[0].trim() ?? '';
    return new InputError(`"${key}" stands twice in this block; keep one of them`, place);
  }
  if (error.code === 'MISSING_CHAR' && openedAt !== undefined && /quote/.test(error.message)) {
    const opened = {...place, lineNumber: source.lines.linePos(openedAt).line};
    return new InputError('a quote opens here and is never closed; close it', opened);
  }
  const remedy =
    REMEDIES[error.code] ?? 'this is not YAML; write "key: value" on lines of their own';
  return new InputError(remedy, place);
}

/** Where the last quoted text begins: the one that a missing quote leaves open. */
function openQuote(contents: unknown): number | undefined {
  let last: unknown = contents;
  while (isMap(last) || isSeq(last)) {
    const item: unknown = last.items.at(-1);
    last = isMap(last) ? (item as {value?: unknown} | undefined)?.value : item;
  }
  return isScalar(last) && last.type?.startsWith('QUOTE') ? last.range?.[0] : undefined;
}

/**
 * Ten thousand opening brackets would exhaust the parser's stack before it could complain.
 * Counting every bracket, also those inside quotes, errs on the safe side of a generous limit.
 */
function refuseDeepFlow(text: string, path: string): void {
  let depth = 0;
  let line = 1;
  for (let i = 0; i < text.length; i++) {
    const character = text[i];
    if (character === '\n') line++;
    else if (character === '[' || character === '{') depth++;
    else if ((character === ']' || character === '}') && depth > 0) depth--;
    if (depth > 100) {
      throw new InputError('more than 100 brackets are open; close or remove them', {
        path,
        lineNumber: line,
      });
    }
  }
}
