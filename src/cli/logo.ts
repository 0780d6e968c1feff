import {InputError} from '../errors.ts';

/** Larger pictures would dominate the report's own size. */
const LARGEST_BYTES = 200_000;
const PNG_SIGNATURE = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a];

/** What an SVG picture has no need of, and what could run or fetch something. */
const REFUSED_IN_SVG: readonly (readonly [RegExp, string])[] = [
  [/<!DOCTYPE|<!ENTITY/i, 'a document type or entity'],
  [/<\s*script/i, 'a script'],
  [/<\s*foreignObject/i, 'foreign content'],
  [/<\s*(iframe|object|embed|audio|video)/i, 'embedded content'],
  [/\son[a-z]+\s*=/i, 'an event handler'],
  [/javascript\s*:/i, 'a script address'],
  [
    /(href|src)\s*=\s*["']?\s*(?!#|["']?data:image\/(png|jpeg))[^"'\s>]/i,
    'a reference to something outside',
  ],
  [/url\s*\(\s*["']?\s*(?!#)[^)]/i, 'a reference to something outside'],
  [/@import/i, 'an imported style sheet'],
];

/**
 * A logo as a data URL for the report: PNG as it is, SVG only when nothing in it could run or
 * fetch anything. A picture that is refused is named with what is wrong in it.
 */
export function logoDataUrl(bytes: Uint8Array, path: string): string {
  if (bytes.length > LARGEST_BYTES) {
    throw new InputError(
      `a logo of at most ${LARGEST_BYTES / 1000} kB is wanted, this one has ${Math.round(bytes.length / 1000)} kB; make it smaller`,
      {path},
    );
  }
  if (PNG_SIGNATURE.every((byte, i) => bytes[i] === byte)) {
    return `data:image/png;base64,${Buffer.from(bytes).toString('base64')}`;
  }
  const text = new TextDecoder().decode(bytes);
  if (!/^\s*(<\?xml[^>]*\?>\s*)?(<!--[\s\S]*?-->\s*)*<svg[\s>]/.test(text)) {
    throw new InputError('a logo must be a PNG or SVG picture; convert it', {path});
  }
  const refused = REFUSED_IN_SVG.find(([pattern]) => pattern.test(text));
  if (refused !== undefined) {
    throw new InputError(`the SVG holds ${refused[1]}; save it as a plain picture or as PNG`, {
      path,
    });
  }
  return `data:image/svg+xml;base64,${Buffer.from(bytes).toString('base64')}`;
}
