'use client';

import { ChevronDown } from 'lucide-react';
import { DropdownMenu } from 'radix-ui';
import { buttonClass } from '@/components/ui/button';
import { editShortcuts, viewShortcuts, type ActionId, type Shortcut } from './shortcuts';

const item =
  'flex items-center justify-between gap-8 rounded px-3 py-1.5 text-sm outline-none data-[highlighted]:bg-well pointer-coarse:py-2.5';

/** Every action of the canvas with its key, for those who do not know the keys yet. */
export function EditMenu({ actions, canEdit }: { actions: Record<ActionId, () => void>; canEdit: boolean }) {
  const shown = new Set<ActionId>();
  const once = ({ id }: Shortcut<ActionId>) => !shown.has(id) && Boolean(shown.add(id));
  const readOnly: ActionId[] = ['copy', 'select-all', 'escape'];
  const edits = editShortcuts.filter(once).filter(({ id }) => canEdit || readOnly.includes(id));
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger className={buttonClass('quiet', 'small')}>
        {canEdit ? 'Edit' : 'View'} <ChevronDown size={14} aria-hidden />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="start"
          sideOffset={4}
          className="bg-sheet text-ink z-50 max-h-[75dvh] min-w-64 overflow-y-auto rounded border p-1 shadow-lg"
        >
          {[...edits, null, ...viewShortcuts].map((shortcut) =>
            shortcut === null ? (
              <DropdownMenu.Separator key="line" className="my-1 border-t" />
            ) : (
              <DropdownMenu.Item key={shortcut.keys} className={item} onSelect={() => setTimeout(actions[shortcut.id])}>
                {shortcut.label} <kbd className="text-quiet font-sans">{shortcut.keys}</kbd>
              </DropdownMenu.Item>
            ),
          )}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
