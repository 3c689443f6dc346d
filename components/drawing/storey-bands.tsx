'use client';

import { useState, type KeyboardEvent, type PointerEvent } from 'react';
import { useReactFlow, useViewport } from 'reactflow';
import { classNames } from '@/components/ui/class-names';
import { Figure } from '@/components/ui/figure';
import type { Storey } from '@/lib/network/drawing';
import { GRID, snap } from '@/lib/network/piece-geometry';
import { resizeStorey } from '@/lib/network/storeys';
import { LEAST_HEIGHT } from './actions/storeys';
import { useCanvas, useDrawing, useEditor } from './editor-context';
import { beginGesture } from './store';
import { useCoarsePointer } from './use-media';

/** Px on the screen, at any zoom: how much of a band its name and half of the edges above and below it take. */
const NAME_ROOM_PX = 48;
const COARSE_NAME_ROOM_PX = 76;
/** In a lower band the name only stands there, in a band lower than this not even that. */
const WORDS_ROOM_PX = 32;

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
  // While something is placed or joined a press is meant for the sheet, and nothing at its edge may take it.
  const isPressable = useCanvas(({ tool }) => tool === 'select') && canEdit;
  const { y, zoom } = useViewport();
  const room = useCoarsePointer() ? COARSE_NAME_ROOM_PX : NAME_ROOM_PX;
  const height = storey.height * zoom;
  if (height < WORDS_ROOM_PX) return null;
  const hasMenu = canEdit && height >= room;
  const name = 'rounded px-1.5 font-semibold';
  return (
    <>
      {hasMenu && <BandEdge storey={storey} isPressable={isPressable} />}
      <div
        className="text-quiet absolute left-1.5 flex -translate-y-full items-center pb-3 text-xs pointer-coarse:pb-4"
        style={{ top: (storey.top + storey.height) * zoom + y }}
      >
        {hasMenu ? (
          <button
            type="button"
            aria-haspopup="menu"
            aria-label={`Storey ${storey.name}: menu`}
            className={classNames(
              name,
              'hover:bg-well hover:text-ink min-h-6 min-w-6 pointer-coarse:min-h-11 pointer-coarse:min-w-11',
              isPressable && 'pointer-events-auto',
            )}
            onClick={(event) => {
              const { left, top } = event.currentTarget.getBoundingClientRect();
              canvasStore.setState({
                storeyId: storey.id,
                menu: { of: 'storey', screen: { x: left, y: top }, at: { x: 0, y: storey.top + storey.height / 2 } },
              });
            }}
          >
            {storey.name}
          </button>
        ) : (
          <p className={name}>{storey.name}</p>
        )}
        <Figure quantity="length" si={storey.elevationM} hasUnit />
      </div>
    </>
  );
}

/** The upper edge of a band: dragged, or moved with the arrows, it makes the band higher or lower. */
function BandEdge({ storey: { id, name, top, height }, isPressable }: { storey: Storey; isPressable: boolean }) {
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
      className={classNames('band-edge nopan nodrag', isPressable && 'pointer-events-auto', isHeld && 'bg-brass/20')}
      style={{ top: top * zoom + y }}
      onPointerDown={drag}
      onKeyDown={press}
    />
  );
}
