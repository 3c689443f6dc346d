import { changeSettingSchema } from '@/lib/api/site';
import { route } from '@/lib/server/http/route';
import { changeSetting } from '@/lib/server/site/change-setting';

export const POST = route({
  permission: 'readings.record',
  scope: 'round',
  body: changeSettingSchema,
  handle: ({ params, body, ...access }) => changeSetting(access, params.roundId!, body),
});
