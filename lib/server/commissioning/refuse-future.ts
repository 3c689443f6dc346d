import { Problem } from '../problem';

const ONE_DAY_MS = 24 * 3600 * 1000;

/** A time by a device's clock that is more than a day ahead is the clock's fault, unless the device knows by how much it is wrong. */
export function refuseFuture(at: string, clockOffsetMs: number | null): void {
  if (Date.parse(at) + (clockOffsetMs ?? 0) <= Date.now() + ONE_DAY_MS) return;
  const message = 'This time is more than a day ahead. Set the clock of the tablet.';
  throw new Problem('input-invalid', message, { fields: [{ path: 'takenAt', message }] });
}
