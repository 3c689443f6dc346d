import type { Knex } from 'knex';
import * as people from './migrations/0001_people';
import * as projectsAndLoops from './migrations/0002_projects_and_loops';
import * as commissioning from './migrations/0003_commissioning';
import * as reportAndActivity from './migrations/0004_report_and_activity';
import * as catalogue from './migrations/0005_catalogue';
import * as presence from './migrations/0006_presence';
import * as site from './migrations/0007_site';

const migrations: Record<string, Knex.Migration> = {
  '0001_people': people,
  '0002_projects_and_loops': projectsAndLoops,
  '0003_commissioning': commissioning,
  '0004_report_and_activity': reportAndActivity,
  '0005_catalogue': catalogue,
  '0006_presence': presence,
  '0007_site': site,
};

/** The migrations by name, oldest first. Named here and not found in a folder, so that every loader of TypeScript reads them alike. */
export const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: async () => Object.keys(migrations).sort(),
  getMigrationName: (name) => name,
  getMigration: async (name) => migrations[name]!,
};
