import { defineConfig } from 'vitest/config';

// A zone that is neither UTC nor the demo's, so that a forgotten time zone shows.
process.env.TZ = 'Pacific/Auckland';

const setupFiles = ['tests/support/console.ts'];

export default defineConfig({
  test: {
    reporters: ['default', ['json', { outputFile: 'node_modules/.cache/vitest.json' }]],
    projects: [
      {
        test: {
          name: 'unit',
          include: ['tests/{unit,property,reference}/**/*.test.{ts,tsx}'],
          setupFiles,
        },
      },
      { test: { name: 'tooling', include: ['tests/tooling/**/*.test.ts'], setupFiles, testTimeout: 60_000 } },
      { test: { name: 'api', include: ['tests/api/**/*.test.ts'], setupFiles, testTimeout: 20_000 } },
      {
        test: {
          name: 'realtime',
          include: ['tests/realtime/**/*.test.ts'],
          setupFiles,
          testTimeout: 60_000,
          fileParallelism: false,
        },
      },
      {
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          globalSetup: ['tests/browser/support/unpack-browser.ts'],
          setupFiles,
          testTimeout: 120_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
