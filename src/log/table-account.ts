import {EXAMPLES_PER_REASON, excerptOf} from './account.ts';
import type {RejectedLine} from './contents.ts';

/** What became of every line of a table; the three kinds add up to `total`. */
export class TableAccount {
  total = 0;
  used = 0;
  readonly ignored: Record<string, number> = {};
  readonly rejected: Record<string, number> = {};
  readonly examples: RejectedLine[] = [];

  ignore(kind: 'blank' | 'comment' | 'header'): void {
    this.ignored[kind] = (this.ignored[kind] ?? 0) + 1;
  }

  reject(reason: string, lineNumber: number, bytes: Uint8Array, from: number, to: number): void {
    const before = Object.hasOwn(this.rejected, reason) ? (this.rejected[reason] ?? 0) : 0;
    this.rejected[reason] = before + 1;
    if (before < EXAMPLES_PER_REASON) {
      this.examples.push({lineNumber, reason, excerpt: excerptOf(bytes, from, to)});
    }
  }

  get rejectedLines(): number {
    return Object.values(this.rejected).reduce((sum, count) => sum + count, 0);
  }
}
