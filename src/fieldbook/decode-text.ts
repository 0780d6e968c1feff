import {InputError} from '../errors.ts';

/** Largest field sheet or marks file that is read as text; a thousand marks need about 0.5 MB. */
const MAX_BYTES = 32 * 1024 * 1024;

/**
 * Bytes of a field sheet or a marks file as text, without a byte-order mark.
 *
 * @throws InputError when the bytes are not UTF-8, hold control characters, or are far too many
 */
export function decodeText(bytes: Uint8Array, path: string): string {
  if (bytes.length > MAX_BYTES) {
    throw new InputError(
      `expected a text file of at most 32 MB, found ${bytes.length} bytes; is this the right file?`,
      {path},
    );
  }
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) {
    throw new InputError('expected UTF-8 text, found UTF-16; save the file as UTF-8', {
      path,
      lineNumber: 1,
    });
  }
  let text: string;
  try {
    text = new TextDecoder('utf-8', {fatal: true}).decode(bytes);
  } catch (cause) {
    throw new InputError('expected UTF-8 text, found other bytes; save the file as UTF-8', {
      path,
      lineNumber: lineOfFirstBadByte(bytes),
      cause,
    });
  }
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is sought
  const control = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/.exec(text);
  if (control) {
    throw new InputError(
      'expected text, found a control character; is this the right file? If so, remove it',
      {path, lineNumber: lineAt(text, control.index)},
    );
  }
  return text;
}

/** The line, counted from 1, on which a character stands. */
export function lineAt(text: string, index: number): number {
  let line = 1;
  for (let i = 0; i < index && i < text.length; i++) {
    if (text.charCodeAt(i) === 10) line++;
  }
  return line;
}

/** A lenient decoding puts U+FFFD where the first bad byte stood. */
function lineOfFirstBadByte(bytes: Uint8Array): number {
  const lenient = new TextDecoder('utf-8').decode(bytes);
  return lineAt(lenient, lenient.indexOf('\ufffd'));
}
