import {defineConfig} from 'vitest/config';

// biome-ignore lint/style/noDefaultExport: vitest reads its configuration from the default export
export default defineConfig({
  test: {include: ['test/report/shots.ts'], testTimeout: 120_000, hookTimeout: 60_000},
});
