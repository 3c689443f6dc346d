import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { hashPassword } from '@/lib/server/auth/passwords';
import { defaultTolerances } from '@/lib/api/tolerances';
import signIns from '../demo-sign-ins.json';
import { chilledLoop, drawDemo, hotLoop } from './demo-drawing';
import { sizeDemo } from './size-demo';

const people = [
  { who: 'owen', name: 'Owen Pasko', isAdministrator: true, role: 'owner' },
  { who: 'mara', name: 'Mara Ellin', isAdministrator: false, role: 'designer' },
  { who: 'tobin', name: 'Tobin Ashgrove', isAdministrator: false, role: 'technician' },
  { who: 'ingrid', name: 'Ingrid Vale', isAdministrator: false, role: 'owner' },
] as const;

/** Loads the demo into an empty database: invented people, building and readings. Answers false where anything is there already. */
export async function loadDemo(knex: Knex): Promise<boolean> {
  return knex.transaction(async (trx) => {
    if (await trx('organizations').first('organization_id')) return false;
    const organizationId = uuidv7();
    await trx('organizations').insert({ organization_id: organizationId, name: 'Quillfeather Estates' });

    const ids = new Map<string, string>();
    for (const person of people) {
      const signIn = signIns.find(({ email }) => email.startsWith(`${person.who}@`));
      if (!signIn) throw new Error(`db/demo-sign-ins.json has no sign-in for ${person.who}`);
      const id = uuidv7();
      ids.set(person.who, id);
      await trx('people').insert({
        organization_id: organizationId,
        id,
        name: person.name,
        email: signIn.email,
        is_administrator: person.isAdministrator,
        default_role: person.role,
      });
      await trx('sign_ins').insert({
        email: signIn.email,
        organization_id: organizationId,
        person_id: id,
        password_hash: await hashPassword(signIn.password),
      });
    }

    const projectId = uuidv7();
    const mara = ids.get('mara')!;
    await trx('projects').insert({
      organization_id: organizationId,
      id: projectId,
      name: 'Tamarind Quay Library',
      client: 'Quillfeather Estates',
      building: 'Library and reading rooms, three storeys',
      created_by: mara,
    });
    for (const { who, role, isAdministrator } of people) {
      if (!isAdministrator) await trx('project_members').insert({ organization_id: organizationId, project_id: projectId, person_id: ids.get(who), role });
    }
    for (const rule of defaultTolerances) {
      await trx('tolerance_rules').insert({
        organization_id: organizationId,
        project_id: projectId,
        station_kind: rule.stationKind,
        lower_percent: rule.lowerPercent,
        upper_percent: rule.upperPercent,
        source: rule.source,
      });
    }
    for (const [name, loop] of [['CHW-1', chilledLoop], ['HTG-1', hotLoop]] as const) {
      const loopId = uuidv7();
      await trx('loops').insert({ organization_id: organizationId, id: loopId, project_id: projectId, name, service: loop.service, created_by: mara });
      await trx('drafts').insert({
        organization_id: organizationId,
        loop_id: loopId,
        version: 1,
        drawing: JSON.stringify(sizeDemo(drawDemo(loop))),
        saved_by: mara,
      });
    }
    return true;
  });
}
