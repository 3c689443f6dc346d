import type { Knex } from 'knex';
import type { Round } from '@/lib/api/commissioning';

/** Rounds, all of a loop or the one of an id, first to last. */
export async function readRounds(
  connection: Knex,
  organizationId: string,
  which: { 'rounds.loop_id': string } | { 'rounds.id': string },
): Promise<Round[]> {
  const rows = await connection('rounds')
    .join('revisions', (join) => join.on('revisions.organization_id', 'rounds.organization_id').on('revisions.id', 'rounds.revision_id'))
    .join('people', (join) => join.on('people.organization_id', 'rounds.organization_id').on('people.id', 'rounds.started_by'))
    .where({ 'rounds.organization_id': organizationId, ...which })
    .orderBy('rounds.number')
    .select({
      id: 'rounds.id',
      number: 'rounds.number',
      purpose: 'rounds.purpose',
      openChecksReason: 'rounds.open_checks_reason',
      revisionNumber: 'revisions.number',
      startedBy: 'people.name',
      startedAt: 'rounds.started_at',
      closedAt: 'rounds.closed_at',
    });
  return rows.map((row) => ({ ...row, startedAt: row.startedAt.toISOString(), closedAt: row.closedAt?.toISOString() ?? null }));
}
