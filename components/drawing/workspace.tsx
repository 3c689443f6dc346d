'use client';

import type { ReactNode } from 'react';
import { Canvas } from './canvas';
import { ShortcutsDialog } from './dialogs/shortcuts-dialog';
import { useCanvas, useDrawing, useEditor } from './editor-context';
import { FindBar } from './find-bar';
import { Legend, OverlayPicker } from './overlay-picker';
import { PageBar } from './page-bar';
import { SidePanel } from './side-panel';
import { ToolRail } from './tool-rail';
import { useActions } from './use-actions';
import { useShortcuts } from './use-shortcuts';

interface WorkspaceProps {
  /** At the right of the bar: what can be done with the drawing as a whole. */
  bar: ReactNode;
  status: ReactNode;
  hasBothBases: boolean;
}

/** Tools, canvas, figures and status: the page as designers and readers share it. */
export function Workspace({ bar, status, hasBothBases }: WorkspaceProps) {
  const { canvasStore, canEdit } = useEditor();
  const actions = useActions();
  useShortcuts(actions);
  const open = useCanvas((state) => state.open);
  const isEmpty = useDrawing((drawing) => drawing.equipment.length === 0);
  return (
    <div className="flex flex-col" data-drawing-keys>
      <PageBar actions={actions}>{bar}</PageBar>
      <div className="relative flex min-h-0 flex-1 max-md:pb-12">
        {canEdit && <ToolRail />}
        <div className="relative min-w-0 flex-1">
          <Canvas />
          <div className="pointer-events-none absolute inset-x-3 top-3 z-10 flex items-start justify-between gap-2 *:pointer-events-auto max-lg:flex-col-reverse">
            <Legend hasBothBases={hasBothBases} />
            <OverlayPicker />
          </div>
          {open === 'find' && <FindBar />}
          {isEmpty && <EmptyDrawing canEdit={canEdit} />}
        </div>
        <SidePanel />
      </div>
      {status}
      <ShortcutsDialog isOpen={open === 'shortcuts'} onClose={() => canvasStore.setState({ open: null })} />
    </div>
  );
}

const EmptyDrawing = ({ canEdit }: { canEdit: boolean }) => (
  <div className="pointer-events-none absolute inset-0 flex items-center justify-center p-6">
    <div className="bg-sheet max-w-sm rounded border px-5 py-4">
      <h2>Nothing drawn yet</h2>
      {canEdit ? (
        <p className="text-quiet mt-1 text-sm">
          Choose a pump at the left and press on the canvas. Drag from the end of one piece to the end of another to join them with a pipe.
          Press ? for all keys.
        </p>
      ) : (
        <p className="text-quiet mt-1 text-sm">The designer has not drawn this loop.</p>
      )}
    </div>
  </div>
);
