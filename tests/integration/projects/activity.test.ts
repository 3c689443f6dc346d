import { beforeAll, expect, it } from 'vitest';
import { v7 as uuidv7 } from 'uuid';
import { GET } from '@/app/api/activity/route';
import { POST as createLoop } from '@/app/api/projects/[projectId]/loops/route';
import { POST as createProject } from '@/app/api/projects/route';
import type { ActivityPage } from '@/lib/api/activity';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let home: MadeOrganization;
let otherProjectId: string;

beforeAll(async () => {
  home = await makeOrganization(suite.db);
  signInAs(home.designer);
  otherProjectId = (await call(createProject, { method: 'POST', body: { name: 'Other', client: '', building: '', members: [] } })).body.id;
  await call(createLoop, { method: 'POST', params: { projectId: home.projectId }, body: { name: 'HTG-2', service: 'hot' } });
});

const page = async (query = '') => (await call(GET, { query })).body as ActivityPage;

it('says who did what, on which project and loop', async () => {
  signInAs(home.technician);
  expect((await page()).rows).toMatchObject([
    { personName: 'designer', verb: 'made the loop', subject: 'HTG-2', projectName: 'Project', loopName: 'HTG-2' },
  ]);
});

it('shows the projects one is on, and an administrator everything', async () => {
  for (const [person, subjects] of [
    [home.technician, ['HTG-2']],
    [home.designer, ['HTG-2', 'Other']],
    [home.administrator, ['HTG-2', 'Other']],
    [home.outsider, []],
  ] as const) {
    signInAs(person);
    expect((await page()).rows.map(({ subject }) => subject)).toEqual(subjects);
  }
});

it('a project that is not theirs is not there to be asked for', async () => {
  signInAs(home.technician);
  expect((await call(GET, { query: `?projectId=${otherProjectId}` })).status).toBe(404);
  signInAs((await makeOrganization(suite.db, { name: 'Another' })).administrator);
  expect((await call(GET, { query: `?projectId=${home.projectId}` })).status).toBe(404);
  expect((await page()).rows).toEqual([]);
});

it('pages into the past without repeating or leaving out a row, even of one moment', async () => {
  const { organizationId, administrator } = await makeOrganization(suite.db, { name: 'Busy' });
  const at = new Date('2026-05-02T10:00:00Z');
  const rows = Array.from({ length: 120 }, (_, i) => ({
    organization_id: organizationId,
    id: uuidv7(),
    person_id: administrator.id,
    person_name: 'administrator',
    verb: 'did',
    subject: String(i),
    at: i < 60 ? at : new Date(at.getTime() + i),
  }));
  await suite.db('activity').insert(rows);
  signInAs(administrator);
  const seen: string[] = [];
  let next: ActivityPage | null = null;
  do {
    next = await page(next ? `?before=${next.rows.at(-1)!.id}` : '');
    seen.push(...next.rows.map(({ subject }) => subject));
  } while (next.hasMore);
  expect(seen).toHaveLength(120);
  expect(new Set(seen).size).toBe(120);
  expect(seen[0]).toBe('119');
});
