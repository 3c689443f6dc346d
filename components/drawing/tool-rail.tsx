'use client';

import { BoxSelect, MousePointer2 } from 'lucide-react';
import { Tooltip } from 'radix-ui';
import type { PointerEvent } from 'react';
import { useReactFlow } from 'reactflow';
import { classNames } from '@/components/ui/class-names';
import { draggedKind } from './canvas';
import type { Tool } from './canvas-state';
import { firstKey, toolName, tools, type Actions, type CommandId } from './commands';
import { useCanvas, useEditor } from './editor-context';
import { ON_PIPE_PX, placePiece } from './placing';
import { KindIcon } from './symbols/symbol';
import { useNarrow } from './use-media';

/** The tools: choose one and press on the canvas, or drag its symbol there. At the foot of the canvas on narrow screens. */
export function ToolRail({ actions }: { actions: Actions }) {
  const chosen = useCanvas((state) => state.tool);
  const isPicking = useCanvas((state) => state.isPicking);
  const isNarrow = useNarrow();
  return (
    <Tooltip.Provider delayDuration={250}>
      <div
        role="toolbar"
        aria-label="Tools"
        aria-orientation={isNarrow ? 'horizontal' : 'vertical'}
        className={classNames(
          'bg-sheet flex shrink-0 items-center gap-0.5',
          'max-md:absolute max-md:inset-x-0 max-md:bottom-12 max-md:z-10 max-md:h-14 max-md:touch-pan-x max-md:overflow-x-auto max-md:border-t max-md:px-1',
          'md:w-14 md:touch-pan-y md:flex-col md:overflow-y-auto md:border-r md:py-2 md:pointer-coarse:w-16',
        )}
      >
        <ToolButton id="tool-select" label="Select" isOn={chosen === 'select' && !isPicking} actions={actions} tool="select" />
        <ToolButton id="pick-several" label="Pick several" isOn={isPicking} actions={actions} className="pointer-fine:hidden" />
        {tools.slice(1).map((tool) => (
          <ToolButton key={tool} id={`tool-${tool}`} label={toolName(tool)} isOn={chosen === tool} actions={actions} tool={tool} />
        ))}
      </div>
    </Tooltip.Provider>
  );
}

interface ToolButtonProps {
  id: CommandId;
  label: string;
  isOn: boolean;
  actions: Actions;
  tool?: Tool;
  className?: string;
}

function ToolButton({ id, label, isOn, actions, tool, className }: ToolButtonProps) {
  const editor = useEditor();
  const view = useReactFlow();
  const isNarrow = useNarrow();
  const kind = tool && tool !== 'select' && tool !== 'pipe' ? tool : null;
  /** A finger that was drawn from the symbol to the canvas; a mouse does it by the browser's own dragging. */
  const drop = ({ pointerType, clientX, clientY }: PointerEvent) => {
    if (pointerType === 'mouse' || !kind || !document.elementFromPoint(clientX, clientY)?.closest('.drawing-canvas')) return;
    placePiece(editor, kind, view.screenToFlowPosition({ x: clientX, y: clientY }), ON_PIPE_PX / view.getZoom());
  };
  return (
    <Tooltip.Root>
      <Tooltip.Trigger asChild>
        <button
          type="button"
          aria-pressed={isOn}
          aria-label={`${label} (${firstKey(id)})`}
          draggable={kind !== null}
          onDragStart={(event) => event.dataTransfer.setData(draggedKind, kind ?? '')}
          onPointerUp={drop}
          onClick={actions[id]}
          className={classNames(
            'hover:bg-well flex size-11 shrink-0 items-center justify-center rounded border pointer-coarse:size-12',
            isOn ? 'border-brass bg-well' : 'border-transparent',
            className,
          )}
        >
          {tool ? <ToolIcon tool={tool} /> : <BoxSelect size={20} strokeWidth={1.5} />}
        </button>
      </Tooltip.Trigger>
      <Tooltip.Portal>
        <Tooltip.Content side={isNarrow ? 'top' : 'right'} sideOffset={6} className="bg-sheet z-50 rounded border px-2 py-1 text-sm shadow">
          {label} <kbd className="text-quiet ml-1">{firstKey(id)}</kbd>
        </Tooltip.Content>
      </Tooltip.Portal>
    </Tooltip.Root>
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
