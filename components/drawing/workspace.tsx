'use client';

import type { ReactNode } from 'react';
import { Canvas } from './canvas';
import { CommandList } from './command-list';
import { ContextMenu } from './context-menu';
import { RenameStoreyDialog } from './dialogs/rename-storey-dialog';
import { ShortcutsDialog } from './dialogs/shortcuts-dialog';
import { TagsDialog } from './dialogs/tags-dialog';
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
  const storeyId = useCanvas((state) => state.storeyId);
  const close = () => canvasStore.setState({ open: null, storeyId: null });
  const isEmpty = useDrawing((drawing) => drawing.equipment.length === 0);
  return (
    <div className="flex flex-col" data-drawing-keys>
      <PageBar actions={actions}>{bar}</PageBar>
      <div className={`relative flex min-h-0 flex-1 ${canEdit ? 'max-md:pb-[6.5rem]' : 'max-md:pb-12'}`}>
        {canEdit && <ToolRail actions={actions} />}
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
      <ShortcutsDialog isOpen={open === 'shortcuts'} onClose={close} />
      <ContextMenu actions={actions} />
      {open === 'commands' && <CommandList actions={actions} onClose={close} />}
      {open === 'tags' && <TagsDialog onClose={close} />}
      {open === 'rename-storey' && storeyId && <RenameStoreyDialog storeyId={storeyId} onClose={close} />}
    </div>
  );
}

const EmptyDrawing = ({ canEdit }: { canEdit: boolean }) => (
  <div className="pointer-events-none absolute inset-0 flex items-center justify-center p-6">
    <div className="bg-sheet max-w-sm rounded border px-5 py-4">
      <h2>Nothing drawn yet</h2>
      {canEdit ? (
        <p className="text-quiet mt-1 text-sm">
          Choose a pump among the tools and press on the canvas. Drag from the end of one piece to the end of another to join them with a
          pipe. Press ? for all keys, Ctrl K for all commands.
        </p>
      ) : (
        <p className="text-quiet mt-1 text-sm">The designer has not drawn this loop.</p>
      )}
    </div>
  </div>
);
