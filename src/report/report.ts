import type {Result} from '../occupation/result.ts';
import type {ChartSeries} from '../occupation/series.ts';
import {loadAssets} from './assets.ts';
import type {Chart} from './charts/chart.ts';
import {PLAIN_REPORT, type ReportOptions} from './options.ts';
import {createRenderer} from './render.ts';
import {cleaned} from './text/clean.ts';
import {pageView} from './view.ts';

/**
 * Loads what draws the report and draws something small with it, so that the first real figure does
 * not pay for it. Nothing of it is seen in the report.
 */
export async function prepareReport(): Promise<void> {
  const [renderer] = await Promise.all([createRenderer(), import('handlebars')]);
  loadAssets();
  await renderer.draw(WARMING_CHART, {id: 'warming', title: '', description: ''});
}

const WARMING_CHART: Chart = {
  widthPx: 100,
  heightPx: 50,
  padding: {left: 20, right: 5, top: 5, bottom: 20},
  spec: {
    data: {
      values: [
        {x: 0, y: 0},
        {x: 1, y: 1},
      ],
    },
    layer: [
      {
        mark: 'line',
        encoding: {x: {field: 'x', type: 'quantitative'}, y: {field: 'y', type: 'quantitative'}},
      },
      {mark: 'text', encoding: {x: {field: 'x', type: 'quantitative'}, text: {field: 'y'}}},
    ],
  },
};

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
