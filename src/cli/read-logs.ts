import {basename} from 'node:path';
import {InputError} from '../errors.ts';
import type {InputLog, LogContents, ReadOptions} from '../log/contents.ts';
import {joinLogs} from '../log/join.ts';
import {createLogReader} from '../log/reader.ts';
import {inputAccount} from '../occupation/account.ts';
import type {RejectedExample} from '../occupation/contents-result.ts';
import type {InputAccount} from '../occupation/result.ts';
import {openDivisible, readDivided} from './decode-threads.ts';
import {inputSize, type ReadFile, readInput, requireInputs} from './files.ts';
import type {Progress} from './progress.ts';

export interface LogsRead {
  readonly contents: LogContents;
  readonly inputs: readonly InputAccount[];
  readonly rejectedLines: readonly RejectedExample[];
}

/** Reads every log, whichever kind each is, and joins them in time order. */
export async function readLogs(
  paths: readonly string[],
  options: Omit<ReadOptions, 'name'>,
  progress: Progress,
): Promise<LogsRead> {
  requireInputs(paths);
  const read: {contents: LogContents; file: ReadFile}[] = [];
  for (const path of paths) read.push(await readLog(path, options, progress));
  progress.done();
  const contents = joinLogs(read.map((one) => one.contents));
  const files = new Map(read.map(({contents: one, file}) => [one.inputs[0], file]));
  return {
    contents,
    inputs: contents.inputs.map((input) => accountOf(input, files)),
    rejectedLines: contents.inputs.flatMap((input) =>
      input.rejectedLines.map((line) => ({input: input.name, ...line})),
    ),
  };
}

function accountOf(
  input: InputLog,
  files: ReadonlyMap<InputLog | undefined, ReadFile>,
): InputAccount {
  const file = files.get(input);
  if (file === undefined) throw new Error(`accountOf: ${input.name} was not read`);
  return inputAccount(input, file);
}

async function readLog(
  path: string,
  options: Omit<ReadOptions, 'name'>,
  progress: Progress,
): Promise<{contents: LogContents; file: ReadFile}> {
  const name = path === '-' ? 'standard input' : basename(path);
  progress.start(name, inputSize(path));
  const divisible = openDivisible(path);
  if (divisible !== undefined) {
    return readDivided(divisible, {...options, name}, (bytes) => progress.at(bytes));
  }
  const reader = createLogReader({...options, name, sizeBytes: inputSize(path)});
  const file = await readInput(
    path,
    (chunk) => reader.add(chunk),
    (bytes) => progress.at(bytes),
  );
  if (file.bytes === 0) {
    throw new InputError('the file is empty; copy it again from the receiver or logger', {path});
  }
  return {contents: reader.finish(), file};
}
