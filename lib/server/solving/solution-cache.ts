import { createHash } from 'node:crypto';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { SolvedDocument } from './solve-document';

const kept = new Map<string, SolvedDocument>();
const mostKept = 64;
/** Together; a solution takes about 1 KiB a link and more. */
const mostKeptLinks = 100_000;

/** The same document has the same key, wherever its pieces lie on the sheet. */
export const documentKey = (document: NetworkDocument): string => createHash('sha256').update(JSON.stringify(document)).digest('hex');

export function cachedSolution(key: string): SolvedDocument | undefined {
  const found = kept.get(key);
  if (found) {
    kept.delete(key);
    kept.set(key, found);
  }
  return found;
}

export function keepSolution(key: string, solution: SolvedDocument): void {
  kept.set(key, solution);
  let links = [...kept.values()].reduce((sum, { solve }) => sum + solve.links.length, 0);
  for (const [oldest, { solve }] of kept) {
    if (kept.size <= mostKept && links <= mostKeptLinks) return;
    kept.delete(oldest);
    links -= solve.links.length;
  }
}
