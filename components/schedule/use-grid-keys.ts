'use client';

import type { KeyboardEvent } from 'react';
import type { Cells } from './use-cells';
import type { GridEdits } from './use-grid-edits';

interface KeyOptions {
  cells: Cells;
  edits: Pick<GridEdits, 'begin' | 'fillDown' | 'clear'>;
  /** Rows that a screenful holds. */
  pageRows: () => number;
  toggleRow: (id: string) => void;
  showRow: (id: string) => void;
}

/** The keys of a spreadsheet, while no cell is open. Tab goes on at the end of a row to what follows the table. */
export function useGridKeys({ cells, edits, pageRows, toggleRow, showRow }: KeyOptions): (event: KeyboardEvent) => void {
  return (event) => {
    if (event.target !== event.currentTarget || event.altKey) return;
    const mod = event.ctrlKey || event.metaKey;
    if (mod ? pressWithMod(event) : pressPlain(event)) event.preventDefault();
  };

  function pressWithMod({ key, shiftKey }: KeyboardEvent): boolean {
    const { rowIds, keys, active, activeRow: row, activeColumn: column } = cells;
    if (active === null || row === null || column === null) return false;
    switch (key.length === 1 ? key.toLowerCase() : key) {
      case 'd':
        edits.fillDown();
        return true;
      case 'a':
        cells.all();
        return true;
      case 'Enter':
        showRow(active.id);
        return true;
      case 'ArrowUp':
      case 'ArrowDown':
        cells.go(cells.placeAt(key === 'ArrowUp' ? 0 : rowIds.length - 1, column), shiftKey);
        return true;
      case 'ArrowLeft':
      case 'ArrowRight':
        cells.go(cells.placeAt(row, key === 'ArrowLeft' ? 0 : keys.length - 1), shiftKey);
        return true;
      case 'Home':
        cells.go(cells.placeAt(0, 0), shiftKey);
        return true;
      case 'End':
        cells.go(cells.placeAt(rowIds.length - 1, keys.length - 1), shiftKey);
        return true;
      default:
        return false;
    }
  }

  function pressPlain({ key, shiftKey }: KeyboardEvent): boolean {
    const { active, activeRow, keys } = cells;
    if (active === null || activeRow === null) return false;
    switch (key) {
      case 'ArrowUp':
        return always(cells.move(-1, 0, shiftKey));
      case 'ArrowDown':
        return always(cells.move(1, 0, shiftKey));
      case 'ArrowLeft':
        return always(cells.move(0, -1, shiftKey));
      case 'ArrowRight':
        return always(cells.move(0, 1, shiftKey));
      case 'PageUp':
        return always(cells.move(-pageRows(), 0, shiftKey));
      case 'PageDown':
        return always(cells.move(pageRows(), 0, shiftKey));
      case 'Home':
        return always(cells.go(cells.placeAt(activeRow, 0), shiftKey));
      case 'End':
        return always(cells.go(cells.placeAt(activeRow, keys.length - 1), shiftKey));
      case 'Tab':
        return cells.move(0, shiftKey ? -1 : 1);
      case 'Enter':
      case 'F2':
        return always(edits.begin(active));
      case 'Delete':
      case 'Backspace':
        return always(edits.clear());
      case ' ':
        return always(shiftKey ? toggleRow(active.id) : edits.begin(active));
      case 'Escape':
        return always(cells.go(active));
      default:
        return key.length === 1 && always(edits.begin(active, key));
    }
  }
}

const always = (_done: unknown): true => true;
