import {UsageError} from '../errors.ts';
import {readCoordinate} from './convert-list.ts';
import type {Form, Triple} from './form.ts';

/**
 * The positions that the words of a command line give: each word one position, its numbers set
 * apart by commas, semicolons or blanks; or three (or two) words that are a number each.
 */
export function positionTexts(words: readonly string[]): string[] {
  const bare = words.every((word) => !/[,;\s]/.test(word.trim()));
  return bare && words.length > 1 ? [words.join(' ')] : [...words];
}

/**
 * The three numbers of a position; a height that is not given is NaN.
 *
 * @throws UsageError that says what was expected
 */
export function readPosition(text: string, form: Form): Triple {
  const trimmed = text.trim();
  const separator = trimmed.includes(';') ? ';' : trimmed.includes(',') ? ',' : /\s+/;
  const parts = trimmed.split(separator).map((part) => part.trim());
  const needsHeight = form.kind === 'geocentric' || form.kind === 'local';
  if (parts.length !== 3 && (needsHeight || parts.length !== 2)) {
    const names = form.axes.map((axis) => axis.replaceAll('_', ' ')).join(', ');
    throw new UsageError(`need ${names}, set apart by commas, found "${text}"`);
  }
  return [
    readCoordinate(parts[0] ?? '', form, 0),
    readCoordinate(parts[1] ?? '', form, 1),
    parts.length === 3 ? readCoordinate(parts[2] ?? '', form, 2) : Number.NaN,
  ];
}
