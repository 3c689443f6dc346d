import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { SetupFailure } from './failure.mjs';
import { identityOf, isAlive, pidOf } from './process-identity.mjs';
import { stopGroup } from './processes.mjs';

/** @typedef {{ command: string, address: string, owner: string, servers: string[] }} RunRecord `owner`, `servers`: see identityOf */
/** @typedef {{ file: string, record: RunRecord }} KnownRun */

/** @param {string} folder */
const recordsFolder = (folder) => join(folder, 'runs');

/**
 * Notes that this process runs Evenhead from this folder, so that a later one knows, also when we are killed.
 * @param {string} folder the data folder
 * @param {{ command: string, address: string }} what
 */
export function recordRun(folder, what) {
  mkdirSync(recordsFolder(folder), { recursive: true });
  const file = join(recordsFolder(folder), `${process.pid}.json`);
  /** @type {RunRecord} */
  const record = { ...what, owner: /** @type {string} */ (identityOf(process.pid)), servers: [] };
  const write = () => writeFileSync(file, JSON.stringify(record));
  write();
  return {
    /** @param {number} pid */
    addServer(pid) {
      const identity = identityOf(pid);
      if (identity) record.servers.push(identity);
      write();
    },
    remove: () => rmSync(file, { force: true }),
  };
}

/**
 * @param {string} folder
 * @returns {KnownRun[]}
 */
function knownRuns(folder) {
  mkdirSync(recordsFolder(folder), { recursive: true });
  return readdirSync(recordsFolder(folder)).map((name) => {
    const file = join(recordsFolder(folder), name);
    return { file, record: readRecord(file) };
  });
}

/**
 * @param {string} file
 * @returns {RunRecord} a record cut short by a full disk or a power cut belongs to nobody who lives
 */
function readRecord(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return { command: '', address: '', owner: '', servers: [] };
  }
}

/** @param {string} folder */
export const liveRuns = (folder) =>
  knownRuns(folder)
    .filter(({ record }) => isAlive(record.owner))
    .map(({ record }) => record);

/**
 * A run that was killed could not stop its servers: they are stopped now, if they are still the same processes.
 * @param {string} folder
 * @param {(line: string) => void} say
 */
export async function clearCrashedRuns(folder, say) {
  for (const { file, record } of knownRuns(folder)) {
    if (isAlive(record.owner)) continue;
    for (const server of record.servers.filter(isAlive)) {
      say(`an earlier run was killed and left its server behind (process ${pidOf(server)}); stopping it`);
      await stopGroup(pidOf(server));
    }
    rmSync(file, { force: true });
  }
}

/**
 * Two servers on one build would pull it from under each other.
 * @param {string} folder
 * @param {string} command
 */
export function requireNoOtherRun(folder, command) {
  const other = liveRuns(folder).find((run) => run.command === command);
  if (!other) return;
  const where = other.address ? `, at ${other.address}` : '';
  throw new SetupFailure(`${command} already runs in this folder${where} (process ${pidOf(other.owner)}). Stop it with Ctrl-C first.`);
}
