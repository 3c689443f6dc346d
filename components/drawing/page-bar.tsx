'use client';

import { Command, Map as MapIcon, Redo2, Search, Trash2, Undo2 } from 'lucide-react';
import type { ReactNode } from 'react';
import { useStore } from 'zustand';
import { firstKey, type Actions, type CommandId } from './commands';
import { EditMenu } from './edit-menu';
import { useCanvas, useEditor } from './editor-context';

/** Above the canvas: history, the menu of all actions, finding, and what the page has to add. */
export function PageBar({ actions, children }: { actions: Actions; children?: ReactNode }) {
  const { drawingStore, canEdit } = useEditor();
  const canUndo = useStore(drawingStore.temporal, ({ pastStates }) => pastStates.length > 0);
  const canRedo = useStore(drawingStore.temporal, ({ futureStates }) => futureStates.length > 0);
  const hasSelection = useCanvas(({ pieces, pipes }) => pieces.size + pipes.size > 0);
  return (
    <div className="bg-sheet flex min-h-11 flex-wrap items-center gap-1 border-b px-2">
      {canEdit && (
        <>
          <IconButton id="undo" label="Undo" isOff={!canUndo} actions={actions} icon={<Undo2 size={18} />} />
          <IconButton id="redo" label="Redo" isOff={!canRedo} actions={actions} icon={<Redo2 size={18} />} />
          <IconButton id="delete" label="Delete" isOff={!hasSelection} actions={actions} icon={<Trash2 size={18} />} />
        </>
      )}
      <EditMenu actions={actions} canEdit={canEdit} />
      <IconButton id="commands" label="All commands" actions={actions} icon={<Command size={18} />} />
      <IconButton id="find" label="Find by tag" actions={actions} icon={<Search size={18} />} />
      <IconButton id="small-map" label="Small map" actions={actions} icon={<MapIcon size={18} />} />
      <div className="ml-auto flex items-center gap-3 py-1">{children}</div>
    </div>
  );
}

interface IconButtonProps {
  id: CommandId;
  label: string;
  icon: ReactNode;
  isOff?: boolean;
  actions: Actions;
}

function IconButton({ id, label, icon, isOff, actions }: IconButtonProps) {
  const words = `${label} (${firstKey(id)})`;
  return (
    <button
      type="button"
      className="text-ink hover:bg-well inline-flex size-9 items-center justify-center rounded disabled:opacity-35 pointer-coarse:size-11"
      aria-label={words}
      title={words}
      disabled={isOff}
      onClick={actions[id]}
    >
      {icon}
    </button>
  );
}
