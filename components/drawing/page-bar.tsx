'use client';

import { Redo2, Search, Trash2, Undo2 } from 'lucide-react';
import type { ReactNode } from 'react';
import { useStore } from 'zustand';
import { EditMenu } from './edit-menu';
import { useCanvas, useEditor } from './editor-context';
import type { ActionId } from './shortcuts';

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
          <IconButton label="Undo (Ctrl Z)" isOff={!canUndo} onPress={actions.undo} icon={<Undo2 size={18} />} />
          <IconButton label="Redo (Ctrl Shift Z)" isOff={!canRedo} onPress={actions.redo} icon={<Redo2 size={18} />} />
          <IconButton label="Delete (Delete)" isOff={!hasSelection} onPress={actions.delete} icon={<Trash2 size={18} />} />
        </>
      )}
      <EditMenu actions={actions} canEdit={canEdit} />
      <IconButton label="Find by tag (Ctrl F)" onPress={actions.find} icon={<Search size={18} />} />
      <div className="ml-auto flex items-center gap-3 py-1">{children}</div>
    </div>
  );
}

interface IconButtonProps {
  /** What it does, with its key. */
  label: string;
  icon: ReactNode;
  isOff?: boolean;
  onPress: () => void;
}

const IconButton = ({ label, icon, isOff, onPress }: IconButtonProps) => (
  <button
    type="button"
    className="text-ink hover:bg-well inline-flex size-9 items-center justify-center rounded disabled:opacity-35 pointer-coarse:size-11"
    aria-label={label}
    title={label}
    disabled={isOff}
    onClick={onPress}
  >
    {icon}
  </button>
);
