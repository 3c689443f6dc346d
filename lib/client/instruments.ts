import { queryOptions } from '@tanstack/react-query';
import type { Certificate, Instrument, InstrumentInput } from '@/lib/api/commissioning';
import { send, sendFile } from './http';

export const addInstrument = (input: InstrumentInput): Promise<Instrument> => send('POST', '/api/instruments', input);
export const changeInstrument = (id: string, input: InstrumentInput): Promise<Instrument> => send('PATCH', `/api/instruments/${id}`, input);

export const certificatesQuery = (instrumentId: string) =>
  queryOptions({
    queryKey: ['certificates', instrumentId],
    queryFn: ({ signal }) => send<Certificate[]>('GET', `/api/instruments/${instrumentId}/certificates`, undefined, { signal }),
  });

export const addCertificate = (instrumentId: string, file: File): Promise<Certificate> =>
  sendFile('POST', `/api/instruments/${instrumentId}/certificates?${new URLSearchParams({ fileName: file.name })}`, file);
