import { kindNames } from '@/lib/network/fault';
import type { EquipmentKind } from '@/lib/network/drawing';
import type { Tool } from './canvas-state';

/** Everything that can be done on the canvas: the one list that keys, menus and the list of commands are made of. */

export interface Key {
  /** As `event.key` gives it, lower case; with `mod` Ctrl (or Command) is held. */
  key: string;
  mod?: true;
  shift?: true;
  alt?: true;
}

export type MenuPlace = 'piece' | 'pipe' | 'sheet' | 'storey';
export const commandGroups = ['Edit', 'Arrange', 'Pipes', 'Storeys', 'Go about', 'View', 'Tools'] as const;
export type CommandGroup = (typeof commandGroups)[number];

export interface Command {
  id: string;
  label: string;
  group: CommandGroup;
  keys: Key[];
  /** In the menu of which things it stands. */
  menus?: MenuPlace[];
  /** Changes nothing, and so is there for those who only read. */
  isForReaders?: true;
}

const key = (text: string): Key => {
  const parts = text.split(' ');
  const held = parts.slice(0, -1);
  return {
    key: parts[parts.length - 1].toLowerCase(),
    ...(held.includes('Ctrl') && { mod: true }),
    ...(held.includes('Shift') && { shift: true }),
    ...(held.includes('Alt') && { alt: true }),
  };
};

const command = <Id extends string>(
  id: Id,
  group: CommandGroup,
  label: string,
  keys: string[],
  more: Pick<Command, 'menus' | 'isForReaders'> = {},
) => ({ id, group, label, keys: keys.map(key), ...more }) satisfies Command;

const piece: MenuPlace[] = ['piece'];
const pipe: MenuPlace[] = ['pipe'];
const storey: MenuPlace[] = ['storey'];
const both: MenuPlace[] = ['piece', 'pipe'];
const sheet: MenuPlace[] = ['sheet'];

