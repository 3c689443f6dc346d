'use client';

import { Command as List } from 'cmdk';
import { Dialog } from 'radix-ui';
import { commandGroups, commandsFor, keyWords, type Actions } from './commands';
import { useEditor } from './editor-context';

const group =
  '[&_[cmdk-group-heading]]:text-quiet [&_[cmdk-group-heading]]:px-3 [&_[cmdk-group-heading]]:pt-3 [&_[cmdk-group-heading]]:pb-1 [&_[cmdk-group-heading]]:text-xs [&_[cmdk-group-heading]]:font-semibold';

/** All commands, found by typing a few letters of their name. */
export function CommandList({ actions, onClose }: { actions: Actions; onClose: () => void }) {
  const { canEdit } = useEditor();
  const offered = commandsFor(canEdit);
  return (
    <Dialog.Root open onOpenChange={(isOpen) => !isOpen && onClose()}>
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-40 bg-black/40" />
        <Dialog.Content
          aria-describedby=""
          className="bg-sheet text-ink fixed top-[12dvh] left-1/2 z-50 w-[calc(100vw-1.5rem)] max-w-xl -translate-x-1/2 overflow-hidden rounded border shadow-lg"
        >
          <Dialog.Title className="sr-only">All commands</Dialog.Title>
          <List label="All commands" loop>
            <List.Input
              placeholder="What do you want to do?"
              className="placeholder:text-quiet focus-visible:outline-petrol h-12 w-full border-b bg-transparent px-4 -outline-offset-2"
            />
            <List.List className="max-h-[56dvh] overflow-y-auto p-1 pb-2">
              <List.Empty className="text-quiet px-3 py-4 text-sm">Nothing is called that.</List.Empty>
              {commandGroups.map((name) => {
                const its = offered.filter((command) => command.group === name);
                if (its.length === 0) return null;
                return (
                  <List.Group key={name} heading={name} className={group}>
                    {its.map(({ id, label, keys }) => (
                      <List.Item
                        key={id}
                        value={id}
                        keywords={[label, name]}
                        onSelect={() => {
                          onClose();
                          setTimeout(actions[id]);
                        }}
                        className="data-[selected=true]:bg-well flex min-h-9 cursor-default items-center justify-between gap-6 rounded px-3 py-1 text-sm pointer-coarse:min-h-11"
                      >
                        {label}
                        <kbd className="text-quiet shrink-0 font-sans">{keys.map(keyWords).join(' or ')}</kbd>
                      </List.Item>
                    ))}
                  </List.Group>
                );
              })}
            </List.List>
          </List>
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  );
}
