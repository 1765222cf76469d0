import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));

/** Pure tests run anywhere; integration tests want the services that docker-free-scripts/test.mjs starts. */
export default defineConfig({
  resolve: { alias: [{ find: /^@\//, replacement: `${root}` }] },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'pure',
          include: [
            'tests/unit/**/*.test.{ts,tsx}',
            'tests/reference/**/*.test.ts',
            'tests/guards/**/*.test.ts',
          ],
          exclude: ['tests/guards/**/*.db.test.ts'],
          environment: 'node',
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts', 'tests/guards/**/*.db.test.ts'],
          environment: 'node',
          testTimeout: 30_000,
          hookTimeout: 60_000,
          // One database for the run; every test makes its own shop, files run one after another.
          fileParallelism: false,
        },
      },
    ],
  },
});