const actionCommands = [
  command('undo', 'Edit', 'Undo', ['Ctrl Z'], { menus: sheet }),
  command('redo', 'Edit', 'Redo', ['Ctrl Shift Z', 'Ctrl Y'], { menus: sheet }),
  command('cut', 'Edit', 'Cut', ['Ctrl X'], { menus: piece }),
  command('copy', 'Edit', 'Copy', ['Ctrl C'], { menus: piece, isForReaders: true }),
  command('paste', 'Edit', 'Paste', ['Ctrl V'], { menus: sheet }),
  command('duplicate', 'Edit', 'Duplicate beside, with new tags', ['Ctrl D'], { menus: piece }),
  command('delete', 'Edit', 'Delete, joining up the pipe', ['Delete', 'Backspace'], { menus: both }),
  command('select-all', 'Edit', 'Select all', ['Ctrl A'], { menus: sheet, isForReaders: true }),
  command('pick-several', 'Edit', 'Pick several, one after another or with a box', ['Shift A'], {
    menus: ['piece', 'sheet'],
    isForReaders: true,
  }),
  command('escape', 'Edit', 'Back to selecting; select nothing', ['Escape'], { isForReaders: true }),
  command('place', 'Edit', 'Place the chosen piece, or select the focused one', ['Enter'], { isForReaders: true }),
  command('renumber', 'Edit', 'Rules for tags and renumbering…', ['Shift T'], { menus: ['piece', 'sheet'] }),

  command('rotate', 'Arrange', 'Rotate a quarter turn', ['R'], { menus: piece }),
  command('mirror', 'Arrange', 'Mirror', ['M'], { menus: piece }),
  command('nudge-left', 'Arrange', 'Nudge left', ['ArrowLeft']),
  command('nudge-right', 'Arrange', 'Nudge right', ['ArrowRight']),
  command('nudge-up', 'Arrange', 'Nudge up', ['ArrowUp']),
  command('nudge-down', 'Arrange', 'Nudge down', ['ArrowDown']),
  command('shift-left', 'Arrange', 'Move left by four', ['Shift ArrowLeft']),
  command('shift-right', 'Arrange', 'Move right by four', ['Shift ArrowRight']),
  command('shift-up', 'Arrange', 'Move up by four', ['Shift ArrowUp']),
  command('shift-down', 'Arrange', 'Move down by four', ['Shift ArrowDown']),
  command('align-left', 'Arrange', 'Line up left edges', ['Ctrl Shift ArrowLeft']),
  command('align-right', 'Arrange', 'Line up right edges', ['Ctrl Shift ArrowRight']),
  command('align-top', 'Arrange', 'Line up upper edges', ['Ctrl Shift ArrowUp']),
  command('align-bottom', 'Arrange', 'Line up lower edges', ['Ctrl Shift ArrowDown']),
  command('align-row', 'Arrange', 'Centres on one level line', ['Shift H']),
  command('align-column', 'Arrange', 'Centres on one plumb line', ['Shift V']),
  command('distribute-across', 'Arrange', 'Even gaps across', ['Shift X']),
  command('distribute-down', 'Arrange', 'Even gaps down', ['Shift Y']),

  command('join', 'Pipes', 'Join two selected pieces with a pipe', ['J'], { menus: piece }),
  command('begin-pipe', 'Pipes', 'Begin a pipe at the selected piece', ['Shift W'], { menus: piece }),
  command('hold-bend', 'Pipes', 'Take hold of the next bend; arrows move it', ['X'], { menus: pipe }),
  command('straighten', 'Pipes', 'Let the pipe find its own way again', ['Shift S'], { menus: pipe }),

  command('storey-rename', 'Storeys', 'Rename the storey…', ['F2'], { menus: storey }),
  command('storey-up', 'Storeys', 'Move the storey up a place', ['Alt PageUp'], { menus: storey }),
  command('storey-down', 'Storeys', 'Move the storey down a place', ['Alt PageDown'], { menus: storey }),
  command('storey-higher', 'Storeys', 'Make its band higher', [']'], { menus: storey }),
  command('storey-lower', 'Storeys', 'Make its band lower', ['['], { menus: storey }),
  command('storey-duplicate', 'Storeys', 'Duplicate the storey above it, with new tags', ['Ctrl Shift D'], { menus: storey }),
  command('storey-add-above', 'Storeys', 'Add a storey on top', ['Shift PageUp'], { menus: storey }),
  command('storey-add-below', 'Storeys', 'Add a storey at the bottom', ['Shift PageDown'], { menus: storey }),
  command('storey-remove', 'Storeys', 'Remove the storey, if it is empty', ['Shift Delete'], { menus: storey }),

  command('find', 'Go about', 'Find by tag', ['Ctrl F'], { menus: sheet, isForReaders: true }),
  command('go-left', 'Go about', 'To the next piece on the left', ['Alt ArrowLeft'], { isForReaders: true }),
  command('go-right', 'Go about', 'To the next piece on the right', ['Alt ArrowRight'], { isForReaders: true }),
  command('go-up', 'Go about', 'To the next piece above', ['Alt ArrowUp'], { isForReaders: true }),
  command('go-down', 'Go about', 'To the next piece below', ['Alt ArrowDown'], { isForReaders: true }),
  command('add-left', 'Go about', 'Select the next piece on the left too', ['Alt Shift ArrowLeft'], { isForReaders: true }),
  command('add-right', 'Go about', 'Select the next piece on the right too', ['Alt Shift ArrowRight'], { isForReaders: true }),
  command('add-up', 'Go about', 'Select the next piece above too', ['Alt Shift ArrowUp'], { isForReaders: true }),
  command('add-down', 'Go about', 'Select the next piece below too', ['Alt Shift ArrowDown'], { isForReaders: true }),
  command('next-pipe', 'Go about', 'To the next pipe of the piece', ['.'], { menus: piece, isForReaders: true }),
  command('far-end', 'Go about', 'Along the pipe to its far end', [','], { menus: pipe, isForReaders: true }),

  command('commands', 'View', 'All commands', ['Ctrl K'], { menus: sheet, isForReaders: true }),
  command('menu', 'View', 'Menu of what is selected', ['Shift F10', 'ContextMenu'], { isForReaders: true }),
  command('fit', 'View', 'Fit all in view', ['F'], { menus: sheet, isForReaders: true }),
  command('zoom-selection', 'View', 'Fit what is selected in view', ['Shift F'], { menus: both, isForReaders: true }),
  command('zoom-in', 'View', 'Closer', ['+'], { isForReaders: true }),
  command('zoom-out', 'View', 'Farther', ['-'], { isForReaders: true }),
  command('small-map', 'View', 'Small map of the sheet', ['Shift O'], { menus: sheet, isForReaders: true }),
  command('next-overlay', 'View', 'Next overlay', ['O'], { isForReaders: true }),
  command('shortcuts', 'View', 'All keys', ['?'], { menus: sheet, isForReaders: true }),
] as const;

