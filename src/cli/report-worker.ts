import {parentPort} from 'node:worker_threads';
import type {Result} from '../occupation/result.ts';
import type {ChartSeries} from '../occupation/series.ts';
import type {ReportOptions} from '../report/options.ts';
import {prepareReport, renderReport} from '../report/report.ts';

/*
 * Draws the report in a thread of its own: it loads the libraries that draw while the log is still
 * being read, which takes about as long.
 */

export interface ReportTask {
  readonly result: Result;
  readonly series: ChartSeries;
  readonly options: Partial<ReportOptions>;
}

parentPort?.on('message', async (task: ReportTask) => {
  parentPort?.postMessage(await renderReport(task.result, task.series, task.options));
  parentPort?.close();
});

await prepareReport();
