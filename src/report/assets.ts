import {readdirSync, readFileSync} from 'node:fs';
import {fileURLToPath} from 'node:url';

/** The texts that the page is built from, as they stand in templates/. */
export interface Assets {
  readonly template: string;
  readonly partials: Readonly<Record<string, string>>;
  readonly css: string;
}

/** The folder stands beside src/ in the repository and beside dist/ in the package. */
const TEMPLATES = new URL('../../templates/', import.meta.url);

/** Reads the templates; the one place in the report that touches files. */
export function loadAssets(): Assets {
  const text = (name: string) => readFileSync(new URL(name, TEMPLATES), 'utf8');
  const names = readdirSync(fileURLToPath(new URL('partials/', TEMPLATES)))
    .filter((name) => name.endsWith('.hbs'))
    .sort();
  return {
    template: text('report.hbs'),
    partials: Object.fromEntries(
      names.map((name) => [name.slice(0, -'.hbs'.length), text(`partials/${name}`)]),
    ),
    css: text('report.css'),
  };
}
