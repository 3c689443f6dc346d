import { toast } from 'sonner';
import { alignPieces, distributePieces, type Alignment } from '@/lib/network/align-pieces';
import type { Drawing } from '@/lib/network/drawing';
import { mirrorPieces, nudgePieces, rotatePieces } from '@/lib/network/move-pieces';
import { GRID } from '@/lib/network/piece-geometry';
import type { Stage } from './stage';

const FAR = 4;

/** What moves and turns the selected pieces. */
export function arranging({ editor: { canvasStore, drawingStore } }: Stage) {
  const withChosen = (make: (drawing: Drawing, ids: Set<string>) => Drawing, least = 1, missing = '') => {
    const ids = new Set(canvasStore.getState().pieces);
    if (ids.size >= least) drawingStore.getState().change((before) => make(before, ids));
    else if (missing) toast(missing);
  };
  const nudge = (x: number, y: number) => () => withChosen((drawing, ids) => nudgePieces(drawing, ids, { x: x * GRID, y: y * GRID }));
  const align = (to: Alignment) => () =>
    withChosen((drawing, ids) => alignPieces(drawing, ids, to), 2, 'Select the pieces to line up: two or more.');
  const distribute = (way: 'across' | 'down') => () =>
    withChosen((drawing, ids) => distributePieces(drawing, ids, way), 3, 'Select three pieces or more: the outer two stay where they are.');
  return {
    rotate: () => withChosen(rotatePieces),
    mirror: () => withChosen(mirrorPieces),
    'nudge-left': nudge(-1, 0),
    'nudge-right': nudge(1, 0),
    'nudge-up': nudge(0, -1),
    'nudge-down': nudge(0, 1),
    'shift-left': nudge(-FAR, 0),
    'shift-right': nudge(FAR, 0),
    'shift-up': nudge(0, -FAR),
    'shift-down': nudge(0, FAR),
    'align-left': align('left'),
    'align-right': align('right'),
    'align-top': align('top'),
    'align-bottom': align('bottom'),
    'align-row': align('row'),
    'align-column': align('column'),
    'distribute-across': distribute('across'),
    'distribute-down': distribute('down'),
  };
}
