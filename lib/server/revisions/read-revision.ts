import { db } from '@/db/knex';
import type { RevisionBody } from '@/lib/api/loops';
import { notFound } from '../problem';

/** One frozen revision: drawing, balance and what changed. */
export async function readRevision(organizationId: string, loopId: string, number: number): Promise<RevisionBody> {
  if (!Number.isInteger(number) || number < 1 || number > 1_000_000) throw notFound();
  const row = await db()('revisions')
    .join('people', (join) => join.on('people.organization_id', 'revisions.organization_id').on('people.id', 'revisions.issued_by'))
    .where({ 'revisions.organization_id': organizationId, 'revisions.loop_id': loopId, 'revisions.number': number })
    .first(
      'revisions.id',
      'revisions.note',
      'revisions.issued_at',
      'revisions.drawing',
      'revisions.balance',
      'revisions.changes',
      'people.name',
    );
  if (!row) throw notFound();
  return {
    id: row.id,
    number,
    note: row.note,
    issuedAt: row.issued_at.toISOString(),
    issuedBy: row.name,
    drawing: row.drawing,
    balance: row.balance,
    changes: row.changes,
  };
}
