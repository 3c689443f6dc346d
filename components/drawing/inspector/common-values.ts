import { same } from '@/lib/network/merge-drawings';

/** What several pieces have in common, field by field; where they differ, null, and the name stands in `mixed`. */
export function commonValues<T extends object>(all: T[]): { values: { [K in keyof T]: T[K] | null }; mixed: Set<keyof T> } {
  const [first, ...others] = all;
  const mixed = new Set<keyof T>();
  const values = { ...first } as { [K in keyof T]: T[K] | null };
  for (const key of Object.keys(first) as (keyof T)[]) {
    if (others.every((other) => same(other[key], first[key]))) continue;
    mixed.add(key);
    values[key] = null;
  }
  return { values, mixed };
}
