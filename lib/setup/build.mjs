import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { SetupFailure } from './failure.mjs';
import { nextProgram } from './next-server.mjs';
import { root } from './places.mjs';
import { run } from './processes.mjs';

// What the built application does not contain: a change there needs no new build.
const besideTheApplication = ['tests', 'e2e', 'docs', join('lib', 'setup')];

/**
 * Builds the application unless the build that is there was made from exactly this tree.
 * @param {{ buildFolder: string, say: (line: string) => void }} options `buildFolder`: under the checkout, `.next` or the tests' own
 */
export async function buildIfStale({ buildFolder, say }) {
  const stampFile = join(root, buildFolder, 'source-hash');
  const hash = sourceHash(root);
  if (existsSync(stampFile) && readFileSync(stampFile, 'utf8') === hash) return;
  say('building the application');
  rmSync(stampFile, { force: true });
  // A build needs no database and no secret, so it is told none.
  const { DATABASE_URL: _database, SMTP_URL: _mail, AUTH_SECRET: _secret, ...rest } = process.env;
  const env = { ...rest, NODE_ENV: /** @type {const} */ ('production'), NEXT_TELEMETRY_DISABLED: '1', NEXT_DIST_DIR: buildFolder };
  await bundleWorkers(env);
  const built = await run(process.execPath, [nextProgram, 'build'], { cwd: root, env });
  if (/ENOSPC|No space left on device/.test(built.output)) throw new Error('No space left on device');
  if (built.code !== 0) throw new SetupFailure(`The application does not build:\n${built.output.trim()}`);
  writeFileSync(stampFile, hash);
}

/**
 * Bundles what runs beside the pages into `public`, where the browser finds it under a name that stays; git ignores it.
 * @param {NodeJS.ProcessEnv} env
 */
export async function bundleWorkers(env) {
  const bundled = await run('npm', ['run', '--silent', 'build:workers'], { cwd: root, env });
  if (bundled.code !== 0) throw new SetupFailure(`The workers do not build:\n${bundled.output.trim()}`);
}

/**
 * A hash over names and contents of the files that go into the application, as they are and not as they were committed.
 * @param {string} checkout
 */
export function sourceHash(checkout) {
  const hash = createHash('sha256');
  const isMade = ignoredByGit(readFileSync(join(checkout, '.gitignore'), 'utf8'));
  for (const file of filesUnder(checkout, '', isMade)) {
    hash.update(`${file}\0`);
    hash.update(readFileSync(join(checkout, file)));
    hash.update('\0');
  }
  // Next.js writes these into the pages.
  for (const name of Object.keys(process.env)
    .filter((key) => key.startsWith('NEXT_PUBLIC_'))
    .sort())
    hash.update(`${name}=${process.env[name]}\0`);
  return hash.digest('hex');
}

/**
 * @param {string} checkout
 * @param {string} folder relative, '' for the checkout
 * @param {(path: string) => boolean} isMade
 * @returns {string[]} sorted relative paths
 */
function filesUnder(checkout, folder, isMade) {
  return readdirSync(join(checkout, folder), { withFileTypes: true })
    .sort((a, b) => (a.name < b.name ? -1 : 1))
    .flatMap((entry) => {
      const path = join(folder, entry.name);
      if (entry.name.startsWith('.') || entry.name.endsWith('.md') || besideTheApplication.includes(path) || isMade(path)) return [];
      if (entry.isDirectory()) return filesUnder(checkout, path, isMade);
      return entry.isFile() ? [path] : [];
    });
}

/**
 * What git ignores is made, not written: it must not make a build stale. Plain names, folders and `*.ending` are understood,
 * the forms that our .gitignore uses; git itself may be missing where Evenhead is only run.
 * @param {string} gitignore
 * @returns {(path: string) => boolean}
 */
function ignoredByGit(gitignore) {
  const patterns = gitignore
    .split('\n')
    .map((line) => line.trim().replace(/^\/|\/$/g, ''))
    .filter((line) => line && !line.startsWith('#'));
  return (path) =>
    patterns.some((pattern) => {
      const ending = /^\*(\.[\w.]+)$/.exec(pattern)?.[1];
      return ending ? path.endsWith(ending) : path === pattern || (!pattern.includes('/') && path.split('/').includes(pattern));
    });
}
