import {BATCH_PADDING_BYTES, type NmeaBatch, NmeaDecoder} from '../../src/log/decode.ts';

/** A whole log as one batch. */
export function decoded(bytes: Uint8Array, trustAbsentChecksum = false): NmeaBatch {
  const decoder = new NmeaDecoder({batchBytes: bytes.length, trustAbsentChecksum});
  const padded = new Uint8Array(bytes.length + BATCH_PADDING_BYTES);
  padded.set(bytes);
  return decoder.decode(padded, bytes.length, true);
}
