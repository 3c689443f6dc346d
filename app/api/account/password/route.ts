import { changePasswordSchema } from '@/lib/api/people';
import { changePassword } from '@/lib/server/account/change-password';
import { route } from '@/lib/server/http/route';

export const POST = route({
  permission: 'account.own',
  scope: 'organization',
  body: changePasswordSchema,
  handle: ({ body, ...access }) => changePassword(access, body),
});
