import { defineConfig } from '@playwright/test';

/** Pictures of every view into the folder that GALLERY names; -g chooses walks. Apart from npm test. */
export default defineConfig({
  testDir: '.',
  testMatch: 'gallery.ts',
  outputDir: '../../../test-results/gallery',
  workers: 1,
  fullyParallel: true,
  timeout: 900_000,
  expect: { timeout: 15_000 },
  reporter: 'line',
});
