import { existsSync } from 'node:fs';
import { SetupFailure } from './failure.mjs';
import { isRoot, run } from './processes.mjs';

/**
 * Installs packages of Debian, or says in one line what the person must do.
 * @param {string[]} packages
 * @param {string} why what is missing, as the beginning of a sentence
 * @param {(line: string) => void} say
 */
export async function installFromDebian(packages, why, say) {
  const advice = `${why}. Install it with: sudo apt-get install ${packages.join(' ')}`;
  if (!isRoot() || !existsSync('/usr/bin/apt-get')) throw new SetupFailure(advice);
  say(`installing ${packages.join(', ')} (Debian)`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const updated = await run('apt-get', ['update', '-q'], { env });
  const installed = await run('apt-get', ['install', '-y', '-q', '--no-install-recommends', ...packages], { env });
  if (installed.code === 0) return;
  if (/No space left on device/.test(installed.output))
    throw new SetupFailure('The disk is full. Free 1 GB and start again; nothing was lost.');
  const reason = [installed, updated].flatMap((step) => step.output.split('\n')).find((line) => line.startsWith('E:')) ?? 'apt-get failed';
  throw new SetupFailure(`${advice} (tried it: ${reason})`);
}
