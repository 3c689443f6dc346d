import { removeSchema, replaceValveFamilySchema } from '@/lib/api/catalogue';
import { removeValveFamily } from '@/lib/server/catalogue/remove-valve-family';
import { replaceValveFamily } from '@/lib/server/catalogue/replace-valve-family';
import { route } from '@/lib/server/http/route';

export const PUT = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  body: replaceValveFamilySchema,
  handle: ({ params, body, ...access }) => replaceValveFamily(access, params.familyId!, body),
});

export const DELETE = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  body: removeSchema,
  handle: ({ params, body, ...access }) => removeValveFamily(access, params.familyId!, body.version),
});
