import { spawn } from 'node:child_process';
import { setTimeout as pause } from 'node:timers/promises';
import { Interrupted } from './failure.mjs';
import { groupIsAlive } from './process-identity.mjs';

/** @typedef {{ cwd?: string, env?: NodeJS.ProcessEnv, input?: string, user?: string, output?: 'show' | 'keep', evenWhenStopping?: boolean }} RunOptions */
/** @typedef {{ code: number, output: string }} Finished */

/** Programs that run to their end, so that a stopped run can stop them too. */
const unfinished = new Set();
let stopping = false;

/** True when this process may install packages and must not run PostgreSQL itself. */
export const isRoot = () => process.getuid?.() === 0;

/**
 * Runs a program to its end in a process group of its own: Ctrl-C then reaches only us, and we stop things in order.
 * @param {string} program
 * @param {string[]} parameters
 * @param {RunOptions} [options] `user`: run as this user (root only); `output: 'show'` passes everything through;
 *   `evenWhenStopping`: part of the stopping itself
 * @returns {Promise<Finished>} never rejects for a non-zero exit; `output` is what it wrote, when kept
 */
export function run(program, parameters, { cwd, env = process.env, input, user, output = 'keep', evenWhenStopping = false } = {}) {
  const [command, ...rest] = user ? ['runuser', '-u', user, '--', program, ...parameters] : [program, ...parameters];
  return new Promise((resolve, reject) => {
    if (stopping && !evenWhenStopping) return reject(new Interrupted());
    const shown = output === 'show' ? 'inherit' : 'pipe';
    const child = spawn(command, rest, { cwd, env, detached: true, stdio: [input === undefined ? 'ignore' : 'pipe', shown, shown] });
    unfinished.add(child);
    let text = '';
    const keep = (/** @type {Buffer} */ chunk) => {
      text += chunk;
    };
    child.stdout?.on('data', keep);
    child.stderr?.on('data', keep);
    child.stdin?.end(input);
    child.on('error', (error) => {
      unfinished.delete(child);
      reject(error);
    });
    child.on('close', (code) => {
      unfinished.delete(child);
      if (stopping && !evenWhenStopping) reject(new Interrupted());
      else resolve({ code: code ?? 1, output: text });
    });
  });
}

/** Stops the programs that `run` is still waiting for, and lets none begin from now on. */
export async function stopUnfinished() {
  stopping = true;
  await Promise.all([...unfinished].map((child) => stopGroup(child.pid)));
}

/**
 * Asks a process group that we started to end, insists after a while, and comes back when all of it is gone.
 * @param {number | undefined} pid the group's leader
 * @param {number} [patienceMs]
 */
export async function stopGroup(pid, patienceMs = 8000) {
  if (!pid) return;
  signalGroup(pid, 'SIGTERM');
  const deadline = Date.now() + patienceMs;
  while (groupIsAlive(pid)) {
    if (Date.now() > deadline) signalGroup(pid, 'SIGKILL');
    await pause(50);
  }
}

/**
 * @param {number} pid
 * @param {NodeJS.Signals} signal
 */
function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'ESRCH') throw error;
  }
}
