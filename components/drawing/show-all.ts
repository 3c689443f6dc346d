import type { ReactFlowInstance } from 'reactflow';
import type { Drawing } from '@/lib/network/drawing';
import { boundsOf } from '@/lib/network/piece-geometry';

/** Room at the top of the sheet for what floats over it, as a part of the drawing's height. */
const HEAD_ROOM = 0.12;
/** Room at the right, where a piece's words stand. */
const WORDS_ROOM = 80;

/** Brings the whole drawing into view; an empty one shows its storeys. */
export function showAll(view: ReactFlowInstance, { equipment, storeys }: Drawing, duration = 0): void {
  if (equipment.length > 0) {
    const { left, top, width, height } = boundsOf(equipment);
    const room = Math.max(height * HEAD_ROOM, 60);
    // A drawing of few pieces is not blown up to fill the view.
    const least = { width: Math.max(width + WORDS_ROOM, 1000), height: Math.max(height, 600) };
    view.fitBounds(
      { x: left - (least.width - width) / 2, y: top - room - (least.height - height) / 2, width: least.width, height: least.height + room },
      { padding: 0.06, duration },
    );
  } else if (storeys.length > 0) {
    const top = Math.min(...storeys.map((it) => it.top));
    view.fitBounds(
      { x: -80, y: top, width: 900, height: Math.max(...storeys.map((it) => it.top + it.height)) - top },
      { padding: 0.02, duration },
    );
  }
}
