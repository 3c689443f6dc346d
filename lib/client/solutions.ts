'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import type { SolutionBody } from '@/lib/api/loops';
import { calculatedPart } from '@/lib/network/calculated-part';
import type { Drawing } from '@/lib/network/drawing';
import { send } from './http';

const WAIT_MS = 250;

interface Answer {
  body: SolutionBody;
  /** The drawing it is the answer for. */
  drawing: Drawing;
}

export interface Solution {
  /** The last good answer; null before the first. */
  answer: Answer | null;
  /** The drawing as it last stood still for a moment; the answer is for it, or on its way. */
  settled: Drawing;
  /** The answer is for an earlier drawing. */
  isOld: boolean;
  error: Error | null;
}

/**
 * Has the server solve the drawing as it stands, shortly after each change of what is calculated. A request that a
 * newer change overtakes is aborted; the last answer stays until the next one comes.
 */
export function useSolution(loopId: string, drawing: Drawing): Solution {
  const settled = useSettled(drawing);
  const key = useMemo(() => calculatedPart(settled), [settled]);
  const { data, error, isPlaceholderData, isFetching } = useQuery({
    queryKey: ['solution', loopId, key],
    queryFn: async ({ signal }): Promise<Answer> => ({
      body: await send<SolutionBody>('POST', `/api/loops/${loopId}/solve`, { drawing: settled }, { signal }),
      drawing: settled,
    }),
    placeholderData: keepPreviousData,
    structuralSharing: false,
    staleTime: Infinity,
    gcTime: 60_000,
    retry: 2,
  });
  // With an error there is no placeholder: the last good answer is still what the drawing should show.
  const [lastGood, setLastGood] = useState<Answer | null>(null);
  if (data && data !== lastGood) setLastGood(data);
  return { answer: data ?? lastGood, settled, isOld: isPlaceholderData || isFetching || Boolean(error), error };
}

/** The drawing once it has stood still for a moment. */
function useSettled(drawing: Drawing): Drawing {
  const [settled, setSettled] = useState(drawing);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => {
    timer.current = setTimeout(() => setSettled(drawing), WAIT_MS);
    return () => clearTimeout(timer.current);
  }, [drawing]);
  return settled;
}
