'use client';

import { useEffect, useState } from 'react';
import { useReactFlow, useViewport, type ConnectionLineComponentProps } from 'reactflow';
import type { Port } from '@/lib/network/drawing';
import { pieceOf, portPlace, snapPoint, type Point } from '@/lib/network/piece-geometry';
import { route } from '@/lib/network/pipe-route';
import { useCanvas, useDrawing, useEditor } from './editor-context';
import { pathText } from './path-text';

const look = { fill: 'none', stroke: 'var(--petrol)', strokeWidth: 2, strokeDasharray: '2 4' } as const;

/** The pipe to come, while it is dragged from an end. */
export function ConnectionPreview({ fromNode, fromHandle, toX, toY }: ConnectionLineComponentProps) {
  const { drawingStore } = useEditor();
  const piece = fromNode && pieceOf(drawingStore.getState().drawing, fromNode.id);
  if (!piece || !fromHandle?.id) return null;
  return <path {...look} d={pathText(route(portPlace(piece, fromHandle.id as Port), snapPoint({ x: toX, y: toY })))} />;
}

/** The pipe to come, while the pipe tool has begun one: it follows the pointer. */
export function PipePreview() {
  const start = useCanvas((state) => state.pipeStart);
  const piece = useDrawing((drawing) => (start ? pieceOf(drawing, start.end.equipmentId) : undefined));
  const { x, y, zoom } = useViewport();
  const pointer = usePointer(start !== null);
  if (!start || !piece || !pointer) return null;
  const path = route(portPlace(piece, start.end.port), snapPoint(pointer), start.bends);
  return (
    <svg className="pointer-events-none absolute inset-0 size-full">
      <g transform={`translate(${x} ${y}) scale(${zoom})`}>
        <path {...look} d={pathText(path)} />
        {start.bends.map((bend, i) => (
          <circle key={i} cx={bend.x} cy={bend.y} r={3} fill="var(--petrol)" />
        ))}
      </g>
    </svg>
  );
}

function usePointer(isWanted: boolean): Point | null {
  const view = useReactFlow();
  const [pointer, setPointer] = useState<Point | null>(null);
  useEffect(() => {
    if (!isWanted) return;
    const follow = (event: PointerEvent) => setPointer(view.screenToFlowPosition({ x: event.clientX, y: event.clientY }));
    window.addEventListener('pointermove', follow);
    return () => window.removeEventListener('pointermove', follow);
  }, [isWanted, view]);
  return pointer;
}
