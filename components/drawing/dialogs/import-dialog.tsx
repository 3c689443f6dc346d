'use client';

import { useReactFlow } from 'reactflow';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { DrawnDocument } from '@/lib/network/document-to-drawing';
import type { ReadFile } from '@/lib/network/read-drawing-file';
import { selectOnly } from '../canvas-state';
import { useDrawing, useEditor } from '../editor-context';
import { showAll } from '../show-all';

const MOST_LINES = 12;

/** What a chosen file holds, before it takes the place of the drawing; or every fault that it has. */
export function ImportDialog({ file, onClose }: { file: ReadFile; onClose: () => void }) {
  return (
    <Dialog isOpen onClose={onClose} title={file.ok ? 'Put this in place of the drawing?' : 'The file cannot be drawn'}>
      {file.ok ? <Replace read={file.read} onClose={onClose} /> : <Faults file={file} onClose={onClose} />}
    </Dialog>
  );
}

function Replace({ read: { drawing, notes }, onClose }: { read: DrawnDocument; onClose: () => void }) {
  const { drawingStore, canvasStore } = useEditor();
  const view = useReactFlow();
  const before = useDrawing(({ equipment, pipes }) => equipment.length + pipes.length);
  const replace = () => {
    drawingStore.getState().change(() => drawing);
    selectOnly(canvasStore, []);
    showAll(view, drawing);
    onClose();
  };
  return (
    <>
      <p>
        {drawing.equipment.length} pieces and {drawing.pipes.length} pipes.{' '}
        {before > 0 && 'What is drawn now goes; undo brings it back for as long as this page is open.'}
      </p>
      {notes.length > 0 && <Lines title="A drawing has no place for these; its flows will differ by them:" lines={notes} />}
      <div className="mt-5 flex justify-end gap-2">
        <Button onClick={onClose}>Keep the drawing</Button>
        <Button look="primary" onClick={replace}>
          Put it in place
        </Button>
      </div>
    </>
  );
}

function Faults({ file, onClose }: { file: ReadFile & { ok: false }; onClose: () => void }) {
  return (
    <>
      <p>{file.message}</p>
      {file.issues.length > 0 && <Lines title="In the file:" lines={file.issues} />}
      <div className="mt-5 flex justify-end">
        <Button onClick={onClose}>Close</Button>
      </div>
    </>
  );
}

const Lines = ({ title, lines }: { title: string; lines: string[] }) => (
  <>
    <p className="mt-3 text-sm font-semibold">{title}</p>
    <ul className="mt-1 max-h-60 overflow-y-auto border-t text-sm">
      {lines.slice(0, MOST_LINES).map((line) => (
        <li key={line} className="border-b py-1 break-words">
          {line}
        </li>
      ))}
      {lines.length > MOST_LINES && <li className="text-quiet py-1">and {lines.length - MOST_LINES} more</li>}
    </ul>
  </>
);
