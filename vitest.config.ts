import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    setupFiles: 'test/fixed-seed.ts',
    globalSetup: 'test/print-reference-table.ts',
    testTimeout: 60_000,
    pool: 'threads',
    maxWorkers: 2,
  },
});
