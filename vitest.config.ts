import {defineConfig} from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    testTimeout: 60_000,
    hookTimeout: 120_000,
    pool: 'forks',
    maxWorkers: 2,
    coverage: {
      provider: 'v8',
      include: ['src/**/*.ts'],
      reporter: ['text-summary', 'json-summary', 'text'],
      thresholds: Object.fromEntries(
        ['time', 'geodesy', 'statistics', 'epochs', 'log', 'fieldbook', 'occupation'].map(
          (folder) => [`src/${folder}/**`, {lines: 90}],
        ),
      ),
    },
  },
});
