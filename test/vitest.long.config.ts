// The tests with random texts, of other Nodes, of very large landscapes, and of a sweep that is killed, for as long as one lets a machine run over night: `npm run test:long`.
import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    root: new URL('..', import.meta.url).pathname,
    include: ['test/fuzz/*.test.ts', 'test/long/*.test.ts', 'test/cli/sweep-killed.test.ts'],
    env: { SKEIN_TESTS: 'long' },
    globalSetup: ['test/global-setup.ts'],
    testTimeout: 3_600_000,
  },
});
