import { expect, it } from 'vitest';
import { POST } from '@/app/api/loops/[loopId]/draft/presence/route';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();

const beat = (loopId: string) => call(POST, { method: 'POST', params: { loopId } });

it('a second designer in the same draft is named to the first, until their page has been silent for a while', async () => {
  const { organizationId, projectId, designer, outsider: secondDesigner, loopId } = await makeOrganization(suite.db);
  await suite
    .db('project_members')
    .insert({ organization_id: organizationId, project_id: projectId, person_id: secondDesigner.id, role: 'designer' });
  signInAs(designer);
  expect((await beat(loopId)).body).toEqual({ others: [] });
  signInAs(secondDesigner);
  expect((await beat(loopId)).body).toEqual({ others: [{ id: designer.id, name: designer.name }] });
  signInAs(designer);
  expect((await beat(loopId)).body.others).toMatchObject([{ id: secondDesigner.id }]);
  await suite
    .db('draft_presence')
    .where({ person_id: secondDesigner.id })
    .update({ seen_at: suite.db.raw("now() - interval '46 seconds'") });
  expect((await beat(loopId)).body).toEqual({ others: [] });
  expect(await suite.db('draft_presence').where({ loop_id: loopId }).select('person_id')).toHaveLength(2);
});

it('nobody of another organisation is told, or noted', async () => {
  const { loopId } = await makeOrganization(suite.db);
  const stranger = await makeOrganization(suite.db, { name: 'Another' });
  signInAs(stranger.designer);
  expect((await beat(loopId)).status).toBe(404);
  expect(await suite.db('draft_presence').where({ loop_id: loopId }).select('person_id')).toEqual([]);
});
