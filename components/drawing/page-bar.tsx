'use client';

import { Redo2, Search, Trash2, Undo2 } from 'lucide-react';
import type { ReactNode } from 'react';
import { useStore } from 'zustand';
import { EditMenu } from './edit-menu';
import { useCanvas, useEditor } from './editor-context';
import type { ActionId } from './shortcuts';

const icon = 'inline-flex size-9 items-center justify-center rounded text-ink hover:bg-well disabled:opacity-35 pointer-coarse:size-11';

/** Above the canvas: history, the menu of all actions, finding, and what the page has to add. */
export function PageBar({ actions, children }: { actions: Record<ActionId, () => void>; children?: ReactNode }) {
  const { drawingStore, canEdit } = useEditor();
  const canUndo = useStore(drawingStore.temporal, ({ pastStates }) => pastStates.length > 0);
  const canRedo = useStore(drawingStore.temporal, ({ futureStates }) => futureStates.length > 0);
  const hasSelection = useCanvas(({ pieces, pipes }) => pieces.size + pipes.size > 0);
  return (
    <div className="bg-sheet flex min-h-11 flex-wrap items-center gap-1 border-b px-2">
      {canEdit && (
        <>
          <button
            type="button"
            className={icon}
            aria-label="Undo (Ctrl Z)"
            title="Undo (Ctrl Z)"
            disabled={!canUndo}
            onClick={actions.undo}
          >
            <Undo2 size={18} />
          </button>
          <button
            type="button"
            className={icon}
            aria-label="Redo (Ctrl Shift Z)"
            title="Redo (Ctrl Shift Z)"
            disabled={!canRedo}
            onClick={actions.redo}
          >
            <Redo2 size={18} />
          </button>
          <button
            type="button"
            className={icon}
            aria-label="Delete (Delete)"
            title="Delete (Delete)"
            disabled={!hasSelection}
            onClick={actions.delete}
          >
            <Trash2 size={18} />
          </button>
        </>
      )}
      <EditMenu actions={actions} canEdit={canEdit} />
      <button type="button" className={icon} aria-label="Find by tag (Ctrl F)" title="Find by tag (Ctrl F)" onClick={actions.find}>
        <Search size={18} />
      </button>
      <div className="ml-auto flex items-center gap-3 py-1">{children}</div>
    </div>
  );
}
