import { defineConfig } from '@playwright/test';

export default defineConfig({
  testDir: '.',
  testMatch: '*.spec.ts',
  outputDir: '../../test-results/window',
  // Two cores draw in software: windows beside each other would only wait for each other.
  workers: 1,
  timeout: 120_000,
  expect: { timeout: 20_000 },
  reporter: [['line'], ['json', { outputFile: '../../test-results/playwright.json' }]],
});
