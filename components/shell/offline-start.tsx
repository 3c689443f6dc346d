'use client';

import { useEffect } from 'react';

/** Lets the browser open Evenhead without a network once something was taken along. The development server's parts change names, so not there. */
export function OfflineStart() {
  useEffect(() => {
    if (process.env.NODE_ENV !== 'production' || !('serviceWorker' in navigator)) return;
    // A browser that refuses (a private window) works on with a network; "Take along" says so when it is pressed.
    navigator.serviceWorker.register('/service-worker.js').catch(() => undefined);
  }, []);
  return null;
}
