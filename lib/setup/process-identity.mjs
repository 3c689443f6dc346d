import { readdirSync, readFileSync } from 'node:fs';

/**
 * @param {number} pid
 * @returns {{ group: number, startedAtTick: string } | null} null where no such process lives
 */
function readProcess(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    const [state, group, threads, startedAtTick] = [fields[0], Number(fields[2]), Number(fields[17]), fields[19]];
    // Dead but not yet collected. While other threads end, its ports are still taken: it counts as alive.
    if (state === 'X' || (state === 'Z' && threads <= 1)) return null;
    return { group, startedAtTick };
  } catch {
    return null;
  }
}

/**
 * A name for a process that its successor under the same number does not share: boot, number, time of start.
 * Numbers are used again, at once in a restarted container, and we stop nothing that we did not start.
 * @param {number} pid
 * @returns {string | null} null where no such process lives
 */
export function identityOf(pid) {
  const found = readProcess(pid);
  return found && `${readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim()}:${pid}:${found.startedAtTick}`;
}

/** @param {string} identity from identityOf */
export const pidOf = (identity) => Number(identity.split(':')[1]);

/** @param {string} identity from identityOf */
export const isAlive = (identity) => identityOf(pidOf(identity)) === identity;

/**
 * @param {number} group the number of its leader
 * @returns {boolean} whether the leader or anyone it started lives
 */
export const groupIsAlive = (group) =>
  readdirSync('/proc').some((name) => /^\d+$/.test(name) && readProcess(Number(name))?.group === group);
