import { db } from '@/db/knex';
import type { LoopDetail } from '@/lib/api/loops';
import { may } from '@/lib/api/permissions';
import { same } from '@/lib/network/merge-drawings';
import type { Access } from '../auth/authorize';
import { notFound } from '../problem';
import { readTolerances } from '../projects/read-tolerances';
import { bandOf, stripsOf } from './loop-strips';

/** What heads every page of a loop. */
export async function readLoop({ person, roles }: Access, loopId: string): Promise<LoopDetail> {
  const { organizationId } = person;
  const row = await db()('loops')
    .join('projects', (join) => join.on('projects.organization_id', 'loops.organization_id').on('projects.id', 'loops.project_id'))
    .where({ 'loops.organization_id': organizationId, 'loops.id': loopId })
    .first({ name: 'loops.name', service: 'loops.service', state: 'loops.state', projectId: 'projects.id', projectName: 'projects.name' });
  if (!row) throw notFound();
  const revision = await db()('revisions')
    .join('people', (join) => join.on('people.organization_id', 'revisions.organization_id').on('people.id', 'revisions.issued_by'))
    .where({ 'revisions.organization_id': organizationId, 'revisions.loop_id': loopId })
    .orderBy('revisions.number', 'desc')
    .first('revisions.id', 'revisions.number', 'revisions.note', 'revisions.issued_at', 'people.name');
  const strips = await stripsOf(organizationId, [loopId]);
  return {
    id: loopId,
    name: row.name,
    service: row.service,
    state: row.state,
    project: { id: row.projectId, name: row.projectName },
    roles,
    revision: revision
      ? {
          id: revision.id,
          number: revision.number,
          note: revision.note,
          issuedAt: revision.issued_at.toISOString(),
          issuedBy: revision.name,
        }
      : null,
    isDraftAhead: may(roles, 'draft.see') ? await isDraftAhead(organizationId, loopId, revision?.id) : null,
    strip: strips.get(loopId)?.ticks ?? [],
    band: bandOf(await readTolerances(organizationId, row.projectId)),
  };
}

async function isDraftAhead(organizationId: string, loopId: string, revisionId: string | undefined): Promise<boolean> {
  if (!revisionId) return false;
  const row = await db()('drafts')
    .join('revisions', (join) => join.on('revisions.organization_id', 'drafts.organization_id').on('revisions.loop_id', 'drafts.loop_id'))
    .where({ 'drafts.organization_id': organizationId, 'drafts.loop_id': loopId, 'revisions.id': revisionId })
    .first({ draft: 'drafts.drawing', issued: 'revisions.drawing' });
  return Boolean(row) && !same(row.draft, row.issued);
}
