import { valveFamilySchema } from '@/lib/api/catalogue';
import { addValveFamily } from '@/lib/server/catalogue/add-valve-family';
import { route } from '@/lib/server/http/route';

export const POST = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  body: valveFamilySchema,
  handle: ({ body, ...access }) => addValveFamily(access, body),
});
