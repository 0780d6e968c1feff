import {InputError} from '../errors.ts';
import {departureFrom} from '../exports/conform.ts';
import {RESULT_SCHEMA} from '../exports/schema.ts';
import type {EarlierCheck} from '../occupation/other-setups.ts';
import type {Result} from '../occupation/result.ts';
import {readWhole} from './files.ts';

/** The results of other checks that this one is set beside. */
export async function readEarlierChecks(paths: readonly string[]): Promise<EarlierCheck[]> {
  const checks: EarlierCheck[] = [];
  for (const path of paths) checks.push(await readCheck(path));
  return checks;
}

async function readCheck(path: string): Promise<EarlierCheck> {
  const result = parsed(Buffer.from(await readWhole(path)).toString('utf8'), path);
  if (result.comparison === null || result.position === null) {
    throw new InputError(
      `this is the result of a ${result.command} without a position compared with a mark; --with takes results of \`stillmark check\``,
      {path},
    );
  }
  return {
    name: path.replace(/^.*[/\\]/, ''),
    result,
    position: result.position,
    comparison: result.comparison,
  };
}

function parsed(text: string, path: string): Result {
  let document: unknown;
  try {
    document = JSON.parse(text);
  } catch (cause) {
    throw new InputError(
      'this is no JSON; --with takes what `stillmark check --result FILE.json` wrote',
      {path, cause},
    );
  }
  const departure = departureFrom(RESULT_SCHEMA, document);
  if (departure !== undefined) {
    const where = departure.path === '' ? 'the document' : departure.path;
    throw new InputError(
      `this is no result of this stillmark: ${where} should be ${departure.wanted}; make it anew with \`stillmark check --result\``,
      {path},
    );
  }
  return document as Result;
}
