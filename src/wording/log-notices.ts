import {counted, formatDuration, formatLength} from './numbers.ts';
import {type NoticeValues, numberIn, type Sentence, textIn} from './sentence.ts';

/** What reading the logs found, and what to do about it. */
export const LOG_SENTENCES: Readonly<Record<string, Sentence>> = {
  'no-date': (v) =>
    `The log carries no date (no RMC or ZDA sentence): its times are shown on ${textIn(v, 'placeholderDate')} as a stand-in. Give the date of the first epoch with --date.`,
  'date-assumed': (v) =>
    `The log carries no date: its first epoch is taken to be on ${textIn(v, 'date')}, as --date says.`,
  'date-overridden': (v) =>
    `The log's own date ${textIn(v, 'logDate')} was used, not --date ${textIn(v, 'givenDate')}.`,
  'date-doubtful': (v) =>
    `The date ${textIn(v, 'date')} stands only in sentences that the receiver itself calls invalid. Check it against the booking sheet.`,
  'date-conflict': (v) =>
    `${counted(numberIn(v, 'dates'), 'date')} in the log contradict the others and were not believed.`,
  'leap-second-seen': (v) =>
    v.known === true
      ? `The log runs through a leap second (23:59:60 in ${counted(numberIn(v, 'times'), 'time')}).`
      : `The log has a second 23:59:60 (${counted(numberIn(v, 'times'), 'time')}) on a day without a leap second in the table; those epochs were not used.`,
  'rollover-suspected': (v) =>
    `The date ${textIn(v, 'date')} looks like a GPS week rollover (${textIn(v, 'because')}): the true date may be ${textIn(v, 'dateAfterRollover')}. Check it against the booking sheet; coordinates at a coordinate epoch depend on it.`,
  'time-back': (v) =>
    `Time runs back ${counted(numberIn(v, 'times'), 'time')} in the log, first at line ${numberIn(v, 'firstLineNumber')}: the epochs were put into time order.`,
  'repeated-epochs': (v) =>
    `${counted(numberIn(v, 'epochs'), 'epoch')} repeat the time of another and were left out.`,
  'frozen-run': (v) =>
    `${counted(numberIn(v, 'epochs'), 'epoch')} repeat the position before them exactly, for up to ${formatDuration(numberIn(v, 'longestS'))} on end: output that was frozen, held or coarse.`,
  'two-talkers': (v) =>
    `${counted(numberIn(v, 'epochs'), 'epoch')} are given twice, by the talkers ${textIn(v, 'talkers')}: the better one of each was used.`,
  'mixed-rates': (v) =>
    `The log changes its rate: mostly one epoch every ${formatDuration(numberIn(v, 'commonS'))}, in part one every ${formatDuration(numberIn(v, 'otherS'))}. Faster parts weigh more in a plain mean.`,
  'no-position': (v) =>
    `${counted(numberIn(v, 'sentences'), 'position sentence')} carry no position: the receiver had no fix.`,
  'zero-position': (v) =>
    `${counted(numberIn(v, 'sentences'), 'position sentence')} say 0° 0° without a fix; they are no positions.`,
  'plan-only': (v) =>
    `The log has no GGA or GNS sentence: positions were taken from ${textIn(v, 'source')}, which carries no height.`,
  'satellites-at-least': (v) =>
    `In ${counted(numberIn(v, 'epochs'), 'epoch')} the satellite count is a lower bound: a GGA sentence cannot count beyond 12.`,
  'datum-not-wgs84': (v) =>
    `The positions are in the datum ${textIn(v, 'datum')}, says DTM. State their frame with --frame.`,
  'datum-changes': (v) =>
    `The datum changes within the log: ${textIn(v, 'datums')}. Split the log.`,
  'resolution-coarse': (v) =>
    `The log prints positions in steps of ${stepsText(v)}: no averaging finds what these digits hide. Log more decimals.`,
  'height-absent': (v) =>
    `${counted(numberIn(v, 'epochs'), 'epoch')} of ${numberIn(v, 'ofEpochs')} carry no height.`,
  'separation-absent': (v) =>
    `${counted(numberIn(v, 'epochs'), 'epoch')} of ${numberIn(v, 'ofEpochs')} give an altitude without a geoid separation, so no ellipsoidal height; none was guessed.`,
  'separation-changes': (v) =>
    `The geoid separation in the log changes ${counted(numberIn(v, 'changes'), 'time')}, between ${numberIn(v, 'smallestM')} and ${numberIn(v, 'largestM')} m.`,
  'checksum-absent': (v) =>
    v.trusted === true
      ? `${counted(numberIn(v, 'lines'), 'line')} carry no checksum and were believed, as --accept-no-checksum asks.`
      : `${counted(numberIn(v, 'lines'), 'line')} carry no checksum and were not believed; --accept-no-checksum takes them.`,
  'bad-checksums': (v) =>
    `${counted(numberIn(v, 'lines'), 'line')} of ${numberIn(v, 'ofLines')} fail their checksum and were rejected. Look at the cable or the logger if that goes on.`,
  'last-line-cut': () => 'The last line of the log breaks off in the middle.',
  'binary-between': (v) =>
    `${counted(numberIn(v, 'bytes'), 'byte')} between the sentences belong to no line: binary data.`,
  'date-without-time': (v) =>
    `The table dates its rows by the day only (column ${textIn(v, 'column')}); each stands at 00:00.`,
  'time-scale-assumed': (v) =>
    `The table does not say on which scale its times are (${textIn(v, 'columns')}): taken as UTC. State --time-scale gps if they are GPS time.`,
  'table-columns': (v) => {
    const unused = textIn(v, 'unused');
    return `Columns used: ${textIn(v, 'used')}${unused === '' ? '' : `; not used: ${unused}`}.`;
  },
  'quality-as-gga': (v) =>
    `The numbers of the column ${textIn(v, 'column')} were read as the fix qualities of GGA (4 fixed, 5 float, 2 differential, 1 autonomous).`,
  'quality-from-comment': (v) =>
    `The numbers of the column ${textIn(v, 'column')} were read as a comment of the table explains them.`,
  'height-taken-as-ellipsoidal': (v) =>
    `The column ${textIn(v, 'column')} was taken as the ellipsoidal height. Name it with --columns if it is a height above a geoid.`,
  'altitude-without-separation': (v) =>
    `The column ${textIn(v, 'column')} is a height above a geoid and no separation stands beside it: no ellipsoidal height is known.`,
  'sigma-correlation-assumed-zero': (v) =>
    `The sigmas ${textIn(v, 'columns')} come without correlations: they were turned into east, north and up as if they had none.`,
  'sigmas-zero': (v) =>
    `${counted(numberIn(v, 'rows'), 'row')} state a sigma of zero, which says nothing; it was not believed.`,
  'gps-week-below-1024': (v) =>
    `The GPS week ${numberIn(v, 'week')} lies before the first rollover: perhaps it is counted modulo 1024. Check the date against the booking sheet.`,
  'logs-overlap': (v) =>
    `The logs overlap: ${counted(numberIn(v, 'epochs'), 'epoch')} given twice were left out.`,
  'datums-differ': (v) =>
    `The logs state different datums (${textIn(v, 'datums')}): do not average them together.`,
  'resolutions-differ': () =>
    'The logs print positions with different numbers of decimals; the coarsest counts.',
};

function stepsText(values: NoticeValues): string {
  const up = values.upM;
  const height = typeof up === 'number' ? `, ${formatLength(up)} in height` : '';
  return `${formatLength(numberIn(values, 'northM'))} north and ${formatLength(numberIn(values, 'eastM'))} east${height}`;
}
