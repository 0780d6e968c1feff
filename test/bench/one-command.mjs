// The smallest program with the same command-line library: the floor for a cold start.
import yargs from 'yargs';

await yargs(['--help'])
  .scriptName('one')
  .command('only <file>', 'the only command', (args) => args.option('name', {type: 'string'}))
  .detectLocale(false)
  .exitProcess(false)
  .parseAsync();
