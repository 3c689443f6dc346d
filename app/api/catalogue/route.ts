import { readCatalogue } from '@/lib/server/catalogue/read-catalogue';
import { route } from '@/lib/server/http/route';

/** The inspector of the drawing asks for it; whoever designs on one project may hold another role in the organisation. */
export const GET = route({
  permission: 'loop.see',
  scope: 'organization',
  handle: ({ person }) => readCatalogue(person.organizationId),
});
