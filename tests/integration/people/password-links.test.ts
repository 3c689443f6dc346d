import { expect, it, vi } from 'vitest';
import { POST as useLink } from '@/app/api/account/password-link/route';
import { POST as askForReset } from '@/app/api/account/reset/route';
import { POST as resend } from '@/app/api/people/[personId]/invitation/route';
import { GET as listPeople, POST as invite } from '@/app/api/people/route';
import { checkPassword } from '@/lib/server/auth/check-password';
import { hashPassword } from '@/lib/server/auth/passwords';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { withMail } from '../../make/mail';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
const mail = withMail();

const newPassword = 'a long enough password';
const follow = (token: string | null, password = newPassword) => call(useLink, { method: 'POST', body: { token, newPassword: password } });

async function invitePerson(email: string) {
  const organization = await makeOrganization(suite.db);
  signInAs(organization.administrator);
  const answer = await call(invite, {
    method: 'POST',
    body: { name: 'Nia Brook', email, isAdministrator: false, defaultRole: 'technician' },
  });
  expect(answer.status).toBe(200);
  return { ...organization, invitedId: answer.body.id as string };
}

async function personWithPassword() {
  const { organizationId, designer } = await makeOrganization(suite.db);
  const password_hash = await hashPassword('the old long password');
  const [{ email }] = await suite
    .db('sign_ins')
    .where({ organization_id: organizationId, person_id: designer.id })
    .update({ password_hash })
    .returning('email');
  return { organizationId, designer, email: email as string };
}

it('an invited person sets a password with the link, once, and can sign in', async () => {
  await invitePerson('nia-1@test.example');
  expect(await checkPassword({ email: 'nia-1@test.example', password: newPassword })).toBeNull();
  const token = mail.tokenTo('nia-1@test.example');
  expect(await follow(token)).toMatchObject({ status: 200, body: { email: 'nia-1@test.example' } });
  expect(await checkPassword({ email: 'NIA-1@test.example ', password: newPassword })).toMatchObject({ name: 'Nia Brook' });

  expect(await follow(token, 'another long password')).toMatchObject({ status: 410, body: { code: 'link-used' } });
  expect(await checkPassword({ email: 'nia-1@test.example', password: 'another long password' })).toBeNull();
});

it('of several who follow one link at once, one sets the password', async () => {
  await invitePerson('nia-2@test.example');
  const token = mail.tokenTo('nia-2@test.example');
  const answers = await Promise.all([1, 2, 3, 4].map((n) => follow(token, `long password number ${n}`)));
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 410, 410, 410]);
  const fits = await Promise.all(
    [1, 2, 3, 4].map((n) => checkPassword({ email: 'nia-2@test.example', password: `long password number ${n}` })),
  );
  expect(fits.map(Boolean)).toEqual(answers.map(({ status }) => status === 200));
});

it('the table keeps no token that could be followed', async () => {
  await invitePerson('nia-3@test.example');
  const rows = await suite.db('password_links').select('token_sha256');
  expect(JSON.stringify(rows)).not.toContain(mail.tokenTo('nia-3@test.example'));
});

it('an invitation sent again replaces the first, and an invited person who is here needs none', async () => {
  const { invitedId } = await invitePerson('nia-4@test.example');
  const first = mail.tokenTo('nia-4@test.example');
  expect((await call(resend, { method: 'POST', params: { personId: invitedId } })).status).toBe(200);
  expect((await follow(first)).status).toBe(410);
  expect((await follow(mail.tokenTo('nia-4@test.example'))).status).toBe(200);
  expect((await call(resend, { method: 'POST', params: { personId: invitedId } })).body.code).toBe('link-used');
});

it('a letter that cannot be sent undoes the invitation', async () => {
  const { administrator } = await makeOrganization(suite.db);
  signInAs(administrator);
  const url = process.env.SMTP_URL;
  process.env.SMTP_URL = 'smtp://127.0.0.1:1';
  const answer = await call(invite, {
    method: 'POST',
    body: { name: 'Nia', email: 'nia-5@test.example', isAdministrator: false, defaultRole: 'owner' },
  });
  process.env.SMTP_URL = url;
  expect(answer.status).toBe(500);
  expect((await call(listPeople)).body.map(({ email }: { email: string }) => email)).not.toContain('nia-5@test.example');
});

it('an address that signs in already cannot be invited', async () => {
  await invitePerson('nia-6@test.example');
  const again = await call(invite, {
    method: 'POST',
    body: { name: 'Nia', email: 'Nia-6@test.example', isAdministrator: false, defaultRole: 'owner' },
  });
  expect(again).toMatchObject({ status: 409, body: { code: 'email-taken', fields: [{ path: 'email' }] } });
});

it('asking for a reset answers the same for every address, and sends a letter only to one that signs in', async () => {
  const { email } = await personWithPassword();
  const known = await call(askForReset, { method: 'POST', body: { email } });
  const unknown = await call(askForReset, { method: 'POST', body: { email: 'nobody@test.example' } });
  expect(known).toMatchObject({ status: 200, body: {} });
  expect({ status: unknown.status, body: unknown.body }).toEqual({ status: known.status, body: known.body });
  await vi.waitFor(() => expect(mail.lettersTo(email)).toHaveLength(1));
  expect(mail.lettersTo('nobody@test.example')).toHaveLength(0);

  expect((await follow(mail.tokenTo(email))).status).toBe(200);
  expect(await checkPassword({ email, password: 'the old long password' })).toBeNull();
  expect(await checkPassword({ email, password: newPassword })).not.toBeNull();
});

it('asking again and again for one address is stopped', async () => {
  const ask = () => call(askForReset, { method: 'POST', body: { email: 'often@test.example' } });
  for (let i = 0; i < 5; i++) expect((await ask()).status).toBe(200);
  expect(await ask()).toMatchObject({ status: 429, body: { code: 'too-many-tries' } });
});

it('a reset runs out after an hour', async () => {
  const { organizationId, email } = await personWithPassword();
  await call(askForReset, { method: 'POST', body: { email } });
  await vi.waitFor(() => expect(mail.lettersTo(email)).toHaveLength(1));
  const { expires_at } = await suite.db('password_links').where({ organization_id: organizationId }).first('expires_at');
  expect(Math.abs(expires_at.getTime() - Date.now() - 3_600_000)).toBeLessThan(60_000);

  await suite
    .db('password_links')
    .where({ organization_id: organizationId })
    .update({ expires_at: new Date(Date.now() - 1000) });
  expect((await follow(mail.tokenTo(email))).body.code).toBe('link-used');
  expect(await checkPassword({ email, password: 'the old long password' })).not.toBeNull();
});

it('a link of a person who was shut out since does not work', async () => {
  const { organizationId, designer, email } = await personWithPassword();
  await call(askForReset, { method: 'POST', body: { email } });
  await vi.waitFor(() => expect(mail.lettersTo(email)).toHaveLength(1));
  await suite.db('people').where({ organization_id: organizationId, id: designer.id }).update({ is_active: false });
  expect((await follow(mail.tokenTo(email))).status).toBe(410);
});

it('a page of another site cannot follow a link', async () => {
  const request = new Request('http://127.0.0.1/api/account/password-link', {
    method: 'POST',
    headers: { host: '127.0.0.1', origin: 'https://elsewhere.example' },
    body: '{}',
  });
  expect((await useLink(request)).status).toBe(403);
});
