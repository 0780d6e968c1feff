import {InputError} from '../errors.ts';
import {departureFrom} from '../exports/conform.ts';
import {RESULT_SCHEMA} from '../exports/schema.ts';
import type {Result} from '../occupation/result.ts';
import {readWhole} from './files.ts';

/** A result that an earlier run wrote, by the name of its file. */
export interface ResultFile {
  readonly name: string;
  readonly result: Result;
}

/**
 * @param command that wrote such results, for messages
 * @throws InputError for a file that is no result of this program
 */
export async function readResult(path: string, command: string): Promise<ResultFile> {
  const text = Buffer.from(await readWhole(path)).toString('utf8');
  return {name: path.replace(/^.*[/\\]/, ''), result: parsed(text, path, command)};
}

function parsed(text: string, path: string, command: string): Result {
  let document: unknown;
  try {
    document = JSON.parse(text);
  } catch (cause) {
    throw new InputError(
      `this is no JSON; what is wanted is what \`stillmark ${command} --result FILE.json\` wrote`,
      {path, cause},
    );
  }
  const departure = departureFrom(RESULT_SCHEMA, document);
  if (departure !== undefined) {
    const where = departure.path === '' ? 'the document' : departure.path;
    throw new InputError(
      `this is no result of this stillmark: ${where} should be ${departure.wanted}; make it anew with \`stillmark ${command} --result\``,
      {path},
    );
  }
  return document as Result;
}
