import {createHash} from 'node:crypto';
import {readSync} from 'node:fs';
import {parentPort, workerData} from 'node:worker_threads';

/** Takes the SHA-256 of a file that others are reading, in a thread of its own. */
export interface FingerprintTask {
  /** File descriptor; the threads of a process share it. */
  readonly descriptor: number;
  readonly sizeBytes: number;
}

const {descriptor, sizeBytes} = workerData as FingerprintTask;
const block = new Uint8Array(1 << 20);
const hash = createHash('sha256');
let at = 0;
while (at < sizeBytes) {
  const read = readSync(descriptor, block, 0, Math.min(block.length, sizeBytes - at), at);
  if (read === 0) break;
  hash.update(block.subarray(0, read));
  at += read;
}
parentPort?.postMessage(hash.digest('hex'));
