import {accessSync, closeSync, constants, fstatSync, openSync, readSync, statSync} from 'node:fs';
import {availableParallelism} from 'node:os';
import {Worker} from 'node:worker_threads';
import type {LogContents, ReadOptions} from '../log/contents.ts';
import type {NmeaBatch} from '../log/decode.ts';
import {DETECT_BYTES, detectLogKind} from '../log/detect.ts';
import {createBatchReader} from '../log/read-nmea.ts';
import {createSentenceColumns, type SentenceColumns, takeCounts} from '../log/sentence-columns.ts';
import {type DecodedBatch, type DecodeTask, END_OF_STRETCH} from './decode-messages.ts';
import {type ReadFile, readingError} from './files.ts';
import type {FingerprintTask} from './fingerprint-worker.ts';

/** Below this the threads take longer to start than they save. */
const SMALLEST_BYTES = 96e6;
const THREADS = 2;
/** Bytes decoded at a time: what is decoded stays in the cache. */
const BATCH_BYTES = 1 << 18;
const STRETCH_BYTES = 1 << 20;
/** Batches that a thread may be ahead of the assembler. */
const SLOTS = 6;

/** A log that lies open on the disk, long enough and of the kind that threads can decode. */
export interface DivisibleLog {
  readonly path: string;
  readonly descriptor: number;
  readonly sizeBytes: number;
  /** Length of the stretches that the threads take in turn, to the nearest line. */
  readonly stretchBytes: number;
}

/**
 * Opens a log that is worth dividing; undefined for any other, which is left closed, and for one
 * that cannot be opened: whoever reads it in one piece will say why.
 */
export function openDivisible(path: string): DivisibleLog | undefined {
  const size = path === '-' ? undefined : statSync(path, {throwIfNoEntry: false})?.size;
  if (size === undefined || size < SMALLEST_BYTES || !isReadable(path)) return undefined;
  // On one core the threads would only wait for one another.
  if (availableParallelism() < THREADS) return undefined;
  const descriptor = openSync(path, 'r');
  const head = new Uint8Array(DETECT_BYTES);
  readSync(descriptor, head, 0, head.length, 0);
  const isPacked = head[0] === 0x1f && head[1] === 0x8b;
  if (!isPacked && detectLogKind(head) === 'nmea') {
    // The size once more: the log may have grown since it was looked at.
    const sizeBytes = fstatSync(descriptor).size;
    return {path, descriptor, sizeBytes, stretchBytes: STRETCH_BYTES};
  }
  closeSync(descriptor);
  return undefined;
}

function isReadable(path: string): boolean {
  try {
    accessSync(path, constants.R_OK);
    return true;
  } catch {
    return false;
  }
}

/**
 * Reads a long NMEA log: two threads decode stretches of it in turn, a third takes the fingerprint,
 * and this one joins what was decoded in its order. The result is that of one thread, byte for
 * byte, because a decoded line depends on that line alone.
 */
export async function readDivided(
  log: DivisibleLog,
  options: ReadOptions,
  progress: (bytesRead: number) => void,
): Promise<{contents: LogContents; file: ReadFile}> {
  const {descriptor, sizeBytes, stretchBytes} = log;
  const reader = createBatchReader({...options, sizeBytes});
  const decoders = Array.from({length: THREADS}, (_, first) =>
    startDecoder(log, first, options.trustAbsentChecksum),
  );
  const task: FingerprintTask = {descriptor, sizeBytes};
  const hashing = new Worker(new URL('./fingerprint-worker.js', import.meta.url), {
    workerData: task,
  });
  let stretch = 0;
  /** Assembles what has come, in the order of the log. */
  const assemble = () => {
    for (;;) {
      const decoder = decoders[stretch % THREADS];
      const message = decoder?.waiting.shift();
      if (decoder === undefined || message === undefined) return;
      if (message === END_OF_STRETCH) {
        stretch += 1;
        progress(Math.min(sizeBytes, stretch * stretchBytes));
      } else {
        reader.add(decoder.batchOf(message));
        decoder.release();
      }
    }
  };
  try {
    const fingerprint = new Promise<string>((resolve, reject) => {
      hashing.on('message', resolve);
      hashing.on('error', reject);
    });
    await Promise.all(
      decoders.map(
        ({worker, waiting}) =>
          new Promise<void>((resolve, reject) => {
            worker.on('message', (message: Message) => {
              waiting.push(message);
              assemble();
            });
            worker.on('error', reject);
            worker.on('exit', () => resolve());
          }),
      ),
    );
    const contents = reader.finish(sizeBytes);
    return {contents, file: {name: options.name, bytes: sizeBytes, sha256: await fingerprint}};
  } catch (error) {
    throw readingError(log.path, error);
  } finally {
    await Promise.all(
      [hashing, ...decoders.map(({worker}) => worker)].map((one) => one.terminate()),
    );
    closeSync(descriptor);
  }
}

type Message = DecodedBatch | typeof END_OF_STRETCH;

/** A decoding thread as the assembler sees it. */
interface Decoder {
  readonly worker: Worker;
  /** What it has sent, in the order of its stretches. */
  readonly waiting: Message[];
  /** The batch of the oldest message that has not been released, over memory that both share. */
  batchOf(message: DecodedBatch): NmeaBatch;
  /** Gives the columns of that batch back to the thread. */
  release(): void;
}

function startDecoder(
  {descriptor, sizeBytes, stretchBytes}: DivisibleLog,
  first: number,
  trustAbsentChecksum: boolean,
): Decoder {
  const slots = Array.from({length: SLOTS}, () =>
    createSentenceColumns(BATCH_BYTES, SharedArrayBuffer),
  );
  const assembled = new Int32Array(new SharedArrayBuffer(4));
  const task: DecodeTask = {
    descriptor,
    sizeBytes,
    stretchBytes,
    first,
    every: THREADS,
    batchBytes: BATCH_BYTES,
    slots,
    assembled,
    trustAbsentChecksum,
  };
  const worker = new Worker(new URL('./decode-worker.js', import.meta.url), {workerData: task});
  let released = 0;
  return {
    worker,
    waiting: [],
    batchOf(message) {
      const columns = slots[released % SLOTS] as SentenceColumns;
      takeCounts(columns, message);
      return {columns, account: message.account, datums: message.datums};
    },
    release() {
      released += 1;
      Atomics.store(assembled, 0, released);
      Atomics.notify(assembled, 0);
    },
  };
}
