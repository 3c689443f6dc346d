'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useForm, useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { instrumentKinds, instrumentSchema, type Instrument, type InstrumentInput } from '@/lib/api/commissioning';
import { addInstrument, changeInstrument } from '@/lib/client/instruments';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { SelectField, TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { NumberField } from './number-field';
import { kindWords, unitOfKind } from './instrument-words';

interface InstrumentDialogProps {
  /** The meter to change; null adds one. */
  instrument: Instrument | null;
  isOpen: boolean;
  onClose: () => void;
}

export const InstrumentDialog = ({ instrument, isOpen, onClose }: InstrumentDialogProps) => (
  <Dialog
    isOpen={isOpen}
    onClose={onClose}
    title={instrument ? `Change ${instrument.serial}` : 'Add a meter'}
    description="Range and accuracy as its certificate states them; they go into the uncertainty of every reading taken with it from now on."
  >
    <InstrumentForm instrument={instrument} onDone={onClose} />
  </Dialog>
);

const blank: InstrumentInput = {
  name: '',
  kind: 'differential-pressure',
  serial: '',
  rangeLow: null,
  rangeHigh: null,
  accuracyPercent: 1,
  accuracyAbsolute: 0,
  calibratedOn: null,
  calibrationDueOn: null,
  isRetired: false,
};

function InstrumentForm({ instrument, onDone }: { instrument: Instrument | null; onDone: () => void }) {
  const router = useRouter();
  const form = useForm<InstrumentInput>({ resolver: zodResolver(instrumentSchema), defaultValues: instrument ?? blank });
  const save = useMutation({
    mutationFn: (input: InstrumentInput) => (instrument ? changeInstrument(instrument.id, input) : addInstrument(input)),
    onSuccess: ({ serial }) => {
      toast(instrument ? `${serial} changed` : `${serial} added`);
      onDone();
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  const unit = unitOfKind[useWatch({ control: form.control, name: 'kind' })];
  const day = { setValueAs: (text: string | null) => text || null };
  return (
    <form onSubmit={form.handleSubmit((input) => save.mutate(input))} noValidate className="flex flex-col gap-4">
      <TextField label="Name" placeholder="Differential pressure meter" error={errors.name?.message} {...form.register('name')} />
      <div className="grid gap-4 sm:grid-cols-2">
        <SelectField label="Reads" error={errors.kind?.message} {...form.register('kind')}>
          {instrumentKinds.map((kind) => (
            <option key={kind} value={kind}>
              {kindWords[kind]}
            </option>
          ))}
        </SelectField>
        <TextField label="Serial number" autoComplete="off" error={errors.serial?.message} {...form.register('serial')} />
        <NumberField control={form.control} name="rangeLow" label="Lower end of range" hint={unit} />
        <NumberField control={form.control} name="rangeHigh" label="Upper end of range" hint={unit} />
        <NumberField control={form.control} name="accuracyPercent" label="Accuracy" hint="± % of reading" />
        <NumberField control={form.control} name="accuracyAbsolute" label="and a fixed part" hint={`± ${unit}`} />
        <TextField type="date" label="Calibrated on" error={errors.calibratedOn?.message} {...form.register('calibratedOn', day)} />
        <TextField
          type="date"
          label="Calibration due"
          error={errors.calibrationDueOn?.message}
          {...form.register('calibrationDueOn', day)}
        />
      </div>
      <FormTrouble message={errors.root?.message} />
      <div className="flex justify-end gap-2">
        <Button look="quiet" onClick={onDone}>
          Cancel
        </Button>
        <Button type="submit" look="primary" isPending={save.isPending} pendingText="Saving…">
          {instrument ? 'Save' : 'Add the meter'}
        </Button>
      </div>
    </form>
  );
}
