import { existsSync, readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ESLint } from 'eslint';
import { describe, expect, it, vi } from 'vitest';

// The linter reads every module that the linted one leads to.
vi.setConfig({ testTimeout: 60_000 });

const root = fileURLToPath(new URL('../..', import.meta.url));
const tested = ['import/no-restricted-paths', '@typescript-eslint/no-explicit-any'];
const eslint = new ESLint({ cwd: root, ruleFilter: ({ ruleId }) => tested.includes(ruleId) });

/** Pairs written out here and not read from the configuration: an arrow that is dropped there must fail here. */
const forbidden: [importer: string, imported: string][] = [
  ['lib/hydraulics', 'lib/network'],
  ['lib/hydraulics', 'lib/units'],
  ['lib/hydraulics', 'lib/api'],
  ['lib/hydraulics', 'lib/server'],
  ['lib/hydraulics', 'db'],
  ['lib/units', 'lib/hydraulics'],
  ['lib/units', 'lib/api'],
  ['lib/balancing', 'lib/server'],
  ['lib/balancing', 'lib/api'],
  ['lib/balancing', 'lib/network'],
  ['lib/commissioning', 'lib/server'],
  ['lib/commissioning', 'lib/api'],
  ['lib/commissioning', 'lib/client'],
  ['lib/network', 'lib/server'],
  ['lib/network', 'lib/api'],
  ['lib/network', 'components'],
  ['lib/api', 'lib/server'],
  ['lib/api', 'db'],
  ['lib/api', 'components'],
  ['lib/client', 'lib/server'],
  ['lib/client', 'db'],
  ['lib/client', 'components'],
  ['lib/server', 'components'],
  ['lib/server', 'lib/client'],
  ['lib/server', 'app'],
  ['components', 'lib/server'],
  ['components', 'db'],
  ['components', 'app'],
  ['db', 'components'],
  ['db', 'app'],
  ['app', 'lib/setup'],
];

const allowed: [importer: string, imported: string][] = [
  ['app', 'lib/server'],
  ['app', 'components'],
  ['components', 'lib/client'],
  ['components', 'lib/network'],
  ['lib/network', 'lib/hydraulics'],
  ['lib/network', 'lib/units'],
  ['lib/commissioning', 'lib/hydraulics'],
  ['lib/server', 'db'],
  ['lib/server', 'lib/hydraulics'],
];

/** The first source file of a folder: what is imported from there, or the place in which our code is said to stand. */
function fileIn(folder: string): string {
  const files = readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' });
  const file = files.filter((name) => /\.(ts|tsx|mjs)$/.test(name) && !name.endsWith('.d.ts')).sort()[0];
  if (!file) throw new Error(`there is no source file in ${folder}`);
  return `${folder}/${file}`;
}

const moduleIn = (folder: string) => `@/${fileIn(folder).replace(/\.tsx?$/, '')}`;

async function rulesBroken(importer: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(code, { filePath: join(root, fileIn(importer)) });
  return result.messages.map((message) => message.ruleId ?? message.message);
}

const importFrom = (folder: string) => `import * as other from '${moduleIn(folder)}';\nexport const name = String(other);\n`;

describe('the arrows of the architecture', () => {
  it.each(forbidden)('%s may not import from %s', async (importer, imported) => {
    expect(await rulesBroken(importer, importFrom(imported))).toContain('import/no-restricted-paths');
  });

  it('a relative path is no way around an arrow', async () => {
    const climb = dirname(fileIn('components')).replace(/[^/]+/g, '..');
    const code = importFrom('lib/server').replace('@/', `${climb}/`);
    expect(await rulesBroken('components', code)).toContain('import/no-restricted-paths');
  });

  it('nor is an import of types alone', async () => {
    const code = `import type * as other from '${moduleIn('lib/server')}';\nexport type Name = keyof typeof other;\n`;
    expect(await rulesBroken('components', code)).toContain('import/no-restricted-paths');
  });

  it.each(allowed)('%s may import from %s', async (importer, imported) => {
    expect(await rulesBroken(importer, importFrom(imported))).not.toContain('import/no-restricted-paths');
  });
});

describe('other rules of the house', () => {
  it('two modules that import each other are refused', async () => {
    const unguarded = new ESLint({ cwd: root, ignore: false, ruleFilter: ({ ruleId }) => ruleId === 'import/no-cycle' });
    const results = await unguarded.lintFiles(['tests/architecture/cycle/*.ts']);
    expect(results.map(({ messages }) => messages.map(({ ruleId }) => ruleId))).toEqual([['import/no-cycle'], ['import/no-cycle']]);
  });

  it('the type that means anything is refused', async () => {
    expect(await rulesBroken('lib/units', 'export const parse = (text: any) => String(text);\n')).toContain(
      '@typescript-eslint/no-explicit-any',
    );
  });

  it.each(['app', 'components', 'db', 'lib'])('%s is where the rules look for it', (folder) => {
    expect(existsSync(join(root, folder))).toBe(true);
  });
});
