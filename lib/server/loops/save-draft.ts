import { db } from '@/db/knex';
import type { SavedDraft } from '@/lib/api/loops';
import type { Drawing } from '@/lib/network/drawing';
import { same } from '@/lib/network/merge-drawings';
import type { Access } from '../auth/authorize';
import { Problem } from '../problem';
import { readDraft } from './read-draft';

/**
 * Saves a draft over the version it was made from. The version stands in the WHERE of the write, so of two people who
 * save at once one is told, with the other's drawing, and nothing is overwritten. Saving the same drawing again
 * (an answer that got lost) is answered as the save that already happened.
 */
export async function saveDraft(access: Access, loopId: string, input: { baseVersion: number; drawing: Drawing }): Promise<SavedDraft> {
  const { organizationId, id: personId } = access.person;
  const [saved] = await db()('drafts')
    .where({ organization_id: organizationId, loop_id: loopId, version: input.baseVersion })
    .update({ version: input.baseVersion + 1, drawing: JSON.stringify(input.drawing), saved_by: personId, saved_at: db().fn.now() })
    .returning(['version', 'saved_at']);
  if (saved) return { version: saved.version, savedAt: saved.saved_at.toISOString() };

  const current = await readDraft(organizationId, loopId);
  if (same(current.drawing, input.drawing)) return { version: current.version, savedAt: current.savedAt };
  throw new Problem('draft-changed', `${current.savedBy} has saved this drawing meanwhile. Nothing of yours is lost: see what differs.`, {
    detail: current,
  });
}
