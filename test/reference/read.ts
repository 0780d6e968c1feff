import {readFileSync} from 'node:fs';
import {join} from 'node:path';

/** The content of a file of published values; its shape is stated by the test that uses it. */
export function readReference<T>(name: string): T {
  return JSON.parse(readFileSync(join(import.meta.dirname, `${name}.json`), 'utf8')) as T;
}
