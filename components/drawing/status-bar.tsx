'use client';

import { useStore } from 'reactflow';
import type { SaveState } from '@/lib/client/draft-saver';
import { digits } from '@/lib/network/working';
import { useEditor, useResults } from './editor-context';

interface StatusBarProps {
  /** Null where nothing is ever saved. */
  saving: string | null;
  /** Compares with what someone else saved. */
  onCompare?: () => void;
  solveError: string | null;
  revision: string;
}

/** The line at the foot of the page: what the solver, the faults and the saving have to say. */
export function StatusBar({ saving, onCompare, solveError, revision }: StatusBarProps) {
  const { canvasStore } = useEditor();
  const { faults, solved, isOld } = useResults();
  const zoom = useStore(({ transform }) => Math.round(transform[2] * 100));
  const errors = faults.filter(({ severity }) => severity === 'error').length;
  const warnings = faults.length - errors;
  const parts = [
    errors && `${errors} ${errors === 1 ? 'fault' : 'faults'}`,
    warnings && `${warnings} ${warnings === 1 ? 'warning' : 'warnings'}`,
  ]
    .filter(Boolean)
    .join(', ');
  return (
    <footer className="bg-sheet flex min-h-8 flex-wrap items-center gap-x-5 border-t px-4 py-1 text-xs">
      <span role="status">
        {solved || solveError ? (
          <SolveWords error={solveError} />
        ) : errors ? (
          'Not solved: faults stand in the drawing'
        ) : isOld ? (
          '○ Solving…'
        ) : (
          'Nothing to solve yet'
        )}
      </span>
      {faults.length > 0 && (
        <button
          type="button"
          className={`min-h-6 max-w-[28rem] truncate hover:underline ${errors ? 'text-high' : 'text-brass'}`}
          onClick={() => canvasStore.setState({ page: 'faults', isSheetOpen: true })}
        >
          {errors ? '▴' : '△'} {parts}: {faults[0].message}
        </button>
      )}
      <span className="text-quiet ml-auto">{revision}</span>
      {saving && (
        <span role="status" className={saving.startsWith('▴') ? 'text-high' : 'text-quiet'}>
          {saving}
        </span>
      )}
      {onCompare && (
        <button type="button" className="text-petrol min-h-6 font-semibold hover:underline" onClick={onCompare}>
          Compare and save
        </button>
      )}
      <span className="figures text-quiet" aria-label="Scale">
        {zoom} %
      </span>
    </footer>
  );
}

function SolveWords({ error }: { error: string | null }) {
  const { solved, isOld } = useResults();
  if (error) return <span className="text-high">▴ Not solved: {error}</span>;
  if (!solved?.solve) return <>Settings as issued</>;
  const { converged, iterations, residuals } = solved.solve;
  if (!converged)
    return (
      <span className="text-high">
        ▴ No converged solution after {iterations} iterations, worst loop {digits(residuals.loopPa)} Pa
      </span>
    );
  const words = `Solved in ${solved.solveMs < 10 ? solved.solveMs.toFixed(1) : solved.solveMs.toFixed(0)} ms, ${iterations} iterations, worst loop ${residuals.loopPa < 0.001 ? 'under 0.001' : residuals.loopPa.toFixed(3)} Pa`;
  return <>{isOld ? `○ Solving… (before: ${words})` : `● ${words}`}</>;
}

/** "Saved 10:42:07" and its like. */
export function savingWords(state: SaveState): string {
  switch (state.kind) {
    case 'saved':
      return `Saved ${new Date(state.at).toLocaleTimeString('en-GB')}`;
    case 'waiting':
    case 'saving':
      return 'Saving…';
    case 'offline':
      return state.isKept
        ? 'Not saved: no connection, keeping it here'
        : '▴ Not saved: no connection, and this browser has no room to keep it. Leave the page open.';
    case 'refused':
      return `▴ Not saved: ${state.message}`;
    case 'conflict':
      return '▴ Not saved: someone else saved meanwhile';
  }
}
