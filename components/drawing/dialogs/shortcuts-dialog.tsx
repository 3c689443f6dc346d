'use client';

import { Dialog } from '@/components/ui/dialog';
import { commandGroups, commandsFor, keyWords } from '../commands';
import { useEditor } from '../editor-context';

const hands = [
  ['Press on the canvas', 'places the chosen piece; on a pipe it goes between its two halves'],
  ['Drag from end to end', 'joins two pieces with a pipe; on a pipe it puts a tee there'],
  ['Pipe tool, two presses', 'joins the two pieces pressed; presses on the sheet between them are its bends'],
  ['Drag on empty canvas', 'selects what the box touches; with Ctrl or Shift it adds to what is selected'],
  ['Middle button, or Space and drag', 'moves the sheet'],
  ['Ctrl or Shift and press', 'adds to what is selected'],
  ['Drag a square on a pipe', 'moves a bend, or a straight part sideways'],
  ['Right button, or a long press', 'opens the menu of a piece, a pipe or the sheet'],
  ['One finger on the sheet', 'moves it; two fingers bring it closer or farther'],
];

export function ShortcutsDialog({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) {
  const { canEdit } = useEditor();
  return (
    <Dialog
      isOpen={isOpen}
      onClose={onClose}
      title="Keys of the drawing"
      description="Keys work while the canvas or the bars around it have the focus."
      isWide
    >
      <div className="gap-x-8 md:columns-2">
        {commandGroups.map((name) => {
          const its = commandsFor(canEdit).filter(({ group }) => group === name);
          if (its.length === 0) return null;
          return (
            <section key={name} className="mb-5">
              <h3 className="border-b pb-1">{name}</h3>
              <dl>
                {its.map(({ id, label, keys }) => (
                  <div key={id} className="flex break-inside-avoid justify-between gap-4 border-b py-1 text-sm">
                    <dt>{label}</dt>
                    <dd>
                      <kbd className="text-quiet font-sans whitespace-nowrap">{keys.map(keyWords).join(', ')}</kbd>
                    </dd>
                  </div>
                ))}
              </dl>
            </section>
          );
        })}
      </div>
      <section>
        <h3 className="border-b pb-1">Mouse and touch</h3>
        <dl>
          {hands.map(([what, does]) => (
            <div key={what} className="grid gap-x-4 border-b py-1 text-sm sm:grid-cols-[240px_1fr]">
              <dt className="font-semibold">{what}</dt>
              <dd className="text-quiet">{does}</dd>
            </div>
          ))}
        </dl>
      </section>
    </Dialog>
  );
}
