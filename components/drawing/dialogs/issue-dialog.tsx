'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextArea } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { issueRevisionSchema } from '@/lib/api/loops';
import { issueRevision } from '@/lib/client/drafts';
import { useResults } from '../editor-context';

interface IssueDialogProps {
  loopId: string;
  nextNumber: number;
  /** Saves what is not saved yet; answers the version to freeze, null where it could not be saved. */
  saveFirst: () => Promise<number | null>;
  onClose: () => void;
  onIssued: (number: number) => void;
}

const noteSchema = issueRevisionSchema.pick({ note: true });

/** Freezes the draft as the next revision, once nothing stands against it. */
export function IssueDialog({ loopId, nextNumber, saveFirst, onClose, onIssued }: IssueDialogProps) {
  const { faults, solved, isOld } = useResults();
  const form = useForm({ resolver: zodResolver(noteSchema), defaultValues: { note: '' } });
  const blocking = faults.filter(({ severity }) => severity === 'error');
  const warnings = faults.filter(({ severity }) => severity === 'warning');
  const isUnbalanced = !solved?.balance?.converged;
  const issue = useMutation({
    mutationFn: async (note: string) => {
      const version = await saveFirst();
      if (version === null)
        throw new Error('The drawing could not be saved, so it cannot be issued yet. See the line at the foot of the page.');
      return issueRevision(loopId, version, note);
    },
    onSuccess: ({ number }) => {
      toast(`Revision ${number} is issued: drawing, schedule, settings and pump duty are frozen.`);
      onIssued(number);
    },
  });
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Issue revision ${nextNumber}`}
      description="Freezes drawing, schedule, settings and pump duty as they stand. Technicians work from the issued revision."
    >
      <form className="flex flex-col gap-4" onSubmit={form.handleSubmit(({ note }) => issue.mutate(note))}>
        {blocking.length > 0 && (
          <Notice tone="high" title={`${blocking.length} ${blocking.length === 1 ? 'fault forbids' : 'faults forbid'} it`}>
            <FaultLines messages={blocking.map(({ message }) => message)} />
          </Notice>
        )}
        {blocking.length === 0 && isUnbalanced && (
          <Notice tone="high" title="There are no settings yet">
            {solved?.balanceMissing ?? 'The loop has not been solved and balanced.'}
          </Notice>
        )}
        {warnings.length > 0 && (
          <Notice tone="brass" title={`${warnings.length} ${warnings.length === 1 ? 'warning' : 'warnings'} to look at`}>
            <FaultLines messages={warnings.map(({ message }) => message)} />
          </Notice>
        )}
        <TextArea label="Note" hint="what changed, and why" error={form.formState.errors.note?.message} {...form.register('note')} />
        {issue.error && <Notice tone="high">{issue.error.message}</Notice>}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Not yet</Button>
          <Button
            look="primary"
            type="submit"
            isPending={issue.isPending}
            pendingText="Issuing…"
            disabled={blocking.length > 0 || isUnbalanced || isOld}
          >
            Issue revision {nextNumber}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}

const SHOWN = 6;

const FaultLines = ({ messages }: { messages: string[] }) => (
  <ul className="list-disc pl-4">
    {messages.slice(0, SHOWN).map((message, i) => (
      <li key={i}>{message}</li>
    ))}
    {messages.length > SHOWN && <li>and {messages.length - SHOWN} more</li>}
  </ul>
);
