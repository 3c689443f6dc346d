'use client';

import { Dialog } from '@/components/ui/dialog';
import { editShortcuts, toolShortcuts, viewShortcuts, type Shortcut } from '../shortcuts';

const groups: [string, Shortcut[]][] = [
  ['Tools', toolShortcuts],
  ['Edit', editShortcuts],
  ['View', viewShortcuts],
];

const hands = [
  ['Press on the canvas', 'places the chosen piece; on a pipe it goes between its two halves'],
  ['Drag from end to end', 'joins two pieces with a pipe; on a pipe it puts a tee there'],
  ['Drag on empty canvas', 'selects what the box touches; with the middle or right button it moves the sheet'],
  ['Ctrl or Shift and press', 'adds to what is selected'],
];

export function ShortcutsDialog({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) {
  return (
    <Dialog
      isOpen={isOpen}
      onClose={onClose}
      title="Keys of the drawing"
      description="Letters work while the canvas or the bars around it have the focus."
      isWide
    >
      <div className="grid gap-x-8 gap-y-5 md:grid-cols-3">
        {groups.map(([title, shortcuts]) => (
          <section key={title}>
            <h3 className="border-b pb-1">{title}</h3>
            <dl>
              {shortcuts.map(({ label, keys }) => (
                <div key={keys} className="flex justify-between gap-4 border-b py-1 text-sm">
                  <dt>{label}</dt>
                  <dd>
                    <kbd className="text-quiet font-sans whitespace-nowrap">{keys}</kbd>
                  </dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
      </div>
      <section className="mt-5">
        <h3 className="border-b pb-1">Mouse and touch</h3>
        <dl>
          {hands.map(([what, does]) => (
            <div key={what} className="grid gap-x-4 border-b py-1 text-sm sm:grid-cols-[200px_1fr]">
              <dt className="font-semibold">{what}</dt>
              <dd className="text-quiet">{does}</dd>
            </div>
          ))}
        </dl>
      </section>
    </Dialog>
  );
}
