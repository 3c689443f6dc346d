'use client';

import { X } from 'lucide-react';
import { useState, type KeyboardEvent } from 'react';
import { inputClass } from '@/components/ui/field';
import { classNames } from '@/components/ui/class-names';
import { kindNames } from '@/lib/network/fault';
import { useDrawing, useEditor } from './editor-context';
import { useShowPlace } from './show-place';

const SHOWN = 8;

/** Finds a piece by its tag or room; Enter goes to the next match. */
export function FindBar() {
  const { canvasStore } = useEditor();
  const equipment = useDrawing((drawing) => drawing.equipment);
  const show = useShowPlace();
  const [text, setText] = useState('');
  const [at, setAt] = useState(-1);
  const wanted = text.trim().toLowerCase();
  const matches = wanted
    ? equipment.filter(
        (piece) => piece.tag.toLowerCase().includes(wanted) || (piece.kind === 'terminalUnit' && piece.room.toLowerCase().includes(wanted)),
      )
    : [];
  const close = () => canvasStore.setState({ open: null });
  const go = (next: number) => {
    if (matches.length === 0) return;
    const index = (next + matches.length) % matches.length;
    setAt(index);
    show({ kind: 'equipment', id: matches[index].id });
  };
  const press = (event: KeyboardEvent) => {
    if (event.key === 'Escape') close();
    if (event.key === 'Enter') go(at + (event.shiftKey ? -1 : 1));
  };
  return (
    <search className="bg-sheet absolute top-16 right-3 z-20 w-72 rounded border p-2 shadow-lg">
      <div className="flex items-center gap-1">
        <input
          ref={(input) => input?.focus()}
          aria-label="Find by tag or room"
          placeholder="Tag or room"
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            setAt(-1);
          }}
          onKeyDown={press}
          className={classNames(inputClass, 'h-9')}
        />
        <button type="button" onClick={close} aria-label="Close" className="text-quiet hover:text-ink p-2">
          <X size={16} />
        </button>
      </div>
      {wanted && (
        <p role="status" className="text-quiet px-1 pt-1.5 text-xs">
          {matches.length === 0 ? 'Nothing has this tag.' : `${matches.length} found`}
        </p>
      )}
      <ul>
        {matches.slice(0, SHOWN).map((piece, index) => (
          <li key={piece.id}>
            <button
              type="button"
              onClick={() => go(index)}
              aria-current={index === at || undefined}
              className="hover:bg-well aria-[current]:bg-well flex w-full justify-between gap-2 rounded px-2 py-1.5 text-left text-sm"
            >
              <span className="font-semibold">{piece.tag}</span>
              <span className="text-quiet">
                {piece.kind === 'terminalUnit' && piece.room ? piece.room : kindNames[piece.kind].toLowerCase()}
              </span>
            </button>
          </li>
        ))}
      </ul>
    </search>
  );
}
