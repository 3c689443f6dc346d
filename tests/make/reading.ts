import { v7 as uuidv7 } from 'uuid';
import type { RecordReading } from '@/lib/api/commissioning';
import type { MadeRound } from './round';

/** A drop of 16 kPa at 4 turns (Kv 4): 0.4444 L/s of water at 1000 kg/m³, 88.9 % of the made station's 0.5 L/s. */
export const reading = ({ stationId, instrumentId }: MadeRound, given: Partial<RecordReading> = {}): RecordReading => ({
  id: uuidv7(),
  stationId,
  method: 'valve-drop',
  settingTurns: 4,
  dropKpa: 16,
  flowLs: null,
  heatKw: null,
  supplyC: null,
  returnC: null,
  pumpSpeed: null,
  entered: [
    { quantity: 'setting', text: '4', unit: 'turns' },
    { quantity: 'pressure', text: '160', unit: 'mbar' },
  ],
  instrumentId,
  takenAt: new Date('2026-06-01T09:30:00.000Z').toISOString(),
  clockOffsetMs: null,
  note: '',
  correctsReadingId: null,
  ...given,
});
