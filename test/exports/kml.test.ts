import {describe, expect, test} from 'vitest';
import {resultKml} from '../../src/exports/kml.ts';
import type {Result} from '../../src/occupation/result.ts';
import {DAY_WITH_JUMP, STILL_HOUR} from '../report/fixtures.ts';
import {invented} from './samples.ts';

interface Element {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: Element[];
  text: string;
}

/** A strict reader of the little XML that is needed: any fault of form throws. */
function parseXml(xml: string): Element {
  const root: Element = {name: '', attributes: {}, children: [], text: ''};
  const open = [root];
  let at = xml.indexOf('?>') + 2;
  expect(xml.startsWith('<?xml version="1.0" encoding="UTF-8"?>')).toBe(true);
  while (at < xml.length) {
    const parent = open[open.length - 1]!;
    if (xml[at] !== '<') {
      const end = xml.indexOf('<', at);
      parent.text += unescaped(xml.slice(at, end < 0 ? undefined : end));
      at = end < 0 ? xml.length : end;
      continue;
    }
    const end = xml.indexOf('>', at);
    const tag = xml.slice(at + 1, end);
    at = end + 1;
    if (tag.startsWith('/')) {
      expect(tag.slice(1)).toBe(open.pop()?.name);
      continue;
    }
    const parts = /^([A-Za-z][\w]*)((?: [\w]+="[^"<]*")*)$/.exec(tag);
    if (parts === null) throw new Error(`no tag: ${tag}`);
    const attributes = Object.fromEntries(
      [...(parts[2] ?? '').matchAll(/ (\w+)="([^"]*)"/g)].map(([, key, value]) => [
        key,
        unescaped(value ?? ''),
      ]),
    );
    const element: Element = {name: parts[1] ?? '', attributes, children: [], text: ''};
    parent.children.push(element);
    open.push(element);
  }
  expect(open.length).toBe(1);
  return root.children[0]!;
}

function unescaped(text: string): string {
  // XML 1.0, production 2: no control characters but tab and line ends; no lone surrogates.
  const codes = [...text].map((character) => character.codePointAt(0) ?? 0);
  expect(codes.filter((code) => code < 0x20 && ![9, 10, 13].includes(code))).toEqual([]);
  expect(codes).not.toContain(0xffff);
  expect(text.isWellFormed()).toBe(true);
  const names: Record<string, string> = {amp: '&', lt: '<', gt: '>', quot: '"', apos: "'"};
  return text.replace(/&(\w*);?/g, (whole, name) => {
    if (names[name] === undefined || !whole.endsWith(';')) throw new Error(`no entity: ${whole}`);
    return names[name];
  });
}

function all(element: Element, name: string): Element[] {
  const own = element.name === name ? [element] : [];
  return [...own, ...element.children.flatMap((child) => all(child, name))];
}

/** The order of children that the schema of OGC KML 2.2 asks for. */
const PLACEMARK_ORDER = [
  'name',
  'description',
  'styleUrl',
  'ExtendedData',
  'Point',
  'LineString',
  'Polygon',
];
const DOCUMENT_ORDER = ['name', 'description', 'Style', 'Placemark'];

function requireKml(result: Result): Element {
  const kml = parseXml(resultKml(result));
  expect(kml.name).toBe('kml');
  expect(kml.attributes.xmlns).toBe('http://www.opengis.net/kml/2.2');
  const [document] = kml.children;
  requireOrder(document!, DOCUMENT_ORDER);
  const placemarks = all(kml, 'Placemark');
  for (const placemark of placemarks) {
    requireOrder(placemark, PLACEMARK_ORDER);
    const mode = all(placemark, 'altitudeMode');
    expect(mode.map(({text}) => text)).toEqual(['clampToGround']);
    const [coordinates] = all(placemark, 'coordinates');
    for (const tuple of coordinates!.text.split(' ')) {
      expect(tuple).toMatch(/^-?\d{1,3}\.\d{10,11},-?\d{1,2}\.\d{10,11}$/);
    }
  }
  const styles = new Set(all(kml, 'Style').map(({attributes}) => `#${attributes.id}`));
  for (const {text} of all(kml, 'styleUrl')) expect(styles).toContain(text);
  for (const {text} of all(kml, 'LinearRing').flatMap((ring) => ring.children)) {
    const tuples = text.split(' ');
    expect(tuples.length).toBeGreaterThanOrEqual(4);
    expect(tuples[tuples.length - 1]).toBe(tuples[0]);
  }
  return kml;
}

function requireOrder(element: Element, order: readonly string[]): void {
  const places = element.children.map(({name}) => order.indexOf(name));
  expect(places).not.toContain(-1);
  expect(places).toEqual([...places].sort((a, b) => a - b));
}

function dataOf(placemark: Element): Record<string, string> {
  return Object.fromEntries(
    all(placemark, 'Data').map(({attributes, children}) => [
      attributes.name,
      children[0]?.text ?? '',
    ]),
  );
}

describe('resultKml', () => {
  test('position, ellipse, line and mark keep to the structure of KML 2.2', () => {
    const result = invented(STILL_HOUR);
    const kml = requireKml(result);
    const kinds = all(kml, 'Placemark').map((placemark) => dataOf(placemark).kind);
    expect(kinds).toEqual(['position', 'ellipse', 'offset', 'mark']);
    const data = dataOf(all(kml, 'Placemark')[0]!);
    expect(Number(data.ellipsoidalHeightM)).toBeCloseTo(
      result.position!.geodetic.ellipsoidalHeightM!,
      3,
    );
    expect(data.heights).toMatch(/KML heights are above sea level/);
    expect(data.coordinates).toMatch(/not transformed/);
  });

  test.each([
    ['a jump', DAY_WITH_JUMP],
    ['no heights', {...STILL_HOUR, heights: false}],
  ])('%s', (_, spec) => {
    const result = invented({...spec, seconds: Math.min(spec.seconds, 7200)});
    expect(all(requireKml(result), 'Point').length).toBeGreaterThan(0);
  });

  test('hostile names stay text', () => {
    const mark = ']]><script>&"\'\u0000\u001b\ud800\uffff{{x}}';
    const kml = requireKml(invented({...STILL_HOUR, names: {mark, file: mark}}));
    const [name] = all(kml, 'name');
    expect(name?.text).toBe(']]><script>&"\'\ufffd\ufffd\ufffd\ufffd{{x}}');
  });

  test('cautions stand in the description', () => {
    const result = invented(STILL_HOUR);
    const notice = {
      code: 'x',
      severity: 'caution',
      about: [],
      values: {},
      text: 'Look < here',
    } as const;
    const kml = requireKml({...result, notices: [notice]});
    expect(all(kml, 'description')[0]?.text).toContain('Look < here');
  });
});
