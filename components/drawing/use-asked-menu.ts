'use client';

import { useMemo, useRef, type MouseEvent, type PointerEvent } from 'react';
import { useReactFlow } from 'reactflow';
import { storeyAt } from '@/lib/network/storeys';
import { selectOnly } from './canvas-state';
import { useEditor } from './editor-context';

const LONG_PRESS_MS = 550;
/** A finger is never quite still. */
const STILL_PX = 10;

/** Opens the menu of what lies under the right button or under a finger that stays: handlers for the canvas. */
export function useAskedMenu() {
  const { canvasStore, drawingStore } = useEditor();
  const view = useReactFlow();
  const pressed = useRef<{ timer: number; x: number; y: number } | null>(null);
  return useMemo(() => {
    const open = (target: Element, screen: { x: number; y: number }) => {
      const pieceId = target.closest('.react-flow__node')?.getAttribute('data-id');
      const pipeId = target.closest('.react-flow__edge')?.getAttribute('data-testid')?.replace('rf__edge-', '');
      const { pieces, pipes } = canvasStore.getState();
      const at = view.screenToFlowPosition(screen);
      if (pieceId && !pieces.has(pieceId)) selectOnly(canvasStore, [pieceId]);
      if (pipeId && !pipes.has(pipeId)) selectOnly(canvasStore, [], [pipeId]);
      const isOfSelection = Boolean(target.closest('.react-flow__nodesselection'));
      const of = pieceId || isOfSelection ? 'piece' : pipeId ? 'pipe' : 'sheet';
      const storeyId = of === 'sheet' ? (storeyAt(drawingStore.getState().drawing, at.y)?.id ?? null) : null;
      canvasStore.setState({ menu: { of, at, screen }, storeyId });
    };
    const letGo = () => {
      if (pressed.current) window.clearTimeout(pressed.current.timer);
      pressed.current = null;
    };
    return {
      onContextMenu: (event: MouseEvent) => {
        event.preventDefault();
        letGo();
        if (canvasStore.getState().menu === null) open(event.target as Element, { x: event.clientX, y: event.clientY });
      },
      onPointerDownCapture: (event: PointerEvent) => {
        const isSecondFinger = pressed.current !== null;
        letGo();
        if (event.pointerType === 'mouse' || isSecondFinger || !event.isPrimary) return;
        const [target, screen] = [event.target as Element, { x: event.clientX, y: event.clientY }];
        if (target.closest('.piece-port, .pipe-hold')) return;
        pressed.current = { ...screen, timer: window.setTimeout(() => open(target, screen), LONG_PRESS_MS) };
      },
      onPointerMoveCapture: ({ clientX, clientY }: PointerEvent) => {
        const from = pressed.current;
        if (from && Math.hypot(clientX - from.x, clientY - from.y) > STILL_PX) letGo();
      },
      onPointerUpCapture: letGo,
      onPointerCancelCapture: letGo,
    };
  }, [canvasStore, drawingStore, view]);
}
