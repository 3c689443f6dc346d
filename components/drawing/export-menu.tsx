'use client';

import { ChevronDown } from 'lucide-react';
import { DropdownMenu } from 'radix-ui';
import { useRef, useState } from 'react';
import { toast } from 'sonner';
import { buttonClass } from '@/components/ui/button';
import { useUnitChoice } from '@/components/shell/units-context';
import { readDrawingFile, type ReadFile } from '@/lib/network/read-drawing-file';
import { ImportDialog } from './dialogs/import-dialog';
import { exportDrawing, exportKinds, type ExportKind } from './export-drawing';
import { useEditor, useResults } from './editor-context';
import { menuItem, menuSheet } from './menu-looks';

const labels: Record<ExportKind, string> = {
  svg: 'Drawing as SVG',
  png: 'Drawing as PNG',
  network: 'Network document (JSON)',
  drawing: 'Drawing with its layout (JSON)',
};

interface ExportMenuProps {
  loop: string;
  project: string;
  /** "Revision 3" or "Draft". */
  revision: string;
  /** When it was issued; a draft is as it stands today. */
  issuedAt?: string;
}

/** The drawing as a file, and where it may be edited a file as the drawing. */
export function ExportMenu({ loop, project, revision, issuedAt }: ExportMenuProps) {
  const { drawingStore, canEdit } = useEditor();
  const { figures } = useResults();
  const units = useUnitChoice();
  const [file, setFile] = useState<ReadFile | null>(null);
  const input = useRef<HTMLInputElement>(null);
  const hand = async (kind: ExportKind) => {
    const date = (issuedAt ? new Date(issuedAt) : new Date()).toLocaleDateString('en-GB', {
      day: 'numeric',
      month: 'long',
      year: 'numeric',
    });
    const title = {
      loop,
      project,
      revision,
      date,
      figures: figures?.basis === 'drawn' ? 'Flows with the valves as drawn' : 'Flows as balanced',
    };
    const refusal = await exportDrawing(kind, { drawing: drawingStore.getState().drawing, figures, title, units });
    if (refusal) toast(refusal);
  };
  return (
    <>
      <DropdownMenu.Root>
        <DropdownMenu.Trigger className={buttonClass('quiet', 'small')}>
          Export <ChevronDown size={14} aria-hidden />
        </DropdownMenu.Trigger>
        <DropdownMenu.Portal>
          <DropdownMenu.Content align="end" sideOffset={4} className={menuSheet}>
            {exportKinds.map((kind) => (
              <DropdownMenu.Item key={kind} className={menuItem} onSelect={() => void hand(kind)}>
                {labels[kind]}
              </DropdownMenu.Item>
            ))}
            {canEdit && (
              <>
                <DropdownMenu.Separator className="my-1 border-t" />
                <DropdownMenu.Item className={menuItem} onSelect={() => input.current?.click()}>
                  Import a network document or drawing…
                </DropdownMenu.Item>
              </>
            )}
          </DropdownMenu.Content>
        </DropdownMenu.Portal>
      </DropdownMenu.Root>
      <input
        ref={input}
        type="file"
        accept=".json,application/json"
        hidden
        aria-label="Network document or drawing"
        onChange={async (event) => {
          const chosen = event.target.files?.[0];
          if (chosen) setFile(readDrawingFile(await chosen.text()));
          // The same file may be chosen again after it was put right.
          if (input.current) input.current.value = '';
        }}
      />
      {file && <ImportDialog file={file} onClose={() => setFile(null)} />}
    </>
  );
}
