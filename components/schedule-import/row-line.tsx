'use client';

import { Undo2, X } from 'lucide-react';
import { meaningOf, type Meaning } from '@/lib/network/schedule-import/meanings';
import type { ReadRow } from '@/lib/network/schedule-import/read-terminals';
import { Button } from '../ui/button';
import { classNames } from '../ui/class-names';
import { Figure } from '../ui/figure';
import { CellInput } from './cell-input';

interface RowLineProps {
  row: ReadRow;
  position: number;
  shown: readonly Meaning[];
  columns: string;
  onCorrect: (meaning: Meaning, text: string) => void;
  onLeaveOut: (how: 'left-out' | 'brought-back') => void;
  onShowWorking: () => void;
}

/** One row of the schedule: its cells, its flow, and below them what is wrong in which cell. */
export function RowLine({ row, position, shown, columns, onCorrect, onLeaveOut, onShowWorking }: RowLineProps) {
  const { index, number, texts, faults, leftOut, terminal } = row;
  const faultsId = `row-${index}-faults`;
  const severityOf = (meaning: Meaning) => {
    const own = faults.filter((fault) => fault.meaning === meaning);
    return own.some(({ severity }) => severity === 'error') ? 'error' : own.length > 0 ? 'warning' : null;
  };
  const goTo = (from: HTMLElement, meaning: Meaning) =>
    from.closest('[role=table]')?.querySelector<HTMLInputElement>(`[data-place="${position} ${meaning}"]`)?.focus();

  return (
    <div className={classNames('border-b', leftOut && 'bg-paper')}>
      <div className="grid items-center gap-x-1 px-3 py-1" style={{ gridTemplateColumns: columns }}>
        <span role="rowheader" className="figures text-quiet text-right text-xs">
          {number}
        </span>
        {shown.map((meaning) => (
          <div role="cell" key={meaning}>
            <CellInput
              label={`${meaningOf[meaning].name}, row ${number}`}
              text={texts[meaning]}
              isFigure={meaningOf[meaning].quantity !== null}
              severity={severityOf(meaning)}
              faultId={severityOf(meaning) ? faultsId : null}
              isDisabled={leftOut !== null}
              place={{ position, column: meaning }}
              onCorrect={(text) => onCorrect(meaning, text)}
            />
          </div>
        ))}
        <div role="cell" className="pr-1.5 text-right text-sm">
          {terminal && row.isFlowFromLoad ? (
            <button
              type="button"
              onClick={onShowWorking}
              title="Worked out from the load: show working"
              className="text-petrol min-h-6 underline decoration-dotted underline-offset-4"
            >
              <Figure quantity="flow" si={terminal.designFlowLs} />
            </button>
          ) : (
            <Figure quantity="flow" si={terminal?.designFlowLs} className={terminal ? undefined : 'text-quiet'} />
          )}
        </div>
        <div role="cell" className={classNames('sticky right-0 text-right', leftOut ? 'bg-paper' : 'bg-sheet')}>
          <Button
            size="small"
            look="quiet"
            onClick={() => onLeaveOut(leftOut ? 'brought-back' : 'left-out')}
            aria-label={`${leftOut ? 'Bring back' : 'Leave out'} row ${number}`}
            className="max-lg:px-1.5 pointer-coarse:h-11"
          >
            <span className="max-lg:hidden">{leftOut ? 'Bring back' : 'Leave out'}</span>
            {leftOut ? <Undo2 aria-hidden className="size-5 lg:hidden" /> : <X aria-hidden className="size-5 lg:hidden" />}
          </Button>
        </div>
      </div>
      {(faults.length > 0 || leftOut === 'no-terminal') && (
        <ul id={faultsId} className="sticky left-0 max-w-[min(100vw-3rem,60rem)] pr-3 pb-2 pl-14 text-sm">
          {leftOut === 'no-terminal' && <li className="text-quiet">Holds no terminal: a heading or a remark.</li>}
          {faults.map(({ meaning, severity, message }) => (
            <li key={meaning + message} className={severity === 'error' ? 'text-high' : 'text-brass'}>
              <span aria-hidden>{severity === 'error' ? '▴' : '●'} </span>
              <button
                type="button"
                onClick={(event) => goTo(event.currentTarget, meaning)}
                className="min-h-6 font-semibold underline-offset-2 hover:underline"
              >
                {meaningOf[meaning].name}:
              </button>{' '}
              {message}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
