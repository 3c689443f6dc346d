import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { DraftBody } from '@/lib/api/loops';
import { notFound } from '../problem';

/** The draft of a loop as last saved. */
export async function readDraft(organizationId: string, loopId: string, connection: Knex = db()): Promise<DraftBody> {
  const row = await connection('drafts')
    .join('people', (join) => join.on('people.organization_id', 'drafts.organization_id').on('people.id', 'drafts.saved_by'))
    .where({ 'drafts.organization_id': organizationId, 'drafts.loop_id': loopId })
    .first('drafts.version', 'drafts.drawing', 'drafts.saved_at', 'people.name');
  if (!row) throw notFound();
  return { version: row.version, drawing: row.drawing, savedAt: row.saved_at.toISOString(), savedBy: row.name };
}
