import {InputError} from '../errors.ts';
import type {EarlierCheck} from '../occupation/other-setups.ts';
import {readResult} from './result-files.ts';

/** The results of other checks that this one is set beside. */
export async function readEarlierChecks(paths: readonly string[]): Promise<EarlierCheck[]> {
  const checks: EarlierCheck[] = [];
  for (const path of paths) checks.push(await readCheck(path));
  return checks;
}

async function readCheck(path: string): Promise<EarlierCheck> {
  const {name, result} = await readResult(path, 'check');
  const {position, comparison} = result;
  if (comparison === null || position === null) {
    throw new InputError(
      `this is the result of a ${result.command} without a position compared with a mark; --with takes results of \`stillmark check\``,
      {path},
    );
  }
  return {name, result, position, comparison};
}
