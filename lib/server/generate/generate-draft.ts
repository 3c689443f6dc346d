import { db } from '@/db/knex';
import type { GeneratedLoop, GenerateLoop } from '@/lib/api/generate';
import type { LoopService } from '@/lib/api/loops';
import { withEarlierIds } from '@/lib/network/generate/earlier-ids';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { readDraft } from '../loops/read-draft';
import { draftChanged, storeDraft } from '../loops/save-draft';
import { notFound, Problem } from '../problem';
import { runOffThread } from '../solving/solve-pool';
import type { GenerateAnswer, GenerateTask } from './generate-worker';
import { valveSizes } from './valve-sizes';

/** 5,000 terminals take about 13 s of a processor that has nothing else to do. */
const LONGEST_MS = 180_000;

/**
 * Makes a loop's drawing from a terminal schedule and saves it as the next version of its draft, under the rule of every save: a draft that somebody has
 * saved meanwhile is not overwritten. What is drawn already is replaced only where that is asked for.
 */
export async function generateDraft(access: Access, loopId: string, input: GenerateLoop, signal?: AbortSignal): Promise<GeneratedLoop> {
  const { organizationId, id: personId } = access.person;
  const draft = await readDraft(organizationId, loopId);
  if (draft.version !== input.baseVersion) throw draftChanged(draft);
  if (draft.drawing.equipment.length > 0 && !input.replacesDrawing) {
    throw new Problem('drawing-not-empty', 'This loop has a drawing already. Nothing was changed; say that it may be replaced to go on.');
  }
  const loop: { name: string; service: LoopService } | undefined = await db()('loops')
    .where({ organization_id: organizationId, id: loopId })
    .first('name', 'service');
  if (!loop) throw notFound();

  const make = { service: loop.service, fluid: draft.drawing.fluid, valveSizes: await valveSizes(organizationId, input.valveFamilyId) };
  const task: GenerateTask = { terminals: input.terminals, options: input.options, make };
  const made = await runOffThread<GenerateAnswer>({ worker: 'generate/generate-worker.ts', task, personId, signal, longestMs: LONGEST_MS });
  if (!made.ok) throw unfit(made.faults);

  const drawing = withEarlierIds(made.drawing, draft.drawing);
  return db().transaction(async (trx) => {
    const saved = await storeDraft(trx, access, loopId, { baseVersion: input.baseVersion, drawing });
    if (!saved) throw draftChanged(await readDraft(organizationId, loopId, trx));
    await recordActivity(trx, access, {
      verb: 'generated the drawing of',
      subject: loop.name,
      loopId,
      detail: { terminals: made.summary.terminals, version: saved.version },
    });
    return { ...saved, summary: made.summary };
  });
}

function unfit(faults: { path: string; message: string }[]): Problem {
  const [first] = faults;
  if (faults.length === 1 && first.path === 'terminals') return new Problem('loop-unfit', first.message);
  return new Problem('schedule-unfit', 'This schedule cannot be made into a loop yet; nothing was changed.', {
    fields: faults.slice(0, 100),
  });
}
