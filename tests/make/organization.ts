import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { defaultTolerances } from '@/lib/api/tolerances';
import { emptyDrawing, type Drawing } from '@/lib/network/drawing';

export interface MadePerson {
  organizationId: string;
  id: string;
  name: string;
}

export interface MadeOrganization {
  organizationId: string;
  administrator: MadePerson;
  designer: MadePerson;
  technician: MadePerson;
  owner: MadePerson;
  /** Of the organisation, on no project. */
  outsider: MadePerson;
  projectId: string;
  loopId: string;
}

/** An organisation with a person in every role, one project and one loop with a draft. */
export async function makeOrganization(
  db: Knex,
  { name = 'Test organisation', drawing = emptyDrawing('chilled') }: { name?: string; drawing?: Drawing } = {},
): Promise<MadeOrganization> {
  const organizationId = uuidv7();
  await db('organizations').insert({ organization_id: organizationId, name });
  const person = async (who: string, role: 'designer' | 'technician' | 'owner', isAdministrator = false): Promise<MadePerson> => {
    const id = uuidv7();
    const email = `${who}-${organizationId.slice(-8)}@test.example`;
    await db('people').insert({
      organization_id: organizationId,
      id,
      name: who,
      email,
      is_administrator: isAdministrator,
      default_role: role,
    });
    await db('sign_ins').insert({ email, organization_id: organizationId, person_id: id, password_hash: null });
    return { organizationId, id, name: who };
  };
  const administrator = await person('administrator', 'owner', true);
  const designer = await person('designer', 'designer');
  const technician = await person('technician', 'technician');
  const owner = await person('owner', 'owner');
  const outsider = await person('outsider', 'technician');

  const projectId = uuidv7();
  await db('projects').insert({ organization_id: organizationId, id: projectId, name: 'Project', created_by: designer.id });
  for (const [member, role] of [
    [designer, 'designer'],
    [technician, 'technician'],
    [owner, 'owner'],
  ] as const) {
    await db('project_members').insert({ organization_id: organizationId, project_id: projectId, person_id: member.id, role });
  }
  for (const rule of defaultTolerances) {
    await db('tolerance_rules').insert({
      organization_id: organizationId,
      project_id: projectId,
      station_kind: rule.stationKind,
        rank: rule.rank,
      lower_percent: rule.lowerPercent,
      upper_percent: rule.upperPercent,
      source: rule.source,
    });
  }
  const loopId = uuidv7();
  await db('loops').insert({
    organization_id: organizationId,
    id: loopId,
    project_id: projectId,
    name: 'Loop',
    service: 'chilled',
    created_by: designer.id,
  });
  await db('drafts').insert({
    organization_id: organizationId,
    loop_id: loopId,
    version: 1,
    drawing: JSON.stringify(drawing),
    saved_by: designer.id,
  });
  return { organizationId, administrator, designer, technician, owner, outsider, projectId, loopId };
}
