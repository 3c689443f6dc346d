'use client';

import { useMemo, useState } from 'react';
import { ReactFlowProvider } from 'reactflow';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { RevisionBody } from '@/lib/api/loops';
import type { Drawing } from '@/lib/network/drawing';
import { drawingToDocument, placeFinder } from '@/lib/network/drawing-to-document';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { circuitThrough } from '@/lib/network/index-circuit';
import { createCanvasStore } from './canvas-state';
import { EditorContext, faultyOf, noResults, ResultsContext, type Editor, type Results } from './editor-context';
import { ExportMenu } from './export-menu';
import { StatusBar } from './status-bar';
import { createDrawingStore } from './store';
import { Workspace } from './workspace';

interface DrawingViewerProps {
  drawing: Drawing;
  band: StripBand;
  names: { loop: string; project: string };
  /** The revision whose drawing this is; null for a draft that was never issued, which has no results. */
  revision: Pick<RevisionBody, 'number' | 'issuedAt' | 'issuedBy' | 'balance'> | null;
}

/** An issued drawing with its results, to be read and not changed. */
export function DrawingViewer({ drawing, band, names, revision }: DrawingViewerProps) {
  const [editor] = useState<Editor>(() => ({
    drawingStore: createDrawingStore(drawing),
    canvasStore: createCanvasStore({ basis: 'balanced' }),
    canEdit: false,
    band,
  }));
  const results = useMemo(() => (revision ? resultsOfRevision(drawing, revision.balance) : noResults), [drawing, revision]);
  const issued =
    revision &&
    `Revision ${revision.number}, issued by ${revision.issuedBy} on ${new Date(revision.issuedAt).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric' })}`;
  return (
    <EditorContext value={editor}>
      <ResultsContext value={results}>
        <ReactFlowProvider>
          <Workspace
            hasBothBases={false}
            bar={
              <>
                <span className="text-quiet px-2 text-sm">{issued ?? 'Draft, never issued'}</span>
                <ExportMenu {...names} revision={revision ? `Revision ${revision.number}` : 'Draft'} issuedAt={revision?.issuedAt} />
              </>
            }
            status={<StatusBar saving={null} solveError={null} revision={revision ? 'To be read only' : 'Draft, to be read only'} />}
          />
        </ReactFlowProvider>
      </ResultsContext>
    </EditorContext>
  );
}

function resultsOfRevision(drawing: Drawing, balance: RevisionBody['balance']): Results {
  const { document, faults } = drawingToDocument(drawing, '');
  const links = document && balance.indexTerminal ? circuitThrough(document, balance.solution, balance.indexTerminal) : [];
  const indexCircuit = links.map(placeFinder(drawing));
  return {
    solved: { solve: null, balance, balanceMissing: null, indexCircuit, solveMs: 0 },
    figures: figuresOfDrawing(drawing, { solve: null, balance }, 'balanced'),
    faults,
    faulty: faultyOf(faults),
    isOld: false,
    index: new Set(indexCircuit.map(({ id }) => id)),
  };
}
