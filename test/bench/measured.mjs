// Runs a script with the words behind it and says at the end what the process cost.
import {pathToFileURL} from 'node:url';

const [script, ...words] = process.argv.slice(2);
process.argv = [process.argv[0], script, ...words];
process.on('exit', () => {
  const {userCPUTime, systemCPUTime, maxRSS} = process.resourceUsage();
  const cpuS = (userCPUTime + systemCPUTime) / 1e6;
  process.stderr.write(`\nMEASURED ${JSON.stringify({cpuS, peakMb: maxRSS / 1024})}\n`);
});
await import(pathToFileURL(script).href);
