import { queryOptions } from '@tanstack/react-query';
import type { CommissioningBody, Reading, RecordReading, Round, StartRound } from '@/lib/api/commissioning';
import { send } from './http';

export const commissioningQuery = (loopId: string) =>
  queryOptions({
    queryKey: ['commissioning', loopId],
    queryFn: ({ signal }) => send<CommissioningBody>('GET', `/api/loops/${loopId}/commissioning`, undefined, signal),
  });

export const startRound = (loopId: string, round: StartRound): Promise<Round> => send('POST', `/api/loops/${loopId}/rounds`, round);
export const closeRound = (roundId: string): Promise<Round> => send('PATCH', `/api/rounds/${roundId}`, { isClosed: true });
export const recordReading = (roundId: string, reading: RecordReading): Promise<Reading> =>
  send('POST', `/api/rounds/${roundId}/readings`, reading);

/** What was known of the loop, with an entry that the server has just acknowledged. */
export function withReading(body: CommissioningBody, reading: Reading): CommissioningBody {
  const others = body.readings.filter(({ id }) => id !== reading.id);
  return {
    ...body,
    readings: [...others.map((entry) => (entry.id === reading.correctsReadingId ? { ...entry, isCorrected: true } : entry)), reading],
  };
}
