import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { DraftBody, SavedDraft } from '@/lib/api/loops';
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
  const saved = await storeDraft(db(), access, loopId, input);
  if (saved) return saved;
  const current = await readDraft(access.person.organizationId, loopId);
  if (same(current.drawing, input.drawing)) return { version: current.version, savedAt: current.savedAt };
  throw draftChanged(current);
}

/** Writes the next version of a draft; null where the draft is not at `baseVersion` any more. */
export async function storeDraft(
  connection: Knex,
  { person }: Access,
  loopId: string,
  { baseVersion, drawing }: { baseVersion: number; drawing: Drawing },
): Promise<SavedDraft | null> {
  const [saved] = await connection('drafts')
    .where({ organization_id: person.organizationId, loop_id: loopId, version: baseVersion })
    .update({ version: baseVersion + 1, drawing: JSON.stringify(drawing), saved_by: person.id, saved_at: connection.fn.now() })
    .returning(['version', 'saved_at']);
  return saved ? { version: saved.version, savedAt: saved.saved_at.toISOString() } : null;
}

/** Somebody else has saved meanwhile: their drawing goes along, for the two to be compared. */
export const draftChanged = (current: DraftBody) =>
  new Problem('draft-changed', `${current.savedBy} has saved this drawing meanwhile. Nothing of yours is lost: see what differs.`, {
    detail: current,
  });
