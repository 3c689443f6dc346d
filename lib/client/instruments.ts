import type { Instrument, InstrumentInput } from '@/lib/api/commissioning';
import { send } from './http';

export const addInstrument = (input: InstrumentInput): Promise<Instrument> => send('POST', '/api/instruments', input);
export const changeInstrument = (id: string, input: InstrumentInput): Promise<Instrument> => send('PATCH', `/api/instruments/${id}`, input);
