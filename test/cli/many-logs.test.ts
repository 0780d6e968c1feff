import {spawnSync} from 'node:child_process';
import {
  chmodSync,
  copyFileSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  writeFileSync,
} from 'node:fs';
import {join, resolve} from 'node:path';
import {describe, expect, test} from 'vitest';
import {emptyFolder, sample, stillmark} from './run.ts';

/*
 * Many logs under a scheduler that people have: the line of the README, as it stands there, beside
 * the same runs one after the other.
 */
const ROOT = resolve(import.meta.dirname, '../..');
const COMMAND = join(ROOT, 'dist/cli/main.js');
const NAMES = ['mole-still.nmea', 'slip-jump.nmea'];

const readme = readFileSync(join(ROOT, 'README.md'), 'utf8');
const line = /^ {4}(find .*xargs .*)$/m.exec(readme)?.[1];
const folder = emptyFolder();

/** A command of that name in the path, as an installation makes it. */
function withCommand(): NodeJS.ProcessEnv {
  const bin = join(folder, 'bin');
  mkdirSync(bin);
  const command = join(bin, 'stillmark');
  writeFileSync(command, `#!/bin/sh\nexec node '${COMMAND}' "$@"\n`);
  chmodSync(command, 0o755);
  return {...process.env, PATH: `${bin}:${process.env.PATH}`};
}

describe('many logs', () => {
  const logs = join(folder, 'logs');
  mkdirSync(logs);
  for (const name of NAMES) {
    copyFileSync(sample(name), join(logs, name));
    copyFileSync(sample(name), join(logs, `again-${name}`));
  }

  test('two at a time give the bytes of one after the other', () => {
    expect(line).toBeDefined();
    const {status, stderr} = spawnSync('sh', ['-c', line!], {
      cwd: folder,
      env: withCommand(),
      encoding: 'utf8',
    });
    expect(stderr).toBe('');
    expect(status).toBe(0);
    const results = readdirSync(logs).filter((name) => name.endsWith('.json'));
    expect(results).toHaveLength(2 * NAMES.length);
    for (const name of results) {
      const log = join(logs, name.replace(/\.json$/, ''));
      const alone = stillmark(['reduce', log, '--quiet', '--result', '-']);
      expect(readFileSync(join(logs, name), 'utf8')).toBe(alone.stdout);
    }
    // Nothing else is left behind: no lock, no part of a file.
    expect(readdirSync(logs).filter((name) => !/\.(nmea|json)$/.test(name))).toEqual([]);
  });

  test('a log that cannot be used fails its own run and no other', () => {
    writeFileSync(join(logs, 'empty.nmea'), '');
    const {status, stderr} = spawnSync('sh', ['-c', line!], {
      cwd: folder,
      env: {...process.env, PATH: `${join(folder, 'bin')}:${process.env.PATH}`},
      encoding: 'utf8',
    });
    // POSIX xargs: 1 to 125 when an invocation failed; GNU says 123.
    expect(status).toBeGreaterThan(0);
    expect(stderr).toContain('the file is empty');
    expect(readdirSync(logs).filter((name) => name.endsWith('.json'))).toHaveLength(4);
  });
});
