import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { sourceHash } from '@/lib/setup/build.mjs';
import { packagesAreCurrent } from '@/lib/setup/packages.mjs';

let checkout = '';
beforeEach(() => {
  checkout = mkdtempSync(join(tmpdir(), 'evenhead-stale-'));
  write('.gitignore', '# made\n.next/\nnode_modules/\npublic/service-worker.js\n*.tsbuildinfo\n');
  write('app/page.tsx', 'one');
});
afterEach(() => rmSync(checkout, { recursive: true }));

function write(path: string, text: string) {
  mkdirSync(dirname(join(checkout, path)), { recursive: true });
  writeFileSync(join(checkout, path), text);
}

describe('a build is stale', () => {
  it.each([
    ['app/page.tsx', 'two'],
    ['app/other.tsx', 'one'],
    ['package-lock.json', '{}'],
    ['public/icon.svg', '<svg/>'],
    ['lib/hydraulics/solve.ts', 'export {}'],
  ])('after a change of %s', (path, text) => {
    const before = sourceHash(checkout);
    write(path, text);
    expect(sourceHash(checkout)).not.toBe(before);
  });

  it('after a file moved, though its content is the same', () => {
    const before = sourceHash(checkout);
    rmSync(join(checkout, 'app/page.tsx'));
    write('app/pages.tsx', 'one');
    expect(sourceHash(checkout)).not.toBe(before);
  });

  it.each([
    'README.md',
    'tests/lib/a.test.ts',
    'e2e/a.spec.ts',
    '.next/BUILD_ID',
    'public/service-worker.js',
    'a.tsbuildinfo',
    'node_modules/a/index.js',
    '.data/x',
  ])('but not after a change of %s, which is no part of it', (path) => {
    const before = sourceHash(checkout);
    write(path, 'changed');
    expect(sourceHash(checkout)).toBe(before);
  });
});

describe('packages are installed again', () => {
  const lock = (packages: object) => JSON.stringify({ packages });
  const wanted = {
    '': { version: '1.0.0' },
    'node_modules/pipe': { version: '2.0.0', integrity: 'sha512-a' },
    'node_modules/other-machine': { version: '1.0.0', integrity: 'sha512-b', optional: true },
  };

  beforeEach(() => write('package-lock.json', lock(wanted)));

  it('when there are none, or an installation was cut short', () => {
    expect(packagesAreCurrent(checkout)).toBe(false);
    write('node_modules/pipe/package.json', '{}');
    expect(packagesAreCurrent(checkout)).toBe(false);
  });

  it.each([
    { version: '1.9.0', integrity: 'sha512-a' },
    { version: '2.0.0', integrity: 'sha512-z' },
  ])('when the lock names another than %o', (present) => {
    write('node_modules/.package-lock.json', lock({ 'node_modules/pipe': present }));
    expect(packagesAreCurrent(checkout)).toBe(false);
  });

  it('and not when all is there but what other kinds of machine need', () => {
    write('node_modules/.package-lock.json', lock({ 'node_modules/pipe': wanted['node_modules/pipe'] }));
    expect(packagesAreCurrent(checkout)).toBe(true);
  });
});
