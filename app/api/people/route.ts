import { invitePersonSchema } from '@/lib/api/people';
import { route } from '@/lib/server/http/route';
import { invitePerson } from '@/lib/server/people/invite-person';
import { listPeople } from '@/lib/server/people/list-people';

export const GET = route({
  permission: 'people.see',
  scope: 'organization',
  handle: ({ person }) => listPeople(person.organizationId),
});

export const POST = route({
  permission: 'people.manage',
  scope: 'organization',
  body: invitePersonSchema,
  handle: ({ body, ...access }) => invitePerson(access, body),
});
