// Shows the main job on a sample occupation and says where its report lies.
import {spawnSync} from 'node:child_process';
import {dirname, join} from 'node:path';
import {fileURLToPath} from 'node:url';

const root = join(dirname(fileURLToPath(import.meta.url)), '..');
const words = [
  'check',
  'sample-logs/mole-still.nmea',
  '--marks',
  'sample-logs/marks.yaml',
  '--sheet',
  'sample-logs/sheet.yaml',
  '--report',
  'demo-report.html',
  '--result',
  'demo-result.json',
];

console.log(`$ stillmark ${words.join(' ')}\n`);
const {status} = spawnSync('node', ['dist/cli/main.js', ...words], {cwd: root, stdio: 'inherit'});
if (status === 0) {
  console.log('\nreport  demo-report.html   open it in any browser');
  console.log('result  demo-result.json   everything computed, as JSON');
}
process.exitCode = status ?? 1;
