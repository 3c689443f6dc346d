'use client';

import { useQuery } from '@tanstack/react-query';
import Link from 'next/link';
import { useEffect, useMemo, useState } from 'react';
import { useStore } from 'zustand';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { DraftBody, LoopDetail } from '@/lib/api/loops';
import { offeredValves } from '@/lib/catalogue/chosen-entries';
import { catalogueQuery } from '@/lib/client/catalogue';
import { useSolution } from '@/lib/client/solutions';
import { applyEdits } from '@/lib/network/schedule-edits';
import { noFigures, scheduleFigures, scheduleRows } from '@/lib/network/schedule-rows';
import { valveOfferOf } from '@/lib/network/schedule-valve-offer';
import { DraftConflict } from '../drawing/draft-conflict';
import { useOpenDraft } from '../drawing/open-draft';
import { savingWords } from '../drawing/status-bar';
import { useDraftSaver } from '../drawing/use-draft-saver';
import { useUnitChoice } from '../shell/units-context';
import { buttonClass } from '../ui/button';
import { Notice } from '../ui/notice';
import { isDrawingEmpty, type Editing, type ScheduleDesk } from './desk';
import { NoSchedule } from './no-schedule';
import { ScheduleTables } from './schedule-tables';

interface ScheduleEditorProps {
  loop: LoopDetail;
  personId: string;
  loaded: DraftBody;
  bands: { terminal: StripBand; branch: StripBand };
  base: string;
}

/** The draft as tables: the same document, history, selection and saving as on the Drawing. */
export function ScheduleEditor({ loop, personId, loaded, bands, base }: ScheduleEditorProps) {
  const draft = useOpenDraft({ loop, personId, loaded });
  const { drawingStore, canvasStore } = draft.editor;
  const units = useUnitChoice();
  const drawing = useStore(drawingStore, (state) => state.drawing);
  const equipment = useStore(canvasStore, ({ pieces }) => pieces);
  const pipes = useStore(canvasStore, (state) => state.pipes);
  const canUndo = useStore(drawingStore.temporal, ({ pastStates }) => pastStates.length > 0);
  const canRedo = useStore(drawingStore.temporal, ({ futureStates }) => futureStates.length > 0);
  const saving = useDraftSaver(draft);
  const { answer, isOld, error } = useSolution(loop.id, drawing);
  const [later, setLater] = useState<DraftBody | null>(null);

  const solved = answer?.body.solved ?? null;
  // Of the drawing that was solved, not of the one under the hand: typing changes no figure until the answer comes.
  const figures = useMemo(() => (answer?.body.solved ? scheduleFigures(answer.drawing, answer.body.solved) : noFigures), [answer]);
  const schedule = useMemo(() => scheduleRows(drawing, figures), [drawing, figures]);
  const families = useQuery(catalogueQuery).data?.valveFamilies;
  const catalogue = useMemo(() => offeredValves(families ?? []), [families]);
  const context = useMemo(() => ({ valves: valveOfferOf(drawing, catalogue) }), [drawing, catalogue]);
  const drawingHref = `${base}/drawing`;
  const importHref = `${base}/schedule/import`;

  const history = drawingStore.temporal;
  const edit: Editing = {
    apply: (table, edits) => {
      const edited = applyEdits(drawingStore.getState().drawing, table, edits, units, catalogue);
      if (!edited.ok) return edited.faults;
      drawingStore.getState().change(() => edited.drawing);
      return [];
    },
    undo: () => history.getState().undo(),
    redo: () => history.getState().redo(),
    canUndo,
    canRedo,
    importHref,
  };
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      const isTyping = (event.target as Element).closest('input:not([type="checkbox"]), select, textarea, [role="dialog"]');
      if (isTyping || event.altKey || !(event.ctrlKey || event.metaKey)) return;
      const key = event.key.toLowerCase();
      if (key !== 'z' && key !== 'y') return;
      event.preventDefault();
      if (key === 'z' && !event.shiftKey) history.getState().undo();
      else history.getState().redo();
    };
    window.addEventListener('keydown', press);
    return () => window.removeEventListener('keydown', press);
  }, [history]);

  const desk: ScheduleDesk = {
    schedule,
    context,
    title: `${loop.name}, draft`,
    personId,
    drawingHref,
    bands,
    isOld,
    selection: { equipment, pipes, select: (of, ids) => canvasStore.setState(of === 'pipes' ? { pipes: ids } : { pieces: ids }) },
    edit,
  };
  const faults = answer && !solved ? answer.body.faults.filter(({ severity }) => severity === 'error') : [];
  const isEmpty = isDrawingEmpty(drawing);
  return (
    <>
      {isEmpty ? (
        <NoSchedule title="No schedule yet" drawingHref={drawingHref} importHref={importHref}>
          Nothing is drawn yet. What you draw is listed here with its solved figures; or bring in a schedule that you have, and the loop is
          drawn from it.
        </NoSchedule>
      ) : (
        <>
          <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
            <h1>Schedule of the draft</h1>
            <p className="text-quiet hidden flex-1 text-sm lg:block">
              Figures in ink are typed, those in grey follow from the drawing: flow now with the valves as they stand, settings, drops and
              authorities at design flow.
            </p>
            <Link href={importHref} className={`${buttonClass('secondary', 'small')} text-ink ml-auto no-underline print:hidden`}>
              Bring in a schedule
            </Link>
          </div>
          {faults.length > 0 && (
            <Notice
              tone="brass"
              title={
                faults.length === 1
                  ? 'One fault keeps the drawing from being solved'
                  : `${faults.length} faults keep the drawing from being solved`
              }
            >
              {faults[0].message}{' '}
              <Link href={drawingHref} className="underline">
                Open the drawing
              </Link>
            </Notice>
          )}
          <ScheduleTables desk={desk} />
        </>
      )}
      <p className="text-quiet flex flex-wrap gap-x-5 text-xs print:hidden">
        <span role="status">{error ? `▴ Not solved: ${error.message}` : isOld ? '○ Solving…' : solved ? '● Solved' : 'Not solved'}</span>
        <span role="status" className="ml-auto">
          {savingWords(saving)}
        </span>
        {saving.kind === 'conflict' && (
          <button type="button" className="text-petrol min-h-6 font-semibold hover:underline" onClick={() => setLater(null)}>
            Compare and save
          </button>
        )}
      </p>
      <DraftConflict draft={draft} saving={saving} drawing={drawing} later={later} onLater={setLater} />
    </>
  );
}
