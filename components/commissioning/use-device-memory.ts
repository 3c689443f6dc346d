'use client';

import { useCallback, useMemo, useSyncExternalStore } from 'react';
import type { z } from 'zod';

/** What this page has written; it also serves where the browser keeps nothing (private windows, a full disk). */
const written = new Map<string, string | null>();
const listeners = new Set<() => void>();

const subscribe = (listener: () => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

const read = (key: string): string | null => (written.has(key) ? written.get(key)! : localStorage.getItem(key));

function write(key: string, text: string | null): void {
  written.set(key, text);
  try {
    if (text === null) localStorage.removeItem(key);
    else localStorage.setItem(key, text);
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
  for (const listener of listeners) listener();
}

/** A value that this device remembers for one person, through a closed tab; null forgets it. */
export function useDeviceMemory<Value>(key: string, schema: z.ZodType<Value>, fallback: Value): [Value, (value: Value | null) => void] {
  const text = useSyncExternalStore(
    subscribe,
    () => read(key),
    () => null,
  );
  const value = useMemo(() => {
    if (text === null) return fallback;
    try {
      return schema.safeParse(JSON.parse(text)).data ?? fallback;
    } catch (error) {
      if (error instanceof SyntaxError) return fallback;
      throw error;
    }
  }, [text, schema, fallback]);
  const remember = useCallback((next: Value | null) => write(key, next === null ? null : JSON.stringify(next)), [key]);
  return [value, remember];
}
