'use client';

import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import type { SolvedBody } from '@/lib/api/loops';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { Drawing } from '@/lib/network/drawing';
import type { DrawnFigures } from '@/lib/network/drawing-figures';
import type { Fault } from '@/lib/network/fault';
import type { CanvasState, CanvasStore } from './canvas-state';
import type { DrawingStore } from './store';

/** What the whole page works on; it stays the same for as long as the page is open. */
export interface Editor {
  drawingStore: DrawingStore;
  canvasStore: CanvasStore;
  canEdit: boolean;
  band: StripBand;
}

export const EditorContext = createContext<Editor | null>(null);

export function useEditor(): Editor {
  const editor = useContext(EditorContext);
  if (!editor) throw new Error('A part of the drawing stands outside of its editor');
  return editor;
}

export const useDrawing = <T>(pick: (drawing: Drawing) => T): T => useStore(useEditor().drawingStore, (state) => pick(state.drawing));
export const useCanvas = <T>(pick: (state: CanvasState) => T): T => useStore(useEditor().canvasStore, pick);

/** The last good answer of the solver as the page shows it. */
export interface Results {
  solved: (Omit<SolvedBody, 'solve'> & { solve: SolvedBody['solve'] | null }) | null;
  figures: DrawnFigures | null;
  faults: Fault[];
  /** Ids of the pieces and pipes that an error stands at. */
  faulty: ReadonlySet<string>;
  isOld: boolean;
  /** Ids of the pieces and pipes of the index circuit. */
  index: ReadonlySet<string>;
}

export const noResults: Results = { solved: null, figures: null, faults: [], faulty: new Set(), isOld: false, index: new Set() };
export const ResultsContext = createContext<Results>(noResults);
export const useResults = (): Results => useContext(ResultsContext);

export const faultyOf = (faults: Fault[]): ReadonlySet<string> =>
  new Set(faults.filter(({ severity }) => severity === 'error').map(({ place }) => place.id));
