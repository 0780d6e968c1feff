import {execFileSync, spawnSync} from 'node:child_process';
import {readFileSync, writeFileSync} from 'node:fs';
import {join} from 'node:path';
import {expect, test} from 'vitest';
import {emptyFolder, sample} from './run.ts';

test('the packed tarball installs into an empty folder and makes a report there', () => {
  const folder = emptyFolder();
  const packed = execFileSync(
    'npm',
    ['pack', '--ignore-scripts', '--silent', '--pack-destination', folder],
    {
      encoding: 'utf8',
    },
  ).trim();
  writeFileSync(join(folder, 'package.json'), '{"private": true}');
  execFileSync('npm', ['install', '--silent', '--no-audit', '--no-fund', join(folder, packed)], {
    cwd: folder,
    stdio: 'pipe',
  });
  const command = join(folder, 'node_modules/.bin/stillmark');
  const ran = spawnSync(command, ['reduce', sample('mole-still.nmea'), '--report', 'report.html'], {
    cwd: folder,
    encoding: 'utf8',
  });
  expect(ran.stderr).toBe('');
  expect(ran.status).toBe(0);
  expect(readFileSync(join(folder, 'report.html'), 'utf8')).toContain('</html>');
}, 300_000);
