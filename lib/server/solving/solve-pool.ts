import { join } from 'node:path';
import Piscina from 'piscina';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { Problem } from '../problem';
import type { SolvedDocument } from './solve-document';

const holder = globalThis as typeof globalThis & { evenheadSolvePool?: Piscina };

/** Threads run the TypeScript as it is: the engine is the same file for tests, command and server. */
function pool(): Piscina {
  holder.evenheadSolvePool ??= new Piscina({
    execArgv: ['--import', 'tsx'],
    minThreads: 0,
    maxThreads: 2,
    idleTimeout: 60_000,
  });
  return holder.evenheadSolvePool;
}

const longestSolveMs = 60_000;
const mostWaiting = 4;
const waitingOf = new Map<string, { count: number; last: Promise<unknown> }>();

/** Solves a document off the request thread. */
export const solveOffThread = (document: NetworkDocument, personId: string, signal?: AbortSignal): Promise<SolvedDocument> =>
  runOffThread({ worker: 'solving/solve-worker.ts', task: document, personId, signal });

interface OffThread {
  /** A file of lib/server whose default export does the work. */
  worker: string;
  task: unknown;
  personId: string;
  signal?: AbortSignal;
  longestMs?: number;
}

/**
 * Does work off the request thread, for a minute at most unless said otherwise. One person's runs wait for one another, a few at most, so that nobody
 * takes both threads; `signal` ends a run that nobody waits for any more, running or waiting.
 */
export async function runOffThread<Result>(work: OffThread): Promise<Result> {
  const { personId } = work;
  const mine = waitingOf.get(personId) ?? { count: 0, last: Promise.resolve() };
  if (mine.count >= mostWaiting)
    throw new Problem(
      'solver-busy',
      'Earlier drawings of yours are still being solved. Wait a moment, then change something to solve again.',
    );
  waitingOf.set(personId, mine);
  mine.count += 1;
  const solved = mine.last.catch(() => undefined).then(() => runInThread(work));
  mine.last = solved;
  try {
    return await solved;
  } finally {
    mine.count -= 1;
    if (mine.count === 0) waitingOf.delete(personId);
  }
}

async function runInThread({ worker, task, signal, longestMs = longestSolveMs }: OffThread) {
  signal?.throwIfAborted();
  const timeUp = AbortSignal.timeout(longestMs);
  try {
    return await pool().run(task, {
      filename: join(process.cwd(), 'lib/server', worker),
      signal: signal ? AbortSignal.any([signal, timeUp]) : timeUp,
    });
  } catch (error) {
    if (timeUp.aborted) throw new Problem('solve-too-long', 'This drawing takes too long to be solved. Draw it as several loops.');
    throw error;
  }
}

/** Ends the threads; for tests and the end of the process. */
export async function closeSolvePool(): Promise<void> {
  await holder.evenheadSolvePool?.destroy();
  delete holder.evenheadSolvePool;
}
