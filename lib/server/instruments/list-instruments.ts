import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { Instrument } from '@/lib/api/commissioning';

/** The meters of the organisation by serial number, retired ones too. */
export async function listInstruments(organizationId: string, connection: Knex = db()): Promise<Instrument[]> {
  // As text: a date has no hour, and the driver would give it one of this machine's time zone.
  const day = (column: string) => connection.raw('to_char(??, ?)', [column, 'YYYY-MM-DD']);
  return connection('instruments')
    .where({ organization_id: organizationId })
    .orderBy('serial')
    .select({
      id: 'id',
      name: 'name',
      kind: 'kind',
      serial: 'serial',
      rangeLow: 'range_low',
      rangeHigh: 'range_high',
      accuracyPercent: 'accuracy_percent',
      accuracyAbsolute: 'accuracy_absolute',
      calibratedOn: day('calibrated_on'),
      calibrationDueOn: day('calibration_due_on'),
      isRetired: 'is_retired',
    });
}
