import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    root: new URL('..', import.meta.url).pathname,
    globalSetup: ['test/global-setup.ts'],
    include: ['test/**/*.test.ts'],
    exclude: ['test/long/**'],
    testTimeout: 60_000,
    hookTimeout: 60_000,
  },
});
