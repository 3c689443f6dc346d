import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));

/** Three suites: unit needs nothing, reference compares with the outside, integration needs DATABASE_URL of a throw-away cluster. */
export default defineConfig({
  resolve: { alias: { '@': root } },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          setupFiles: ['tests/make/fixed-seed.ts'],
          include: ['tests/lib/**/*.test.ts', 'tests/architecture/**/*.test.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'reference',
          setupFiles: ['tests/make/fixed-seed.ts'],
          include: ['tests/reference/**/*.test.ts'],
          testTimeout: 120_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          setupFiles: ['tests/make/fixed-seed.ts', 'tests/make/session.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
});
