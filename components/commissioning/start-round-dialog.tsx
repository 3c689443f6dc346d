'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import { v7 as uuidv7 } from 'uuid';
import { startRoundSchema, type StartRound } from '@/lib/api/commissioning';
import { commissioningQuery, startRound } from '@/lib/client/commissioning';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';

const usual = ['As found', 'As set', 'As left', 'Witness'];

export function StartRoundDialog({ loopId, openChecks, onDone }: { loopId: string; openChecks: number; onDone: () => void }) {
  const queries = useQueryClient();
  const router = useRouter();
  // The id is made with the form, so pressing again after no answer came starts no second round.
  const form = useForm<StartRound>({
    resolver: zodResolver(startRoundSchema),
    defaultValues: { id: uuidv7(), purpose: '', openChecksReason: '' },
  });
  const start = useMutation({
    mutationFn: (round: StartRound) => startRound(loopId, round),
    onSuccess: async () => {
      await queries.invalidateQueries({ queryKey: commissioningQuery(loopId).queryKey });
      onDone();
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((round) => start.mutate(round))} noValidate className="flex flex-col gap-4">
      <TextField
        label="What is it for?"
        placeholder="As found"
        className="!h-12 text-lg"
        autoComplete="off"
        error={errors.purpose?.message}
        {...form.register('purpose')}
      />
      <div className="flex flex-wrap gap-2">
        {usual.map((purpose) => (
          <Button
            key={purpose}
            size="touch"
            className="!text-base"
            onClick={() => form.setValue('purpose', purpose, { shouldValidate: true })}
          >
            {purpose}
          </Button>
        ))}
      </div>
      {openChecks > 0 && (
        <TextField
          label={openChecks === 1 ? 'One check is open. Why start all the same?' : `${openChecks} checks are open. Why start all the same?`}
          hint="stands in the report"
          className="!h-12 text-lg"
          autoComplete="off"
          error={errors.openChecksReason?.message}
          {...form.register('openChecksReason')}
        />
      )}
      <FormTrouble message={errors.root?.message ?? errors.id?.message} />
      <div className="flex justify-end gap-2">
        <Button size="touch" look="quiet" className="!text-base" onClick={onDone}>
          Cancel
        </Button>
        <Button size="touch" type="submit" look="primary" className="!text-base" isPending={start.isPending} pendingText="Starting…">
          Start the round
        </Button>
      </div>
    </form>
  );
}
