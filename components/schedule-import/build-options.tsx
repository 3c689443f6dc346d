'use client';

import { useQuery } from '@tanstack/react-query';
import { Controller, type Control, type UseFormRegister } from 'react-hook-form';
import type { ReactNode } from 'react';
import { catalogueQuery } from '@/lib/client/catalogue';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import type { GenerateOptions } from '@/lib/network/generate/scheduled-terminal';
import { seriesIds } from '@/lib/network/pipe-choice';
import type { Quantity } from '@/lib/units/quantities';
import { CheckField, SelectField, TextField } from '../ui/field';
import { QuantityField } from '../ui/quantity-field';

export interface BuildValues extends GenerateOptions {
  /** '' for the generic valves. */
  valveFamilyId: string;
}

type FigureName =
  | 'terminalSpacingM'
  | 'runOutM'
  | 'storeyHeightM'
  | 'riserSpacingM'
  | 'maxVelocityMs'
  | 'maxGradientPaM'
  | 'minReadingKpa'
  | 'sourceDropKpa';

interface BuildOptionsProps {
  control: Control<BuildValues>;
  register: UseFormRegister<BuildValues>;
  errors: Partial<Record<keyof BuildValues, { message?: string }>>;
}

/** How the loop is piped, valved and sized. */
export function BuildOptions({ control, register, errors }: BuildOptionsProps) {
  const families = useQuery(catalogueQuery).data?.valveFamilies ?? [];
  const figure = (name: FigureName, label: string, quantity: Quantity, hint?: string) => (
    <Controller
      key={name}
      control={control}
      name={name}
      render={({ field: { ref, value, onChange, onBlur } }) => (
        <QuantityField
          label={label}
          hint={hint}
          quantity={quantity}
          ref={ref}
          value={value}
          onChange={(si) => onChange(si)}
          onBlur={onBlur}
          error={errors[name]?.message}
        />
      )}
    />
  );
  return (
    <div className="grid gap-x-8 gap-y-6 md:grid-cols-2 xl:grid-cols-4">
      <Group name="Pipework">
        <SelectField label="Return piping" {...register('returnPiping')}>
          <option value="direct">Direct: the nearest returns first</option>
          <option value="reverse">Reverse: the nearest returns last</option>
        </SelectField>
        {figure('terminalSpacingM', 'From terminal to terminal', 'length')}
        {figure('runOutM', 'From main to terminal', 'length', 'each way')}
        <TextField
          label="Terminals on one branch"
          hint="at most"
          inputMode="numeric"
          className="figures text-right"
          error={errors.mostOnBranch?.message}
          {...register('mostOnBranch', { valueAsNumber: true })}
        />
      </Group>
      <Group name="Building">
        {figure('storeyHeightM', 'Storey height', 'length')}
        {figure('riserSpacingM', 'Pump to riser, riser to riser', 'length')}
        {figure('sourceDropKpa', 'Drop of the source', 'pressure', 'at design flow')}
      </Group>
      <Group name="Pipe sizes">
        <SelectField label="Pipe" {...register('pipeSeries')}>
          {seriesIds.map((id) => (
            <option key={id} value={id}>
              {pipeSeries[id].name}
            </option>
          ))}
        </SelectField>
        {figure('maxVelocityMs', 'Velocity', 'velocity', 'at most')}
        {figure('maxGradientPaM', 'Friction', 'gradient', 'at most')}
      </Group>
      <Group name="Balancing valves">
        <SelectField label="Family" {...register('valveFamilyId')}>
          <option value="">Generic, fixed orifice</option>
          {families.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </SelectField>
        {figure('minReadingKpa', 'Least reading', 'pressure', 'at design flow')}
        <CheckField label="A valve on each branch and riser" {...register('hasBranchValves')} />
        <CheckField label="A main valve" {...register('hasMainValve')} />
      </Group>
    </div>
  );
}

const Group = ({ name, children }: { name: string; children: ReactNode }) => (
  <fieldset className="flex flex-col gap-3">
    <legend className="text-quiet mb-2 w-full border-b pb-1 text-sm font-semibold">{name}</legend>
    {children}
  </fieldset>
);
