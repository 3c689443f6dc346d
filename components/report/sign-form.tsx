'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import { returnNoteSchema, signNoteSchema, type Meaning } from '@/lib/api/reports';
import { RequestError } from '@/lib/client/http';
import { signReport } from '@/lib/client/reports';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { TextArea } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { Notice } from '../ui/notice';
import { ShortSha256 } from './sha256-text';
import { signingWords } from './signing-words';

interface SignFormProps {
  loopId: string;
  meaning: Meaning;
  contentSha256: string;
  /** Tags of the terminals that nobody measured: a submission has to say why. */
  notMeasured: string[];
  /** What was typed before the dialog was closed without signing. */
  note: string;
  onNote: (note: string) => void;
  onDone: () => void;
}

/** What a person signs, with what note; the SHA-256 is that of the report they have before them. */
export function SignForm({ loopId, meaning, contentSha256, notMeasured, note, onNote, onDone }: SignFormProps) {
  const router = useRouter();
  const words = signingWords[meaning];
  const asksWhy = meaning === 'submitted' && notMeasured.length > 0;
  const form = useForm({ resolver: zodResolver(meaning === 'returned' ? returnNoteSchema : signNoteSchema), defaultValues: { note } });
  const sign = useMutation({
    mutationFn: (typed: { note: string }) => signReport(loopId, { meaning, contentSha256, ...typed }),
    onSuccess: () => {
      toast(words.done);
      onNote('');
      onDone();
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const isSuperseded = sign.error instanceof RequestError && sign.error.code === 'revision-superseded';
  const look = () => {
    router.refresh();
    onDone();
  };
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => sign.mutate(values))} noValidate className="flex flex-col gap-4">
      {asksWhy && (
        <Notice tone="brass" title={`${notMeasured.length} ${notMeasured.length === 1 ? 'terminal is' : 'terminals are'} not measured`}>
          {notMeasured.slice(0, 12).join(', ')}
          {notMeasured.length > 12 && ` and ${notMeasured.length - 12} more`}. Say in the note why.
        </Notice>
      )}
      <TextArea
        label={meaning === 'returned' || asksWhy ? 'Note' : 'Note, if there is something to say'}
        error={errors.note?.message}
        {...form.register('note', { onChange: (event: { target: { value: string } }) => onNote(event.target.value) })}
      />
      <p className="text-quiet text-sm">
        SHA-256 of what you sign: <ShortSha256 sha256={contentSha256} />
      </p>
      <FormTrouble message={errors.root?.message} />
      <div className="flex flex-wrap justify-end gap-2">
        <Button look="quiet" onClick={onDone}>
          Cancel
        </Button>
        {isSuperseded ? (
          <Button look="primary" onClick={look}>
            Show the report as it is now
          </Button>
        ) : (
          <Button type="submit" look={meaning === 'returned' ? 'danger' : 'primary'} isPending={sign.isPending} pendingText={words.pending}>
            {words.action}
          </Button>
        )}
      </div>
    </form>
  );
}
