/** JSON that can stand inside a script element: no tag and no comment can begin in it. */
export function jsonForHtml(value: unknown): string {
  return JSON.stringify(value)
    .replace(/</g, '\\u003c')
    .replace(/>/g, '\\u003e')
    .replace(/\u2028/g, '\\u2028')
    .replace(/\u2029/g, '\\u2029');
}

/** A string inside CSS, everything but letters, digits and a few signs written as code points. */
export function cssString(text: string): string {
  const body = [...text]
    .map((c) => (/[A-Za-z0-9 .,:/-]/.test(c) ? c : `\\${(c.codePointAt(0) ?? 0).toString(16)} `))
    .join('');
  return `"${body}"`;
}

/** A file name that every system takes. */
export function fileStem(text: string): string {
  const stem = text
    .normalize('NFKD')
    .replace(/[^A-Za-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60)
    .toLowerCase();
  return stem === '' ? 'occupation' : stem;
}

/**
 * JSON as an address that a browser saves as a file. Percent signs rather than base64: the text
 * stays like the data block beside it, and the pair compresses to little more than one of them.
 */
export function jsonUrl(value: unknown): string {
  const json = JSON.stringify(value).replace(/[%#"<>\s]|[^ -~]+/g, encodeURIComponent);
  return `data:application/json;charset=utf-8,${json}`;
}
