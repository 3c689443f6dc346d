import { route } from '@/lib/server/http/route';
import { resendInvitation } from '@/lib/server/people/resend-invitation';

export const POST = route({
  permission: 'people.manage',
  scope: 'organization',
  handle: ({ params, ...access }) => resendInvitation(access, params.personId!),
});
