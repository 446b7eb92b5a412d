// Two groups of tests: those of the sources, and those of the real command, which first see to it that dist is built.
import { defineConfig } from 'vitest/config';

const ofTheCommand = 'test/**/*.process.test.ts';

export default defineConfig({
  test: {
    testTimeout: 120_000,
    hookTimeout: 120_000,
    setupFiles: ['test/helpers/steady-seed.ts'],
    projects: [
      {
        extends: true,
        // One set of modules for the files of a worker: loading them anew for each took most of the time.
        test: { name: 'source', include: ['test/**/*.test.ts'], exclude: [ofTheCommand], isolate: false },
      },
      {
        extends: true,
        test: { name: 'process', include: [ofTheCommand], globalSetup: ['test/helpers/build-once.ts'] },
      },
    ],
  },
});
