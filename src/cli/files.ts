import {createHash} from 'node:crypto';
import {createReadStream, createWriteStream, existsSync, realpathSync, statSync} from 'node:fs';
import {rename, rm} from 'node:fs/promises';
import {basename, dirname, join, resolve} from 'node:path';
import {Readable} from 'node:stream';
import {pipeline} from 'node:stream/promises';
import {createGunzip} from 'node:zlib';
import {InputError, UsageError} from '../errors.ts';

/** The name under which standard input appears in the result. */
const STANDARD_INPUT_NAME = 'standard input';
const READ_BLOCK_BYTES = 1 << 20;

export interface ReadFile {
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
}

export function inputName(path: string): string {
  return path === '-' ? STANDARD_INPUT_NAME : basename(path);
}

/** Size in bytes, for progress; undefined when it cannot be known beforehand. */
export function inputSize(path: string): number | undefined {
  return path === '-' ? undefined : statSync(path, {throwIfNoEntry: false})?.size;
}

/** Refuses inputs that are not there before anything is read. */
export function requireInputs(paths: readonly string[]): void {
  for (const path of paths) {
    if (path === '-') continue;
    const stat = statSync(path, {throwIfNoEntry: false});
    if (stat === undefined) {
      throw new InputError('no such file; check the name and the folder', {path});
    }
    if (stat.isDirectory()) {
      throw new InputError('this is a folder; name the log files in it', {path});
    }
  }
  if (paths.filter((path) => path === '-').length > 1) {
    throw new UsageError('standard input (-) can be read only once');
  }
}

/**
 * Feeds the bytes of a file, unpacked when it is gzip, to `take`, and says what was read. The
 * fingerprint and the size are those of the file as it lies on the disk.
 */
export async function readInput(
  path: string,
  take: (chunk: Uint8Array) => void,
  progress: (bytesRead: number) => void,
): Promise<ReadFile> {
  const hash = createHash('sha256');
  let bytes = 0;
  const see = (block: Uint8Array) => {
    hash.update(block);
    bytes += block.length;
    progress(bytes);
  };
  for await (const block of inputBlocks(path, see)) take(block);
  return {name: inputName(path), bytes, sha256: hash.digest('hex')};
}

/** The bytes of a file, unpacked when it is gzip; `see` gets them as they lie on the disk. */
export async function* inputBlocks(
  path: string,
  see: (block: Uint8Array) => void,
): AsyncGenerator<Uint8Array> {
  try {
    yield* unpacked(counted(openBytes(path), see));
  } catch (error) {
    throw readingError(path, error);
  }
}

/** The whole of a small input, such as a field sheet. */
export async function readWhole(path: string): Promise<Uint8Array> {
  const blocks: Uint8Array[] = [];
  await readInput(
    path,
    (block) => blocks.push(block.slice()),
    () => undefined,
  );
  return Buffer.concat(blocks);
}

function openBytes(path: string): Readable {
  return path === '-' ? process.stdin : createReadStream(path, {highWaterMark: READ_BLOCK_BYTES});
}

async function* counted(
  source: AsyncIterable<Uint8Array>,
  see: (block: Uint8Array) => void,
): AsyncGenerator<Uint8Array> {
  for await (const block of source) {
    see(block);
    yield block;
  }
}

async function* unpacked(source: AsyncGenerator<Uint8Array>): AsyncGenerator<Uint8Array> {
  const first = await source.next();
  if (first.done === true) return;
  const all = prefixed(first.value, source);
  if (first.value[0] === 0x1f && first.value[1] === 0x8b) {
    const gunzip = createGunzip({chunkSize: READ_BLOCK_BYTES});
    // A failure reaches us twice, through the blocks and through the pipeline: once is enough.
    const feeding = pipeline(Readable.from(all), gunzip).catch(() => undefined);
    yield* gunzip;
    await feeding;
  } else {
    yield* all;
  }
}

async function* prefixed(
  first: Uint8Array,
  rest: AsyncGenerator<Uint8Array>,
): AsyncGenerator<Uint8Array> {
  yield first;
  yield* rest;
}

/** The same failure as something that the user can act on, where it is one. */
export function readingError(path: string, error: unknown): unknown {
  if (!(error instanceof Error) || !('code' in error)) return error;
  const code = String(error.code);
  if (code.startsWith('Z_')) {
    return new InputError('the gzip data is damaged or cut short; copy the file again', {
      path,
      cause: error,
    });
  }
  if (code === 'EACCES') return new InputError('no permission to read this file', {path});
  if (['EISDIR', 'EIO', 'ENOENT'].includes(code)) {
    return new InputError(`cannot read this file (${code})`, {path, cause: error});
  }
  return error;
}

export interface Output {
  readonly path: string;
  readonly text: Iterable<string> | AsyncIterable<string>;
}

/** Refuses, before any work, outputs that could not be written or would overwrite an input. */
export function requireOutputs(outputs: readonly string[], inputs: readonly string[]): void {
  const taken = new Set(inputs.filter((path) => path !== '-').map(realPath));
  const seen = new Set<string>();
  if (outputs.filter((path) => path === '-').length > 1) {
    throw new UsageError('only one output can be - (standard output)');
  }
  for (const path of outputs) {
    if (path === '-') continue;
    const folder = dirname(resolve(path));
    if (!existsSync(folder)) {
      throw new UsageError(`cannot write ${path}: its folder does not exist; create it first`);
    }
    if (statSync(path, {throwIfNoEntry: false})?.isDirectory() === true) {
      throw new UsageError(`cannot write ${path}: it is a folder; name a file in it`);
    }
    const real = realPath(path);
    if (taken.has(real)) {
      throw new UsageError(`${path} is also an input; name another file for the output`);
    }
    if (seen.has(real)) throw new UsageError(`${path} is named for two outputs`);
    seen.add(real);
  }
}

function realPath(path: string): string {
  return existsSync(path)
    ? realpathSync(path)
    : join(realpathSync(dirname(resolve(path))), basename(path));
}

/**
 * Writes every output to a temporary name beside its place and renames all of them once the last
 * is complete, so that a run that fails leaves nothing changed.
 */
export async function writeOutputs(outputs: readonly Output[]): Promise<void> {
  const temporary: {from: string; to: string}[] = [];
  try {
    for (const {path, text} of outputs) {
      if (path === '-') continue;
      const from = join(dirname(resolve(path)), `.${basename(path)}.${process.pid}.part`);
      temporary.push({from, to: path});
      await pipeline(Readable.from(text), createWriteStream(from));
    }
    for (const {from, to} of temporary) await rename(from, to);
  } catch (error) {
    await Promise.all(temporary.map(({from}) => rm(from, {force: true})));
    throw writingError(error);
  }
  const direct = outputs.find(({path}) => path === '-');
  if (direct !== undefined)
    await pipeline(Readable.from(direct.text), process.stdout, {end: false});
}

function writingError(error: unknown): unknown {
  if (!(error instanceof Error) || !('code' in error)) return error;
  const reasons: Record<string, string> = {
    EACCES: 'no permission',
    ENOSPC: 'the disk is full',
    EROFS: 'the disk is read-only',
    EPERM: 'not permitted',
  };
  const reason = reasons[String(error.code)];
  return reason === undefined ? error : new UsageError(`cannot write the output: ${reason}`);
}
