'use client';

import { X } from 'lucide-react';
import type { CellFault } from '@/lib/network/schedule-edits';
import type { CellPlace } from './use-cells';

interface RefusedCellsProps {
  title: string;
  faults: CellFault[];
  tagOf: (id: string) => string;
  onGo: (place: CellPlace) => void;
  onDismiss: () => void;
}

const MOST = 50;

/** Every cell that kept a block from being taken, each with the way to it. */
export function RefusedCells({ title, faults, tagOf, onGo, onDismiss }: RefusedCellsProps) {
  return (
    <div role="alert" className="border-l-high flex items-start gap-3 border-b border-l-4 px-3 py-2 text-sm print:hidden">
      <div className="min-w-0 flex-1">
        <p className="font-semibold">▴ {title}</p>
        <ul className="mt-0.5 max-h-28 overflow-y-auto">
          {faults.slice(0, MOST).map(({ id, key, head, text, message }) => (
            <li key={`${id} ${key}`}>
              <button type="button" className="text-petrol min-h-6 font-semibold hover:underline" onClick={() => onGo({ id, key })}>
                {tagOf(id)}, {head.toLowerCase()}
              </button>{' '}
              <span className="text-quiet">
                {text !== '' && !message.includes(text) && <span className="figures">{text}: </span>}
                {message}
              </span>
            </li>
          ))}
          {faults.length > MOST && <li className="text-quiet">and {faults.length - MOST} more.</li>}
        </ul>
      </div>
      <button
        type="button"
        aria-label="Close this notice"
        className="text-quiet hover:text-ink -m-1 inline-flex size-8 items-center justify-center pointer-coarse:size-11"
        onClick={onDismiss}
      >
        <X size={16} aria-hidden />
      </button>
    </div>
  );
}
