import type { Knex } from 'knex';
import type { ToleranceRule } from '@/lib/api/projects';

/** Sets the tolerance bands of a project. A kind that is not named keeps its band; a rank that is not named has none of its own any more. */
export async function writeTolerances(
  trx: Knex.Transaction,
  organizationId: string,
  projectId: string,
  rules: ToleranceRule[],
): Promise<void> {
  const named = rules.map(({ stationKind, rank }) => [stationKind, rank]);
  await trx('tolerance_rules')
    .where({ organization_id: organizationId, project_id: projectId })
    .whereNot({ rank: 'all' })
    .whereNotIn(['station_kind', 'rank'], named)
    .delete();
  for (const { stationKind, rank, lowerPercent, upperPercent, source } of rules) {
    await trx('tolerance_rules')
      .insert({
        organization_id: organizationId,
        project_id: projectId,
        station_kind: stationKind,
        rank,
        lower_percent: lowerPercent,
        upper_percent: upperPercent,
        source,
      })
      .onConflict(['organization_id', 'project_id', 'station_kind', 'rank'])
      .merge(['lower_percent', 'upper_percent', 'source']);
  }
}
