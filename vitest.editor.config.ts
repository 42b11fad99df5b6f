/** The editor suite: a real editor in a real browser, one test at a time. */
import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['tests/editor/**/*.test.ts'],
    globalSetup: ['tests/editor/support/build.ts'],
    fileParallelism: false,
    testTimeout: 180_000,
    hookTimeout: 120_000,
    // One retry, which the reporter names: a browser on a busy machine may lose a key; a fault of ours fails twice.
    retry: 1,
    passWithNoTests: false,
  },
});
