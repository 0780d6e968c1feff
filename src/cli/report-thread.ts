import {Worker} from 'node:worker_threads';
import type {ReportTask} from './report-worker.ts';

/** The thread that draws the report, warming up since it was made. */
export interface ReportThread {
  render(task: ReportTask): Promise<string>;
  /** Ends a thread that is not needed after all; the process would wait for it. */
  close(): Promise<unknown>;
}

export function startReportThread(): ReportThread {
  const worker = new Worker(new URL('./report-worker.js', import.meta.url));
  return {
    render: (task) =>
      new Promise((resolve, reject) => {
        worker.once('message', resolve);
        worker.once('error', reject);
        worker.postMessage(task);
      }),
    close: () => worker.terminate(),
  };
}
