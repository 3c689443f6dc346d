'use client';

import type { DrawingPipe, Equipment } from '@/lib/network/drawing';
import { mapPieces } from '@/lib/network/move-pieces';
import { useEditor } from '../editor-context';

/** Changes pieces or pipes by id, one step of the history each. */
export function useEdit() {
  const { drawingStore } = useEditor();
  const { change } = drawingStore.getState();
  return {
    editPieces: <T extends Equipment>(pieces: T[], make: (piece: T) => T) =>
      change((drawing) => mapPieces(drawing, new Set(pieces.map(({ id }) => id)), (piece) => make(piece as T))),
    editPipes: (pipes: DrawingPipe[], make: (pipe: DrawingPipe) => DrawingPipe) => {
      const ids = new Set(pipes.map(({ id }) => id));
      change((drawing) => ({ ...drawing, pipes: drawing.pipes.map((pipe) => (ids.has(pipe.id) ? make(pipe) : pipe)) }));
    },
    change,
  };
}
