import {parseDate, parseDateTime, parseTimeOfDay} from '../time/parse-time.ts';

export type TextKind = 'date and time' | 'date' | 'clock' | 'number' | 'other' | 'none';

/** What the first row with anything readable in it holds. */
export function kindOf(texts: readonly string[]): TextKind {
  const kinds = texts.map(kindOfText);
  return kinds.find((kind) => kind !== 'other') ?? (texts.length > 0 ? 'other' : 'none');
}

function kindOfText(text: string): TextKind {
  if (parseDateTime(text).kind === 'date and time') return 'date and time';
  if (parseDate(text).kind === 'date') return 'date';
  if (isClock(text)) return 'clock';
  return /^[+-]?(\d+[.,]?\d*|[.,]\d+)(e[+-]?\d+)?$/i.test(text) ? 'number' : 'other';
}

/** With colons; six bare digits could as well be a count of seconds. */
export function isClock(text: string): boolean {
  const bare = text.replace(/(Z|UTC|[+-]\d{2}:?\d{2})$/i, '');
  return text.includes(':') && parseTimeOfDay(bare).kind === 'time of day';
}
