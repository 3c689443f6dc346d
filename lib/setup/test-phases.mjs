import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { nextProgram } from './next-server.mjs';
import { root } from './places.mjs';
import { run } from './processes.mjs';

/** @typedef {{ passed: number, failed: number }} Tally */

/** The tests' own build, beside the one that `npm start` may be serving. */
export const testBuildFolder = '.next-test';
/** Where the runners' reports and the server's log go. */
export const reports = join(root, 'reports');

/**
 * @param {string[]} parameters program of node_modules and its parameters
 * @param {Record<string, string>} [env]
 */
async function passes(parameters, env) {
  const { code } = await run(process.execPath, parameters, { cwd: root, env: { ...process.env, ...env }, output: 'show' });
  return code === 0;
}

/** @param {boolean} good @returns {Tally} */
const asOne = (good) => (good ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 });

/** The type check: the routes' generated types and everything else; counts as one. */
export async function checkTypes() {
  const generated = await passes([nextProgram, 'typegen'], { NEXT_DIST_DIR: testBuildFolder, NEXT_TELEMETRY_DISABLED: '1' });
  return asOne(generated && (await passes([join(root, 'node_modules/typescript/bin/tsc'), '-p', 'tsconfig.test.json'])));
}

/** The lint rules, a warning being an error; counts as one. */
export async function lint() {
  return asOne(await passes([join(root, 'node_modules/eslint/bin/eslint.js'), '.', '--max-warnings', '0']));
}

/**
 * One project of vitest.
 * @param {'unit' | 'reference' | 'integration'} project
 * @param {Record<string, string>} [env]
 * @returns {Promise<Tally>}
 */
export async function runVitest(project, env) {
  const file = freshReport(`${project}.json`);
  const program = join(root, 'node_modules/vitest/vitest.mjs');
  const good = await passes(
    [program, 'run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${file}`],
    env,
  );
  return atLeastOneFailureUnless(good, readVitestReport(file));
}

/**
 * @param {string} file
 * @returns {Tally}
 */
export function readVitestReport(file) {
  if (!existsSync(file)) return { passed: 0, failed: 0 };
  /** @type {{ numPassedTests: number, numFailedTests: number, testResults: { status: string, assertionResults: unknown[] }[] }} */
  const report = JSON.parse(readFileSync(file, 'utf8'));
  // A file that does not even load has no tests to count.
  const broken = report.testResults.filter(({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0).length;
  return { passed: report.numPassedTests, failed: report.numFailedTests + broken };
}

/**
 * @param {Record<string, string>} env
 * @returns {Promise<Tally>}
 */
export async function runPlaywright(env) {
  const file = freshReport('e2e.json');
  const program = join(root, 'node_modules/@playwright/test/cli.js');
  const good = await passes([program, 'test', '--project=desktop', '--reporter=list,json'], { ...env, PLAYWRIGHT_JSON_OUTPUT_FILE: file });
  return atLeastOneFailureUnless(good, readPlaywrightReport(file));
}

/**
 * @param {string} file
 * @returns {Tally}
 */
export function readPlaywrightReport(file) {
  if (!existsSync(file)) return { passed: 0, failed: 0 };
  /** @type {{ stats: { expected: number, unexpected: number, flaky: number } }} */
  const { stats } = JSON.parse(readFileSync(file, 'utf8'));
  return { passed: stats.expected, failed: stats.unexpected + stats.flaky };
}

/**
 * A runner that fails without a failed test (nothing ran, an error outside the tests) is a failure too.
 * @param {boolean} good
 * @param {Tally} tally
 */
const atLeastOneFailureUnless = (good, tally) => (good || tally.failed > 0 ? tally : { ...tally, failed: 1 });

/** @param {string} name */
function freshReport(name) {
  const file = join(reports, name);
  rmSync(file, { force: true });
  return file;
}
