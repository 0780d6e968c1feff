/** A tree of the SVG that Vega writes: elements with attributes and text, nothing else. */
export interface SvgElement {
  readonly name: string;
  attributes: Map<string, string>;
  children: (SvgElement | string)[];
}

/**
 * Reads well-formed markup without comments, declarations or CDATA, which is all Vega writes.
 *
 * Text and attribute values keep their escapes.
 *
 * @throws RangeError when tags do not pair up
 */
export function parseSvg(text: string): SvgElement {
  const root: SvgElement = {name: '', attributes: new Map(), children: []};
  const open: SvgElement[] = [root];
  let at = 0;
  while (at < text.length) {
    const parent = open[open.length - 1];
    if (parent === undefined)
      throw new RangeError('parseSvg: a closing tag without an opening one');
    const tagStart = text.indexOf('<', at);
    const textEnd = tagStart < 0 ? text.length : tagStart;
    if (textEnd > at) parent.children.push(text.slice(at, textEnd));
    if (tagStart < 0) break;
    const tagEnd = endOfTag(text, tagStart);
    at = tagEnd + 1;
    if (text[tagStart + 1] === '/') {
      open.pop();
      continue;
    }
    const selfClosing = text[tagEnd - 1] === '/';
    const element = readTag(text.slice(tagStart + 1, selfClosing ? tagEnd - 1 : tagEnd));
    parent.children.push(element);
    if (!selfClosing) open.push(element);
  }
  const svg = root.children[0];
  if (open.length !== 1 || svg === undefined || typeof svg === 'string') {
    throw new RangeError('parseSvg: the tags do not pair up');
  }
  return svg;
}

/** A greater-than sign inside quotes does not end a tag. */
function endOfTag(text: string, start: number): number {
  let quoted = false;
  for (let i = start; i < text.length; i++) {
    if (text[i] === '"') quoted = !quoted;
    else if (text[i] === '>' && !quoted) return i;
  }
  throw new RangeError('parseSvg: a tag does not end');
}

function readTag(tag: string): SvgElement {
  const name = /^[^\s]+/.exec(tag)?.[0] ?? '';
  const attributes = new Map<string, string>();
  for (const match of tag.slice(name.length).matchAll(/([^\s=]+)="([^"]*)"/g)) {
    attributes.set(match[1] ?? '', match[2] ?? '');
  }
  return {name, attributes, children: []};
}
