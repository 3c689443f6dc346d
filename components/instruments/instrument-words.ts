import type { InstrumentKind } from '@/lib/api/commissioning';

export const kindWords: Record<InstrumentKind, string> = {
  'differential-pressure': 'Differential pressure',
  flow: 'Flow',
  temperature: 'Temperature',
};

/** The unit that a meter's range and fixed accuracy are kept in. */
export const unitOfKind: Record<InstrumentKind, string> = { 'differential-pressure': 'kPa', flow: 'L/s', temperature: '°C' };

const dayForm = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' });

/** A calendar day, YYYY-MM-DD, as it is read: "14 Mar 2027". */
export const dayWords = (day: string): string => dayForm.format(new Date(`${day}T00:00:00Z`));
