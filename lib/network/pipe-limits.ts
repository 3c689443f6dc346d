import type { Drawing, PipeLimit } from './drawing';

/**
 * What pipes may have at most where a loop says nothing else: friction and velocity by bore. Common practice for closed loops of steel and
 * copper (about 100 to 400 Pa/m; slower in small bores, for noise and erosion); a designer sets the loop's own.
 */
export const usualPipeLimits: readonly PipeLimit[] = [
  { upToBoreMm: 55, maxPaPerM: 400, maxVelocityMs: 1.2 },
  { upToBoreMm: null, maxPaPerM: 400, maxVelocityMs: 2.4 },
];

/** The limit that holds for a bore (mm): of the first range that reaches it, the last one beyond them all. */
export function limitFor({ pipeLimits }: Pick<Drawing, 'pipeLimits'>, boreMm: number): PipeLimit {
  const limits = pipeLimits ?? usualPipeLimits;
  return limits.find(({ upToBoreMm }) => upToBoreMm === null || boreMm <= upToBoreMm) ?? limits[limits.length - 1];
}
