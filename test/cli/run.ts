import {spawnSync} from 'node:child_process';
import {mkdtempSync} from 'node:fs';
import {tmpdir} from 'node:os';
import {join, resolve} from 'node:path';

const ROOT = resolve(import.meta.dirname, '../..');
const COMMAND = join(ROOT, 'dist/cli/main.js');

export interface Ran {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** Runs the built command as a user would. */
export function stillmark(
  words: readonly string[],
  more: {input?: string | Uint8Array; env?: Record<string, string>; cwd?: string} = {},
): Ran {
  const {status, stdout, stderr} = spawnSync('node', [COMMAND, ...words], {
    cwd: more.cwd ?? ROOT,
    input: more.input ?? '',
    env: {...process.env, ...more.env},
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  return {status, stdout, stderr};
}

export function sample(name: string): string {
  return join(ROOT, 'sample-logs', name);
}

/** A folder of its own for the outputs of one test file. */
export function emptyFolder(): string {
  return mkdtempSync(join(tmpdir(), 'stillmark-test-'));
}
