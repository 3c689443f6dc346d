/** Mutation testing of the engine, run on demand (`npm run mutation`, or with `-- --mutate lib/hydraulics/NAME.ts` for one file). */
export default {
  testRunner: 'vitest',
  plugins: ['@stryker-mutator/vitest-runner'],
  vitest: { configFile: 'tests/mutation.vitest.config.ts' },
  mutate: ['lib/hydraulics/**/*.ts', '!lib/hydraulics/types.ts'],
  reporters: ['clear-text', 'html'],
  htmlReporter: { fileName: '.data/mutation/index.html' },
  clearTextReporter: { allowColor: false, logTests: false },
  tempDirName: '.stryker-tmp',
  ignorePatterns: ['.next', '.data', 'public', 'app', 'components', 'e2e', 'test-results', 'playwright-report'],
  coverageAnalysis: 'perTest',
  // Static mutants (tables evaluated on import) rerun every test; they are most of the coefficient tables, which the reference suite compares.
  ignoreStatic: true,
  concurrency: 1,
  timeoutMS: 5_000,
};
