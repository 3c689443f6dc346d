import type { InstrumentInput } from '@/lib/api/commissioning';
import { unlessTaken } from '../unless-taken';

/** A meter as its row of the table. */
export const instrumentRow = (input: InstrumentInput) => ({
  name: input.name,
  kind: input.kind,
  serial: input.serial,
  range_low: input.rangeLow,
  range_high: input.rangeHigh,
  accuracy_percent: input.accuracyPercent,
  accuracy_absolute: input.accuracyAbsolute,
  calibrated_on: input.calibratedOn,
  calibration_due_on: input.calibrationDueOn,
  is_retired: input.isRetired,
});

export const unlessSerialTaken = <Result>(work: Promise<Result>): Promise<Result> =>
  unlessTaken({ code: 'serial-taken', message: 'A meter with this serial number is in the list already.', path: 'serial' }, work);
