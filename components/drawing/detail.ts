import { useStore } from 'reactflow';

export type Detail = 'far' | 'middle' | 'near';

/** How much can be read at this distance; labels thin out as one goes away. */
export const useDetail = (): Detail => useStore(({ transform: [, , zoom] }) => (zoom < 0.32 ? 'far' : zoom < 0.6 ? 'middle' : 'near'));
