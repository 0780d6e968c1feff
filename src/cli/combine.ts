import {combinationJson} from '../exports/json.ts';
import {combineResults} from '../occupation/combine.ts';
import {noticeList} from '../occupation/notices.ts';
import {noticeText} from '../wording/notices.ts';
import {combinationSummary} from './combination-summary.ts';
import {requireInputs, requireOutputs, writeOutputs} from './files.ts';
import {type ResultFile, readResult} from './result-files.ts';
import {STATUS} from './status.ts';
import {styleOf} from './terminal.ts';
import {requireSingle} from './values.ts';
import {VERSION} from './version.ts';

/** What yargs yields for `combine`. */
export interface CombineArguments {
  readonly results: readonly string[];
  readonly output?: string | undefined;
}

/**
 * `stillmark combine`: several occupations as one position per mark.
 *
 * The exit status is 0 when every mark has a position and its occupations agree or stand alone, 1
 * when some disagree, 3 when no result could be used.
 */
export async function combine({results: paths, output}: CombineArguments): Promise<number> {
  requireSingle({output});
  requireInputs(paths);
  requireOutputs(output === undefined ? [] : [output], paths);
  const results: ResultFile[] = [];
  for (const path of paths) results.push(await readResult(path, 'reduce'));
  const program = {name: 'stillmark', version: VERSION} as const;
  const combination = combineResults(results, program, noticeList(noticeText));
  if (output !== undefined) {
    await writeOutputs([{path: output, text: [combinationJson(combination)]}]);
  }
  if (output !== '-') {
    const style = styleOf(process.stdout, process.env);
    process.stdout.write(combinationSummary(combination, style));
  }
  if (combination.marks.length === 0) return STATUS.cannotTell;
  const disagree = combination.marks.some(({agreement}) => agreement === 'disagrees');
  return disagree ? STATUS.doesNotHold : STATUS.done;
}
