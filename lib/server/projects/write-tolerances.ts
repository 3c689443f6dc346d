import type { Knex } from 'knex';
import type { ToleranceRule } from '@/lib/api/projects';

/** Sets the tolerance bands of a project, one for each kind of station; a kind that is not named keeps its band. */
export async function writeTolerances(
  trx: Knex.Transaction,
  organizationId: string,
  projectId: string,
  rules: ToleranceRule[],
): Promise<void> {
  for (const { stationKind, lowerPercent, upperPercent, source } of rules) {
    await trx('tolerance_rules')
      .insert({
        organization_id: organizationId,
        project_id: projectId,
        station_kind: stationKind,
        lower_percent: lowerPercent,
        upper_percent: upperPercent,
        source,
      })
      .onConflict(['organization_id', 'project_id', 'station_kind'])
      .merge(['lower_percent', 'upper_percent', 'source']);
  }
}
