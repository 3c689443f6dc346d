import { createHash } from 'node:crypto';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { SolvedDocument } from './solve-document';

const kept = new Map<string, SolvedDocument>();
const mostKept = 64;

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
  const oldest = kept.keys().next();
  if (kept.size > mostKept && !oldest.done) kept.delete(oldest.value);
}
