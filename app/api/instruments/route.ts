import { instrumentSchema } from '@/lib/api/commissioning';
import { route } from '@/lib/server/http/route';
import { addInstrument } from '@/lib/server/instruments/add-instrument';
import { listInstruments } from '@/lib/server/instruments/list-instruments';

export const GET = route({
  permission: 'instruments.see',
  scope: 'organization',
  handle: ({ person }) => listInstruments(person.organizationId),
});

export const POST = route({
  permission: 'instruments.manage',
  scope: 'organization',
  body: instrumentSchema,
  handle: ({ body, ...access }) => addInstrument(access, body),
});
