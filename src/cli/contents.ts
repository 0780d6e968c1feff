import {contentsJson} from '../exports/json.ts';
import {describeContents} from '../occupation/describe.ts';
import {noticeList} from '../occupation/notices.ts';
import {noticeText} from '../wording/notices.ts';
import {contentsSummary} from './contents-summary.ts';
import {requireOutputs, writeOutputs} from './files.ts';
import type {CommandArguments} from './options.ts';
import {progressOn} from './progress.ts';
import {readLogs} from './read-logs.ts';
import {readingOptions} from './reading-options.ts';
import {styleOf} from './terminal.ts';
import {ellipsoidOption, requireSingle} from './values.ts';
import {VERSION} from './version.ts';

/** `stillmark contents`: what is in these logs; the exit status is 0 once they could be read. */
export async function contents(options: CommandArguments): Promise<number> {
  requireSingle({...options});
  const outputs = options.result === undefined ? [] : [options.result];
  requireOutputs(outputs, options.log);
  const ellipsoid = ellipsoidOption(options.ellipsoid);
  const progress = progressOn(process.stderr, options.quiet, () => performance.now());
  const {
    contents: log,
    inputs,
    rejectedLines,
  } = await readLogs(options.log, readingOptions(options, ellipsoid), progress);
  const notices = noticeList(noticeText);
  for (const {severity, code, values} of log.findings) notices.add(severity, code, [], values);
  const result = describeContents({
    program: {name: 'stillmark', version: VERSION},
    inputs,
    epochs: log.epochs,
    satellites: log.satellites,
    resolution: log.resolution,
    rejectedLines,
    notices: notices.notices,
    ellipsoid,
  });
  await writeOutputs(outputs.map((path) => ({path, text: [contentsJson(result)]})));
  if (options.result !== '-') {
    process.stdout.write(contentsSummary(result, styleOf(process.stdout, process.env)));
  }
  return 0;
}
