/**
 * Widths of characters in thousandths of the type size: the metric-compatible sans of most
 * systems (Liberation Sans; its digits and capitals are those of Helvetica).
 */
const WIDTHS: readonly (readonly [string, number])[] = [
  ["ijl'|", 222],
  [' fIt.,:;/!()[]°', 278],
  ['r-', 333],
  ['ckvxyzsJ', 500],
  ['mM', 833],
  ['W%', 920],
  ['wCDHNRU', 722],
  ['GOQ', 778],
  ['ABEKPSVXY&', 667],
  ['FTZ', 611],
];

const BY_CHARACTER = new Map(
  WIDTHS.flatMap(([characters, width]) => [...characters].map((c) => [c, width] as const)),
);
const OTHER = 556;
/** Room for wider fonts than the one measured. */
const ALLOWANCE = 1.12;

/** An upper estimate of the width of a line of text, in pixels. */
export function textWidthPx(text: string, sizePx: number): number {
  let thousandths = 0;
  for (const character of text) thousandths += BY_CHARACTER.get(character) ?? OTHER;
  return (thousandths / 1000) * sizePx * ALLOWANCE;
}

/** The text, or its beginning and an ellipsis, so that it fits. */
export function fitted(text: string, widthPx: number, sizePx: number): string {
  if (textWidthPx(text, sizePx) <= widthPx) return text;
  const characters = [...text];
  while (characters.length > 1 && textWidthPx(`${characters.join('')}…`, sizePx) > widthPx) {
    characters.pop();
  }
  return `${characters.join('').trimEnd()}…`;
}
