import { isDeepStrictEqual } from 'node:util';
import type { RecordReading } from '@/lib/api/commissioning';
import { Problem } from '../problem';

export type SentReading = RecordReading & { roundId: string; takenBy: string };
export type StoredReading = Omit<SentReading, 'id' | 'takenAt' | 'clockOffsetMs'> & { takenAt: Date };

/** A reading sent again must be the one that is stored: same place, same figures, same person, same moment. */
export function refuseOtherContent(stored: StoredReading, sent: SentReading): void {
  const { takenAt: storedAt, flowLs: storedFlow, ...storedRest } = stored;
  const { id: _, takenAt: sentAt, flowLs: sentFlow, clockOffsetMs: __, ...sentRest } = sent;
  const isSame =
    storedAt.getTime() === Date.parse(sentAt) &&
    // Where it follows from something else the flow is ours, not the sender's.
    (sent.method !== 'direct-flow' || storedFlow === sentFlow) &&
    isDeepStrictEqual(storedRest, sentRest);
  if (!isSame) throw new Problem('reading-id-taken', 'Another reading is stored under this id. Nothing was changed; enter this one again.');
}
