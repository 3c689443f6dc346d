'use client';

import { useSyncExternalStore } from 'react';

const never = () => () => undefined;
let loadedAt: Date | null = null;

/** When this page was first looked at; null while it is made on the server, whose clock is not the reader's. */
export const useNow = (): Date | null =>
  useSyncExternalStore(
    never,
    () => (loadedAt ??= new Date()),
    () => null,
  );
