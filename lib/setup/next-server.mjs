import { spawn } from 'node:child_process';
import { closeSync, openSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { SetupFailure } from './failure.mjs';
import { root } from './places.mjs';
import { stopGroup } from './processes.mjs';

/** @typedef {{ pid: number, stopped: Promise<number>, stop: () => Promise<void> }} NextServer `stopped`: the exit code */

export const nextProgram = join(root, 'node_modules/next/dist/bin/next');

/**
 * What the application is told. The variables of sign-in carry the names that its library wants.
 * @param {{ databaseUrl: string, smtpUrl: string, files: Record<string, string>, authSecret: string, publicUrl: string, mode: 'production' | 'development' }} told
 * @returns {NodeJS.ProcessEnv}
 */
export function applicationEnv({ databaseUrl, smtpUrl, files, authSecret, publicUrl, mode }) {
  return {
    ...process.env,
    NODE_ENV: mode,
    NEXT_TELEMETRY_DISABLED: '1',
    DATABASE_URL: databaseUrl,
    SMTP_URL: smtpUrl,
    ...files,
    AUTH_SECRET: authSecret,
    PUBLIC_URL: publicUrl,
    NEXTAUTH_SECRET: authSecret,
    NEXTAUTH_URL: publicUrl,
  };
}

/**
 * @param {{ mode: 'start' | 'dev', host: string, port: number, env: NodeJS.ProcessEnv, program?: string, logFile?: string }} options
 * @returns {NextServer}
 */
export function startNext({ mode, host, port, env, program = nextProgram, logFile }) {
  const log = logFile ? openSync(logFile, 'w') : null;
  const output = log ?? 'inherit';
  const child = spawn(process.execPath, [program, mode, '-H', host, '-p', String(port)], {
    cwd: root,
    env,
    detached: true,
    stdio: ['ignore', output, output],
  });
  if (log !== null) closeSync(log);
  const stopped = new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('exit', (code) => resolve(code ?? 1));
  });
  return { pid: /** @type {number} */ (child.pid), stopped, stop: () => stopGroup(child.pid) };
}

/**
 * @param {NextServer} server
 * @returns {Promise<never>}
 */
export async function failWhenEnded(server) {
  const code = await server.stopped;
  throw new SetupFailure(`The server ended by itself (exit code ${code}); its own lines above say why.`);
}

/**
 * Comes back when the server answers well; fails when it ends before that or takes too long.
 * @param {{ url: string, server: NextServer, seconds?: number, accept?: (response: Response) => boolean }} options
 */
export async function waitUntilUp({ url, server, seconds = 90, accept = (response) => response.ok }) {
  const deadline = Date.now() + seconds * 1000;
  const ended = failWhenEnded(server);
  ended.catch(() => {});
  let last = 'no answer';
  while (Date.now() < deadline) {
    const answer = await Promise.race([ask(url), ended]);
    if (answer instanceof Response && accept(answer)) return;
    last = answer instanceof Response ? `status ${answer.status}` : 'no answer';
    await pause(150);
  }
  throw new SetupFailure(`The server is not healthy after ${seconds} s: ${url} gives ${last}. Its own lines above say why.`);
}

/**
 * @param {string} url
 * @returns {Promise<Response | null>} null while nobody listens or the answer is slow
 */
async function ask(url) {
  try {
    return await fetch(url, { signal: AbortSignal.timeout(20_000) });
  } catch {
    return null;
  }
}
