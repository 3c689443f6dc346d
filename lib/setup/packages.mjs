import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { SetupFailure } from './failure.mjs';
import { root } from './places.mjs';
import { run } from './processes.mjs';

/** @typedef {Record<string, { version?: string, integrity?: string, optional?: boolean, link?: boolean }>} LockedPackages */

const minimumNode = [20, 11];

/** @param {string} [version] */
export function requireNode(version = process.versions.node) {
  const [major, minor] = version.split('.').map(Number);
  if (major > minimumNode[0] || (major === minimumNode[0] && minor >= minimumNode[1])) return;
  throw new SetupFailure(
    `Evenhead needs Node.js ${minimumNode.join('.')} or newer; this is ${version}. Install it from nodejs.org or Debian.`,
  );
}

/**
 * Installs what the lock names, if that is not what is there.
 * @param {(line: string) => void} say
 */
export async function installPackages(say) {
  if (packagesAreCurrent(root)) return;
  say('installing packages (npm ci)');
  const installed = await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: root });
  if (installed.code === 0) return;
  if (/ENOSPC|No space left/.test(installed.output)) throw new SetupFailure('The disk is full. Free 2 GB and start again.');
  const reason = installed.output
    .split('\n')
    .filter((line) => /^npm (error|ERR!)/.test(line))
    .slice(0, 3)
    .join(' ');
  throw new SetupFailure(`npm ci failed: ${reason || installed.output.trim()}. Check the network and start again.`);
}

/**
 * npm writes the inner lock as the last act of an installation, so a broken one has none.
 * @param {string} checkout
 */
export function packagesAreCurrent(checkout) {
  const inner = join(checkout, 'node_modules', '.package-lock.json');
  if (!existsSync(inner)) return false;
  const wanted = readLock(join(checkout, 'package-lock.json'));
  const present = readLock(inner);
  return Object.entries(wanted).every(([path, entry]) => {
    // Optional ones are for one kind of machine each; the entry '' is the project itself.
    if (path === '' || entry.optional) return true;
    return present[path]?.version === entry.version && present[path]?.integrity === entry.integrity;
  });
}

/**
 * @param {string} file
 * @returns {LockedPackages}
 */
const readLock = (file) => JSON.parse(readFileSync(file, 'utf8')).packages;
