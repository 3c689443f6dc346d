import type { Tool } from './canvas-state';

/** Everything that can be done on the canvas, by name. Each has a key and an entry in the Edit menu. */
export const actionIds = [
  'undo',
  'redo',
  'cut',
  'copy',
  'paste',
  'duplicate',
  'delete',
  'select-all',
  'rotate',
  'mirror',
  'join',
  'nudge-left',
  'nudge-right',
  'nudge-up',
  'nudge-down',
  'place',
  'find',
  'fit',
  'zoom-in',
  'zoom-out',
  'next-overlay',
  'escape',
  'shortcuts',
] as const;
export type ActionId = (typeof actionIds)[number];

export interface Shortcut<Id extends string = string> {
  id: Id;
  /** As `event.key` gives it, lower case; with `mod` Ctrl (or Command) is held. */
  key: string;
  mod?: boolean;
  shift?: boolean;
  /** How a person reads it. */
  keys: string;
  label: string;
}

export const toolShortcuts: Shortcut<Tool>[] = [
  { id: 'select', key: 'v', keys: 'V', label: 'Select' },
  { id: 'pipe', key: 'w', keys: 'W', label: 'Pipe' },
  { id: 'pump', key: 'p', keys: 'P', label: 'Pump' },
  { id: 'source', key: 's', keys: 'S', label: 'Source' },
  { id: 'terminalUnit', key: 'u', keys: 'U', label: 'Terminal unit' },
  { id: 'balancingValve', key: 'b', keys: 'B', label: 'Balancing valve' },
  { id: 'controlValve', key: 'c', keys: 'C', label: 'Control valve' },
  { id: 'isolatingValve', key: 'i', keys: 'I', label: 'Isolating valve' },
  { id: 'checkValve', key: 'k', keys: 'K', label: 'Check valve' },
  { id: 'strainer', key: 'y', keys: 'Y', label: 'Strainer' },
  { id: 'tee', key: 't', keys: 'T', label: 'Tee' },
  { id: 'expansionVessel', key: 'e', keys: 'E', label: 'Expansion vessel' },
];

export const editShortcuts: Shortcut<ActionId>[] = [
  { id: 'undo', key: 'z', mod: true, keys: 'Ctrl Z', label: 'Undo' },
  { id: 'redo', key: 'z', mod: true, shift: true, keys: 'Ctrl Shift Z', label: 'Redo' },
  { id: 'redo', key: 'y', mod: true, keys: 'Ctrl Y', label: 'Redo' },
  { id: 'cut', key: 'x', mod: true, keys: 'Ctrl X', label: 'Cut' },
  { id: 'copy', key: 'c', mod: true, keys: 'Ctrl C', label: 'Copy' },
  { id: 'paste', key: 'v', mod: true, keys: 'Ctrl V', label: 'Paste' },
  { id: 'duplicate', key: 'd', mod: true, keys: 'Ctrl D', label: 'Duplicate' },
  { id: 'delete', key: 'delete', keys: 'Delete', label: 'Delete, joining up the pipe' },
  { id: 'delete', key: 'backspace', keys: 'Backspace', label: 'Delete, joining up the pipe' },
  { id: 'select-all', key: 'a', mod: true, keys: 'Ctrl A', label: 'Select all' },
  { id: 'rotate', key: 'r', keys: 'R', label: 'Rotate a quarter turn' },
  { id: 'mirror', key: 'm', keys: 'M', label: 'Mirror' },
  { id: 'join', key: 'j', keys: 'J', label: 'Join two selected pieces with a pipe' },
  { id: 'nudge-left', key: 'arrowleft', keys: '←', label: 'Nudge left' },
  { id: 'nudge-right', key: 'arrowright', keys: '→', label: 'Nudge right' },
  { id: 'nudge-up', key: 'arrowup', keys: '↑', label: 'Nudge up' },
  { id: 'nudge-down', key: 'arrowdown', keys: '↓', label: 'Nudge down' },
  { id: 'place', key: 'enter', keys: 'Enter', label: 'Place the chosen piece in mid-view, or select the focused one' },
  { id: 'escape', key: 'escape', keys: 'Esc', label: 'Back to selecting; select nothing' },
];

export const viewShortcuts: Shortcut<ActionId>[] = [
  { id: 'find', key: 'f', mod: true, keys: 'Ctrl F', label: 'Find by tag' },
  { id: 'fit', key: 'f', keys: 'F', label: 'Fit all in view' },
  { id: 'zoom-in', key: '+', keys: '+', label: 'Closer' },
  { id: 'zoom-out', key: '-', keys: '−', label: 'Farther' },
  { id: 'next-overlay', key: 'o', keys: 'O', label: 'Next overlay' },
  { id: 'shortcuts', key: '?', keys: '?', label: 'All keys' },
];

type Press = Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'shiftKey' | 'altKey'>;

/** What a key press asks for: an action, or a tool; null where it is nothing of ours. */
export function shortcutFor(press: Press): { action: ActionId } | { tool: Tool } | null {
  if (press.altKey) return null;
  const key = press.key.toLowerCase();
  const mod = press.ctrlKey || press.metaKey;
  // A sign such as "?" or "+" needs Shift on many keyboards: there it says nothing.
  const isSign = key.length === 1 && !/[a-z]/.test(key);
  const fits = (it: Shortcut) =>
    it.key === key && Boolean(it.mod) === mod && (isSign || key.startsWith('arrow') || Boolean(it.shift) === press.shiftKey);
  const action = [...editShortcuts, ...viewShortcuts].find(fits);
  if (action) return { action: action.id };
  const tool = toolShortcuts.find(fits);
  return tool ? { tool: tool.id } : null;
}
