'use client';

import { pipeWords } from '@/lib/network/pipe-choice';
import { useCanvas, useEditor } from '../editor-context';
import { changedPipe, PipeFields } from './pipe-form';

/** What the next pipe will have; it follows the pipe that was last edited. */
export function NewPipes() {
  const { canvasStore } = useEditor();
  const newPipe = useCanvas((state) => state.newPipe);
  return (
    <details className="mt-4 text-sm">
      <summary className="min-h-6">
        <span className="text-quiet text-xs font-semibold">New pipes: </span>
        {pipeWords(newPipe)}
      </summary>
      <PipeFields
        figures={[newPipe]}
        label="New pipes"
        disabled={false}
        onCommit={(changed) => canvasStore.setState({ newPipe: changedPipe(newPipe, changed) })}
      />
    </details>
  );
}
