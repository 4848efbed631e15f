import { defineConfig } from '@playwright/test';

export default defineConfig({
  testDir: '.',
  testMatch: '*.spec.ts',
  outputDir: '../../test-results/window',
  // A window waits as often as it draws: two beside each other use two cores well.
  workers: 2,
  fullyParallel: true,
  timeout: 180_000,
  expect: { timeout: 30_000 },
  reporter: [['line'], ['json', { outputFile: '../../test-results/playwright.json' }]],
});
