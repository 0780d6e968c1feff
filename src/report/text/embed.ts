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

/** The bytes of a text in base64. */
export function base64(text: string): string {
  return Buffer.from(text, 'utf8').toString('base64');
}
