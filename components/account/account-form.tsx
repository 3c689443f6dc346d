'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import { changeAccountSchema, type ChangeAccount } from '@/lib/api/people';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { quantities, unitFor, unitsOf, type Quantity, type UnitChoice } from '@/lib/units/quantities';
import { Button } from '../ui/button';
import { SelectField, TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';

const quantityWords: Record<Quantity, string> = {
  flow: 'Flow',
  pressure: 'Pressure and drop',
  head: 'Head and elevation',
  length: 'Length',
  bore: 'Bore',
  temperature: 'Temperature',
  power: 'Power and load',
  valveCoefficient: 'Valve coefficient',
  velocity: 'Velocity',
  gradient: 'Drop per length',
  speed: 'Pump speed',
  setting: 'Valve setting',
};

/** Quantities with something to choose. */
const choosable = quantities.filter((quantity) => unitsOf(quantity).length > 1);

interface AccountFormProps {
  name: string;
  theme: 'system' | 'light' | 'dark';
  units: UnitChoice;
}

/** One's own name, theme and units. */
export function AccountForm({ name, theme, units }: AccountFormProps) {
  const router = useRouter();
  const chosen = Object.fromEntries(choosable.map((quantity) => [quantity, unitFor(quantity, units)]));
  const form = useForm<ChangeAccount>({ resolver: zodResolver(changeAccountSchema), defaultValues: { name, theme, units: chosen } });
  const save = useMutation({
    mutationFn: (values: ChangeAccount) => send('PATCH', '/api/account', values),
    onSuccess: (_, values) => {
      // What was typed while it saved stays.
      form.reset(values, { keepValues: true });
      toast('Saved');
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors, isDirty } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => save.mutate(values))} noValidate className="flex flex-col gap-4">
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField
          label="Name"
          hint="as it stands on reports you sign"
          autoComplete="name"
          error={errors.name?.message}
          {...form.register('name')}
        />
        <SelectField label="Theme" {...form.register('theme')}>
          <option value="system">As the device</option>
          <option value="light">Light</option>
          <option value="dark">Dark, for dim plant rooms</option>
        </SelectField>
      </div>
      <fieldset className="grid gap-x-4 gap-y-3 border-t pt-4 sm:grid-cols-2">
        <legend className="sr-only">Units</legend>
        <p className="text-quiet text-sm sm:col-span-2">
          The units you read and type in. Whatever you choose, a value may carry its own: “12 gpm”, “3,4 m³/h”.
        </p>
        {choosable.map((quantity) => (
          <SelectField key={quantity} label={quantityWords[quantity]} {...form.register(`units.${quantity}`)}>
            {unitsOf(quantity).map((unit) => (
              <option key={unit}>{unit}</option>
            ))}
          </SelectField>
        ))}
      </fieldset>
      <FormTrouble message={errors.root?.message ?? errors.units?.root?.message} />
      <Button type="submit" look="primary" className="self-start" disabled={!isDirty} isPending={save.isPending} pendingText="Saving…">
        Save
      </Button>
    </form>
  );
}
