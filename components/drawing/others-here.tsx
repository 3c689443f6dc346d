'use client';

import { useQuery } from '@tanstack/react-query';
import { presenceQuery } from '@/lib/client/presence';

/** Who else has this draft open. Without an answer nothing is said: the line of the saving tells of a lost connection. */
export function OthersHere({ loopId }: { loopId: string }) {
  const { data, isError } = useQuery(presenceQuery(loopId));
  const others = isError ? [] : (data?.others ?? []);
  return (
    <span role="status" className="text-brass flex items-center gap-1.5 text-sm empty:hidden">
      {others.length > 0 && (
        <>
          <span aria-hidden className="bg-brass size-2 shrink-0 rounded-full" />
          <span className="max-sm:sr-only">{namesOf(others.map(({ name }) => name))} also drawing here</span>
        </>
      )}
    </span>
  );
}

function namesOf(names: string[]): string {
  if (names.length === 1) return `${names[0]} is`;
  if (names.length === 2) return `${names[0]} and ${names[1]} are`;
  return `${names[0]} and ${names.length - 1} others are`;
}
