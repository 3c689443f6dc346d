import { db } from '@/db/knex';

export interface RevisionRow {
  number: number;
  note: string;
  issuedAt: string;
  issuedBy: string;
}

/** The revisions of a loop, newest first. */
export async function listRevisions(organizationId: string, loopId: string): Promise<RevisionRow[]> {
  const rows = await db()('revisions')
    .join('people', (join) => join.on('people.organization_id', 'revisions.organization_id').on('people.id', 'revisions.issued_by'))
    .where({ 'revisions.organization_id': organizationId, 'revisions.loop_id': loopId })
    .orderBy('revisions.number', 'desc')
    .select('revisions.number', 'revisions.note', 'revisions.issued_at', 'people.name');
  return rows.map((row) => ({ number: row.number, note: row.note, issuedAt: row.issued_at.toISOString(), issuedBy: row.name }));
}
