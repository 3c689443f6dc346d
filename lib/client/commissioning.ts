import { queryOptions } from '@tanstack/react-query';
import type { CommissioningBody, Reading, Round, StartRound, WalkingOrder } from '@/lib/api/commissioning';
import { send } from './http';

export const commissioningQuery = (loopId: string) =>
  queryOptions({
    queryKey: ['commissioning', loopId],
    queryFn: ({ signal }) => send<CommissioningBody>('GET', `/api/loops/${loopId}/commissioning`, undefined, { signal }),
  });

export const startRound = (loopId: string, round: StartRound): Promise<Round> => send('POST', `/api/loops/${loopId}/rounds`, round);
export const writeWalkingOrder = (loopId: string, stationIds: string[]): Promise<WalkingOrder> =>
  send('PUT', `/api/loops/${loopId}/walking-order`, { stationIds });
export const closeRound = (roundId: string): Promise<Round> => send('PATCH', `/api/rounds/${roundId}`, { isClosed: true });

/** What was known of the loop, with an entry that the server has just acknowledged. */
export function withReading(body: CommissioningBody, reading: Reading): CommissioningBody {
  const others = body.readings.filter(({ id }) => id !== reading.id);
  return {
    ...body,
    readings: [...others.map((entry) => (entry.id === reading.correctsReadingId ? { ...entry, isCorrected: true } : entry)), reading],
  };
}
