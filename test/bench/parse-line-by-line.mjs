// What a user would otherwise do: hand every line to a parser, and nothing else.
import {createReadStream} from 'node:fs';
import {createInterface} from 'node:readline';
import {parseNmeaSentence} from 'nmea-simple';

let parsed = 0;
for await (const line of createInterface({input: createReadStream(process.argv[2])})) {
  try {
    parseNmeaSentence(line);
    parsed++;
  } catch {
    // A line that it does not know.
  }
}
if (parsed === 0) throw new Error('nothing parsed');
