'use client';

import { useEffect, useRef } from 'react';
import type { CommissioningBody } from '@/lib/api/commissioning';
import type { SiteBody } from '@/lib/api/site';
import { renewAboard } from '@/lib/client/aboard';

/** Whatever the server says of a loop that is aboard goes aboard too, so that what was sent is still there without signal. */
export function useRenewAboard(personId: string, loopId: string, body: CommissioningBody, site: SiteBody): void {
  const known = useRef({ body, site });
  useEffect(() => {
    if (known.current.body === body && known.current.site === site) return;
    known.current = { body, site };
    renewAboard(personId, loopId, { body, site }).catch((error: unknown) => {
      // No room, or a browser that keeps nothing: what was aboard stays as it was, and says how old it is.
      if (!(error instanceof DOMException)) throw error;
    });
  }, [personId, loopId, body, site]);
}
