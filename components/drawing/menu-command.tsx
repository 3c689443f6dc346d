'use client';

import { DropdownMenu } from 'radix-ui';
import { keyWords, type Actions, type Command, type CommandId } from './commands';
import { menuItem } from './menu-looks';

/** One command as a line of a menu, with its key. */
export function MenuCommand({ command, actions }: { command: Command & { id: CommandId }; actions: Actions }) {
  return (
    // What an action focuses or opens must not be undone by the menu that closes after it.
    <DropdownMenu.Item className={menuItem} onSelect={() => setTimeout(actions[command.id])}>
      {command.label} <kbd className="text-quiet font-sans whitespace-nowrap pointer-coarse:hidden">{keyWords(command.keys[0])}</kbd>
    </DropdownMenu.Item>
  );
}
