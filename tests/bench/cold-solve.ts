import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { solve } from '@/lib/hydraulics/solve';
import { distribution } from '../make/distribution';

const FRESH_PROCESSES = 7;

/** Median time by the wall clock, ms, of the first solve in a process that has solved nothing before; the document and the modules are loaded. */
export function coldMs(terminals: number, isMeshed: boolean): number {
  const script = fileURLToPath(import.meta.url);
  const times = Array.from({ length: FRESH_PROCESSES }, () => {
    const answer = execFileSync(process.execPath, [...process.execArgv, script, String(terminals), isMeshed ? 'meshed' : 'direct-return']);
    return Number(answer.toString());
  });
  return times.sort((a, b) => a - b)[times.length >> 1];
}

function solveOnce([terminals, network]: string[]): void {
  const document = distribution(Number(terminals), network === 'meshed');
  const begun = performance.now();
  solve(document);
  process.stdout.write(String(performance.now() - begun));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) solveOnce(process.argv.slice(2));
