import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { houseExample } from '../../make/house-example';

const folder = mkdtempSync(join(tmpdir(), 'network-command-'));
afterAll(() => rmSync(folder, { recursive: true }));

function file(content: string | Buffer): string {
  const path = join(folder, `${Math.random()}.json`);
  writeFileSync(path, content);
  return path;
}

function run(words: string[], input = '') {
  const { status, stdout } = spawnSync('npx', ['tsx', 'lib/network/command.ts', ...words], { input, encoding: 'utf8', maxBuffer: 1 << 28 });
  return { status, result: JSON.parse(stdout) as Record<string, unknown> };
}

describe('the headless command', { timeout: 60_000 }, () => {
  it('solves a file, and standard input the same', () => {
    const text = JSON.stringify(houseExample());
    const fromFile = run(['solve', file(text)]);
    expect(fromFile).toMatchObject({ status: 0, result: { converged: true } });
    expect(run(['solve', '-'], text)).toEqual(fromFile);
  });

  it('balances', () => {
    expect(run(['balance', '-'], JSON.stringify(houseExample({ kv: [9, 6, 4.1569219382] })))).toMatchObject({
      status: 0,
      result: { indexTerminal: 'T3' },
    });
  });

  it.each([
    ['no words', [], '', 'usage'],
    ['an unknown verb', ['draw', '-'], '{}', 'usage'],
    ['a file that is not there', ['solve', '/nowhere/network.json'], '', 'unreadable'],
    ['what is not JSON', ['solve', '-'], '{"format":', 'not-json'],
    ['nothing', ['solve', '-'], '', 'not-json'],
    ['a document with faults', ['solve', '-'], JSON.stringify({ ...houseExample(), fluid: {} }), 'invalid-document'],
  ])('%s: status 2 and a coded error', (_, words, input, code) => {
    expect(run(words, input)).toMatchObject({ status: 2, result: { error: { code } } });
  });

  it('a document over 32 MiB is refused', () => {
    const large = file(Buffer.alloc(32 * 1024 * 1024 + 1, ' '));
    expect(run(['solve', large])).toMatchObject({ status: 2, result: { error: { code: 'document-too-large' } } });
  });

  it('design flows that cannot meet: status 3, what was found, and the place', () => {
    const document = houseExample();
    document.links.push({ id: 'T9', kind: 'terminal', from: 'X', to: 'Y', designFlowLs: 0.1, designDropKpa: 5 });
    document.links.push({ id: 'T10', kind: 'terminal', from: 'Y', to: 'P', designFlowLs: 0.2, designDropKpa: 5 });
    document.nodes.push({ id: 'Y' });
    const { status, result } = run(['balance', '-'], JSON.stringify(document));
    expect(status).toBe(3);
    expect(result).toMatchObject({ converged: false, warnings: [{ code: 'design-flow-conflict', message: expect.stringContaining('Y') }] });
  });
});
