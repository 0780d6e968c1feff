#!/usr/bin/env node
import yargs, {type Argv} from 'yargs';
import {hideBin} from 'yargs/helpers';
import {InputError, UsageError} from '../errors.ts';
import {
  checkExamples,
  checkOptions,
  combineExamples,
  combineOptions,
  contentsExamples,
  contentsOptions,
  convertExamples,
  convertOptions,
  inputOptions,
  outputOptions,
  reduceExamples,
  reduceOptions,
} from './options.ts';
import {STATUS} from './status.ts';
import {VERSION} from './version.ts';

const EXIT_STATUSES = [
  'Exit status: 0 done (check: holds)   1 check: does not hold, combine: disagree',
  '             2 usage or unusable input',
  '             3 cannot tell, no position, or rows refused   70 a defect of stillmark',
].join('\n');

/**
 * The parser drops a lone hyphen among the words and takes a southern position for options; this
 * stands for the hyphen on the way through.
 */
const HYPHEN = '<hyphen>';

function untied(words: readonly string[]): string[] {
  return words.map((word) => (word.startsWith(HYPHEN) ? `-${word.slice(HYPHEN.length)}` : word));
}

function withStandardInput<T extends {readonly log: readonly string[]}>(argv: T): T {
  return {...argv, log: untied(argv.log)};
}

/**
 * Ties a value that begins with a hyphen to its option, or the parser takes it for an option: `-`
 * for a standard stream, and southern latitudes. Behind a lone `--` no word is an option.
 */
function tied(words: readonly string[]): string[] {
  const joined: string[] = [];
  for (let i = 0; i < words.length; i++) {
    const word = words[i] ?? '';
    const next = words[i + 1] ?? '';
    if (word === '--') {
      const rest = words.slice(i + 1);
      return [...joined, ...rest.map((behind) => behind.replace(/^-/, HYPHEN))];
    }
    if (/^--[a-z][a-z-]*$/.test(word) && /^-($|[\d.,])/.test(next)) {
      joined.push(`${word}=${next}`);
      i++;
    } else {
      joined.push(/^-($|[\d.])/.test(word) ? `${HYPHEN}${word.slice(1)}` : word);
    }
  }
  return joined;
}

async function run(words: readonly string[]): Promise<number> {
  let work: Work = async () => STATUS.done;
  const parser = commands(yargs(tied(words)), (chosen) => {
    work = chosen;
  })
    .scriptName('stillmark')
    .usage(
      '$0 <command> LOG…\n\nWhat a receiver that stood still over a mark can tell, and how surely.',
    )
    .version(VERSION)
    .alias({help: 'h'})
    .detectLocale(false)
    .exitProcess(false)
    .strict()
    .recommendCommands()
    .completion('completion', 'Print a script for completion in bash or zsh')
    .demandCommand(1, 'name a command: contents, reduce, check, combine, convert or sheet')
    .wrap(100)
    .epilogue(EXIT_STATUSES)
    .fail((message: string | null, error: Error | undefined) => {
      throw error ?? new UsageError(message ?? 'cannot understand these options');
    });
  await parser.parseAsync();
  return work();
}

/** What a command does; returns the exit status. */
type Work = () => Promise<number>;

/**
 * The commands, each of which chooses its work and leaves it to be done: for a handler that takes
 * time the parser would lay out a help text that nobody asked for.
 */
function commands(parser: Argv, choose: (work: Work) => void): Argv {
  return parser
    .command(
      'contents <log..>',
      'What is in these logs, and what is wrong with them',
      (args) => contentsExamples(contentsOptions(inputOptions(args))),
      (argv) =>
        choose(async () => (await import('./contents.ts')).contents(withStandardInput(argv))),
    )
    .command(
      'reduce <log..>',
      'One occupation: position, honest uncertainty, report',
      (args) => reduceExamples(outputOptions(reduceOptions(inputOptions(args)))),
      (argv) =>
        choose(async () => (await import('./reduce.ts')).reduce(withStandardInput(argv), 'reduce')),
    )
    .command(
      'check <log..>',
      'The same against a known mark and a tolerance; the verdict sets the exit status',
      (args) => checkExamples(outputOptions(checkOptions(reduceOptions(inputOptions(args))))),
      (argv) =>
        choose(async () => (await import('./reduce.ts')).reduce(withStandardInput(argv), 'check')),
    )
    .command(
      'combine <results..>',
      'Several occupations: one position per mark, agreement, distances between marks',
      (args) => combineExamples(combineOptions(args)),
      ({results, result: output}) =>
        choose(async () =>
          (await import('./combine.ts')).combine({results: untied(results), output}),
        ),
    )
    .command(
      'convert [position..]',
      'Positions and lists between geocentric, geodetic, local and grid, between frames and epochs',
      (args) => convertExamples(convertOptions(args)),
      (argv) =>
        choose(async () =>
          (await import('./convert.ts')).convert({...argv, position: untied(argv.position)}),
        ),
    )
    .command(
      'sheet',
      'Print a blank field sheet to fill in',
      (args) =>
        args.option('schema', {
          type: 'boolean',
          default: false,
          describe: 'print its JSON Schema instead, for an editor',
        }),
      (argv) => choose(async () => (await import('./sheet.ts')).printSheet(argv)),
    );
}

/** What a person reads when the run cannot go on: what, where, what to do; never a stack trace. */
function explain(error: UsageError | InputError): string {
  if (error instanceof UsageError)
    return `${error.message}\nstillmark --help lists commands and options`;
  const line = error.lineNumber === undefined ? '' : `, line ${error.lineNumber}`;
  return `${error.path}${line}: ${error.message}`;
}

async function main(): Promise<void> {
  try {
    process.exitCode = await run(hideBin(process.argv));
  } catch (error) {
    if (error instanceof UsageError || error instanceof InputError) {
      process.stderr.write(`stillmark: ${explain(error)}\n`);
      process.exitCode = STATUS.unusable;
    } else if (error instanceof Error && error.name === 'YError') {
      process.stderr.write(
        `stillmark: ${error.message}\nstillmark --help lists commands and options\n`,
      );
      process.exitCode = STATUS.unusable;
    } else {
      const trace = error instanceof Error ? (error.stack ?? error.message) : String(error);
      process.stderr.write(
        `stillmark: a defect of stillmark, not of your log; please report it with these lines\n${trace}\n`,
      );
      process.exitCode = STATUS.defect;
    }
  }
}

// A reader that closes early, such as `head`, is no error.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code === 'EPIPE') process.exit(STATUS.done);
  throw error;
});

await main();
