import { cataloguePumpSchema } from '@/lib/api/catalogue';
import { addPump } from '@/lib/server/catalogue/add-pump';
import { route } from '@/lib/server/http/route';

export const POST = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  body: cataloguePumpSchema,
  handle: ({ body, ...access }) => addPump(access, body),
});
