'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import type { SolutionBody } from '@/lib/api/loops';
import { calculatedPart } from '@/lib/network/calculated-part';
import type { Drawing } from '@/lib/network/drawing';
import { send } from './http';

const WAIT_MS = 250;

export interface Solution {
  body: SolutionBody | null;
  /** The figures are those of an earlier drawing; new ones are on their way. */
  isOld: boolean;
  error: Error | null;
  solveAgain: () => void;
}

/**
 * Has the server solve the drawing as it stands, shortly after each change of what is calculated. A request that a
 * newer change overtakes is aborted; the last answer stays until the next one comes.
 */
export function useSolution(loopId: string, drawing: Drawing): Solution {
  const settled = useSettled(drawing);
  const key = calculatedPart(settled);
  const { data, error, isPlaceholderData, isFetching, refetch } = useQuery({
    queryKey: ['solution', loopId, key],
    queryFn: ({ signal }) => send<SolutionBody>('POST', `/api/loops/${loopId}/solve`, { drawing: settled }, signal),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
    retry: 2,
  });
  const isOld = isPlaceholderData || isFetching || settled !== drawing;
  // With an error there is no placeholder: the last good answer is still what the drawing should show.
  const [lastGood, setLastGood] = useState<SolutionBody | null>(null);
  if (data && data !== lastGood) setLastGood(data);
  return { body: data ?? lastGood, isOld: isOld || Boolean(error), error, solveAgain: () => void refetch() };
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
