import { changeAccountSchema } from '@/lib/api/people';
import { changeAccount } from '@/lib/server/account/change-account';
import { route } from '@/lib/server/http/route';

export const PATCH = route({
  permission: 'account.own',
  scope: 'organization',
  body: changeAccountSchema,
  handle: ({ person, body }) => changeAccount(person, body),
});
