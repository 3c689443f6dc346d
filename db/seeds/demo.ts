import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import type { Access } from '@/lib/server/auth/authorize';
import { hashPassword } from '@/lib/server/auth/passwords';
import type { Person } from '@/lib/server/auth/person';
import { issueRevision } from '@/lib/server/revisions/issue-revision';
import { defaultTolerances } from '@/lib/api/tolerances';
import signIns from '../demo-sign-ins.json';
import { onConnection } from '../knex';
import { chilledLoop, drawDemo, hotLoop, type DemoLoop } from './demo-drawing';
import { measureDemo, type DemoMeters } from './demo-readings';
import { sizeDemo } from './size-demo';

const organization = 'Quillfeather Estates';

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
    await trx('organizations').insert({ organization_id: organizationId, name: organization });

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
      if (!isAdministrator)
        await trx('project_members').insert({ organization_id: organizationId, project_id: projectId, person_id: ids.get(who), role });
    }
    for (const rule of defaultTolerances) {
      await trx('tolerance_rules').insert({
        organization_id: organizationId,
        project_id: projectId,
        station_kind: rule.stationKind,
        rank: rule.rank,
        lower_percent: rule.lowerPercent,
        upper_percent: rule.upperPercent,
        source: rule.source,
      });
    }
    const person = (who: string, name: string) => ({ organizationId, organizationName: organization, id: ids.get(who)!, name });
    const designer: Access = { person: asPerson(person('mara', 'Mara Ellin'), 'designer'), roles: ['designer'], projectId };
    const technician: Access = { person: asPerson(person('tobin', 'Tobin Ashgrove'), 'technician'), roles: ['technician'], projectId };
    const meters = await addMeters(trx, organizationId);
    await onConnection(trx, async () => {
      for (const [name, loop] of [
        ['CHW-1', chilledLoop],
        ['HTG-1', hotLoop],
      ] as const) {
        const loopId = await addLoop(trx, designer, name, loop);
        await issueRevision(designer, loopId, { draftVersion: 1, note: 'For construction' });
        if (loop === chilledLoop) await measureDemo(trx, technician, loopId, meters);
      }
    });
    return true;
  });
}

const asPerson = (
  person: Pick<Person, 'organizationId' | 'organizationName' | 'id' | 'name'>,
  defaultRole: Person['defaultRole'],
): Person => ({
  ...person,
  email: '',
  isAdministrator: false,
  defaultRole,
  theme: 'system',
  units: {},
});

async function addLoop(trx: Knex.Transaction, { person, projectId }: Access, name: string, loop: DemoLoop): Promise<string> {
  const loopId = uuidv7();
  await trx('loops').insert({
    organization_id: person.organizationId,
    id: loopId,
    project_id: projectId,
    name,
    service: loop.service,
    created_by: person.id,
  });
  await trx('drafts').insert({
    organization_id: person.organizationId,
    loop_id: loopId,
    version: 1,
    drawing: JSON.stringify(sizeDemo(drawDemo(loop))),
    saved_by: person.id,
  });
  return loopId;
}

/** Two meters in date and one that is overdue, so that the warning can be seen. */
async function addMeters(trx: Knex.Transaction, organizationId: string): Promise<DemoMeters> {
  const [pressureId, flowId] = [uuidv7(), uuidv7()];
  const day = (fromToday: number) => new Date(Date.now() + fromToday * 86_400_000).toISOString().slice(0, 10);
  const meter = { organization_id: organizationId, accuracy_absolute: 0 };
  await trx('instruments').insert([
    {
      ...meter,
      id: pressureId,
      name: 'Differential pressure meter',
      kind: 'differential-pressure',
      serial: 'DP-02',
      range_low: 0,
      range_high: 200,
      accuracy_percent: 1,
      accuracy_absolute: 0.1,
      calibrated_on: day(-262),
      calibration_due_on: day(103),
    },
    {
      ...meter,
      id: flowId,
      name: 'Clamp-on ultrasonic meter',
      kind: 'flow',
      serial: 'UF-01',
      range_low: 0.05,
      range_high: 40,
      accuracy_percent: 2,
      calibrated_on: day(-120),
      calibration_due_on: day(245),
    },
    {
      ...meter,
      id: uuidv7(),
      name: 'Differential pressure meter, old',
      kind: 'differential-pressure',
      serial: 'DP-01',
      range_low: 0,
      range_high: 100,
      accuracy_percent: 2,
      accuracy_absolute: 0.2,
      calibrated_on: day(-500),
      calibration_due_on: day(-135),
    },
  ]);
  return { pressureId, flowId };
}
