import { expect, it } from 'vitest';
import { PUT as saveDraft } from '@/app/api/loops/[loopId]/draft/route';
import { POST as createProject } from '@/app/api/projects/route';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
const projectNamed = (name: string) => ({ name, client: '', building: '', members: [] });

async function send(text: string, headers: Record<string, string> = {}) {
  const { designer } = await makeOrganization(suite.db);
  signInAs(designer);
  const request = new Request('http://127.0.0.1/api/projects', { method: 'POST', headers: { host: '127.0.0.1', ...headers }, body: text });
  const response = await createProject(request, { params: Promise.resolve({}) });
  return { status: response.status, body: await response.json() };
}

it.each(['null', 'https://elsewhere.example', 'http://127.0.0.1:81', 'nonsense'])('refuses a request of the origin %s', async (origin) => {
  const refused = await send(JSON.stringify(projectNamed('Origin')), { origin });
  expect(refused).toMatchObject({ status: 403, body: { code: 'origin-refused' } });
});

it.each(['a\\u0000b', 'a\\ud83d', 'a\\ude00', '\\ud83d\\ud83d\\ude00', '\\\\\\u0000'])(
  'refuses the text "%s", which cannot be stored',
  async (escaped) => {
    const refused = await send(JSON.stringify(projectNamed('#')).replace('#', escaped));
    expect(refused).toMatchObject({ status: 400, body: { code: 'input-invalid' } });
  },
);

it.each(['\\ud83d\\ude00', '😀', '\\\\u0000', '\\u00e9'])('takes the text "%s"', async (escaped) => {
  expect((await send(JSON.stringify(projectNamed('#')).replace('#', escaped))).status).toBe(200);
});

it('names at most a hundred faults of what was sent', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const refused = await call(saveDraft, {
    method: 'PUT',
    params: { loopId },
    body: { baseVersion: 1, drawing: { equipment: Array(5000).fill({}) } },
  });
  expect(refused.status).toBe(400);
  expect(refused.body.fields).toHaveLength(100);
});
