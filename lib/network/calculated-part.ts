import type { Drawing } from './drawing';

/**
 * What of a drawing its calculation depends on, as a text to compare: places, turns, bends and rooms are left
 * out (tags stay: faults speak of them). Storeys count by their elevation.
 */
export function calculatedPart(drawing: Drawing): string {
  const leaveOut = new Set(['x', 'y', 'rotation', 'isMirrored', 'bends', 'top', 'height', 'room']);
  return JSON.stringify(drawing, (key, value: unknown) => (leaveOut.has(key) ? undefined : value));
}
