import {existsSync} from 'node:fs';
import {type Browser, chromium} from 'playwright-core';

const FLAGS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** Chromium as the machine has it; a missing one fails with what to do, and is never skipped. */
export async function openBrowser(): Promise<Browser> {
  const places = [
    process.env.CHROMIUM,
    '/usr/bin/chromium',
    '/usr/bin/chromium-browser',
    '/usr/bin/google-chrome',
  ];
  const executablePath = places.find((path) => path !== undefined && existsSync(path));
  if (executablePath === undefined) {
    throw new Error(
      'the tests of the report need Chromium: install the package chromium, or name the program in the variable CHROMIUM',
    );
  }
  return chromium.launch({executablePath, args: FLAGS});
}
