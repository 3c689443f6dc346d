'use client';

import { useState, type PointerEvent } from 'react';
import { useReactFlow } from 'reactflow';
import type { Point } from '@/lib/network/piece-geometry';
import { boundsOf } from '@/lib/network/piece-geometry';
import { useCanvas, useEditor } from './editor-context';

const TAP_PX = 8;

/** While several are picked: a press adds or takes away, a drag draws a box and adds what it touches. For a finger, which holds no key. */
export function BoxPicker() {
  const isPicking = useCanvas((state) => state.isPicking);
  return isPicking ? <PickingLayer /> : null;
}

function PickingLayer() {
  const { canvasStore, drawingStore } = useEditor();
  const view = useReactFlow();
  const [box, setBox] = useState<{ from: Point; to: Point } | null>(null);

  const placeOf = (event: PointerEvent): Point => {
    const { left, top } = event.currentTarget.getBoundingClientRect();
    return { x: event.clientX - left, y: event.clientY - top };
  };
  const end = (event: PointerEvent) => {
    if (!box) return;
    setBox(null);
    const to = placeOf(event);
    const { pieces, pipes } = canvasStore.getState();
    if (Math.hypot(to.x - box.from.x, to.y - box.from.y) < TAP_PX) {
      const under = elementUnder(event);
      if (!under) return;
      const chosen = new Set(under.isPiece ? pieces : pipes);
      if (!chosen.delete(under.id)) chosen.add(under.id);
      canvasStore.setState({ [under.isPiece ? 'pieces' : 'pipes']: chosen, page: 'properties' });
      return;
    }
    const { left, top } = event.currentTarget.getBoundingClientRect();
    const [a, b] = [box.from, to].map((point) => view.screenToFlowPosition({ x: point.x + left, y: point.y + top }));
    const { drawing } = drawingStore.getState();
    const touched = new Set(pieces);
    for (const piece of drawing.equipment) {
      const its = boundsOf([piece]);
      const isApart =
        its.left > Math.max(a.x, b.x) ||
        its.left + its.width < Math.min(a.x, b.x) ||
        its.top > Math.max(a.y, b.y) ||
        its.top + its.height < Math.min(a.y, b.y);
      if (!isApart) touched.add(piece.id);
    }
    const inner = drawing.pipes.filter((pipe) => touched.has(pipe.from.equipmentId) && touched.has(pipe.to.equipmentId));
    canvasStore.setState({ pieces: touched, pipes: new Set([...pipes, ...inner.map(({ id }) => id)]), page: 'properties' });
  };

  return (
    <div
      className="absolute inset-0 z-[6] cursor-crosshair touch-none"
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        setBox({ from: placeOf(event), to: placeOf(event) });
      }}
      onPointerMove={(event) => {
        const to = placeOf(event);
        setBox((before) => before && { ...before, to });
      }}
      onPointerUp={end}
      onPointerCancel={() => setBox(null)}
    >
      <p className="bg-sheet pointer-events-none absolute bottom-3 left-1/2 -translate-x-1/2 rounded border px-3 py-1.5 text-sm whitespace-nowrap shadow max-md:bottom-4">
        Press on what to pick, or draw a box.
      </p>
      {box && (
        <div
          className="border-brass bg-brass/10 pointer-events-none absolute border border-dashed"
          style={{
            left: Math.min(box.from.x, box.to.x),
            top: Math.min(box.from.y, box.to.y),
            width: Math.abs(box.to.x - box.from.x),
            height: Math.abs(box.to.y - box.from.y),
          }}
        />
      )}
    </div>
  );
}

/** The piece or pipe under the layer, where it was pressed. */
function elementUnder({ clientX, clientY }: PointerEvent): { id: string; isPiece: boolean } | null {
  for (const element of document.elementsFromPoint(clientX, clientY)) {
    const piece = element.closest('.react-flow__node')?.getAttribute('data-id');
    if (piece) return { id: piece, isPiece: true };
    const pipe = element.closest('.react-flow__edge')?.getAttribute('data-testid')?.replace('rf__edge-', '');
    if (pipe) return { id: pipe, isPiece: false };
  }
  return null;
}
