import {NmeaAssembler} from './assemble.ts';
import {BatchCutter} from './batch-cutter.ts';
import type {LogContents, LogReader, ReadOptions} from './contents.ts';
import {type NmeaBatch, NmeaDecoder} from './decode.ts';
import {nmeaContents} from './nmea-contents.ts';

/** Bytes decoded at a time: what is decoded stays in the cache until it is assembled. */
export const BATCH_BYTES = 1 << 18;

/** Reads NMEA 0183; `NmeaDecoder` says what is a line, `NmeaAssembler` what is an epoch. */
export function createNmeaReader(options: ReadOptions): LogReader {
  const {trustAbsentChecksum} = options;
  const decoder = new NmeaDecoder({batchBytes: BATCH_BYTES, trustAbsentChecksum});
  const assembler = new NmeaAssembler(mostEpochsOf(options));
  const cutter = new BatchCutter(BATCH_BYTES, (bytes, length, isLast) =>
    assembler.add(decoder.decode(bytes, length, isLast)),
  );
  let bytes = 0;
  return {
    add(chunk: Uint8Array): void {
      bytes += chunk.length;
      cutter.add(chunk);
    },
    finish(): LogContents {
      cutter.finish(true);
      return nmeaContents(assembler.finish(), {...options, bytes});
    },
  };
}

/** No sentence with a time and a position is shorter: `$XXGLL,hhmmss,ddmm.m,N,dddmm.m,E*hh`. */
const SHORTEST_EPOCH_BYTES = 40;

function mostEpochsOf({sizeBytes}: ReadOptions): number | undefined {
  return sizeBytes === undefined ? undefined : Math.ceil(sizeBytes / SHORTEST_EPOCH_BYTES);
}

/** Takes batches that were decoded elsewhere, in the order of the log. */
export interface BatchReader {
  add(batch: NmeaBatch): void;
  finish(bytes: number): LogContents;
}

/** The second half of `createNmeaReader`, for a log whose stretches several threads decode. */
export function createBatchReader(options: ReadOptions): BatchReader {
  const assembler = new NmeaAssembler(mostEpochsOf(options));
  return {
    add: (batch) => assembler.add(batch),
    finish: (bytes) => nmeaContents(assembler.finish(), {...options, bytes}),
  };
}
