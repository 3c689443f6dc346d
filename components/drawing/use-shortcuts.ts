'use client';

import { useEffect } from 'react';
import { commandFor, type Actions } from './commands';
import { useEditor } from './editor-context';
import { pressWithPipeTool } from './placing';

const typesText = 'input, textarea, select, [contenteditable], [role="dialog"], [role="menu"]';
const takesKeys = '[role="radio"], [role="tab"], [role="menuitem"], button, a';

/** Keys work while the focus is on the page itself or on the canvas and its bars, never while text is typed. */
export function useShortcuts(actions: Actions): void {
  const editor = useEditor();
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      const target = event.target as Element;
      if (event.defaultPrevented) return;
      if (target !== document.body && (!target.closest('[data-drawing-keys]') || target.closest(typesText))) return;
      const asked = commandFor(event);
      if (!asked) return;
      if (/^(Enter|Arrow)/.test(event.key) && !event.altKey && target.closest(takesKeys) && !isElementOfCanvas(target)) return;
      event.preventDefault();
      if (asked === 'place' && isElementOfCanvas(target)) pressElement(target);
      else actions[asked]();
    };
    /** Enter on a piece or pipe selects it, ends a pipe there, or places the chosen kind by it. */
    const pressElement = (target: Element) => {
      const id = target.getAttribute('data-id') ?? target.getAttribute('data-testid')?.replace('rf__edge-', '') ?? '';
      const { tool, pieces, pipes } = editor.canvasStore.getState();
      const piece = editor.drawingStore.getState().drawing.equipment.find((it) => it.id === id);
      if (tool === 'pipe' && piece && editor.canEdit) pressWithPipeTool(editor, piece, { pieceId: id }, 0);
      else if (pieces.has(id) || pipes.has(id)) actions.place();
      else editor.canvasStore.setState({ pieces: new Set(piece ? [id] : []), pipes: new Set(piece ? [] : [id]), page: 'properties' });
    };
    window.addEventListener('keydown', press);
    return () => window.removeEventListener('keydown', press);
  }, [actions, editor]);
}

const isElementOfCanvas = (target: Element) => target.matches('.react-flow__node, .react-flow__edge');
