import {describe, expect, test} from 'vitest';
import {parseSvg} from '../../../src/report/svg/parse.ts';
import {slimSvg, withoutControls} from '../../../src/report/svg/slim.ts';

const OPTIONS = {id: 'f', title: 'A < B', description: 'what & why', widthPx: 100, heightPx: 50};

describe('parseSvg', () => {
  test('reads elements, attributes and text with their escapes', () => {
    const svg = parseSvg('<svg a="1"><g b="x > y"><text>1 &lt; 2</text></g><path d="M0"/></svg>');
    expect(svg.name).toBe('svg');
    expect(svg.children).toHaveLength(2);
    const [group] = svg.children;
    if (typeof group === 'string' || group === undefined) throw new Error('no group');
    expect(group.attributes.get('b')).toBe('x > y');
    expect(JSON.stringify(group.children)).toContain('1 &lt; 2');
  });

  test('refuses tags that do not pair up', () => {
    expect(() => parseSvg('<svg><g></svg>')).toThrow(RangeError);
    expect(() => parseSvg('<svg></svg></g>')).toThrow(RangeError);
    expect(() => parseSvg('<svg a="')).toThrow(RangeError);
  });
});

describe('slimSvg', () => {
  test('one name outside, no role, class or empty group inside', () => {
    const svg = slimSvg(
      '<svg><g class="a" role="graphics-object" aria-label="x"><g/><path class="background" d="M0,0h1"/><path d="M1,1L2,1" opacity="1" stroke="#123456"/></g></svg>',
      OPTIONS,
    );
    expect(svg).toBe(
      '<svg role="img" aria-labelledby="f-t f-d" viewBox="0 0 100 50" width="100" height="50"><title id="f-t">A &lt; B</title><desc id="f-d">what &amp; why</desc><path d="M1 1h1" stroke="#123456"/></svg>',
    );
  });

  test('ids and what points to them take the name of the figure', () => {
    const svg = slimSvg(
      '<svg><defs><clipPath id="clip1"><path d="M0,0h5v5Z"/></clipPath></defs><g clip-path="url(#clip1)"><path d="M0,0h9"/></g></svg>',
      OPTIONS,
    );
    expect(svg).toContain('id="f-clip1"');
    expect(svg).toContain('clip-path="url(#f-clip1)"');
  });

  test('what all children share is said once', () => {
    const svg = slimSvg(
      '<svg><g transform="translate(1,2)"><path d="M0,0h1" fill="#000000"/><path d="M0,0h2" fill="#000000"/></g></svg>',
      OPTIONS,
    );
    expect(svg).toContain(
      '<g transform="translate(1,2)" fill="#000000"><path d="M0 0h1"/><path d="M0 0h2"/></g>',
    );
  });

  test('control characters are dropped, line ends kept', () => {
    expect(withoutControls('a\u0001b\u0000c\nd\u009fe\ufffff')).toBe('abc\ndef');
  });
});
