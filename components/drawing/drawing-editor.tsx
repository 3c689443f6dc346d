'use client';

import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { ReactFlowProvider } from 'reactflow';
import { useStore } from 'zustand';
import { Button } from '@/components/ui/button';
import type { DraftBody, LoopDetail } from '@/lib/api/loops';
import { useSolution } from '@/lib/client/solutions';
import type { Drawing } from '@/lib/network/drawing';
import { faultsOf } from '@/lib/network/drawing-faults';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { same } from '@/lib/network/merge-drawings';
import { IssueDialog } from './dialogs/issue-dialog';
import { DraftConflict } from './draft-conflict';
import { EditorContext, faultyOf, ResultsContext, useCanvas, type Results } from './editor-context';
import { useOpenDraft, type OpenDraft } from './open-draft';
import { ExportMenu } from './export-menu';
import { OthersHere } from './others-here';
import { savingWords, StatusBar } from './status-bar';
import { useDraftSaver } from './use-draft-saver';
import { Workspace } from './workspace';

interface DrawingEditorProps {
  loop: LoopDetail;
  personId: string;
  loaded: DraftBody;
  /** The drawing of the newest revision, to tell whether the draft differs. */
  issued: { number: number; drawing: Drawing } | null;
}

/** The drawing as its designer works on it: drawn, solved and saved as one goes. */
export function DrawingEditor(props: DrawingEditorProps) {
  const draft = useOpenDraft(props);
  return (
    <EditorContext value={draft.editor}>
      <ReactFlowProvider>
        <Editing loop={props.loop} issued={props.issued} draft={draft} />
      </ReactFlowProvider>
    </EditorContext>
  );
}

function Editing({ loop, issued: issuedBefore, draft }: Pick<DrawingEditorProps, 'loop' | 'issued'> & { draft: OpenDraft }) {
  const { saver } = draft;
  const { drawingStore, canvasStore } = draft.editor;
  const router = useRouter();
  const drawing = useStore(drawingStore, (state) => state.drawing);
  const open = useCanvas((state) => state.open);
  const saving = useDraftSaver(draft);
  const { answer, settled, isOld, error } = useSolution(loop.id, drawing);
  const basis = useCanvas((state) => state.basis);
  // Not of the drawing under the hand: a drag changes no figure, and every piece reads these.
  const results = useMemo<Results>(() => {
    const solved = answer?.body.solved ?? null;
    const faults = answer && !isOld ? answer.body.faults : faultsOf(settled);
    return {
      solved,
      figures: answer && solved && figuresOfDrawing(answer.drawing, solved, basis),
      faults,
      faulty: faultyOf(faults),
      isOld,
      index: new Set(solved?.indexCircuit.map(({ id }) => id)),
    };
  }, [answer, settled, basis, isOld]);
  const [issuedHere, setIssuedHere] = useState<DrawingEditorProps['issued']>(null);
  const issued = (issuedHere?.number ?? 0) > (issuedBefore?.number ?? 0) ? issuedHere : issuedBefore;
  const isAhead = useMemo(() => issued === null || !same(issued.drawing, drawing), [issued, drawing]);
  const revisionWords =
    issued === null ? 'Never issued' : isAhead ? `Draft, differs from revision ${issued.number}` : `Same as revision ${issued.number}`;

  /** What the other person saved, once its comparison was put off. */
  const [later, setLater] = useState<DraftBody | null>(null);

  const saveFirst = async () => ((await saver.saveNow()) ? saver.version : null);
  return (
    <ResultsContext value={results}>
      <Workspace
        hasBothBases={Boolean(results.solved?.balance)}
        bar={
          <>
            <OthersHere loopId={loop.id} />
            <span className="text-quiet hidden text-sm sm:inline">{revisionWords}</span>
            <ExportMenu
              loop={loop.name}
              project={loop.project.name}
              issuedAt={isAhead ? undefined : loop.revision?.issuedAt}
              revision={isAhead || !issued ? 'Draft' : `Revision ${issued.number}`}
            />
            <Button look="primary" size="small" disabled={!isAhead} onClick={() => canvasStore.setState({ open: 'issue' })}>
              Issue revision
            </Button>
          </>
        }
        status={
          <StatusBar
            saving={savingWords(saving)}
            onCompare={saving.kind === 'conflict' ? () => setLater(null) : undefined}
            solveError={error?.message ?? null}
            revision={revisionWords}
          />
        }
      />
      <DraftConflict draft={draft} saving={saving} drawing={drawing} later={later} onLater={setLater} />
      {open === 'issue' && (
        <IssueDialog
          loopId={loop.id}
          nextNumber={(issued?.number ?? 0) + 1}
          saveFirst={saveFirst}
          onClose={() => canvasStore.setState({ open: null })}
          onIssued={(number) => {
            setIssuedHere({ number, drawing });
            canvasStore.setState({ open: null });
            router.refresh();
          }}
        />
      )}
    </ResultsContext>
  );
}
