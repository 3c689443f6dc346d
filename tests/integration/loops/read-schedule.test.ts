import { expect, it } from 'vitest';
import { readSchedule } from '@/lib/server/loops/read-schedule';
import type { Role } from '@/lib/api/permissions';
import type { Access } from '@/lib/server/auth/authorize';
import type { Drawing } from '@/lib/network/drawing';
import { withDatabase } from '../../make/database';
import { ladder } from '../../make/drawing';
import { makeMeasuredLoop } from '../../make/measured-loop';
import { makeOrganization, type MadeOrganization, type MadePerson } from '../../make/organization';

const suite = withDatabase();

const accessOf = (person: MadePerson, role: Role, { projectId }: MadeOrganization): Access => ({
  person: {
    ...person,
    organizationName: '',
    email: '',
    isAdministrator: role === 'administrator',
    defaultRole: 'owner',
    theme: 'system',
    units: {},
  },
  roles: [role],
  projectId,
});

const saveDraft = (loopId: string, drawing: Drawing) =>
  suite
    .db('drafts')
    .where({ loop_id: loopId })
    .update({ drawing: JSON.stringify(drawing), version: 2 });

it('a designer and an administrator read the draft, a technician and an owner the revision that was issued', async () => {
  const loop = await makeMeasuredLoop(suite.db);
  await saveDraft(loop.loopId, ladder([0.2, 0.3, 0.25, 0.1]));
  for (const role of ['designer', 'administrator'] as const) {
    const seen = await readSchedule(accessOf(loop[role], role, loop), loop.loopId);
    expect(seen).toMatchObject({ of: { kind: 'draft', version: 2 }, errors: [] });
    expect(seen!.schedule.terminals.map(({ tag }) => tag)).toEqual(['FC-1', 'FC-2', 'FC-3', 'FC-4']);
  }
  for (const role of ['technician', 'owner'] as const) {
    const seen = await readSchedule(accessOf(loop[role], role, loop), loop.loopId);
    expect(seen).toMatchObject({ of: { kind: 'revision', number: 1 } });
    expect(seen!.schedule.terminals.map(({ tag }) => tag)).toEqual(['FC-1', 'FC-2', 'FC-3']);
    expect(seen!.schedule.terminals.every(({ settingTurns, flowLs }) => settingTurns !== null && flowLs !== null)).toBe(true);
  }
});

it('before a revision there is nothing for an owner, and what is drawn for a designer', async () => {
  const organization = await makeOrganization(suite.db, { drawing: ladder([0.2]) });
  const { owner, designer, loopId } = organization;
  expect(await readSchedule(accessOf(owner, 'owner', organization), loopId)).toBeNull();
  expect((await readSchedule(accessOf(designer, 'designer', organization), loopId))!.schedule.terminals).toHaveLength(1);
});

it('a draft with a fault is listed with what keeps it from being solved', async () => {
  const { pipes, ...rest } = ladder([0.2, 0.3]);
  const organization = await makeOrganization(suite.db, { drawing: { ...rest, pipes: pipes.slice(1) } });
  const seen = await readSchedule(accessOf(organization.designer, 'designer', organization), organization.loopId);
  expect(seen!.errors.length).toBeGreaterThan(0);
  expect(seen!.schedule.terminals).toMatchObject([{ tag: 'FC-1', flowLs: null, designFlowLs: 0.2 }, { tag: 'FC-2' }]);
});
