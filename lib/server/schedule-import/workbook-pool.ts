import { join } from 'node:path';
import Piscina from 'piscina';
import type { UploadedSchedule } from '@/lib/api/schedule-import';
import { log } from '../log';
import { Problem } from '../problem';
import type { WorkbookAnswer, WorkbookTask } from './workbook-worker';

const holder = globalThis as typeof globalThis & { evenheadWorkbookPool?: Piscina };

const LONGEST_MS = 20_000;
const MOST_MEMORY_MB = 512;
const MOST_WAITING = 8;

/** One thread, bounded in memory and time: a hostile workbook ends its own thread and nothing else. */
function pool(): Piscina {
  holder.evenheadWorkbookPool ??= new Piscina({
    filename: join(process.cwd(), 'lib/server/schedule-import/workbook-worker.ts'),
    execArgv: ['--import', 'tsx'],
    minThreads: 0,
    maxThreads: 1,
    maxQueue: MOST_WAITING,
    idleTimeout: 30_000,
    resourceLimits: { maxOldGenerationSizeMb: MOST_MEMORY_MB, maxYoungGenerationSizeMb: 64 },
  });
  return holder.evenheadWorkbookPool;
}

/** Reads a workbook off the request thread. `signal` ends it when nobody waits for it any more. */
export async function readWorkbookOffThread(task: WorkbookTask, signal: AbortSignal, longestMs = LONGEST_MS): Promise<UploadedSchedule> {
  if (pool().queueSize >= MOST_WAITING) throw new Problem('reader-busy', 'Other workbooks are being read. Try again in a moment.');
  const timeUp = AbortSignal.timeout(longestMs);
  let answer: WorkbookAnswer;
  try {
    answer = await pool().run(task, { signal: AbortSignal.any([signal, timeUp]) });
  } catch (error) {
    if (timeUp.aborted) throw tooHard('took too long to read');
    if (error instanceof Error && 'code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY')
      throw tooHard('takes more memory than is allowed');
    throw error;
  }
  if (!answer.ok) {
    // The person reads a sentence; what the reader stumbled over is for whoever mends it.
    if (answer.reason) log.warn({ reason: answer.reason }, 'workbook could not be read');
    throw new Problem('schedule-unfit', answer.message);
  }
  return answer.schedule;
}

const tooHard = (what: string) =>
  new Problem('schedule-unfit', `The workbook ${what}. Copy the rows alone to a new workbook, or save it as CSV.`);

/** Ends the thread; for tests and the end of the process. */
export async function closeWorkbookPool(): Promise<void> {
  await holder.evenheadWorkbookPool?.destroy();
  delete holder.evenheadWorkbookPool;
}
