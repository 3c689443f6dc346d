import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';
import { BaseSequencer, type TestSpecification } from 'vitest/node';

/** Tests that solve hundreds of networks come last: a mutant that a quick test finds never gets to them. */
const LONG = /(solve|solve-cases|solved-loops|balance|size|loops|ldl)\.test\.ts$/;

class QuickFirst extends BaseSequencer {
  override async sort(files: TestSpecification[]): Promise<TestSpecification[]> {
    return [...files].sort((a, b) => Number(LONG.test(a.moduleId)) - Number(LONG.test(b.moduleId)));
  }
}

/** With MUTATION_TESTS only those tests are run: a score found so is a lower bound, in a fraction of the time. */
const include = [process.env.MUTATION_TESTS ?? 'tests/lib/hydraulics/**/*.test.ts'];

/** The engine's unit tests alone, for mutation runs: without the projects of the main configuration, which need outside programs. */
export default defineConfig({
  resolve: { alias: { '@': fileURLToPath(new URL('..', import.meta.url)) } },
  test: {
    include,
    // The same property cases for every mutant, or its fate would be a matter of luck.
    setupFiles: ['tests/make/fixed-seed.ts'],
    sequence: { sequencer: QuickFirst },
    // One worker for all files of a run: the engine keeps nothing between tests, and starting afresh takes longer than most tests.
    isolate: false,
  },
});
