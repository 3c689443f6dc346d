import { usePasswordLinkSchema } from '@/lib/api/people';
import { setPasswordByLink } from '@/lib/server/account/set-password-by-link';
import { publicRoute } from '@/lib/server/http/public-route';

export const POST = publicRoute({ permission: 'public', body: usePasswordLinkSchema, handle: setPasswordByLink });
