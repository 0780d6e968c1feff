import type {BatchAccount} from '../log/account.ts';
import type {ColumnCounts, SentenceColumns} from '../log/sentence-columns.ts';

/** What one of the threads has to do. */
export interface DecodeTask {
  /** File descriptor; the threads of a process share it. */
  readonly descriptor: number;
  readonly sizeBytes: number;
  readonly stretchBytes: number;
  /** This thread decodes the stretches `first`, `first + every`, … */
  readonly first: number;
  readonly every: number;
  readonly batchBytes: number;
  /** Columns in shared memory, filled in turn. */
  readonly slots: readonly SentenceColumns[];
  /** One integer, shared: how many batches of this thread have been assembled. */
  readonly assembled: Int32Array;
  readonly trustAbsentChecksum: boolean;
}

/** What a thread sends for each batch, whose columns lie in the next of its slots. */
export interface DecodedBatch extends ColumnCounts {
  readonly account: BatchAccount;
  readonly datums: readonly string[];
}

/** What a thread sends behind the batches of a stretch. */
export const END_OF_STRETCH = 'end of stretch';
