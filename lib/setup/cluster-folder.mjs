import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  readlinkSync,
  renameSync,
  rmSync,
  writeFileSync,
  chownSync,
  appendFileSync,
} from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { SetupFailure } from './failure.mjs';
import { isRoot, run } from './processes.mjs';

/** The user that PostgreSQL runs as; undefined means: as ourselves. */
export const clusterUser = () => (isRoot() ? 'postgres' : undefined);

const settings = `
# Written by Evenhead: loopback only, no Unix socket; the port is given at the start.
listen_addresses = '127.0.0.1'
unix_socket_directories = ''
max_connections = 100
log_min_messages = warning
`;

// What a throw-away cluster may lose, it need not wait for.
const throwAwaySettings = `
fsync = off
synchronous_commit = off
full_page_writes = off
`;

/**
 * Makes a cluster, completely or not at all: it is built beside its place and moved there when done.
 * @param {{ folder: string, programs: import('./postgres-programs.mjs').PostgresPrograms, password: string, throwAway?: boolean }} cluster
 */
export async function makeCluster({ folder, programs, password, throwAway = false }) {
  const unfinished = join(dirname(folder), `${basename(folder)}.unfinished`);
  rmSync(unfinished, { recursive: true, force: true });
  mkdirSync(unfinished, { mode: 0o700 });
  const passwordFile = join(dirname(folder), 'initdb-password');
  writeFileSync(passwordFile, password, { mode: 0o600 });
  giveToClusterUser(unfinished, passwordFile);
  const parameters = [
    '-D',
    unfinished,
    '-U',
    'postgres',
    `--pwfile=${passwordFile}`,
    '--auth=scram-sha-256',
    '--encoding=UTF8',
    '--locale=C.UTF-8',
  ];
  try {
    const made = await run(
      join(programs.folder, 'initdb'),
      throwAway ? [...parameters, '--no-sync'] : [...parameters, '--data-checksums'],
      {
        cwd: '/',
        user: clusterUser(),
      },
    );
    if (made.code !== 0) throw new Error(`initdb failed: ${made.output}`);
  } finally {
    rmSync(passwordFile, { force: true });
  }
  appendFileSync(join(unfinished, 'postgresql.conf'), throwAway ? settings + throwAwaySettings : settings);
  renameSync(unfinished, folder);
}

/** @param {string[]} paths */
function giveToClusterUser(...paths) {
  if (!isRoot()) return;
  const [, , uid, gid] = /** @type {string} */ (/^postgres:.*$/m.exec(readFileSync('/etc/passwd', 'utf8'))?.[0]).split(':');
  for (const path of paths) chownSync(path, Number(uid), Number(gid));
}

/**
 * @param {string} folder
 * @returns {{ pid: number, port: number } | null} the cluster's server, when one runs in this folder
 */
export function runningServer(folder) {
  const file = join(folder, 'postmaster.pid');
  if (!existsSync(file)) return null;
  const [pid, , , port] = readFileSync(file, 'utf8').split('\n').map(Number);
  return pid && port && worksIn(pid, folder) ? { pid, port } : null;
}

/**
 * Clears what a killed server left. Its pid file is removed only when no process works in the folder: PostgreSQL itself
 * refuses to start when another program has got the old number since, as happens after every restart of a container.
 * @param {string} folder
 * @param {(line: string) => void} say
 */
export async function clearCrashedServer(folder, say) {
  const file = join(folder, 'postmaster.pid');
  if (!existsSync(file)) return;
  const deadline = Date.now() + 10_000;
  while (anyoneWorksIn(folder)) {
    if (Date.now() > deadline) throw new SetupFailure(`An earlier PostgreSQL is still ending in ${folder}. Wait a moment and start again.`);
    await pause(200);
  }
  rmSync(file, { force: true });
  say('the database was not shut down the last time; it recovers by itself');
}

/** @param {string} folder */
const anyoneWorksIn = (folder) => readdirSync('/proc').some((name) => /^\d+$/.test(name) && worksIn(Number(name), folder));

/**
 * Every PostgreSQL process has its cluster as its working folder.
 * @param {number} pid
 * @param {string} folder
 */
function worksIn(pid, folder) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === folder;
  } catch {
    return false;
  }
}
