'use client';

import { v7 as uuidv7 } from 'uuid';
import type { Station } from '@/lib/api/commissioning';
import { clockOffsetMs } from '@/lib/client/server-clock';
import type { Commissioning } from '../commissioning-context';

/** Writes down on this device that a valve (turns) or pump (speed, part of full) was set, and sends it when there is signal. */
export function useRecordSetting({ outbox, round, loop }: Commissioning) {
  return async (station: Station, before: number | null, after: number, note = ''): Promise<void> => {
    if (!round) return;
    await outbox.keep(loop.id, station.tag, {
      kind: 'setting',
      roundId: round.id,
      body: {
        id: uuidv7(),
        stationId: station.id,
        before,
        after,
        changedAt: new Date().toISOString(),
        clockOffsetMs: clockOffsetMs(),
        note,
      },
    });
    void outbox.send();
  };
}
