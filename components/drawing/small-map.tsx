'use client';

import { useEffect, useRef, type PointerEvent } from 'react';
import { useReactFlow, useStore } from 'reactflow';
import type { Drawing } from '@/lib/network/drawing';
import { boundsOf, sizeOf } from '@/lib/network/piece-geometry';
import { useCanvas, useDrawing } from './editor-context';

const WIDTH = 208;
const HEIGHT = 132;

interface Frame {
  left: number;
  top: number;
  scale: number;
}

/** The whole sheet in a corner: where the pieces lie, and a frame around what is seen. A press or a drag there moves the view. */
export function SmallMap() {
  const isShown = useCanvas((state) => state.isMapShown);
  const isEmpty = useDrawing((drawing) => drawing.equipment.length === 0);
  return isShown && !isEmpty ? <MapSheet /> : null;
}

function MapSheet() {
  const drawing = useDrawing((it) => it);
  const selected = useCanvas((state) => state.pieces);
  const view = useReactFlow();
  const [x, y, zoom] = useStore(({ transform }) => transform);
  const [width, height] = [useStore((state) => state.width), useStore((state) => state.height)];
  const canvas = useRef<HTMLCanvasElement>(null);
  const frame = frameOf(drawing);

  useEffect(() => {
    const asked = requestAnimationFrame(() => paint(canvas.current, drawing, selected));
    return () => cancelAnimationFrame(asked);
  }, [drawing, selected]);

  const go = (event: PointerEvent) => {
    if (event.buttons !== 1) return;
    const box = event.currentTarget.getBoundingClientRect();
    view.setCenter((event.clientX - box.left) / frame.scale + frame.left, (event.clientY - box.top) / frame.scale + frame.top, { zoom });
  };
  return (
    <div
      role="img"
      aria-label="Small map of the sheet"
      className="bg-sheet absolute right-3 bottom-3 z-10 cursor-crosshair touch-none overflow-hidden rounded border shadow"
      style={{ width: WIDTH, height: HEIGHT }}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        go(event);
      }}
      onPointerMove={go}
    >
      <canvas ref={canvas} style={{ width: WIDTH, height: HEIGHT }} />
      <div
        className="border-petrol bg-petrol/10 pointer-events-none absolute border"
        style={{
          left: (-x / zoom - frame.left) * frame.scale,
          top: (-y / zoom - frame.top) * frame.scale,
          width: (width / zoom) * frame.scale,
          height: (height / zoom) * frame.scale,
        }}
      />
    </div>
  );
}

/** All pieces with some room around them, in the middle of the map. */
function frameOf({ equipment }: Drawing): Frame {
  const { left, top, width, height } = boundsOf(equipment);
  const scale = Math.min(WIDTH / (width + 200), HEIGHT / (height + 200), 0.2);
  return { left: left + width / 2 - WIDTH / 2 / scale, top: top + height / 2 - HEIGHT / 2 / scale, scale };
}

/** One small box a piece: drawn at once, so that thousands cost a millisecond or two. */
function paint(canvas: HTMLCanvasElement | null, drawing: Drawing, selected: ReadonlySet<string>): void {
  const pen = canvas?.getContext('2d');
  if (!canvas || !pen) return;
  const dots = window.devicePixelRatio;
  [canvas.width, canvas.height] = [WIDTH * dots, HEIGHT * dots];
  pen.scale(dots, dots);
  const { left, top, scale } = frameOf(drawing);
  const colour = (name: string) => getComputedStyle(canvas).getPropertyValue(name);
  const [ink, brass, rule] = ['--quiet', '--brass', '--rule'].map(colour);
  pen.fillStyle = rule;
  for (const storey of drawing.storeys) pen.fillRect(0, (storey.top + storey.height - top) * scale, WIDTH, 1);
  for (const piece of drawing.equipment) {
    const size = sizeOf(piece);
    const [w, h] = [Math.max(size.width * scale, 1.5), Math.max(size.height * scale, 1.5)];
    pen.fillStyle = selected.has(piece.id) ? brass : ink;
    pen.fillRect((piece.x - left) * scale - w / 2, (piece.y - top) * scale - h / 2, w, h);
  }
}
