import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

/** Unit and API tests: everything under test/, which mirrors shared/, server/, migrations/ and seeds/ by path. */
export default defineConfig({
  root: fileURLToPath(new URL('..', import.meta.url)),
  test: {
    include: ['test/**/*.test.ts'],
    environment: 'node',
    testTimeout: 30_000,
    hookTimeout: 30_000,
    maxWorkers: 2,
  },
});
