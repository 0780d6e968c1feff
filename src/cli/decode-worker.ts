import {readSync} from 'node:fs';
import {parentPort, workerData} from 'node:worker_threads';
import {BatchCutter} from '../log/batch-cutter.ts';
import {LF} from '../log/bytes.ts';
import {NmeaDecoder} from '../log/decode.ts';
import {countsOf} from '../log/sentence-columns.ts';
import {type DecodedBatch, type DecodeTask, END_OF_STRETCH} from './decode-messages.ts';

/*
 * Decodes every so-manyth stretch of a log in a thread of its own. A stretch begins behind the
 * first line feed at or after its nominal start and ends where the next begins, so that every
 * byte belongs to one stretch and every line is whole.
 */

const BOUNDARY_BYTES = 4096;

const task = workerData as DecodeTask;
const {trustAbsentChecksum, sizeBytes, stretchBytes, batchBytes, slots} = task;
const decoder = new NmeaDecoder({batchBytes, trustAbsentChecksum});
const block = new Uint8Array(batchBytes);
let batches = 0;
const cutter = new BatchCutter(batchBytes, (bytes, length, isLast) => {
  waitForSlot();
  const slot = slots[batches % slots.length];
  const {columns, account, datums} = decoder.decode(bytes, length, isLast, slot);
  const message: DecodedBatch = {...countsOf(columns), account, datums};
  parentPort?.postMessage(message);
  batches += 1;
});

/** Keeps memory bounded: a thread that is far ahead sleeps until the assembler has caught up. */
function waitForSlot(): void {
  for (;;) {
    const assembled = Atomics.load(task.assembled, 0);
    if (batches - assembled < slots.length) return;
    Atomics.wait(task.assembled, 0, assembled);
  }
}

/** Where a stretch begins; the size of the log where no line feed follows. */
function startOf(index: number): number {
  if (index === 0) return 0;
  let at = index * stretchBytes - 1;
  while (at < sizeBytes) {
    const read = readSync(task.descriptor, block, 0, BOUNDARY_BYTES, at);
    if (read === 0) break;
    const lineFeed = block.subarray(0, read).indexOf(LF);
    if (lineFeed >= 0) return Math.min(sizeBytes, at + lineFeed + 1);
    at += read;
  }
  return sizeBytes;
}

function decodeStretch(index: number): void {
  const from = startOf(index);
  const to = startOf(index + 1);
  let at = from;
  while (at < to) {
    const read = readSync(task.descriptor, block, 0, Math.min(block.length, to - at), at);
    if (read === 0) break;
    cutter.add(block.subarray(0, read));
    at += read;
  }
  if (from < to) cutter.finish(to === sizeBytes);
}

for (let index = task.first; index * stretchBytes < sizeBytes; index += task.every) {
  decodeStretch(index);
  parentPort?.postMessage(END_OF_STRETCH);
}
