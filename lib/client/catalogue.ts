import { queryOptions } from '@tanstack/react-query';
import type { CatalogueBody, PumpInput, ValveFamilyInput } from '@/lib/api/catalogue';
import type { UploadedSchedule } from '@/lib/api/schedule-import';
import { send, sendFile } from './http';

/** The organisation's own valves and pumps. */
export const catalogueQuery = queryOptions({
  queryKey: ['catalogue'],
  queryFn: ({ signal }) => send<CatalogueBody>('GET', '/api/catalogue', undefined, { signal }),
  staleTime: 60_000,
});

/** The entry a change is made to, and the version that the person looked at; null adds one. */
type Seen = { id: string; version: number } | null;

export const saveValveFamily = (seen: Seen, family: ValveFamilyInput): Promise<{ id: string }> => save('valve-families', seen, family);
export const savePump = (seen: Seen, pump: PumpInput): Promise<{ id: string }> => save('pumps', seen, pump);

const save = (list: string, seen: Seen, entry: object): Promise<{ id: string }> =>
  seen
    ? send('PUT', `/api/catalogue/${list}/${seen.id}`, { ...entry, version: seen.version })
    : send('POST', `/api/catalogue/${list}`, entry);

export const removeValveFamily = ({ id, version }: NonNullable<Seen>) =>
  send<object>('DELETE', `/api/catalogue/valve-families/${id}`, { version });
export const removePump = ({ id, version }: NonNullable<Seen>) => send<object>('DELETE', `/api/catalogue/pumps/${id}`, { version });

/** What stands in a file, read by the server, which keeps nothing of it. */
export const readTableFile = (file: File): Promise<UploadedSchedule> =>
  sendFile('POST', `/api/catalogue/upload?${new URLSearchParams({ fileName: file.name })}`, file);
