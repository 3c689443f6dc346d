import type { ReactFlowInstance } from 'reactflow';
import type { Point } from '@/lib/network/piece-geometry';
import type { Editor } from '../editor-context';

/** What an action works on: the drawing with its canvas, and the view of it. */
export interface Stage {
  editor: Editor;
  view: ReactFlowInstance;
}

export const canvasBox = (): DOMRect | null => document.querySelector('.drawing-canvas')?.getBoundingClientRect() ?? null;

/** The point of the sheet in the middle of the view. */
export function midView({ view }: Stage): Point {
  const box = canvasBox();
  return view.screenToFlowPosition(box ? { x: box.left + box.width / 2, y: box.top + box.height / 2 } : { x: 0, y: 0 });
}

/** Where something stands that cannot be seen, the view goes there; else it stays. */
export function bringIntoView({ view }: Stage, { x, y }: Point): void {
  const box = canvasBox();
  const on = view.flowToScreenPosition({ x, y });
  const margin = 60;
  const isSeen = box && on.x > box.left + margin && on.x < box.right - margin && on.y > box.top + margin && on.y < box.bottom - margin;
  if (!isSeen) view.setCenter(x, y, { zoom: view.getZoom(), duration: 0 });
}

/** Gives the focus to a piece or pipe, once it is drawn. */
export function focusElement(id: string, triesLeft = 10): void {
  const quoted = CSS.escape(id);
  const element = document.querySelector<HTMLElement>(`.react-flow__node[data-id="${quoted}"], [data-testid="rf__edge-${quoted}"]`);
  if (element) element.focus({ preventScroll: true });
  else if (triesLeft > 0) requestAnimationFrame(() => focusElement(id, triesLeft - 1));
}
