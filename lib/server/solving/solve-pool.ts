import { join } from 'node:path';
import Piscina from 'piscina';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { SolvedDocument } from './solve-document';

const holder = globalThis as typeof globalThis & { evenheadSolvePool?: Piscina };

/** Threads run the TypeScript as it is: the engine is the same file for tests, command and server. */
function pool(): Piscina {
  holder.evenheadSolvePool ??= new Piscina({
    filename: join(process.cwd(), 'lib/server/solving/solve-worker.ts'),
    execArgv: ['--import', 'tsx'],
    minThreads: 0,
    maxThreads: 2,
    idleTimeout: 60_000,
  });
  return holder.evenheadSolvePool;
}

const lastOf = new Map<string, Promise<unknown>>();

/**
 * Solves off the request thread. One person's solves wait for one another, so that nobody takes both threads;
 * `signal` ends a solve that nobody waits for any more, running or waiting.
 */
export async function solveOffThread(document: NetworkDocument, personId: string, signal?: AbortSignal): Promise<SolvedDocument> {
  const before = lastOf.get(personId) ?? Promise.resolve();
  const mine = before.catch(() => undefined).then(() => {
    signal?.throwIfAborted();
    return pool().run(document, { signal }) as Promise<SolvedDocument>;
  });
  lastOf.set(personId, mine);
  try {
    return await mine;
  } finally {
    if (lastOf.get(personId) === mine) lastOf.delete(personId);
  }
}

/** Ends the threads; for tests and the end of the process. */
export async function closeSolvePool(): Promise<void> {
  await holder.evenheadSolvePool?.destroy();
  delete holder.evenheadSolvePool;
}
