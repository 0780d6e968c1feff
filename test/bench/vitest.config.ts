import {defineConfig} from 'vitest/config';

/** The long experiments; `npm test` does not run them. */
// biome-ignore lint/style/noDefaultExport: the test runner asks for one
export default defineConfig({
  test: {
    include: ['test/bench/*.run.ts'],
    testTimeout: 24 * 3600 * 1000,
    hookTimeout: 3600 * 1000,
    pool: 'forks',
    maxWorkers: 1,
    reporters: ['dot'],
    disableConsoleIntercept: true,
  },
});
