import { defineConfig } from 'vitest/config';

export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  test: {
    include: [
      'test/{core,reference,command,hosts,engine,rules}/**/*.test.{ts,tsx}',
      'test/desktop/**/*.test.ts',
    ],
    environment: 'node',
    setupFiles: [new URL('./rules/seededCases.ts', import.meta.url).pathname],
    // Both of two cores: the default leaves one idle.
    maxWorkers: 2,
    testTimeout: 60_000,
    hookTimeout: 60_000,
    // A busy machine must not decide whether a test passes: what comes at all comes within this.
    expect: { poll: { timeout: 20_000 } },
  },
});
