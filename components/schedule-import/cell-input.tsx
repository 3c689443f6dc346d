'use client';

import { useState, type KeyboardEvent } from 'react';
import { classNames } from '../ui/class-names';

interface CellInputProps {
  label: string;
  text: string;
  isFigure: boolean;
  /** The id of what is said about it. */
  faultId: string | null;
  severity: 'error' | 'warning' | null;
  isDisabled: boolean;
  /** Where it stands among its like: the keys up and down go from one to the next. */
  place: { position: number; column: string };
  onCorrect: (text: string) => void;
}

/** A cell of a schedule: what is typed counts when the cell is left, Escape takes it back. */
export function CellInput({ label, text, isFigure, faultId, severity, isDisabled, place, onCorrect }: CellInputProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const keep = () => {
    if (typed !== null && typed.trim() !== text) onCorrect(typed.trim());
    setTyped(null);
  };
  const step = (event: KeyboardEvent<HTMLInputElement>, by: number) => {
    event.preventDefault();
    keep();
    const table = event.currentTarget.closest('[role=table]');
    table?.querySelector<HTMLInputElement>(`[data-place="${place.position + by} ${place.column}"]`)?.focus();
  };
  return (
    <input
      aria-label={label}
      aria-invalid={severity === 'error'}
      aria-describedby={faultId ?? undefined}
      data-place={`${place.position} ${place.column}`}
      value={typed ?? text}
      disabled={isDisabled}
      autoComplete="off"
      spellCheck={false}
      maxLength={300}
      onChange={(event) => setTyped(event.target.value)}
      onFocus={(event) => event.currentTarget.select()}
      onBlur={keep}
      onKeyDown={(event) => {
        if (event.key === 'Escape') setTyped(null);
        else if (event.key === 'ArrowUp') step(event, -1);
        else if (event.key === 'ArrowDown' || event.key === 'Enter') step(event, 1);
      }}
      className={classNames(
        'h-9 w-full min-w-0 rounded border px-1.5 text-sm disabled:border-transparent disabled:bg-transparent disabled:opacity-60 pointer-coarse:h-11',
        isFigure && 'figures text-right',
        severity === 'error'
          ? 'border-high bg-well border-2'
          : severity === 'warning'
            ? 'border-brass bg-transparent'
            : 'hover:border-rule focus:bg-well border-transparent bg-transparent',
      )}
    />
  );
}
