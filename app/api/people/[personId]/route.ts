import { changePersonSchema } from '@/lib/api/people';
import { route } from '@/lib/server/http/route';
import { changePerson } from '@/lib/server/people/change-person';

export const PATCH = route({
  permission: 'people.manage',
  scope: 'organization',
  body: changePersonSchema,
  handle: ({ params, body, ...access }) => changePerson(access, params.personId!, body),
});
