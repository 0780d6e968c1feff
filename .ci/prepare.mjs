// Makes a fresh clone ready, once: installs what package-lock.json names when it is not installed
// yet, and with --build compiles src/ into dist/ when a source is newer than the last build.
import {spawnSync} from 'node:child_process';
import {existsSync, mkdirSync, readdirSync, statSync, writeFileSync} from 'node:fs';
import {dirname, join} from 'node:path';
import {fileURLToPath} from 'node:url';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
const installed = join(root, 'node_modules/.package-lock.json');
const built = join(root, 'dist/.built');

function run(command, args) {
  const done = spawnSync(command, args, {cwd: root, stdio: ['ignore', 'inherit', 'inherit']});
  if (done.status !== 0) process.exit(done.status ?? 1);
}

function changedAt(path) {
  return existsSync(path) ? statSync(path).mtimeMs : 0;
}

function newestSource() {
  const sources = readdirSync(join(root, 'src'), {recursive: true, withFileTypes: true})
    .filter((entry) => entry.isFile())
    .map((entry) => changedAt(join(entry.parentPath, entry.name)));
  return Math.max(...sources, changedAt(join(root, 'tsconfig.build.json')));
}

if (changedAt(installed) < changedAt(join(root, 'package-lock.json'))) {
  console.error('installing the packages named in package-lock.json (once)');
  run('npm', ['ci', '--loglevel=error']);
}

if (process.argv.includes('--build') && changedAt(built) < newestSource()) {
  console.error('compiling src/ into dist/');
  run('npm', ['run', '--silent', 'build']);
  mkdirSync(dirname(built), {recursive: true});
  writeFileSync(built, '');
}
