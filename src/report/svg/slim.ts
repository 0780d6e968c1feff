import {parseSvg, type SvgElement} from './parse.ts';
import {shortNumber, shortPath} from './path.ts';

export interface SlimOptions {
  /** Prefix of every id in the picture, unique on the page. */
  readonly id: string;
  readonly title: string;
  readonly description: string;
  readonly widthPx: number;
  readonly heightPx: number;
}

/**
 * The picture as the page carries it: one name for the whole, no roles or classes inside, ids of
 * its own, numbers to 0.1 px, and nothing that draws nothing.
 */
export function slimSvg(svg: string, options: SlimOptions): string {
  const root = parseSvg(svg);
  const content = contentOf(root, options.id).map(hoisted);
  const {id, widthPx, heightPx} = options;
  const names = `<title id="${id}-t">${escaped(options.title)}</title><desc id="${id}-d">${escaped(options.description)}</desc>`;
  const head = `<svg role="img" aria-labelledby="${id}-t ${id}-d" viewBox="0 0 ${widthPx} ${heightPx}" width="${widthPx}" height="${heightPx}">`;
  return `${head}${names}${content.map(written).join('')}</svg>`;
}

const DROPPED = new Set([
  'class',
  'role',
  'aria-label',
  'aria-hidden',
  'aria-roledescription',
  'aria-describedby',
  'pointer-events',
  'font-family',
  'stroke-miterlimit',
  'cursor',
]);

const DEFAULTS: Readonly<Record<string, string>> = {
  opacity: '1',
  'fill-opacity': '1',
  'stroke-opacity': '1',
  'stroke-width': '1',
  'text-anchor': 'start',
  'font-size': '11px',
  transform: 'translate(0,0)',
};

function contentOf(element: SvgElement, id: string): SvgElement[] {
  return element.children.flatMap((child) => (typeof child === 'string' ? [] : slimmed(child, id)));
}

/** The element without what says nothing; a group without attributes gives way to its children. */
function slimmed(element: SvgElement, id: string): SvgElement[] {
  if (drawsNothing(element)) return [];
  const attributes = slimAttributes(element, id);
  const isText = element.name === 'text' || element.name === 'tspan';
  const children = isText ? element.children : contentOf(element, id);
  if (element.name === 'g') {
    if (children.length === 0) return [];
    if (attributes.size === 0) return children as SvgElement[];
  }
  return [{name: element.name, attributes, children}];
}

function drawsNothing({name, attributes}: SvgElement): boolean {
  if (attributes.get('display') === 'none') return true;
  const cls = attributes.get('class') ?? '';
  // The plates behind and before a group are drawn only when they have a paint of their own.
  const plate = cls === 'background' || cls === 'foreground';
  if (plate && !attributes.has('fill') && !attributes.has('stroke')) return true;
  return name === 'path' && (attributes.get('d') ?? '') === '';
}

function slimAttributes({name, attributes}: SvgElement, id: string): Map<string, string> {
  const kept = new Map<string, string>();
  for (const [key, value] of attributes) {
    if (DROPPED.has(key)) continue;
    const short = slimValue(key, value, id);
    if (DEFAULTS[key] === short) continue;
    if (name === 'line' && short === '0' && /^[xy][12]$/.test(key)) continue;
    kept.set(key, short);
  }
  return kept;
}

function slimValue(key: string, value: string, id: string): string {
  if (key === 'd') return shortPath(value);
  if (key === 'id') return `${id}-${value}`;
  if (key === 'transform') return slimTransform(value);
  if (value.startsWith('url(#')) return `url(#${id}-${value.slice(5)}`;
  return /^-?\d+\.\d+$/.test(value) ? shortNumber(Number(value)) : value;
}

function slimTransform(value: string): string {
  return value
    .replace(/-?\d+\.\d+(e-?\d+)?/g, (number) => shortNumber(Number(number)))
    .replace(/ ?rotate\(0,0,0\)| ?scale\(1,1\)/g, '')
    .trim();
}

const INHERITED = [
  'fill',
  'stroke',
  'stroke-width',
  'stroke-dasharray',
  'text-anchor',
  'font-size',
  'font-weight',
  'stroke-linecap',
  'stroke-linejoin',
];

/** Attributes that all children share move to their group, where they are said once. */
function hoisted(element: SvgElement): SvgElement {
  if (element.name !== 'g') return element;
  const children = element.children.map((child) =>
    typeof child === 'string' ? child : hoisted(child),
  );
  const attributes = new Map(element.attributes);
  const elements = children.filter((child) => typeof child !== 'string');
  for (const key of INHERITED) {
    const value = elements[0]?.attributes.get(key);
    if (value === undefined || attributes.has(key) || elements.length < 2) continue;
    if (!elements.every((child) => child.attributes.get(key) === value)) continue;
    attributes.set(key, value);
    for (const child of elements) child.attributes.delete(key);
  }
  return {name: element.name, attributes, children};
}

function written(node: SvgElement | string): string {
  if (typeof node === 'string') return withoutControls(node);
  const attributes = [...node.attributes].map(([key, value]) => ` ${key}="${value}"`).join('');
  const open = `<${node.name}${withoutControls(attributes)}`;
  if (node.children.length === 0) return `${open}/>`;
  return `${open}>${node.children.map(written).join('')}</${node.name}>`;
}

/** Vega lets control characters through, which XML and HTML forbid. */
export function withoutControls(text: string): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is removed
  return text.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f\ufffe\uffff]/g, '');
}

function escaped(text: string): string {
  return withoutControls(text).replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;');
}
