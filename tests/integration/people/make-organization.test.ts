import { expect, it } from 'vitest';
import { makeOrganization } from '@/lib/server/people/make-organization';
import { withDatabase } from '../../make/database';

const suite = withDatabase();
process.env.PUBLIC_URL = 'http://127.0.0.1:1';

it('a new organisation has one administrator, who gets a link to set a password', async () => {
  const link = await makeOrganization({ organization: 'Heron Works', name: 'Una Fell', email: 'una@heron.example' });
  expect(link).toMatch(/^http:\/\/127\.0\.0\.1:1\/password\?token=.{40,}$/);
  expect(await suite.db('people').select('name', 'is_administrator')).toEqual([{ name: 'Una Fell', is_administrator: true }]);
});

it('an address that is in use makes nothing', async () => {
  await expect(makeOrganization({ organization: 'Second', name: 'Una Fell', email: 'una@heron.example' })).rejects.toThrow(
    'in use already',
  );
  expect(await suite.db('organizations').select('name')).toEqual([{ name: 'Heron Works' }]);
});
