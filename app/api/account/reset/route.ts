import { askForResetSchema } from '@/lib/api/people';
import { askForReset } from '@/lib/server/account/ask-for-reset';
import { publicRoute } from '@/lib/server/http/public-route';

export const POST = publicRoute({ permission: 'public', body: askForResetSchema, handle: askForReset });
