'use client';

import { toast } from 'sonner';
import { classNames } from '@/components/ui/class-names';
import type { Fault } from '@/lib/network/fault';
import { mendFor, type Mend } from '@/lib/network/mends';
import { useCanvas, useDrawing, useEditor, useResults } from './editor-context';
import { useShowPlace } from './show-place';

/** Beyond these the list is no list any more: the first ones are put right first. */
const MOST_SHOWN = 200;

/** What is wrong with the drawing; each entry selects its place and brings it into view, and some can be put right at a press. */
export function FaultsList() {
  const { faults } = useResults();
  const show = useShowPlace();
  const { canvasStore } = useEditor();
  if (faults.length === 0) return <p className="text-quiet py-4 text-sm">● No faults: the drawing can be solved as it stands.</p>;
  const errors = faults.filter(({ severity }) => severity === 'error').length;
  const bySeverity = [...faults].sort((a, b) => Number(b.severity === 'error') - Number(a.severity === 'error'));
  return (
    <>
      <p className="text-quiet pb-2 text-sm">
        {errors ? `${errors} to be put right before the loop can be solved.` : 'The loop can be solved; look at these.'}
      </p>
      <ul className="border-t">
        {bySeverity.slice(0, MOST_SHOWN).map((fault, i) => (
          <FaultRow
            key={`${fault.code}${fault.place.id}${i}`}
            fault={fault}
            onShow={() => {
              show(fault.place);
              canvasStore.setState({ isSheetOpen: false });
            }}
          />
        ))}
      </ul>
      {faults.length > MOST_SHOWN && <p className="text-quiet py-2 text-sm">And {faults.length - MOST_SHOWN} more.</p>}
    </>
  );
}

function FaultRow({ fault, onShow }: { fault: Fault; onShow: () => void }) {
  const { severity, message } = fault;
  const isError = severity === 'error';
  const tone = isError ? 'text-high' : 'text-brass';
  return (
    <li className="border-b py-1">
      <button
        type="button"
        className="hover:bg-well flex w-full gap-2 px-1 py-1 text-left text-sm pointer-coarse:min-h-11"
        onClick={onShow}
      >
        <span aria-hidden className={tone}>
          {isError ? '▴' : '△'}
        </span>
        <span>
          <span className={classNames('font-semibold', tone)}>{isError ? 'Fault' : 'Warning'}: </span>
          {message}
        </span>
      </button>
      <MendButton fault={fault} />
    </li>
  );
}

function MendButton({ fault }: { fault: Fault }) {
  const { drawingStore, canEdit } = useEditor();
  const { solved } = useResults();
  const newPipe = useCanvas((state) => state.newPipe);
  const drawing = useDrawing((it) => it);
  const mend = canEdit ? mendFor(fault, drawing, { newPipe, balance: solved?.balance ?? null }) : null;
  if (!mend) return null;
  const apply = ({ apply: make }: Mend) => {
    const made = make(drawingStore.getState().drawing);
    if ('refused' in made) toast(made.refused);
    else drawingStore.getState().change(() => made);
  };
  return (
    <button
      type="button"
      className="text-petrol ml-6 min-h-6 text-sm font-semibold hover:underline pointer-coarse:min-h-11"
      onClick={() => apply(mend)}
    >
      {mend.label}
    </button>
  );
}
