import { type Fault, isRecord } from './document-fault';

/** Checks `options`; sizing limits are required where pipes are to be sized. */
export function checkOptions(options: unknown, purpose: string, fault: Fault): void {
  if (options !== undefined && !isRecord(options)) return fault.add('options', 'must be an object');
  if (options) {
    const at = fault.of(options, 'options');
    at.oneOf('method', ['hardy-cross', 'simultaneous']);
    at.oneOf('pumpExcess', ['speed', 'throttle']);
    at.flag('history');
  }
  const sizing = options?.sizing;
  if (sizing === undefined) {
    if (purpose === 'size') fault.add('options.sizing', 'is required');
    return;
  }
  if (!Array.isArray(sizing)) return checkLimit(sizing, 'options.sizing', fault);
  if (!sizing.length) fault.add('options.sizing', 'must not be empty');
  sizing.forEach((limit: unknown, k) => checkLimit(limit, `options.sizing[${k}]`, fault));
  for (let k = 1; k < sizing.length; k++)
    if (!(upTo(sizing[k]) > upTo(sizing[k - 1]))) fault.add(`options.sizing[${k}].upToBoreMm`, 'must be greater than the one before');
}

const upTo = (limit: unknown) => (isRecord(limit) && typeof limit.upToBoreMm === 'number' ? limit.upToBoreMm : Infinity);

function checkLimit(limit: unknown, path: string, fault: Fault): void {
  if (!isRecord(limit)) return fault.add(path, 'must be an object');
  const at = fault.of(limit, path);
  at.positive('maxPaPerM');
  at.positive('maxVelocityMs');
  at.positive('upToBoreMm', false);
}
