'use client';

import { useMutation } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import type { DraftBody } from '@/lib/api/loops';
import type { GenerateLoop } from '@/lib/api/generate';
import { RequestError } from '@/lib/client/http';
import { generateLoop } from '@/lib/client/schedule-import';

/** What is drawn already, as far as this page knows. */
export interface DrawnAlready {
  version: number;
  pieces: number;
  /** Who saved after this page was opened. */
  savedBy: string | null;
}

type Asked = Omit<GenerateLoop, 'baseVersion' | 'replacesDrawing'>;

/** Generates the loop; asks before anything that is drawn is replaced, and again where somebody saved in the meantime. */
export function useGenerate(loopId: string, drawn: DrawnAlready) {
  const [known, setKnown] = useState(drawn);
  const [waiting, setWaiting] = useState<Asked | null>(null);
  const stop = useRef<AbortController>(null);
  const mutation = useMutation({
    mutationFn: ({ asked, replacesDrawing }: { asked: Asked; replacesDrawing: boolean }) => {
      stop.current = new AbortController();
      return generateLoop(loopId, { ...asked, baseVersion: known.version, replacesDrawing }, stop.current.signal);
    },
    onError: (error, { asked }) => {
      if (!(error instanceof RequestError)) return;
      if (error.code === 'draft-changed') {
        const { version, drawing, savedBy } = error.problem!.detail as DraftBody;
        setKnown({ version, pieces: drawing.equipment.length, savedBy });
        setWaiting(asked);
      }
      if (error.code === 'drawing-not-empty') setWaiting(asked);
    },
  });
  const isAsking = waiting !== null;
  const isKnownRefusal = isAsking && mutation.error instanceof RequestError;

  return {
    known,
    isAsking,
    isPending: mutation.isPending,
    result: mutation.data ?? null,
    /** Null while the refusal is what the person is being asked about, or the work was stopped. */
    error: isKnownRefusal || isAbort(mutation.error) ? null : mutation.error,
    elapsedS: useElapsed(mutation.isPending),
    generate(asked: Asked) {
      if (known.pieces > 0) setWaiting(asked);
      else mutation.mutate({ asked, replacesDrawing: false });
    },
    replace() {
      if (waiting) mutation.mutate({ asked: waiting, replacesDrawing: true });
      setWaiting(null);
    },
    keepDrawing() {
      setWaiting(null);
      mutation.reset();
    },
    cancel: () => stop.current?.abort(),
  };
}

const isAbort = (error: unknown): boolean => error instanceof DOMException && error.name === 'AbortError';

/** Seconds since it began. */
function useElapsed(isRunning: boolean): number {
  const [seconds, setSeconds] = useState(0);
  useEffect(() => {
    if (!isRunning) return;
    const startedAt = performance.now();
    const timer = setInterval(() => setSeconds(Math.floor((performance.now() - startedAt) / 1000)), 500);
    return () => {
      clearInterval(timer);
      setSeconds(0);
    };
  }, [isRunning]);
  return seconds;
}
