import {type Conversion, planConversion} from '../conversion/conversion.ts';
import {ListConverter} from '../conversion/convert-list.ts';
import type {Form, FormKind, Triple} from '../conversion/form.ts';
import type {NumberStyle} from '../conversion/number-text.ts';
import {positionTexts, readPosition} from '../conversion/positions.ts';
import {UsageError} from '../errors.ts';
import {parsePointMotion} from '../geodesy/point-motion.ts';
import {conversionSummary, listSummary} from './conversion-summary.ts';
import {
  inputBlocks,
  inputName,
  inputSize,
  requireInputs,
  requireOutputs,
  writeOutputs,
} from './files.ts';
import {progressOn} from './progress.ts';
import {STATUS} from './status.ts';
import {styleOf} from './terminal.ts';
import {ellipsoidOption, placeOption, requireSingle} from './values.ts';

/** What yargs yields for `convert`. */
export interface ConvertArguments {
  readonly position: readonly string[];
  readonly list?: string | undefined;
  readonly output: string;
  readonly from?: string | undefined;
  readonly to?: string | undefined;
  readonly fromFrame?: string | undefined;
  readonly fromEpoch?: number | undefined;
  readonly toFrame?: string | undefined;
  readonly toEpoch?: number | undefined;
  readonly motion?: string | undefined;
  readonly at?: string | undefined;
  readonly ellipsoid?: string | undefined;
  readonly columns?: string | undefined;
  readonly factors: boolean;
  readonly angles: 'deg' | 'dms';
  readonly decimals: number;
  readonly quiet: boolean;
}

const MOST_DECIMALS = 8;

/**
 * `stillmark convert`: positions from the command line, or a list.
 *
 * The exit status is 0 when every position was converted, 3 when rows of a list were refused.
 */
export async function convert(options: ConvertArguments): Promise<number> {
  requireSingle({...options});
  const style = styleOfNumbers(options);
  if (options.list === undefined) return convertPositions(options, style);
  if (options.position.length > 0) {
    throw new UsageError('name positions or a --list, not both');
  }
  return convertList(options, options.list, style);
}

function styleOfNumbers({decimals, angles}: ConvertArguments): NumberStyle {
  if (Number.isInteger(decimals) && decimals >= 0 && decimals <= MOST_DECIMALS) {
    return {decimals, angles};
  }
  throw new UsageError(`--decimals: need a whole number from 0 to ${MOST_DECIMALS}`);
}

/** The conversion that the options ask for, with the form that a header names if they do not. */
function planned(
  options: ConvertArguments,
  header: FormKind | undefined,
  known?: (form: Form) => readonly Triple[],
): Conversion {
  const from = options.from ?? header;
  if (from === undefined) {
    throw new UsageError(
      'need the kind of the given coordinates; write --from geocentric, geodetic, local or a grid ' +
        'such as "UTM 32N"',
    );
  }
  const {toFrame, toEpoch} = options;
  if (options.to === undefined && toFrame === undefined && toEpoch === undefined) {
    throw new UsageError(
      'need what to convert to; write --to geocentric, geodetic, local or a grid such as "UTM 32N", ' +
        'or a frame with --to-frame',
    );
  }
  const request = {
    from,
    to: options.to ?? from,
    fromFrame: options.fromFrame ?? null,
    fromEpoch: options.fromEpoch ?? null,
    toFrame: toFrame ?? null,
    toEpoch: toEpoch ?? null,
    motion: options.motion === undefined ? null : parsePointMotion(options.motion),
    ellipsoid: options.ellipsoid === undefined ? null : ellipsoidOption(options.ellipsoid),
    origin: placeOption('at', options.at),
  };
  return planConversion(request, known);
}

async function convertPositions(options: ConvertArguments, style: NumberStyle): Promise<number> {
  if (options.position.length === 0) {
    throw new UsageError('name a position, such as 50.1,9.2,210.5, or a --list of them');
  }
  for (const name of ['columns', 'factors'] as const) {
    if (options[name]) throw new UsageError(`--${name} belongs to a --list`);
  }
  requireOutputs([options.output], []);
  const words = positionTexts(options.position);
  const positions = (form: Form) => words.map((text) => readPosition(text, form));
  const conversion = planned(options, undefined, positions);
  const texts = positions(conversion.from).map((given) =>
    conversionSummary(given, conversion, style),
  );
  await writeOutputs([{path: options.output, text: [texts.join('\n')]}]);
  return STATUS.done;
}

async function convertList(
  options: ConvertArguments,
  path: string,
  style: NumberStyle,
): Promise<number> {
  requireInputs([path]);
  requireOutputs([options.output], [path]);
  const name = inputName(path);
  const progress = progressOn(process.stderr, options.quiet, () => performance.now());
  const shownPath = path === '-' ? name : path;
  const converter = new ListConverter({
    path: shownPath,
    columns: options.columns?.split(',').map((column) => column.trim()) ?? null,
    plan: (header) => planned(options, header),
    style,
    factors: options.factors,
    refuse: (lineNumber, reason) => {
      progress.done();
      process.stderr.write(`stillmark: ${shownPath}, line ${lineNumber}: ${reason}\n`);
    },
  });
  progress.start(name, inputSize(path));
  let bytes = 0;
  const blocks = inputBlocks(path, (block) => {
    bytes += block.length;
    progress.at(bytes);
  });
  await writeOutputs([{path: options.output, text: convertedText(blocks, converter)}]);
  progress.done();
  const counts = converter.counts();
  const prepared = converter.prepared();
  if (!options.quiet && prepared !== null) {
    process.stderr.write(listSummary(counts, prepared, styleOf(process.stderr, process.env)));
  }
  return counts.refused === 0 ? STATUS.done : STATUS.cannotTell;
}

/** Text in short pieces stays in the cache and out of the collector's way. */
const PIECE_BYTES = 1 << 16;

async function* convertedText(
  blocks: AsyncIterable<Uint8Array>,
  converter: ListConverter,
): AsyncGenerator<string> {
  const decoder = new TextDecoder();
  for await (const block of blocks) {
    for (let at = 0; at < block.length; at += PIECE_BYTES) {
      const piece = block.subarray(at, at + PIECE_BYTES);
      yield converter.take(decoder.decode(piece, {stream: true}));
    }
  }
  yield converter.take(decoder.decode());
  yield converter.end();
}
