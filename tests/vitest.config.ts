import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['tests/**/*.test.ts'],
    reporters: ['default', new URL('./tools/count-reporter.mjs', import.meta.url).pathname],
    testTimeout: 60_000,
    hookTimeout: 120_000,
    // Two cores is what the tests are budgeted for.
    maxWorkers: 2,
  },
});
