import {type Field, type Fields, isMapping} from './shape.ts';
import {sheetSections} from './sheet-shape.ts';

const COMMENT_COLUMN = 40;

const HEAD = `# Field sheet of one occupation, for stillmark
#
# Fill in what you know and leave the rest blank: blank means "not given", and the report says so.
# Lengths carry their unit: 1.543 m, 12 mm, 5.062 ft (0.3048 m), 5.062 us-ft (1200/3937 m).
# Numbers have a decimal point. Times carry Z or their offset from UTC: 2026-05-04 10:00 +02:00.
# Indent with spaces. Put text with ": " or " #" in it into quotes.
`;

/** The commented blank sheet. It reads as a sheet in which nothing is given. */
export function blankSheet(): string {
  const sections = sheetSections.map(
    ({title, fields}) => `\n# ${title}\n\n${linesOf(fields, '').join('\n')}\n`,
  );
  return HEAD + sections.join('');
}

function linesOf(fields: Fields, indent: string): string[] {
  return Object.values(fields).flatMap((field) => linesOfField(field, indent));
}

function linesOfField(field: Field<unknown>, indent: string): string[] {
  const {key, shape, says} = field;
  const begin = `${indent}${key}:`;
  if (isMapping(shape)) return [commented(begin, says), ...linesOf(shape.fields, `${indent}  `)];
  return [commented(begin, `${says}${shape.hint}`)];
}

function commented(begin: string, comment: string): string {
  return `${begin.padEnd(COMMENT_COLUMN - 1)} # ${comment}`;
}
