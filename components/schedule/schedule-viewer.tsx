'use client';

import { useState } from 'react';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { Schedule } from '@/lib/network/schedule-rows';
import { noValveOffer } from '@/lib/network/schedule-valve-offer';
import type { ScheduleDesk } from './desk';
import { ScheduleTables } from './schedule-tables';

interface ScheduleViewerProps {
  schedule: Schedule;
  title: string;
  personId: string;
  drawingHref: string;
  bands: { terminal: StripBand; branch: StripBand };
}

const context = { valves: noValveOffer };

/** The tables to be read, filtered and exported, and not changed. */
export function ScheduleViewer(props: ScheduleViewerProps) {
  const [selected, setSelected] = useState<Record<'equipment' | 'pipes', ReadonlySet<string>>>({ equipment: new Set(), pipes: new Set() });
  const desk: ScheduleDesk = {
    ...props,
    context,
    isOld: false,
    selection: { ...selected, select: (of, ids) => setSelected((before) => ({ ...before, [of]: ids })) },
    edit: null,
  };
  return <ScheduleTables desk={desk} />;
}