export type ActionId = (typeof actionCommands)[number]['id'];
export type CommandId = ActionId | `tool-${Tool}`;
export type Actions = Record<CommandId, () => void>;

const toolKeys: Record<Tool, string> = {
  select: 'V',
  pipe: 'W',
  pump: 'P',
  source: 'S',
  terminalUnit: 'U',
  balancingValve: 'B',
  controlValve: 'C',
  isolatingValve: 'I',
  checkValve: 'K',
  strainer: 'Y',
  tee: 'T',
  header: 'H',
  decoupler: 'D',
  dpController: 'Q',
  flowLimiter: 'L',
  flowStation: 'N',
  pressureStation: 'G',
  expansionVessel: 'E',
};

export const tools = Object.keys(toolKeys) as Tool[];
/** The pieces that can be placed, in the order of the tools. */
export const placeable = tools.filter((tool): tool is EquipmentKind => tool !== 'select' && tool !== 'pipe');

export const toolName = (tool: Tool): string => (tool === 'select' ? 'Select' : tool === 'pipe' ? 'Pipe' : kindNames[tool]);

export const commands: (Command & { id: CommandId })[] = [
  ...actionCommands,
  ...tools.map((tool) => command(`tool-${tool}` as const, 'Tools', toolName(tool), [toolKeys[tool]])),
];

const commandById = new Map(commands.map((it) => [it.id, it]));
export const commandOf = (id: CommandId): Command & { id: CommandId } => commandById.get(id)!;

/** What of it there is for one who edits, or only reads. */
export const commandsFor = (canEdit: boolean) => (canEdit ? commands : commands.filter(({ isForReaders }) => isForReaders));

const signs: Record<string, string> = {
  arrowleft: '←',
  arrowright: '→',
  arrowup: '↑',
  arrowdown: '↓',
  escape: 'Esc',
  pageup: 'Page up',
  pagedown: 'Page down',
  contextmenu: 'Menu key',
  '-': '−',
};

/** How a person reads a key. */
export function keyWords({ key: pressed, mod, shift, alt }: Key): string {
  const name = signs[pressed] ?? pressed[0].toUpperCase() + pressed.slice(1);
  return [mod && 'Ctrl', alt && 'Alt', shift && 'Shift', name].filter(Boolean).join(' ');
}

export const firstKey = (id: CommandId): string => keyWords(commandOf(id).keys[0]);

type Press = Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'shiftKey' | 'altKey'>;

/** The command that a key press asks for; null where it is nothing of ours. */
export function commandFor(press: Press): CommandId | null {
  const pressed = press.key.toLowerCase();
  const mod = press.ctrlKey || press.metaKey;
  // A sign such as "?" or "+" needs Shift on many keyboards, and Alt on some: there they say nothing.
  const isSign = pressed.length === 1 && !/[a-z]/.test(pressed);
  const fits = (it: Key) =>
    it.key === pressed && Boolean(it.mod) === mod && (isSign || (Boolean(it.shift) === press.shiftKey && Boolean(it.alt) === press.altKey));
  return commands.find(({ keys }) => keys.some(fits))?.id ?? null;
}
