import {InputError} from '../errors.ts';

/**
 * What somebody wrote down, before anyone says what it should mean: text, lists and mappings, each
 * with the line it stands on.
 *
 * Scalars stay text on purpose. A mark called `0012`, `NO` or `1e3` keeps its name, and a length
 * keeps the unit and the number of digits it was written with.
 */
export type Node = ScalarNode | ListNode | MappingNode;

export interface ScalarNode {
  readonly kind: 'scalar';
  /** Empty when the place was left blank. */
  readonly text: string;
  readonly lineNumber: number;
}

export interface ListNode {
  readonly kind: 'list';
  readonly items: readonly Node[];
  readonly lineNumber: number;
}

export interface MappingNode {
  readonly kind: 'mapping';
  readonly entries: readonly MappingEntry[];
  readonly lineNumber: number;
}

export interface MappingEntry {
  readonly key: string;
  readonly lineNumber: number;
  readonly value: Node;
}

/** The file being read, and the way from its top to the value in hand (`antenna.before`). */
export interface Place {
  readonly path: string;
  readonly trail: string;
}

/** Ends the reading with a message that names the key, and keeps file and line beside it. */
export function refuse(place: Place, lineNumber: number, message: string): never {
  const where = place.trail === '' ? '' : `${place.trail}: `;
  throw new InputError(`${where}${message}`, {path: place.path, lineNumber});
}

/** Whether nothing was filled in below this node. */
export function isBlank(node: Node): boolean {
  switch (node.kind) {
    case 'scalar':
      return node.text === '';
    case 'list':
      return node.items.every(isBlank);
    case 'mapping':
      return node.entries.every((entry) => isBlank(entry.value));
  }
}

/** What a message calls a node: its text in quotes, or its kind. */
export function described(node: Node): string {
  if (node.kind === 'scalar') return quoted(node.text);
  return node.kind === 'list' ? 'a list' : 'a block of keys';
}

/** Text in quotes, cut to a length that leaves a message readable. */
export function quoted(text: string): string {
  const flat = text.replace(/\s+/g, ' ');
  return `"${flat.length > 60 ? `${flat.slice(0, 57)}...` : flat}"`;
}
