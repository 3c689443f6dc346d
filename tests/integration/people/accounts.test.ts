import { expect, it } from 'vitest';
import { POST as changePassword } from '@/app/api/account/password/route';
import { PATCH as changeAccount } from '@/app/api/account/route';
import { PATCH as changePerson } from '@/app/api/people/[personId]/route';
import { GET as listPeople } from '@/app/api/people/route';
import { GET as listProjects } from '@/app/api/projects/route';
import { checkPassword } from '@/lib/server/auth/check-password';
import { hashPassword } from '@/lib/server/auth/passwords';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadePerson } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();

const change = (person: MadePerson, body: object) => call(changePerson, { method: 'PATCH', params: { personId: person.id }, body });

async function givePassword({ organizationId, id }: MadePerson, password: string): Promise<string> {
  const [{ email }] = await suite
    .db('sign_ins')
    .where({ organization_id: organizationId, person_id: id })
    .update({ password_hash: await hashPassword(password) })
    .returning('email');
  return email;
}

it('a changed password ends the sessions that began before, and the new one signs in', async () => {
  const { designer } = await makeOrganization(suite.db);
  const email = await givePassword(designer, 'the old long password');
  const signedInAt = Date.now() - 60_000;
  signInAs(designer, signedInAt);
  const answer = await call(changePassword, {
    method: 'POST',
    body: { currentPassword: 'the old long password', newPassword: 'the new long password' },
  });
  expect(answer.status).toBe(200);

  expect(await call(listProjects)).toMatchObject({ status: 401, body: { code: 'signed-out' } });
  signInAs(designer);
  expect((await call(listProjects)).status).toBe(200);
  expect(await checkPassword({ email, password: 'the old long password' })).toBeNull();
  expect(await checkPassword({ email, password: 'the new long password' })).not.toBeNull();
});

it('a wrong present password changes nothing and says which field', async () => {
  const { designer } = await makeOrganization(suite.db);
  const email = await givePassword(designer, 'the old long password');
  signInAs(designer);
  const answer = await call(changePassword, {
    method: 'POST',
    body: { currentPassword: 'not the password', newPassword: 'the new long password' },
  });
  expect(answer).toMatchObject({ status: 422, body: { code: 'password-wrong', fields: [{ path: 'currentPassword' }] } });
  expect(await checkPassword({ email, password: 'the old long password' })).not.toBeNull();
});

it('after ten wrong passwords even the right one has to wait, and other addresses do not', async () => {
  const { designer, technician } = await makeOrganization(suite.db);
  const email = await givePassword(designer, 'the right long password');
  const other = await givePassword(technician, 'the right long password');
  for (let i = 0; i < 10; i++) expect(await checkPassword({ email, password: `wrong ${i}` })).toBeNull();
  await expect(checkPassword({ email, password: 'the right long password' })).rejects.toMatchObject({ code: 'too-many-tries' });
  expect(await checkPassword({ email: other, password: 'the right long password' })).not.toBeNull();
});

it('a person who is shut out is out at once, with the session they have', async () => {
  const { administrator, designer } = await makeOrganization(suite.db);
  const email = await givePassword(designer, 'the right long password');
  signInAs(administrator);
  expect((await change(designer, { isActive: false })).status).toBe(200);
  signInAs(designer);
  expect((await call(listProjects)).status).toBe(401);
  expect(await checkPassword({ email, password: 'the right long password' })).toBeNull();
});

it('the last active administrator stays one', async () => {
  const { administrator, designer } = await makeOrganization(suite.db);
  signInAs(administrator);
  for (const body of [{ isAdministrator: false }, { isActive: false }]) {
    expect(await change(administrator, body)).toMatchObject({ status: 409, body: { code: 'last-administrator' } });
  }
  const people = (await call(listPeople)).body as { id: string; isAdministrator: boolean; isActive: boolean }[];
  expect(people.find(({ id }) => id === administrator.id)).toMatchObject({ isAdministrator: true, isActive: true });

  expect((await change(designer, { isAdministrator: true })).status).toBe(200);
  expect((await change(administrator, { isAdministrator: false })).status).toBe(200);
});

it('two administrators who take each other out at once leave one', async () => {
  const { administrator, designer, organizationId } = await makeOrganization(suite.db);
  signInAs(administrator);
  await change(designer, { isAdministrator: true });
  const answers = await Promise.all([change(administrator, { isActive: false }), change(designer, { isActive: false })]);
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  expect(
    await suite.db('people').where({ organization_id: organizationId, is_administrator: true, is_active: true }).select('id'),
  ).toHaveLength(1);
});

it('a person of another organisation is not there to be changed or seen', async () => {
  const home = await makeOrganization(suite.db);
  const away = await makeOrganization(suite.db, { name: 'Another' });
  signInAs(away.administrator);
  expect((await change(home.designer, { isActive: false })).status).toBe(404);
  expect(await suite.db('people').where({ id: home.designer.id }).first('is_active')).toEqual({ is_active: true });
  const seen = (await call(listPeople)).body as { id: string }[];
  expect(seen.map(({ id }) => id)).not.toContain(home.designer.id);
});

it('a name, theme and units are kept, and a unit that is none is refused', async () => {
  const { technician } = await makeOrganization(suite.db);
  signInAs(technician);
  const save = (body: object) => call(changeAccount, { method: 'PATCH', body });
  expect((await save({ name: 'Tove Lind', theme: 'dark', units: { flow: 'US gpm' } })).status).toBe(200);
  expect(await save({ units: { flow: 'furlongs' } })).toMatchObject({ status: 400, body: { fields: [{ path: 'units' }] } });
  const row = await suite
    .db('people')
    .where({ organization_id: technician.organizationId, id: technician.id })
    .first('name', 'theme', 'units');
  expect(row).toEqual({ name: 'Tove Lind', theme: 'dark', units: { flow: 'US gpm' } });
});
