import { spawn } from 'node:child_process';
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { identityOf, isAlive, pidOf } from '@/lib/setup/process-identity.mjs';
import { run, stopGroup } from '@/lib/setup/processes.mjs';
import { clearCrashedRuns, liveRuns, recordRun, requireNoOtherRun } from '@/lib/setup/runs.mjs';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'evenhead-runs-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

const sleeper = () => spawn('sleep', ['60'], { detached: true });
const identityOfChild = (child: ReturnType<typeof sleeper>) => identityOf(child.pid ?? 0) ?? '';

describe('a process is known by more than its number', () => {
  it('and one that ended is not alive', async () => {
    const child = sleeper();
    const identity = identityOfChild(child);
    expect(pidOf(identity)).toBe(child.pid);
    expect(isAlive(identity)).toBe(true);
    await stopGroup(child.pid);
    expect(isAlive(identity)).toBe(false);
    expect(isAlive(identityOf(process.pid)!.replace(/\d+$/, '1'))).toBe(false);
  });

  it('a group that ignores the polite request ends all the same', async () => {
    const child = spawn('sh', ['-c', 'trap "" TERM; echo ready; while :; do sleep 1; done'], { detached: true });
    await new Promise((resolve) => child.stdout.once('data', resolve));
    await stopGroup(child.pid, 200);
    expect(identityOf(child.pid ?? 0)).toBeNull();
  });
});

describe('the record of runs', () => {
  it('names the live run of a command, and forgets it when it ends', () => {
    const record = recordRun(folder, { command: 'npm start', address: 'http://127.0.0.1:4300' });
    expect(liveRuns(folder)).toHaveLength(1);
    expect(() => requireNoOtherRun(folder, 'npm start')).toThrow(`at http://127.0.0.1:4300 (process ${process.pid})`);
    expect(() => requireNoOtherRun(folder, 'npm run dev')).not.toThrow();
    record.remove();
    expect(liveRuns(folder)).toEqual([]);
  });

  it('of a killed run tells which server to stop, and spares a stranger that has got its number since', async () => {
    const server = sleeper();
    const stranger = sleeper();
    const dead = identityOf(process.pid)!.replace(/\d+$/, '1');
    const servers = [identityOfChild(server), identityOfChild(stranger).replace(/\d+$/, '1')];
    recordRun(folder, { command: 'npm start', address: '' }).remove();
    writeFileSync(join(folder, 'runs/1.json'), JSON.stringify({ command: 'npm start', address: '', owner: dead, servers }));
    writeFileSync(join(folder, 'runs/2.json'), '{"comm');

    const said: string[] = [];
    await clearCrashedRuns(folder, (line) => said.push(line));
    expect(said).toHaveLength(1);
    expect(isAlive(servers[0])).toBe(false);
    expect(identityOf(stranger.pid ?? 0)).not.toBeNull();
    expect(readdirSync(join(folder, 'runs'))).toEqual([]);
    await stopGroup(stranger.pid);
  });
});

it('a program is run to its end with what it wrote and how it ended', async () => {
  expect(await run('sh', ['-c', 'cat; echo to both >&2; exit 3'], { input: 'given\n' })).toEqual({ code: 3, output: 'given\nto both\n' });
  await expect(run('no-such-program', [])).rejects.toThrow('ENOENT');
});
