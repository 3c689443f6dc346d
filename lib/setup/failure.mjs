/** A step of the set-up that cannot go on. Its message is the one line a person reads: what is wrong and what to do. */
export class SetupFailure extends Error {}

/** One of the steps was cut short because the person stopped the run; nothing is wrong and nothing is printed. */
export class Interrupted extends Error {}

/**
 * @param {unknown} error
 * @returns {boolean} whether the disk (or the person's quota) is what ran out
 */
function isDiskFull(error) {
  return error instanceof Error && /ENOSPC|EDQUOT|No space left on device/.test(`${'code' in error ? error.code : ''} ${error.message}`);
}

/**
 * What to print for an error: one line for the expected ones, everything we know for the others.
 * @param {unknown} error
 */
export function describe(error) {
  if (error instanceof SetupFailure) return error.message;
  if (isDiskFull(error)) return 'The disk is full. Free some space (1 GB is plenty) and start again; nothing was lost.';
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
