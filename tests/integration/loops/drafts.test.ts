import { expect, it } from 'vitest';
import { GET, PUT } from '@/app/api/loops/[loopId]/draft/route';
import { emptyDrawing, type Drawing } from '@/lib/network/drawing';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();

const withTee = (id: string): Drawing => ({
  ...emptyDrawing('chilled'),
  equipment: [{ kind: 'tee', id, tag: id, storeyId: null, x: 0, y: 0, rotation: 0, isMirrored: false }],
});

it('of two people who save the same version one is told, with the drawing of the other, and nothing is overwritten', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const answers = await Promise.all(
    ['T-1', 'T-2', 'T-3', 'T-4'].map((id) =>
      call(PUT, { method: 'PUT', params: { loopId }, body: { baseVersion: 1, drawing: withTee(id) } }),
    ),
  );
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
  const kept = (await call(GET, { params: { loopId } })).body;
  expect(kept.version).toBe(2);
  for (const { status, body } of answers) {
    if (status === 409)
      expect(body).toMatchObject({ code: 'draft-changed', detail: { version: 2, drawing: kept.drawing, savedBy: 'designer' } });
  }
});

it('a save whose answer was lost can be sent again', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const save = () => call(PUT, { method: 'PUT', params: { loopId }, body: { baseVersion: 1, drawing: withTee('T-1') } });
  const first = await save();
  const again = await save();
  expect([first.status, again.status]).toEqual([200, 200]);
  expect(again.body).toEqual(first.body);
});

it('a drawing that is none is refused with the fields at fault, and the draft stays', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const drawing = { ...withTee('T-1'), equipment: [{ kind: 'teapot', id: 'x' }] };
  const refused = await call(PUT, { method: 'PUT', params: { loopId }, body: { baseVersion: 1, drawing } });
  expect(refused.status).toBe(400);
  expect(refused.body.fields[0].path).toBe('drawing.equipment.0.kind');
  expect((await call(GET, { params: { loopId } })).body.version).toBe(1);
});

it('a designer of another organisation is told that there is nothing, and the draft stays', async () => {
  const { loopId } = await makeOrganization(suite.db);
  const stranger = await makeOrganization(suite.db, { name: 'Another' });
  signInAs(stranger.designer);
  expect((await call(GET, { params: { loopId } })).status).toBe(404);
  expect((await call(PUT, { method: 'PUT', params: { loopId }, body: { baseVersion: 1, drawing: withTee('T-1') } })).status).toBe(404);
  expect(await suite.db('drafts').where({ loop_id: loopId }).first('version')).toEqual({ version: 1 });
});
