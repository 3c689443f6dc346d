'use client';

import { z } from 'zod';
import type { Equipment } from '@/lib/network/drawing';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { TextRow } from './rows';
import { useEdit } from './use-edit';

const schema = z.object({ tag: z.string().trim().max(40, 'At most 40 characters.') });

/** The tag of one piece; several never share one. */
export function TagForm({ piece }: { piece: Equipment }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  return (
    <CommitForm
      schema={schema}
      values={{ tag: piece.tag }}
      label="Tag"
      disabled={!canEdit}
      onCommit={(changed) => editPieces([piece], (it) => ({ ...it, ...changed }))}
    >
      <TextRow name="tag" label="Tag" />
    </CommitForm>
  );
}
