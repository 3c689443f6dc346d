import { createStore } from 'zustand';
import type { EquipmentKind, PipeEnd, Place } from '@/lib/network/drawing';
import type { Basis } from '@/lib/network/drawing-figures';
import type { DrawingPart } from '@/lib/network/duplicate-pieces';
import { firstPipeFigures, type PipeFigures } from '@/lib/network/pipe-choice';
import type { Point } from '@/lib/network/piece-geometry';

export type Tool = 'select' | 'pipe' | EquipmentKind;

export const overlays = ['percent', 'flow', 'velocity', 'gradient', 'drop', 'pressure', 'setting'] as const;
export type Overlay = (typeof overlays)[number];

export type PanelPage = 'properties' | 'settings' | 'faults';

export interface OpenMenu {
  of: 'piece' | 'pipe' | 'sheet' | 'storey';
  /** On the screen, px. */
  screen: Point;
  /** On the sheet. */
  at: Point;
}

export interface CanvasState {
  tool: Tool;
  pieces: ReadonlySet<string>;
  pipes: ReadonlySet<string>;
  overlay: Overlay;
  basis: Basis;
  page: PanelPage;
  /** On narrow screens the panel is a sheet that opens from below. */
  isSheetOpen: boolean;
  open: 'shortcuts' | 'find' | 'issue' | 'commands' | 'tags' | 'rename-storey' | null;
  /** The menu of a piece, a pipe, a storey or the sheet, where it was asked for. */
  menu: OpenMenu | null;
  /** The storey that a command was asked for in its own menu; else it is that of the selection. */
  storeyId: string | null;
  /** Every press adds to the selection, and a drag draws a box: for a finger, which has no Ctrl. */
  isPicking: boolean;
  isMapShown: boolean;
  /** The piece whose pipes are gone through one after another. */
  walkedFrom: string | null;
  clipboard: DrawingPart | null;
  /** What new pipes take over. */
  newPipe: PipeFigures;
  /** New pieces take the figures of the last one of their kind. */
  isLikeLast: boolean;
  /** Where the pipe tool began, and the corners it was given since. */
  pipeStart: { end: PipeEnd; bends: Point[] } | null;
}

const nothing: ReadonlySet<string> = new Set();

export function createCanvasStore(initial: Partial<CanvasState> = {}) {
  return createStore<CanvasState>()(() => ({
    tool: 'select',
    pieces: nothing,
    pipes: nothing,
    overlay: 'percent',
    basis: 'drawn',
    page: 'properties',
    isSheetOpen: false,
    open: null,
    menu: null,
    storeyId: null,
    isPicking: false,
    isMapShown: false,
    walkedFrom: null,
    clipboard: null,
    newPipe: firstPipeFigures,
    isLikeLast: true,
    pipeStart: null,
    ...initial,
  }));
}

export type CanvasStore = ReturnType<typeof createCanvasStore>;

export const selectOnly = (store: CanvasStore, pieces: Iterable<string>, pipes: Iterable<string> = []) =>
  store.setState({ pieces: new Set(pieces), pipes: new Set(pipes), page: 'properties' });

export const selectPlace = (store: CanvasStore, place: Place) =>
  store.setState({
    pieces: place.kind === 'equipment' ? new Set([place.id]) : nothing,
    pipes: place.kind === 'pipe' ? new Set([place.id]) : nothing,
  });
