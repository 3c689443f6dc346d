'use client';

import { useState, type KeyboardEvent, type PointerEvent } from 'react';
import { useReactFlow, useViewport } from 'reactflow';
import { Figure } from '@/components/ui/figure';
import type { Storey } from '@/lib/network/drawing';
import { GRID, snap } from '@/lib/network/piece-geometry';
import { resizeStorey } from '@/lib/network/storeys';
import { LEAST_HEIGHT } from './actions/storeys';
import { useDrawing, useEditor } from './editor-context';
import { beginGesture } from './store';

const NAME_AT = 20;

/** The storeys behind the drawing: a line between two. */
export function StoreyBands() {
  const storeys = useDrawing((drawing) => drawing.storeys);
  const { y, zoom } = useViewport();
  return (
    <div className="pointer-events-none absolute inset-0 -z-10 overflow-hidden">
      {storeys.map(({ id, top, height }) => (
        <div key={id} className="border-rule absolute inset-x-0 border-b-2" style={{ top: top * zoom + y, height: height * zoom }} />
      ))}
    </div>
  );
}

/** At the left edge of the view the name and elevation of each storey, which opens its menu, and above it what makes its band higher. */
export function StoreyNames() {
  const storeys = useDrawing((drawing) => drawing.storeys);
  return (
    <div className="pointer-events-none absolute inset-0 z-[4] overflow-hidden">
      {storeys.map((storey) => (
        <StoreyName key={storey.id} storey={storey} />
      ))}
    </div>
  );
}

function StoreyName({ storey }: { storey: Storey }) {
  const { canvasStore, canEdit } = useEditor();
  const { y, zoom } = useViewport();
  const bottom = (storey.top + storey.height) * zoom + y;
  if (storey.height * zoom <= 2 * NAME_AT) return null;
  const words = (
    <>
      {storey.name} <Figure quantity="length" si={storey.elevationM} hasUnit className="ml-1 font-normal" />
    </>
  );
  const look = 'text-quiet absolute left-1.5 rounded px-1.5 py-1 text-xs font-semibold';
  if (!canEdit)
    return (
      <p className={look} style={{ top: bottom, translate: '0 -100%' }}>
        {words}
      </p>
    );
  return (
    <>
      <BandEdge storey={storey} />
      <button
        type="button"
        aria-haspopup="menu"
        aria-label={`Storey ${storey.name}: menu`}
        className={`${look} hover:bg-well hover:text-ink pointer-events-auto -translate-y-full pointer-coarse:min-h-11`}
        style={{ top: bottom }}
        onClick={(event) => {
          const { left, top } = event.currentTarget.getBoundingClientRect();
          canvasStore.setState({
            storeyId: storey.id,
            menu: { of: 'storey', screen: { x: left, y: top }, at: { x: 0, y: storey.top + storey.height / 2 } },
          });
        }}
      >
        {words}
      </button>
    </>
  );
}

/** The upper edge of a band: dragged, or moved with the arrows, it makes the band higher or lower. */
function BandEdge({ storey: { id, name, top, height } }: { storey: Storey }) {
  const { drawingStore } = useEditor();
  const view = useReactFlow();
  const { y, zoom } = useViewport();
  const [isHeld, setHeld] = useState(false);
  const drag = (event: PointerEvent) => {
    if (event.button !== 0) return;
    event.stopPropagation();
    event.currentTarget.setPointerCapture(event.pointerId);
    const end = beginGesture(drawingStore);
    setHeld(true);
    const before = drawingStore.getState().drawing;
    const handle = event.currentTarget as HTMLElement;
    const follow = ({ clientX, clientY }: globalThis.PointerEvent) => {
      const at = snap(view.screenToFlowPosition({ x: clientX, y: clientY }).y);
      drawingStore.getState().change(() => resizeStorey(before, id, Math.max(LEAST_HEIGHT, top + height - at)));
    };
    const letGo = () => {
      handle.removeEventListener('pointermove', follow);
      handle.removeEventListener('lostpointercapture', letGo);
      end();
      setHeld(false);
    };
    handle.addEventListener('pointermove', follow);
    handle.addEventListener('lostpointercapture', letGo);
  };
  const press = (event: KeyboardEvent) => {
    const by = { ArrowUp: GRID, ArrowDown: -GRID }[event.key];
    if (!by) return;
    event.preventDefault();
    event.stopPropagation();
    drawingStore.getState().change((before) => resizeStorey(before, id, Math.max(LEAST_HEIGHT, height + by * (event.shiftKey ? 4 : 1))));
  };
  return (
    <div
      role="separator"
      aria-orientation="horizontal"
      aria-label={`Height of the band of ${name}`}
      aria-valuenow={height}
      aria-valuemin={LEAST_HEIGHT}
      tabIndex={0}
      className={`band-edge nopan nodrag ${isHeld ? 'bg-brass/20' : ''}`}
      style={{ top: top * zoom + y }}
      onPointerDown={drag}
      onKeyDown={press}
    />
  );
}
