import { expect, it } from 'vitest';
import { GET as readDraft } from '@/app/api/loops/[loopId]/draft/route';
import { GET as readLoop } from '@/app/api/loops/[loopId]/route';
import { POST as createLoop } from '@/app/api/projects/[projectId]/loops/route';
import { GET as readProject, PATCH as changeProject } from '@/app/api/projects/[projectId]/route';
import { GET as listProjects, POST as createProject } from '@/app/api/projects/route';
import type { ProjectSummary } from '@/lib/api/projects';
import { emptyDrawing } from '@/lib/network/drawing';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();

const make = (name: string, members: object[] = []) =>
  call(createProject, { method: 'POST', body: { name, client: 'Client', building: 'Mill house', members } });
const makeLoop = (projectId: string, name: string, service = 'hot') =>
  call(createLoop, { method: 'POST', params: { projectId }, body: { name, service } });
const listed = async (query = '') => ((await call(listProjects, { query })).body as ProjectSummary[]).map(({ name }) => name);

it('whoever makes a project is its designer, and it starts with the usual bands and no loop', async () => {
  const { designer, technician } = await makeOrganization(suite.db);
  signInAs(designer);
  const { status, body } = await make('Harbour baths', [{ personId: technician.id, role: 'technician' }]);
  expect(status).toBe(200);
  const project = (await call(readProject, { params: { projectId: body.id } })).body;
  expect(project).toMatchObject({
    name: 'Harbour baths',
    client: 'Client',
    building: 'Mill house',
    roles: ['designer'],
    loops: [],
    band: { lowerPercent: 90, upperPercent: 110 },
  });
  expect(project.members.map(({ name, role }: { name: string; role: string }) => [name, role])).toEqual([
    ['designer', 'designer'],
    ['technician', 'technician'],
  ]);
  expect(project.tolerances).toHaveLength(3);
  expect(project.tolerances.find(({ stationKind }: { stationKind: string }) => stationKind === 'pump')).toMatchObject({
    lowerPercent: 0,
    upperPercent: 10,
  });
});

it('a name that is taken is refused at its field, in one organisation only', async () => {
  const home = await makeOrganization(suite.db);
  signInAs(home.designer);
  expect((await make('Twice')).status).toBe(200);
  expect(await make('Twice')).toMatchObject({ status: 409, body: { code: 'name-taken', fields: [{ path: 'name' }] } });
  signInAs((await makeOrganization(suite.db, { name: 'Another' })).designer);
  expect((await make('Twice')).status).toBe(200);
});

it('a person of another organisation cannot be put on a project', async () => {
  const home = await makeOrganization(suite.db);
  const away = await makeOrganization(suite.db, { name: 'Another' });
  signInAs(home.designer);
  const answer = await make('With a stranger', [{ personId: away.designer.id, role: 'owner' }]);
  expect(answer).toMatchObject({ status: 400, body: { fields: [{ path: 'members.0.personId' }] } });
  expect(await listed()).not.toContain('With a stranger');
});

it('one sees the projects one is on, an administrator all of them, nobody those of another organisation', async () => {
  const home = await makeOrganization(suite.db);
  signInAs(home.designer);
  await make('Second');
  expect(await listed()).toEqual(['Project', 'Second']);
  signInAs(home.technician);
  expect(await listed()).toEqual(['Project']);
  signInAs(home.outsider);
  expect(await listed()).toEqual([]);
  signInAs(home.administrator);
  expect(await listed()).toEqual(['Project', 'Second']);
  signInAs((await makeOrganization(suite.db, { name: 'Another' })).administrator);
  expect(await listed()).toEqual(['Project']);
  expect((await call(readProject, { params: { projectId: home.projectId } })).status).toBe(404);
});

it('a search looks in project, client, building and loop names, and takes its signs as they are', async () => {
  const { designer } = await makeOrganization(suite.db);
  signInAs(designer);
  const { body } = await make('100 % fresh air');
  await makeLoop(body.id, 'HTG_7');
  expect(await listed('?q=FRESH')).toEqual(['100 % fresh air']);
  expect(await listed('?q=mill')).toEqual(['100 % fresh air']);
  expect(await listed('?q=htg_')).toEqual(['100 % fresh air']);
  expect(await listed('?q=htg%25')).toEqual([]);
  expect(await listed('?q=h__')).toEqual([]);
  expect(await listed('?q=%27%20or%201=1%20--')).toEqual([]);
  expect(await listed('?q=fre%00sh')).toEqual(['100 % fresh air']);
});

it('a new loop starts as a draft with an empty drawing of its service', async () => {
  const { designer, projectId } = await makeOrganization(suite.db);
  signInAs(designer);
  const { status, body } = await makeLoop(projectId, 'HTG-2');
  expect(status).toBe(200);
  expect((await call(readLoop, { params: { loopId: body.id } })).body).toMatchObject({
    name: 'HTG-2',
    service: 'hot',
    state: 'draft',
    revision: null,
    strip: [],
  });
  expect((await call(readDraft, { params: { loopId: body.id } })).body).toMatchObject({ version: 1, drawing: emptyDrawing('hot') });
  expect(await makeLoop(projectId, 'HTG-2')).toMatchObject({ status: 409, body: { code: 'name-taken' } });
});

it('an administrator changes bands and members; a designer does not', async () => {
  const { administrator, designer, outsider, projectId } = await makeOrganization(suite.db);
  const rule = { stationKind: 'terminal', rank: 'all', lowerPercent: -5, upperPercent: 15, source: 'Agreed on site' };
  const change = (body: object) => call(changeProject, { method: 'PATCH', params: { projectId }, body });
  signInAs(designer);
  expect((await change({ tolerances: [rule] })).status).toBe(403);
  signInAs(administrator);
  expect((await change({ tolerances: [rule], members: [{ personId: outsider.id, role: 'technician' }] })).status).toBe(200);
  const project = (await call(readProject, { params: { projectId } })).body;
  expect(project.band).toEqual({ lowerPercent: 95, upperPercent: 115 });
  expect(project.tolerances).toContainEqual(rule);
  expect(project.tolerances).toHaveLength(3);
  expect(project.members).toMatchObject([{ personId: outsider.id, role: 'technician' }]);
  signInAs(designer);
  expect((await call(readProject, { params: { projectId } })).status).toBe(404);
});

it('a band that is none is refused and the old one stays', async () => {
  const { administrator, projectId } = await makeOrganization(suite.db);
  signInAs(administrator);
  for (const wrong of [{ lowerPercent: 5 }, { upperPercent: -1 }, { lowerPercent: -100 }, { source: ' ' }, { lowerPercent: null }]) {
    const rule = { stationKind: 'terminal', rank: 'all', lowerPercent: -5, upperPercent: 5, source: 'Agreed', ...wrong };
    expect((await call(changeProject, { method: 'PATCH', params: { projectId }, body: { tolerances: [rule] } })).status).toBe(400);
  }
  expect((await call(readProject, { params: { projectId } })).body.band).toEqual({ lowerPercent: 90, upperPercent: 110 });
});
