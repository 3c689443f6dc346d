'use client';

import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { makePlan } from '@/lib/client/plan';
import { revisionQuery } from '@/lib/client/revisions';
import { siteRecords } from '@/lib/client/site-records';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { bandOf } from '@/lib/api/tolerances';
import type { Commissioning } from '../commissioning-context';

/** What to do next, worked out on this device from all that was read and set, unsent entries included; made anew when any is added. */
export function usePlan({ body, site, loop, revision: aboard, outboxState }: Commissioning) {
  const { data: revision, error: revisionError } = useQuery({
    ...revisionQuery(loop.id, body.revision?.number ?? 0),
    enabled: body.revision !== null && aboard === null,
  });
  const drawing = (aboard ?? revision)?.drawing;
  const document = useMemo(() => (drawing ? drawingToDocument(drawing, loop.name).document : null), [drawing, loop.name]);
  const kept = outboxState.entries;
  const records = useMemo(
    () =>
      siteRecords(
        body,
        site.settingChanges,
        kept.filter(({ loopId }) => loopId === loop.id),
      ),
    [body, site, kept, loop.id],
  );
  const tolerance = toleranceOf(body.tolerances);
  const plan = useQuery({
    queryKey: ['plan', loop.id, body.revision?.number, tolerance, records],
    queryFn: ({ signal }) => makePlan({ document: document!, records, tolerance }, signal),
    enabled: document !== null,
    networkMode: 'always',
    staleTime: Infinity,
    retry: false,
    placeholderData: (before) => before,
  });
  return { ...plan, error: plan.error ?? revisionError, document, tolerance };
}

/** The nearer end of the terminals' band, as a part: to be within it on both sides. */
const toleranceOf = (tolerances: Commissioning['body']['tolerances']): number => {
  const { lowerPercent, upperPercent } = bandOf(tolerances, { kind: 'terminal' });
  return Math.max(0.02, Math.min(-lowerPercent || upperPercent, upperPercent || -lowerPercent) / 100);
};
