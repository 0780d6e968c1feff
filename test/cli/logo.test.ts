import {describe, expect, test} from 'vitest';
import {logoDataUrl} from '../../src/cli/logo.ts';

const bytes = (text: string) => new TextEncoder().encode(text);
const svg = (inside: string) => bytes(`<svg xmlns="http://www.w3.org/2000/svg">${inside}</svg>`);

describe('a logo', () => {
  test('PNG and plain SVG become data URLs', () => {
    const png = Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0);
    expect(logoDataUrl(png, 'a.png')).toMatch(/^data:image\/png;base64,/);
    const plain = svg('<path d="M0 0h10"/><use href="#a"/><rect fill="url(#g)"/>');
    expect(logoDataUrl(plain, 'a.svg')).toMatch(/^data:image\/svg\+xml;base64,/);
  });

  test.each([
    ['<script>1</script>', 'a script'],
    ['<g onload="x()"/>', 'an event handler'],
    ['<a href="javascript:x()"/>', 'a script address'],
    ['<image href="http://example.org/a.png"/>', 'outside'],
    ["<image xlink:href='//example.org/a.png'/>", 'outside'],
    ['<style>@import url(x.css)</style>', 'outside'],
    ['<rect style="fill: url(http://example.org/#a)"/>', 'outside'],
    ['<foreignObject/>', 'foreign content'],
  ])('SVG with %s is refused', (inside, says) => {
    expect(() => logoDataUrl(svg(inside), 'a.svg')).toThrow(says);
  });

  test('other files and large ones are refused by name', () => {
    expect(() => logoDataUrl(bytes('GIF89a'), 'a.gif')).toThrow('PNG or SVG');
    expect(() => logoDataUrl(new Uint8Array(300_000), 'a.png')).toThrow('200 kB');
    expect(() => logoDataUrl(bytes('<!DOCTYPE svg [<!ENTITY a "b">]><svg/>'), 'a.svg')).toThrow();
  });
});
