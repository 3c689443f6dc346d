import { db } from '@/db/knex';
import type { LoopSummary, ProjectSummary } from '@/lib/api/projects';
import type { ProjectRole, Role } from '@/lib/api/permissions';
import type { Person } from '../auth/person';
import { bandOf, stripsOf } from '../loops/loop-strips';

/** The projects that a person is on (an administrator: all), each with its loops; `search` looks in the names of projects, clients, buildings and loops. */
export async function listProjects(person: Person, search = ''): Promise<ProjectSummary[]> {
  // An address can hold a NUL, which PostgreSQL takes in no text.
  const rows = await projectRows(person, search.replaceAll('\0', '').trim());
  const projectIds = rows.map(({ id }) => id);
  const [loops, bands] = await Promise.all([loopsOf(person.organizationId, projectIds), bandsOf(person.organizationId, projectIds)]);
  return rows.map(({ held, ...project }) => ({
    ...project,
    roles: [...held, ...(person.isAdministrator ? (['administrator'] satisfies Role[]) : [])],
    loops: loops.get(project.id) ?? [],
    band: bandOf(bands.get(project.id) ?? []),
  }));
}

interface ProjectRow {
  id: string;
  name: string;
  client: string;
  building: string;
  held: ProjectRole[];
}

function projectRows(person: Person, search: string): Promise<ProjectRow[]> {
  const { organizationId } = person;
  const held = db()('project_members')
    .where({ organization_id: organizationId, person_id: person.id })
    .whereRaw('project_id = projects.id')
    .select(db().raw('coalesce(array_agg(role order by role), array[]::text[])'))
    .as('held');
  return db()('projects')
    .where('projects.organization_id', organizationId)
    .modify((query) => {
      if (!person.isAdministrator) {
        query.whereExists(
          db()('project_members')
            .where({ organization_id: organizationId, person_id: person.id })
            .whereRaw('project_id = projects.id')
            .select('role'),
        );
      }
      if (!search) return;
      const like = `%${search.replace(/[\\%_]/g, '\\$&')}%`;
      const loopsNamed = db()('loops')
        .where('organization_id', organizationId)
        .whereRaw('project_id = projects.id')
        .whereILike('loops.name', like)
        .select('loops.id');
      query.where((any) =>
        any
          .whereILike('projects.name', like)
          .orWhereILike('projects.client', like)
          .orWhereILike('projects.building', like)
          .orWhereExists(loopsNamed),
      );
    })
    .orderBy(['projects.name', 'projects.id'])
    .select('projects.id', 'projects.name', 'projects.client', 'projects.building', held);
}

/** The loops of projects, each with its strip, by project. */
export async function loopsOf(organizationId: string, projectIds: string[]): Promise<Map<string, LoopSummary[]>> {
  const rows = await db()('loops')
    .where({ organization_id: organizationId })
    .whereIn('project_id', projectIds)
    .orderBy(['name', 'id'])
    .select('id', 'project_id', 'name', 'service', 'state');
  const strips = await stripsOf(
    organizationId,
    rows.map(({ id }) => id),
  );
  return grouped(
    rows,
    ({ project_id }) => project_id,
    ({ id, name, service, state }) => {
      const strip = strips.get(id);
      return { id, name, service, state, revisionNumber: strip?.revisionNumber ?? null, strip: strip?.ticks ?? [] };
    },
  );
}

async function bandsOf(organizationId: string, projectIds: string[]) {
  const rows = await db()('tolerance_rules')
    .where({ organization_id: organizationId, station_kind: 'terminal' })
    .whereIn('project_id', projectIds)
    .select({
      projectId: 'project_id',
      stationKind: 'station_kind',
      rank: 'rank',
      lowerPercent: 'lower_percent',
      upperPercent: 'upper_percent',
      source: 'source',
    });
  return grouped(
    rows,
    ({ projectId }) => projectId,
    (rule) => rule,
  );
}

function grouped<Row, Value>(rows: Row[], keyOf: (row: Row) => string, valueOf: (row: Row) => Value): Map<string, Value[]> {
  const groups = new Map<string, Value[]>();
  for (const row of rows) groups.set(keyOf(row), [...(groups.get(keyOf(row)) ?? []), valueOf(row)]);
  return groups;
}
