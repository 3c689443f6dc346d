'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useFieldArray, useForm } from 'react-hook-form';
import { toast } from 'sonner';
import { z } from 'zod';
import { stationKinds, toleranceRuleSchema, type ToleranceRule } from '@/lib/api/projects';
import { ranksOf, toleranceTemplates } from '@/lib/api/tolerances';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { SelectField, TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { bandName, inOrder } from './tolerance-table';

const formSchema = z.object({ tolerances: z.array(toleranceRuleSchema) });
type FormValues = z.infer<typeof formSchema>;

/** For administrators: the bands, each with where it comes from. Readings keep the verdict that they were recorded with. */
export function ToleranceSettings({ projectId, tolerances }: { projectId: string; tolerances: ToleranceRule[] }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button size="small" onClick={() => setOpen(true)}>
        Change
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title="Tolerance bands"
        description="Per cent below and above design flow. Readings already recorded keep the verdict they were given."
      >
        <ToleranceForm projectId={projectId} tolerances={tolerances} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function ToleranceForm({ projectId, tolerances, onDone }: { projectId: string; tolerances: ToleranceRule[]; onDone: () => void }) {
  const router = useRouter();
  const form = useForm<FormValues>({ resolver: zodResolver(formSchema), defaultValues: { tolerances: inOrder(tolerances) } });
  const save = useMutation({
    mutationFn: (values: FormValues) => send('PATCH', `/api/projects/${projectId}`, values),
    onSuccess: () => {
      toast('Tolerance bands changed');
      onDone();
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const { fields, append, remove, replace } = useFieldArray({ control: form.control, name: 'tolerances' });
  const missing = stationKinds.flatMap((stationKind) =>
    ranksOf[stationKind]
      .filter((rank) => !fields.some((field) => field.stationKind === stationKind && field.rank === rank))
      .map((rank) => ({ stationKind, rank })),
  );
  const { errors } = form.formState;
  const percent = { type: 'number', step: 'any', inputMode: 'decimal', className: 'figures text-right' } as const;
  return (
    <form onSubmit={form.handleSubmit((values) => save.mutate(values))} noValidate className="flex flex-col gap-5">
      <SelectField
        label="Start from"
        hint="every figure can be changed afterwards"
        value=""
        onChange={({ target }) => {
          const template = toleranceTemplates[Number(target.value)];
          if (target.value !== '' && template) replace(template.rules);
        }}
      >
        <option value="">the bands as they are</option>
        {toleranceTemplates.map(({ name }, at) => (
          <option key={name} value={at}>
            {name}
          </option>
        ))}
      </SelectField>
      {fields.map(({ id, stationKind, rank }, i) => (
        <fieldset key={id} className="grid grid-cols-2 gap-3">
          <legend className="mb-1 flex w-full items-center justify-between font-semibold">
            {bandName({ stationKind, rank })}
            {rank !== 'all' && (
              <Button
                size="small"
                look="quiet"
                onClick={() => remove(i)}
                aria-label={`No band of its own for ${bandName({ stationKind, rank })}`}
              >
                Take away
              </Button>
            )}
          </legend>
          <TextField
            label="Below"
            hint="%"
            {...percent}
            error={errors.tolerances?.[i]?.lowerPercent?.message}
            {...form.register(`tolerances.${i}.lowerPercent`, { valueAsNumber: true })}
          />
          <TextField
            label="Above"
            hint="%"
            {...percent}
            error={errors.tolerances?.[i]?.upperPercent?.message}
            {...form.register(`tolerances.${i}.upperPercent`, { valueAsNumber: true })}
          />
          <div className="col-span-2">
            <TextField label="Source" error={errors.tolerances?.[i]?.source?.message} {...form.register(`tolerances.${i}.source`)} />
          </div>
        </fieldset>
      ))}
      {missing.length > 0 && (
        <div className="flex flex-wrap items-center gap-2">
          <span className="text-quiet text-sm">A band of their own for</span>
          {missing.map((which) => (
            <Button
              key={`${which.stationKind} ${which.rank}`}
              size="small"
              onClick={() => append({ ...which, lowerPercent: -10, upperPercent: 10, source: 'Agreed for this project' })}
            >
              {bandName(which)}
            </Button>
          ))}
        </div>
      )}
      <FormTrouble message={errors.root?.message} />
      <div className="flex justify-end gap-2">
        <Button look="quiet" onClick={onDone}>
          Cancel
        </Button>
        <Button type="submit" look="primary" isPending={save.isPending} pendingText="Saving…">
          Save
        </Button>
      </div>
    </form>
  );
}
