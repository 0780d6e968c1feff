import {readFileSync} from 'node:fs';
import {join, resolve} from 'node:path';
import {describe, expect, test} from 'vitest';
import {stillmark} from './run.ts';

/* The worked runs of the README are what the program prints today. */
const README = readFileSync(join(resolve(import.meta.dirname, '../..'), 'README.md'), 'utf8');
const RUNS = [...README.matchAll(/```\n\$ stillmark (.*)\n\n([\s\S]*?)\n```/g)].map(
  ([, command, shown]) => [command!, shown!] as const,
);

describe('the README', () => {
  test('shows three runs', () => {
    expect(RUNS).toHaveLength(3);
  });

  test.each(RUNS)('stillmark %s', (command, shown) => {
    const {stdout} = stillmark(command.split(' '));
    // The account of a log is shown by its first lines.
    const printed = stdout.trimEnd().split('\n').slice(0, shown.split('\n').length);
    expect(printed).toEqual(shown.split('\n'));
  });
});
