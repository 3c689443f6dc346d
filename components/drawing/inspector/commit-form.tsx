'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { createContext, useContext, useRef, type ReactNode, type RefObject, type SyntheticEvent } from 'react';
import { FormProvider, useForm, type DefaultValues, type FieldValues } from 'react-hook-form';
import type { z } from 'zod';
import { same } from '@/lib/network/merge-drawings';

/** Fields whose text means nothing yet: what they held before must not be overwritten by it. */
const UnreadContext = createContext<RefObject<Set<string>>>({ current: new Set() });
export const useUnreadFields = () => useContext(UnreadContext);

interface CommitFormProps<T extends FieldValues> {
  schema: z.ZodType<T, T>;
  values: T;
  /** Gets the fields that were changed, and no others. */
  onCommit: (changed: Partial<T>) => void;
  label: string;
  disabled: boolean;
  children: ReactNode;
}

/** A form without a button: a field is taken when it is left or Enter is pressed, and undo brings back what it was. */
export function CommitForm<T extends FieldValues>({ schema, values, onCommit, label, disabled, children }: CommitFormProps<T>) {
  const form = useForm<T>({ resolver: zodResolver(schema), values, defaultValues: values as DefaultValues<T> });
  const unread = useRef(new Set<string>());
  const take = (event: SyntheticEvent) =>
    form.handleSubmit((typed) => {
      if (disabled) return;
      const changed = Object.entries(typed).filter(([name, value]) => !unread.current.has(name) && !same(value, values[name]));
      if (changed.length) onCommit(Object.fromEntries(changed) as Partial<T>);
    })(event);
  return (
    <FormProvider {...form}>
      <UnreadContext value={unread}>
        <form aria-label={label} onSubmit={take} onBlur={take} noValidate>
          <fieldset disabled={disabled} className="min-w-0 [&_:disabled]:opacity-100">
            {children}
            {/* Without it a browser takes Enter for nothing where there are several fields. */}
            <button type="submit" hidden tabIndex={-1} />
          </fieldset>
        </form>
      </UnreadContext>
    </FormProvider>
  );
}
