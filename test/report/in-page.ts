/*
 * What the tests ask inside the page, as text: it runs in the browser, whose types this project does
 * not load.
 */

export const SIDEWAYS = 'document.documentElement.scrollWidth - window.innerWidth';

export const VERDICT_BOTTOM = "document.querySelector('.verdict').getBoundingClientRect().bottom";

export const CAUTIONS_BOTTOM = "document.querySelector('.care').getBoundingClientRect().bottom";

/** How far down the page the element stands that has the focus; NaN for one that takes no room. */
export const FOCUS_TOP = `(() => {
  const box = document.activeElement.getBoundingClientRect();
  return box.width > 0 && box.height > 0 ? Math.round(box.top + window.scrollY) : NaN;
})()`;

export const VERDICT_EDGE = "getComputedStyle(document.querySelector('.verdict')).borderLeftWidth";

export const AXE_VIOLATIONS =
  "axe.run().then(({violations}) => violations.map(({id, nodes}) => id + ': ' + nodes[0].html))";

export interface Ids {
  readonly twice: readonly string[];
  readonly dangling: readonly string[];
  readonly count: number;
}

export const IDS = `(() => {
  const ids = [...document.querySelectorAll('[id]')].map((e) => e.id);
  const wanted = [...document.querySelectorAll('*')].flatMap((e) =>
    [...e.attributes].flatMap(({name, value}) => {
      if (name === 'href' && value.startsWith('#')) return [value.slice(1)];
      if (name === 'aria-labelledby') return value.split(' ');
      return [...value.matchAll(/url\\(#([^)]+)\\)/g)].map(([, id]) => id);
    }),
  );
  return {
    twice: ids.filter((id, i) => ids.indexOf(id) !== i),
    dangling: wanted.filter((id) => !ids.includes(id)),
    count: document.querySelectorAll('*').length,
  };
})()`;

export interface PictureFacts {
  readonly role: string | null;
  readonly named: number;
  readonly inside: number;
}

export const PICTURES = `[...document.querySelectorAll('svg')].map((svg) => ({
  role: svg.getAttribute('role'),
  named: svg.querySelectorAll(':scope > title, :scope > desc').length,
  inside: svg.querySelectorAll('[role], [aria-label], [class]').length,
}))`;

export const HEADING_LEVELS =
  "[...document.querySelectorAll('h1,h2,h3,h4')].map((e) => Number(e.tagName[1]))";

export interface TextPlaces {
  readonly outside: readonly string[];
  readonly overlaps: readonly string[];
  readonly count: number;
}

/** Texts that leave their picture, and pairs that touch; boxes of text are taller than letters. */
export const TEXT_PLACES = `(() => {
  const outside = [];
  const overlaps = [];
  let count = 0;
  for (const svg of document.querySelectorAll('svg')) {
    const frame = svg.getBoundingClientRect();
    if (frame.width === 0) continue;
    const texts = [...svg.querySelectorAll('text')].map((e) => ({
      text: e.textContent,
      box: e.getBoundingClientRect(),
    }));
    count += texts.length;
    for (const {text, box} of texts) {
      const inside =
        box.left >= frame.left - 0.5 && box.right <= frame.right + 0.5 &&
        box.top >= frame.top - 0.5 && box.bottom <= frame.bottom + 0.5;
      if (!inside) outside.push(text);
    }
    texts.forEach((a, i) => {
      for (const b of texts.slice(i + 1)) {
        const wide = Math.min(a.box.right, b.box.right) - Math.max(a.box.left, b.box.left);
        const tall = Math.min(a.box.bottom, b.box.bottom) - Math.max(a.box.top, b.box.top);
        if (wide > 0.5 && tall > 3.5) overlaps.push(a.text + ' / ' + b.text);
      }
    });
  }
  return {outside, overlaps, count};
})()`;

/** Sizes of all texts in pictures as they stand on the screen. */
export const TEXT_SIZES = `[...document.querySelectorAll('svg')].flatMap((svg) => {
  const shown = svg.getBoundingClientRect().width;
  const scale = shown / svg.viewBox.baseVal.width;
  return shown === 0 ? [] : [...svg.querySelectorAll('text')].map(
    (e) => Number.parseFloat(getComputedStyle(e).fontSize) * scale,
  );
})`;
