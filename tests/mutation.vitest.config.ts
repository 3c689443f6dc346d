import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

/** The engine's unit tests alone, for mutation runs: without the projects of the main configuration, which need outside programs. */
export default defineConfig({
  resolve: { alias: { '@': fileURLToPath(new URL('..', import.meta.url)) } },
  test: { include: ['tests/lib/hydraulics/**/*.test.ts'] },
});
