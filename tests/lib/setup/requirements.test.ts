import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { describe as inWords, SetupFailure } from '@/lib/setup/failure.mjs';
import { requireNode } from '@/lib/setup/packages.mjs';
import { requireFreeSpace } from '@/lib/setup/places.mjs';
import { programsFor } from '@/lib/setup/postgres-programs.mjs';

const folder = mkdtempSync(join(tmpdir(), 'evenhead-requirements-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe('what a machine must have', () => {
  it.each(['18.19.1', '20.10.0'])('Node.js %s is too old, and the line says which will do', (version) => {
    expect(() => requireNode(version)).toThrow(`Evenhead needs Node.js 20.11 or newer; this is ${version}.`);
  });

  it.each(['20.11.0', '22.1.0', '24.0.0'])('Node.js %s will do', (version) => {
    expect(() => requireNode(version)).not.toThrow();
  });

  it('a disk without room is told before anything is written', async () => {
    await expect(requireFreeSpace(folder, 1e18)).rejects.toThrow(/is full: \d+ MB free, 1000000000000 MB needed\. Free some space/);
    await expect(requireFreeSpace(folder, 1)).resolves.toBeUndefined();
  });

  it('a disk that fills up on the way is told in one line as well', () => {
    const error = Object.assign(new Error('ENOSPC: no space left on device, write'), { code: 'ENOSPC' });
    expect(inWords(error)).toBe('The disk is full. Free some space (1 GB is plenty) and start again; nothing was lost.');
    expect(inWords(new Error('FATAL: could not write: No space left on device'))).toContain('The disk is full.');
  });

  it('an error that nobody expected shows where it came from', () => {
    expect(inWords(new TypeError('unforeseen'))).toMatch(/TypeError: unforeseen\n\s+at /);
    expect(inWords(new SetupFailure('Do this.'))).toBe('Do this.');
  });

  it('of several PostgreSQL versions, the one that made the cluster is taken, else the newest', () => {
    const found = [
      { folder: '/new', major: '17' },
      { folder: '/old', major: '15' },
    ];
    expect(programsFor(join(folder, 'none-yet'), found).major).toBe('17');
    writeFileSync(join(folder, 'PG_VERSION'), '15\n');
    expect(programsFor(folder, found).major).toBe('15');
    writeFileSync(join(folder, 'PG_VERSION'), '14\n');
    expect(() => programsFor(folder, found)).toThrow(/was made by PostgreSQL 14, this machine has 17, 15\. Install postgresql-14/);
  });
});
