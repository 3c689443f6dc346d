import { useStore } from 'reactflow';

export type Detail = 'far' | 'middle' | 'near';

/** How much can be read at this distance; labels thin out as one goes away. */
export const useDetail = (): Detail => useStore(({ transform: [, , zoom] }) => (zoom < 0.28 ? 'far' : zoom < 0.52 ? 'middle' : 'near'));

const steps = (value: number) => Math.round(value * 20) / 20;

/** By how much words and lines grow on the sheet so that they stay readable from farther away. */
export const useGrowth = () => ({
  words: useStore(({ transform: [, , zoom] }) => steps(Math.min(1.8, Math.max(1, 0.84 / zoom)))),
  lines: useStore(({ transform: [, , zoom] }) => steps(Math.min(2.2, Math.max(1, 0.9 / zoom)))),
});
