import {InputError} from '../errors.ts';
import type {LogContents, LogReader, ReadOptions} from './contents.ts';
import {DETECT_BYTES, detectLogKind} from './detect.ts';
import {createNmeaReader} from './read-nmea.ts';
import {createTableReader} from './table.ts';

/** Reads a log of either kind, which its first bytes decide. */
export function createLogReader(options: ReadOptions): LogReader {
  const head = new Uint8Array(DETECT_BYTES);
  let filled = 0;
  let reader: LogReader | undefined;

  function begin(): LogReader {
    const bytes = head.subarray(0, filled);
    const kind = detectLogKind(bytes);
    if (kind === 'utf-16') {
      throw new InputError('this is UTF-16 text; save it as UTF-8 or plain ASCII', {
        path: options.name,
      });
    }
    const begun = kind === 'nmea' ? createNmeaReader(options) : createTableReader(options);
    begun.add(bytes);
    return begun;
  }

  return {
    add(chunk: Uint8Array): void {
      let rest = chunk;
      if (reader === undefined) {
        const part = chunk.subarray(0, head.length - filled);
        head.set(part, filled);
        filled += part.length;
        rest = chunk.subarray(part.length);
        if (filled === head.length) reader = begin();
      }
      if (rest.length > 0) reader?.add(rest);
    },
    finish(): LogContents {
      return (reader ?? begin()).finish();
    },
  };
}
