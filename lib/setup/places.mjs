import { createHash } from 'node:crypto';
import { chmodSync, mkdirSync, statSync } from 'node:fs';
import disks from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { SetupFailure } from './failure.mjs';
import { isRoot } from './processes.mjs';

/** The checkout. */
export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

const enoughBytes = 300e6;

/**
 * Where everything that must last is kept: the cluster, the secrets, the mail. `.data/` of the checkout, or, where
 * PostgreSQL's user cannot enter it (a checkout under /root), a folder of the machine that belongs to this checkout alone.
 * @param {(line: string) => void} say
 * @param {string} [checkout]
 */
export function openDataFolder(say, checkout = root) {
  const here = join(checkout, '.data');
  const enterable = !isRoot() || everyoneMayEnter(checkout);
  const folder = enterable ? here : join('/var/lib/evenhead', createHash('sha256').update(checkout).digest('hex').slice(0, 12));
  if (!enterable) say(`PostgreSQL's user cannot enter ${checkout}; the data is kept in ${folder}`);
  mkdirSync(folder, { recursive: true });
  if (isRoot()) chmodSync(folder, 0o755);
  return folder;
}

/**
 * @param {string} folder
 * @returns {boolean} whether another user can pass through the folder and all above it
 */
export function everyoneMayEnter(folder) {
  if ((statSync(folder).mode & 0o001) === 0) return false;
  return folder === dirname(folder) || everyoneMayEnter(dirname(folder));
}

/**
 * A database on a full disk stops in the middle of things: better not to begin.
 * @param {string} folder
 * @param {number} [bytes]
 */
export async function requireFreeSpace(folder, bytes = enoughBytes) {
  const disk = await disks.statfs(folder);
  const freeBytes = disk.bavail * disk.bsize;
  if (freeBytes >= bytes) return;
  throw new SetupFailure(
    `The disk of ${folder} is full: ${Math.floor(freeBytes / 1e6)} MB free, ${Math.ceil(bytes / 1e6)} MB needed. Free some space and start again; nothing was lost.`,
  );
}
