'use client';

import { useCallback } from 'react';
import { useReactFlow } from 'reactflow';
import type { Drawing, Place } from '@/lib/network/drawing';
import { labelPlace, routeOfPipe } from '@/lib/network/pipe-route';
import { selectPlace } from './canvas-state';
import { useEditor } from './editor-context';

/** Selects a piece, pipe or storey and brings it to the middle of the view. */
export function useShowPlace(): (place: Place) => void {
  const { drawingStore, canvasStore } = useEditor();
  const view = useReactFlow();
  return useCallback(
    (place) => {
      selectPlace(canvasStore, place);
      const { equipment, pipes, storeys } = drawingStore.getState().drawing;
      const zoom = Math.max(view.getZoom(), 0.9);
      const options = { zoom, duration: 250 };
      if (place.kind === 'equipment') {
        const piece = equipment.find(({ id }) => id === place.id);
        if (piece) view.setCenter(piece.x, piece.y, options);
      } else if (place.kind === 'pipe') {
        const pipe = pipes.find(({ id }) => id === place.id);
        const path = pipe && routeOfPipe(pipe, new Map(equipment.map((piece) => [piece.id, piece])));
        if (!path) return;
        const { x, y } = labelPlace(path);
        view.setCenter(x, y, options);
      } else {
        const storey = storeys.find(({ id }) => id === place.id);
        if (storey) view.fitBounds({ x: -80, y: storey.top, width: 900, height: storey.height }, { duration: 250 });
      }
    },
    [canvasStore, drawingStore, view],
  );
}

/** The piece or pipe that the address asks for (`?select=`, as the schedule's rows do); null where there is none such. */
export function placeAskedFor({ equipment, pipes }: Drawing, search: string): Place | null {
  const id = new URLSearchParams(search).get('select');
  if (equipment.some((piece) => piece.id === id)) return { kind: 'equipment', id: id! };
  return pipes.some((pipe) => pipe.id === id) ? { kind: 'pipe', id: id! } : null;
}
