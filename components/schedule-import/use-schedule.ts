'use client';

import { useMemo, useState } from 'react';
import { rememberColumns, rememberedColumns } from '@/lib/client/schedule-import';
import type { DrawingFluid } from '@/lib/network/drawing';
import { guessReading, readingWithHead, type ColumnChoice, type TableReading } from '@/lib/network/schedule-import/guess-columns';
import type { Meaning } from '@/lib/network/schedule-import/meanings';
import { cellKey, noCorrections, readTerminals, type Corrections } from '@/lib/network/schedule-import/read-terminals';
import type { ScheduleTable } from '@/lib/network/schedule-import/table';
import { useUnitChoice } from '../shell/units-context';

/** A schedule as it was brought: its table, and the words that say where from. */
export interface BroughtSchedule {
  table: ScheduleTable;
  from: string;
}

interface State {
  brought: BroughtSchedule;
  reading: TableReading;
  isRemembered: boolean;
  corrections: Corrections;
}

/** The schedule that is being read, how it is read, and what was corrected; all of it in this page until a loop is generated. */
export function useSchedule(personId: string, fluid: DrawingFluid) {
  const choice = useUnitChoice();
  const [state, setState] = useState<State | null>(null);
  const rows = useMemo(() => (state ? readTerminals(state.brought.table, state.reading, fluid, state.corrections) : []), [state, fluid]);
  const change = (next: (state: State) => State) => setState((state) => state && next(state));

  /** A change of columns or heads is remembered; corrections belong to the row and stay. */
  const read = (reading: TableReading) => {
    if (!state) return;
    rememberColumns(localStorage, personId, state.brought.table, reading);
    setState({ ...state, reading, isRemembered: false });
  };

  return {
    state,
    rows,
    bring(brought: BroughtSchedule | null) {
      if (!brought) return setState(null);
      const guessed = guessReading(brought.table, choice);
      const columns = rememberedColumns(localStorage, personId, brought.table, guessed.headRow);
      setState({
        brought,
        reading: columns ? { ...guessed, columns } : guessed,
        isRemembered: columns !== null,
        corrections: noCorrections,
      });
    },
    chooseHead(headRow: number | null) {
      if (state) read(readingWithHead(state.brought.table, headRow, choice));
    },
    chooseColumn(meaning: Meaning, changed: Partial<ColumnChoice>) {
      if (!state) return;
      const { reading } = state;
      read({ ...reading, columns: { ...reading.columns, [meaning]: { ...reading.columns[meaning], ...changed } } });
    },
    correct(index: number, meaning: Meaning, text: string) {
      change((state) => ({
        ...state,
        corrections: { ...state.corrections, texts: new Map(state.corrections.texts).set(cellKey(index, meaning), text) },
      }));
    },
    leaveOut(indexes: number[], how: 'left-out' | 'brought-back') {
      change((state) => {
        const rows = new Map(state.corrections.rows);
        for (const index of indexes) rows.set(index, how);
        return { ...state, corrections: { ...state.corrections, rows } };
      });
    },
  };
}

export type Schedule = ReturnType<typeof useSchedule>;
