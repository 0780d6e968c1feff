import type {Result} from '../occupation/result.ts';
import type {ChartSeries} from '../occupation/series.ts';
import {loadAssets} from './assets.ts';
import {PLAIN_REPORT, type ReportOptions} from './options.ts';
import {createRenderer} from './render.ts';
import {cleaned} from './text/clean.ts';
import {pageView} from './view.ts';

/**
 * The report of one occupation as one HTML file: no script, no request, the same bytes for the
 * same result.
 */
export async function renderReport(
  result: Result,
  series: ChartSeries,
  options: Partial<ReportOptions> = {},
): Promise<string> {
  const context = {
    result: cleaned(result),
    series,
    options: cleaned({...PLAIN_REPORT, ...options}),
  };
  const [{default: handlebars}, renderer] = await Promise.all([
    import('handlebars'),
    createRenderer(),
  ]);
  const {template, partials, css} = loadAssets();
  const view = await pageView(context, renderer, css);
  const engine = handlebars.create();
  for (const [name, text] of Object.entries(partials)) engine.registerPartial(name, text);
  return engine.compile(template, {strict: true, preventIndent: true})(view);
}
