import { z } from 'zod';

/** Which columns of a table a person sees, and in what order. */
export interface TableLayout {
  order: string[];
  hidden: string[];
}

const layoutSchema = z.object({ order: z.array(z.string()).max(100), hidden: z.array(z.string()).max(100) });

const keyOf = (personId: string, table: string) => `evenhead.schedule.${personId}.${table}`;
const listeners = new Set<() => void>();

/** What this browser remembers of a table for a person, as it is stored; compare it by its text. */
export const storedLayout = (personId: string, table: string): string | null => window.localStorage.getItem(keyOf(personId, table));

/** Null for what is missing or was written by another edition. */
export function readLayout(stored: string | null): TableLayout | null {
  if (stored === null) return null;
  try {
    return layoutSchema.safeParse(JSON.parse(stored)).data ?? null;
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
}

/** Null goes back to the usual columns. */
export function rememberLayout(personId: string, table: string, layout: TableLayout | null): void {
  if (layout === null) window.localStorage.removeItem(keyOf(personId, table));
  else window.localStorage.setItem(keyOf(personId, table), JSON.stringify(layout));
  for (const listener of listeners) listener();
}

export function onLayoutChange(listener: () => void): () => void {
  listeners.add(listener);
  window.addEventListener('storage', listener);
  return () => {
    listeners.delete(listener);
    window.removeEventListener('storage', listener);
  };
}
