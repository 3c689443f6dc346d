import { temporal } from 'zundo';
import { createStore } from 'zustand';
import type { Drawing } from '@/lib/network/drawing';

interface DrawingState {
  drawing: Drawing;
  /** One step of the history, unless it stands between `beginGesture` and `endGesture`. */
  change: (make: (drawing: Drawing) => Drawing) => void;
}

/**
 * The drawing under the hand, with its history: every step of the session, since two drawings share all that did not change
 * between them. What is selected or shown is no part of it.
 */
export function createDrawingStore(drawing: Drawing) {
  return createStore<DrawingState>()(
    temporal((set) => ({ drawing, change: (make) => set((state) => ({ drawing: make(state.drawing) })) }), {
      partialize: (state) => ({ drawing: state.drawing }),
      equality: (past, current) => past.drawing === current.drawing,
    }),
  );
}

export type DrawingStore = ReturnType<typeof createDrawingStore>;

/** From here on changes follow the hand and are no steps of the history; answers what ends the gesture as a single step. */
export function beginGesture(store: DrawingStore): () => void {
  const before = store.getState().drawing;
  const history = store.temporal.getState();
  history.pause();
  return () => {
    const after = store.getState().drawing;
    store.setState({ drawing: before });
    history.resume();
    if (after !== before) store.setState({ drawing: after });
  };
}
