import { partOf } from '@/lib/network/duplicate-pieces';
import { boundsOf } from '@/lib/network/piece-geometry';
import { labelPlace } from '@/lib/network/pipe-route';
import { storeyAt } from '@/lib/network/storeys';
import { wayOf } from '@/lib/network/bend-pipe';
import { overlays, selectOnly } from '../canvas-state';
import { showAll } from '../show-all';
import { midView, type Stage } from './stage';

/** What changes how the drawing is seen, and what is selected. */
export function viewing(stage: Stage) {
  const { editor, view } = stage;
  const { canvasStore, drawingStore } = editor;
  return {
    find: () => canvasStore.setState({ open: 'find' }),
    commands: () => canvasStore.setState({ open: 'commands' }),
    shortcuts: () => canvasStore.setState({ open: 'shortcuts' }),
    fit: () => showAll(view, drawingStore.getState().drawing, 200),
    'zoom-selection': () => showSelection(stage),
    'zoom-in': () => void view.zoomIn({ duration: 120 }),
    'zoom-out': () => void view.zoomOut({ duration: 120 }),
    'small-map': () => canvasStore.setState(({ isMapShown }) => ({ isMapShown: !isMapShown })),
    'next-overlay': () => canvasStore.setState(({ overlay }) => ({ overlay: overlays[(overlays.indexOf(overlay) + 1) % overlays.length] })),
    'pick-several': () => canvasStore.setState(({ isPicking }) => ({ isPicking: !isPicking, tool: 'select', pipeStart: null })),
    escape: () => {
      const { tool, pipeStart, isPicking } = canvasStore.getState();
      if (pipeStart) canvasStore.setState({ pipeStart: null });
      else if (tool !== 'select') canvasStore.setState({ tool: 'select' });
      else if (isPicking) canvasStore.setState({ isPicking: false });
      else selectOnly(canvasStore, []);
    },
    'select-all': () => {
      const { equipment, pipes } = drawingStore.getState().drawing;
      selectOnly(
        canvasStore,
        equipment.map(({ id }) => id),
        pipes.map(({ id }) => id),
      );
    },
    copy: () => canvasStore.setState(({ pieces, clipboard }) => ({ clipboard: pieces.size ? partOfNow(stage, pieces) : clipboard })),
    menu: () => openMenuAtSelection(stage),
  };
}

const partOfNow = ({ editor }: Stage, pieces: ReadonlySet<string>) => partOf(editor.drawingStore.getState().drawing, new Set(pieces));

/** Brings the selected pieces and pipes into view, as large as they go up to life-size. */
function showSelection({ editor: { canvasStore, drawingStore }, view }: Stage): void {
  const { pieces, pipes } = canvasStore.getState();
  const { drawing } = drawingStore.getState();
  const chosen = drawing.equipment.filter(({ id }) => pieces.has(id));
  const corners = [...pipes].flatMap((id) => wayOf(drawing, id)?.path ?? []);
  if (chosen.length + corners.length === 0) return;
  const box = chosen.length ? boundsOf(chosen) : null;
  const xs = [...corners.map(({ x }) => x), ...(box ? [box.left, box.left + box.width] : [])];
  const ys = [...corners.map(({ y }) => y), ...(box ? [box.top, box.top + box.height] : [])];
  const [left, top] = [Math.min(...xs), Math.min(...ys)];
  const least = 400;
  const [width, height] = [Math.max(...xs) - left, Math.max(...ys) - top];
  const [wide, high] = [Math.max(width, least), Math.max(height, least)];
  view.fitBounds(
    { x: left - (wide - width) / 2, y: top - (high - height) / 2, width: wide, height: high },
    { padding: 0.15, duration: 200 },
  );
}

/** The menu that the keyboard asks for: of what is selected, where that stands; else of the sheet, in mid-view. */
function openMenuAtSelection(stage: Stage): void {
  const { canvasStore, drawingStore } = stage.editor;
  const { pieces, pipes } = canvasStore.getState();
  const { drawing } = drawingStore.getState();
  const piece = drawing.equipment.find(({ id }) => pieces.has(id));
  const way = piece ? null : wayOf(drawing, [...pipes][0] ?? '');
  const at = piece ?? (way ? labelPlace(way.path) : midView(stage));
  const of = piece ? 'piece' : way ? 'pipe' : 'sheet';
  const point = { x: at.x, y: at.y };
  canvasStore.setState({
    menu: { of, at: point, screen: stage.view.flowToScreenPosition(point) },
    storeyId: of === 'sheet' ? (storeyAt(drawing, at.y)?.id ?? null) : null,
  });
}
