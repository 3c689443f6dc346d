import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { ToleranceRule } from '@/lib/api/projects';

/** The tolerance bands agreed for a project, one for each kind of station and for ranks that have their own. */
export async function readTolerances(organizationId: string, projectId: string, connection: Knex = db()): Promise<ToleranceRule[]> {
  return connection('tolerance_rules').where({ organization_id: organizationId, project_id: projectId }).orderBy(['station_kind', 'rank']).select({
    stationKind: 'station_kind',
    rank: 'rank',
    lowerPercent: 'lower_percent',
    upperPercent: 'upper_percent',
    source: 'source',
  });
}
