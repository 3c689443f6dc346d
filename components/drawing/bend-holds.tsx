'use client';

import { useRef, type CSSProperties, type KeyboardEvent, type PointerEvent } from 'react';
import { toast } from 'sonner';
import { useReactFlow, useViewport } from 'reactflow';
import { isLevel, moveCorner, movePart, wayOf, withRoute } from '@/lib/network/bend-pipe';
import type { Drawing } from '@/lib/network/drawing';
import { GRID, snapPoint, type Point } from '@/lib/network/piece-geometry';
import { useCanvas, useDrawing, useEditor } from './editor-context';
import { beginGesture } from './store';

/** What is held of a pipe: one of its straight parts, or the corner after the part before. */
interface Hold {
  isCorner: boolean;
  index: number;
}

const arrows: Record<string, Point> = {
  ArrowLeft: { x: -1, y: 0 },
  ArrowRight: { x: 1, y: 0 },
  ArrowUp: { x: 0, y: -1 },
  ArrowDown: { x: 0, y: 1 },
};

/** Squares on the one selected pipe by which its bends and straight parts are moved, with the pointer or by key. */
export function BendHolds() {
  const { canEdit } = useEditor();
  const pipeId = useCanvas(({ pieces, pipes, tool }) =>
    pieces.size === 0 && pipes.size === 1 && tool === 'select' ? [...pipes][0] : null,
  );
  return canEdit && pipeId ? <HoldsOf key={pipeId} pipeId={pipeId} /> : null;
}

function HoldsOf({ pipeId }: { pipeId: string }) {
  const { drawingStore } = useEditor();
  const view = useReactFlow();
  const { x, y, zoom } = useViewport();
  const drawing = useDrawing((it) => it);
  const layer = useRef<HTMLDivElement>(null);
  const way = wayOf(drawing, pipeId);
  if (!way) return null;
  const { path } = way;

  /** From the drawing as it was, so that a drag there and back leaves nothing behind. */
  const bent = (before: Drawing, hold: Hold, to: Point): Drawing => {
    const from = wayOf(before, pipeId);
    if (!from) return before;
    const moved = hold.isCorner
      ? moveCorner(from.path, hold.index, to, from.turns)
      : movePart(from.path, hold.index, isLevel(from.path, hold.index) ? to.y : to.x, from.turns);
    const after = withRoute(before, pipeId, moved);
    if (!after) toast('A pipe takes 20 bends at most. Straighten it, or put a tee in it.', { id: 'most-bends' });
    return after ?? before;
  };

  const drag = (event: PointerEvent, hold: Hold) => {
    const sheet = layer.current;
    if (event.button !== 0 || !sheet) return;
    event.stopPropagation();
    // The square itself may give way to others while the pipe changes; the layer stays.
    sheet.setPointerCapture(event.pointerId);
    const before = drawingStore.getState().drawing;
    const endGesture = beginGesture(drawingStore);
    const follow = ({ clientX, clientY }: globalThis.PointerEvent) => {
      const to = snapPoint(view.screenToFlowPosition({ x: clientX, y: clientY }));
      drawingStore.getState().change(() => bent(before, hold, to));
    };
    const end = () => {
      sheet.removeEventListener('pointermove', follow);
      sheet.removeEventListener('lostpointercapture', end);
      endGesture();
    };
    sheet.addEventListener('pointermove', follow);
    sheet.addEventListener('lostpointercapture', end);
  };

  const press = (event: KeyboardEvent, hold: Hold, at: Point) => {
    const step = arrows[event.key];
    if (!step || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    event.stopPropagation();
    const by = GRID * (event.shiftKey ? 4 : 1);
    const level = !hold.isCorner && isLevel(path, hold.index);
    const to = { x: at.x + (hold.isCorner || !level ? step.x * by : 0), y: at.y + (hold.isCorner || level ? step.y * by : 0) };
    if (to.x === at.x && to.y === at.y) return;
    drawingStore.getState().change((before) => bent(before, hold, to));
    // The same part or corner may stand elsewhere in the list by now.
    requestAnimationFrame(() => holdNearest(layer.current, hold.isCorner, view.flowToScreenPosition(to))?.focus());
  };

  const holds = [
    ...path.slice(1).map((b, index) => ({ isCorner: false, index, at: { x: (path[index].x + b.x) / 2, y: (path[index].y + b.y) / 2 } })),
    ...path.slice(1, -1).map((at, i) => ({ isCorner: true, index: i + 1, at })),
  ];
  return (
    <div ref={layer} className="pointer-events-none absolute inset-0 z-[5] overflow-hidden">
      {holds.map(({ isCorner, index, at }) => {
        const words = isCorner
          ? `Bend ${index} of ${path.length - 2}`
          : `${isLevel(path, index) ? 'Level' : 'Plumb'} part ${index + 1} of ${path.length - 1}`;
        return (
          <button
            key={`${isCorner ? 'corner' : 'part'} ${index}`}
            type="button"
            aria-label={`${words}: move it with the arrows`}
            className="pipe-hold nodrag nopan"
            data-hold={isCorner ? 'corner' : isLevel(path, index) ? 'level' : 'plumb'}
            style={
              { left: at.x * zoom + x, top: at.y * zoom + y, '--room': `${roomOf(path, { isCorner, index }) * zoom}px` } as CSSProperties
            }
            onPointerDown={(event) => drag(event, { isCorner, index })}
            onKeyDown={(event) => press(event, { isCorner, index }, at)}
          />
        );
      })}
    </div>
  );
}

/** The length of the shortest straight part that is held: a hold must not cover what stands beside it. */
function roomOf(path: Point[], { isCorner, index }: Hold): number {
  const lengthOf = (part: number) => Math.abs(path[part + 1].x - path[part].x) + Math.abs(path[part + 1].y - path[part].y);
  return isCorner ? Math.min(lengthOf(index - 1), lengthOf(index)) : lengthOf(index);
}

/** The hold of the wanted sort that lies nearest to a place on the screen. */
function holdNearest(layer: HTMLElement | null, isCorner: boolean, { x, y }: Point): HTMLElement | null {
  const holds = [...(layer?.querySelectorAll<HTMLElement>('.pipe-hold') ?? [])].filter((it) => (it.dataset.hold === 'corner') === isCorner);
  const far = (hold: HTMLElement) => {
    const box = hold.getBoundingClientRect();
    return Math.hypot(box.left + box.width / 2 - x, box.top + box.height / 2 - y);
  };
  return holds.sort((a, b) => far(a) - far(b))[0] ?? null;
}
