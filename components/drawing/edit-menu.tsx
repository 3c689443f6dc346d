'use client';

import { ChevronDown, ChevronRight } from 'lucide-react';
import { DropdownMenu } from 'radix-ui';
import { buttonClass } from '@/components/ui/button';
import { commandGroups, commandsFor, type Actions } from './commands';
import { MenuCommand } from './menu-command';
import { menuItem, menuSheet } from './menu-looks';

/** Every command of the canvas with its key, for those who do not know the keys yet. */
export function EditMenu({ actions, canEdit }: { actions: Actions; canEdit: boolean }) {
  const offered = commandsFor(canEdit);
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger className={buttonClass('quiet', 'small')}>
        {canEdit ? 'Edit' : 'View'} <ChevronDown size={14} aria-hidden />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="start" sideOffset={4} className={menuSheet}>
          {offered
            .filter(({ group }) => group === 'Edit')
            .map((command) => (
              <MenuCommand key={command.id} command={command} actions={actions} />
            ))}
          <DropdownMenu.Separator className="my-1 border-t" />
          {commandGroups.slice(1).map((group) => {
            const its = offered.filter((command) => command.group === group);
            if (its.length === 0) return null;
            return (
              <DropdownMenu.Sub key={group}>
                <DropdownMenu.SubTrigger className={menuItem}>
                  {group} <ChevronRight size={14} aria-hidden />
                </DropdownMenu.SubTrigger>
                <DropdownMenu.Portal>
                  <DropdownMenu.SubContent className={menuSheet} sideOffset={2} collisionPadding={8}>
                    {its.map((command) => (
                      <MenuCommand key={command.id} command={command} actions={actions} />
                    ))}
                  </DropdownMenu.SubContent>
                </DropdownMenu.Portal>
              </DropdownMenu.Sub>
            );
          })}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
