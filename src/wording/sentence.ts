/** Values that a notice carries. */
export type NoticeValues = Readonly<Record<string, string | number | boolean | null>>;

/** One sentence: what is so, and what to do about it. */
export type Sentence = (values: NoticeValues) => string;

/** Reads a number out of the values; a missing one is a defect of the caller. */
export function numberIn(values: NoticeValues, name: string): number {
  const value = values[name];
  if (typeof value !== 'number') throw new Error(`numberIn: no number ${name} in the notice`);
  return value;
}

/** Reads a text out of the values; empty when there is none. */
export function textIn(values: NoticeValues, name: string): string {
  const value = values[name];
  return value === null || value === undefined ? '' : String(value);
}
