import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { readPlaywrightReport, readVitestReport } from '@/lib/setup/test-phases.mjs';

const folder = mkdtempSync(join(tmpdir(), 'evenhead-reports-'));
afterAll(() => rmSync(folder, { recursive: true }));

function report(content: object): string {
  const file = join(folder, 'report.json');
  writeFileSync(file, JSON.stringify(content));
  return file;
}

it('a test file that does not load counts as a failure', () => {
  const testResults = [
    { status: 'failed', assertionResults: [] },
    { status: 'failed', assertionResults: [{}, {}] },
    { status: 'passed', assertionResults: [{}] },
  ];
  expect(readVitestReport(report({ numPassedTests: 2, numFailedTests: 1, testResults }))).toEqual({ passed: 2, failed: 2 });
});

it('a test in the browser that passes only at the second try counts as a failure', () => {
  expect(readPlaywrightReport(report({ stats: { expected: 5, unexpected: 1, flaky: 1, skipped: 3 } }))).toEqual({ passed: 5, failed: 2 });
});

it('a runner that left no report passed nothing', () => {
  expect(readVitestReport(join(folder, 'none.json'))).toEqual({ passed: 0, failed: 0 });
  expect(readPlaywrightReport(join(folder, 'none.json'))).toEqual({ passed: 0, failed: 0 });
});
