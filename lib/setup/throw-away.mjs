import { chmodSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { runningServer } from './cluster-folder.mjs';
import { openCluster } from './cluster.mjs';
import { everyoneMayEnter } from './places.mjs';
import { migrate } from './migrate.mjs';
import { identityOf, isAlive } from './process-identity.mjs';
import { isRoot } from './processes.mjs';
import { newSecrets } from './secrets.mjs';

const prefix = 'evenhead-test-';

/** @typedef {Awaited<ReturnType<typeof openThrowAwayCluster>>} ThrowAway */

/**
 * A folder and a cluster for one test run alone, gone when it ends.
 * @param {(line: string) => void} say
 * @param {import('./lifetime.mjs').Lifetime} lifetime
 */
export async function openThrowAwayCluster(say, lifetime) {
  const parent = [tmpdir(), '/tmp', '/var/tmp'].find((folder) => existsSync(folder) && (!isRoot() || everyoneMayEnter(folder))) ?? tmpdir();
  await clearKilledRuns(parent);
  const folder = mkdtempSync(join(parent, prefix));
  lifetime.atEnd(() => rmSync(folder, { recursive: true, force: true }));
  // PostgreSQL's own user passes through to its cluster, which only it can read.
  chmodSync(folder, 0o711);
  writeFileSync(join(folder, 'owner'), String(identityOf(process.pid)));
  const cluster = await openCluster({ folder, secrets: newSecrets(), say: () => {}, throwAway: true });
  lifetime.atEnd(cluster.stop);
  say(`throw-away database on 127.0.0.1:${cluster.port}`);
  return {
    folder,
    /**
     * @param {string} name
     * @param {{ demo: boolean }} options
     * @returns {Promise<string>} the URL of a database that has every migration
     */
    async migratedDatabase(name, options) {
      const url = await cluster.database(name);
      await migrate(url, options);
      return url;
    },
  };
}

/**
 * A test run that was killed could not tidy up: its cluster is stopped and its folder removed by the next one.
 * @param {string} parent
 */
export async function clearKilledRuns(parent) {
  for (const name of readdirSync(parent).filter((entry) => entry.startsWith(prefix))) {
    const folder = join(parent, name);
    const owner = join(folder, 'owner');
    if (statSync(folder, { throwIfNoEntry: false })?.uid !== process.getuid?.() || !existsSync(owner)) continue;
    if (isAlive(readFileSync(owner, 'utf8'))) continue;
    const server = runningServer(join(folder, 'cluster'));
    // SIGQUIT is PostgreSQL's immediate shutdown: nothing in it is worth a checkpoint.
    if (server) process.kill(server.pid, 'SIGQUIT');
    while (runningServer(join(folder, 'cluster'))) await pause(50);
    rmSync(folder, { recursive: true, force: true });
  }
}
