import type { FieldValues, Path, UseFormReturn } from 'react-hook-form';
import { RequestError } from './http';

/** Puts the server's refusal where the person looks: at the fields it names, else at the head of the form. Nothing typed is lost. */
export function showRefusal<Values extends FieldValues>(error: unknown, form: Pick<UseFormReturn<Values>, 'getValues' | 'setError'>): void {
  if (!(error instanceof RequestError)) throw error;
  const names = Object.keys(form.getValues());
  const here = error.fields.filter(({ path }) => names.includes(path.split('.')[0]!));
  for (const { path, message } of here) form.setError(path as Path<Values>, { message }, { shouldFocus: true });
  if (here.length === 0) form.setError('root', { message: error.message });
}
