import {readFileSync} from 'node:fs';

/** The version in package.json, which stands two folders above this file, built or not. */
export const VERSION: string = JSON.parse(
  readFileSync(new URL('../../package.json', import.meta.url), 'utf8'),
).version;
