'use client';

import { MousePointer2 } from 'lucide-react';
import { Tooltip } from 'radix-ui';
import { classNames } from '@/components/ui/class-names';
import type { Tool } from './canvas-state';
import { draggedKind } from './canvas';
import { useCanvas, useEditor } from './editor-context';
import { toolShortcuts } from './shortcuts';
import { KindIcon } from './symbols/symbol';

/** The tools: choose one and press on the canvas, or drag its symbol there. */
export function ToolRail() {
  const { canvasStore } = useEditor();
  const chosen = useCanvas((state) => state.tool);
  return (
    <Tooltip.Provider delayDuration={250}>
      <div
        role="toolbar"
        aria-label="Tools"
        aria-orientation="vertical"
        className="bg-sheet hidden w-14 shrink-0 flex-col items-center gap-0.5 overflow-y-auto border-r py-2 md:flex pointer-coarse:w-16"
      >
        {toolShortcuts.map(({ id, label, keys }) => (
          <Tooltip.Root key={id}>
            <Tooltip.Trigger asChild>
              <button
                type="button"
                aria-pressed={chosen === id}
                aria-label={`${label} (${keys})`}
                draggable={id !== 'select' && id !== 'pipe'}
                onDragStart={(event) => event.dataTransfer.setData(draggedKind, id)}
                onClick={() => canvasStore.setState({ tool: id, pipeStart: null })}
                className={classNames(
                  'hover:bg-well flex size-11 shrink-0 items-center justify-center rounded border pointer-coarse:size-12',
                  chosen === id ? 'border-brass bg-well' : 'border-transparent',
                )}
              >
                <ToolIcon tool={id} />
              </button>
            </Tooltip.Trigger>
            <Tooltip.Portal>
              <Tooltip.Content side="right" sideOffset={6} className="bg-sheet z-50 rounded border px-2 py-1 text-sm shadow">
                {label} <kbd className="text-quiet ml-1">{keys}</kbd>
              </Tooltip.Content>
            </Tooltip.Portal>
          </Tooltip.Root>
        ))}
      </div>
    </Tooltip.Provider>
  );
}

function ToolIcon({ tool }: { tool: Tool }) {
  if (tool === 'select') return <MousePointer2 size={20} strokeWidth={1.5} />;
  if (tool === 'pipe') {
    return (
      <svg viewBox="-22 -22 44 44" width={30} height={30} aria-hidden>
        <path d="M-16 10H0V-10H16" fill="none" stroke="currentColor" strokeWidth={1.5} />
      </svg>
    );
  }
  return <KindIcon kind={tool} />;
}
