import { db } from '@/db/knex';
import type { ActivityPage, ActivityRow } from '@/lib/api/activity';
import type { Person } from '../auth/person';

interface Asked {
  projectId?: string;
  /** The id of the last row already seen. */
  before?: string;
  limit?: number;
}

/**
 * Who did what, newest first: on the projects that the person is on; an administrator sees all of the organisation. Whether
 * they may see the project named in `projectId` is for the caller to ask first.
 */
export async function readActivity(person: Person, { projectId, before, limit = 50 }: Asked): Promise<ActivityPage> {
  const { organizationId } = person;
  const rows = await db()('activity')
    .leftJoin('projects', (join) =>
      join.on('projects.organization_id', 'activity.organization_id').on('projects.id', 'activity.project_id'),
    )
    .leftJoin('loops', (join) => join.on('loops.organization_id', 'activity.organization_id').on('loops.id', 'activity.loop_id'))
    .where('activity.organization_id', organizationId)
    .modify((query) => {
      if (projectId) query.where('activity.project_id', projectId);
      if (!person.isAdministrator) {
        const own = db()('project_members').where({ organization_id: organizationId, person_id: person.id }).select('project_id');
        query.whereIn('activity.project_id', own);
      }
      if (before) {
        const seen = db()('activity').where({ organization_id: organizationId, id: before }).select('at', 'id');
        // Two deeds of one moment are told apart by their ids, so a page neither repeats nor leaves out a row.
        query.whereRaw('(activity.at, activity.id) < (?)', [seen]);
      }
    })
    .orderBy([
      { column: 'activity.at', order: 'desc' },
      { column: 'activity.id', order: 'desc' },
    ])
    .limit(limit + 1)
    .select({
      id: 'activity.id',
      personName: 'activity.person_name',
      verb: 'activity.verb',
      subject: 'activity.subject',
      projectId: 'activity.project_id',
      projectName: 'projects.name',
      loopId: 'activity.loop_id',
      loopName: 'loops.name',
      at: 'activity.at',
    });
  return {
    rows: rows.slice(0, limit).map((row: ActivityRow & { at: Date }) => ({ ...row, at: row.at.toISOString() })),
    hasMore: rows.length > limit,
  };
}
