import { instrumentSchema } from '@/lib/api/commissioning';
import { route } from '@/lib/server/http/route';
import { changeInstrument } from '@/lib/server/instruments/change-instrument';

export const PATCH = route({
  permission: 'instruments.manage',
  scope: 'organization',
  body: instrumentSchema,
  handle: ({ params, body, ...access }) => changeInstrument(access, params.instrumentId!, body),
});
