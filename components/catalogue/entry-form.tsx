'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState, type ReactNode } from 'react';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import type { z } from 'zod';
import { describedSchema } from '@/lib/api/catalogue';
import { catalogueQuery } from '@/lib/client/catalogue';
import { showRefusal } from '@/lib/client/show-refusal';
import type { FigureColumn } from '@/lib/catalogue/figure-columns';
import type { CellFault } from '@/lib/catalogue/read-valve-rows';
import { Button, buttonClass } from '../ui/button';
import { TextArea, TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { Notice } from '../ui/notice';
import { Sheet } from '../ui/sheet';
import { FaultList } from './fault-list';
import { FigureGrid, type Grid } from './figure-grid';
import { UploadButton, type TakenFile } from './upload-button';

export type Described = z.infer<typeof describedSchema>;

interface EntryFormProps {
  /** Null adds one. */
  entry: Described | null;
  /** "valve family", "pump". */
  kind: string;
  columns: readonly FigureColumn[];
  initialGrid: Grid;
  placeholders: Described;
  /** How the table is filled, in a sentence or two. */
  hint: ReactNode;
  faultsOf: (grid: Grid) => CellFault<string>[];
  /** What the figures come to so far. */
  preview: (grid: Grid) => ReactNode;
  onSave: (described: Described, grid: Grid) => Promise<unknown>;
  listHref: string;
}

/** A catalogue entry: what it is, where its figures come from, and the figures; looked at as a whole before anything is stored. */
export function EntryForm(props: EntryFormProps) {
  const { entry, kind, columns, initialGrid, placeholders, hint, faultsOf, preview, onSave, listHref } = props;
  const router = useRouter();
  const queries = useQueryClient();
  const [grid, setGrid] = useState(initialGrid);
  const [taken, setTaken] = useState<TakenFile | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  /** A table that is being typed is not found fault with before it is done. */
  const [isJudged, setJudged] = useState(entry !== null);
  const form = useForm<Described>({
    resolver: zodResolver(describedSchema),
    defaultValues: entry ? { name: entry.name, source: entry.source } : { name: '', source: '' },
  });
  const save = useMutation({
    mutationFn: (described: Described) => onSave(described, grid),
    onSuccess: async (_, { name }) => {
      toast(entry ? `${name}: a new version is in the catalogue` : `${name} is in the catalogue`);
      await queries.invalidateQueries(catalogueQuery);
      router.push(listHref);
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const faults = faultsOf(grid);
  const { errors } = form.formState;

  const take = (file: TakenFile) => {
    const before = grid;
    setGrid({ rows: file.rows, units: { ...grid.units, ...file.units } });
    setTaken(file);
    setJudged(true);
    if (form.getValues('name') === '') form.setValue('name', file.fileName.replace(/\.[a-z0-9]+$/i, ''));
    if (before.rows.length > 0)
      toast('The table was replaced by the file’s', {
        action: {
          label: 'Undo',
          onClick: () => {
            setGrid(before);
            setTaken(null);
          },
        },
      });
  };

  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setJudged(true);
        return form.handleSubmit((described) => {
          if (faults.length === 0) save.mutate(described);
        })(event);
      }}
    >
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,24rem)]">
        <div className="flex min-w-0 flex-col gap-4">
          <Sheet title={entry ? `Change ${entry.name}` : `New ${kind}`}>
            <div className="flex flex-col gap-4">
              <TextField
                label="Name"
                autoComplete="off"
                placeholder={placeholders.name}
                error={errors.name?.message}
                {...form.register('name')}
              />
              <TextArea
                label="Source"
                hint="where the figures come from"
                rows={2}
                placeholder={placeholders.source}
                error={errors.source?.message}
                {...form.register('source')}
              />
            </div>
          </Sheet>
          <Sheet title="Figures" action={<UploadButton columns={columns} onTaken={take} onRefused={setRefused} />}>
            <div className="flex flex-col gap-3">
              <p className="text-quiet text-sm">{hint}</p>
              {refused && <Notice tone="high" title={refused} />}
              {taken && !refused && (
                <Notice tone="brass" title={`${taken.rows.length} rows from ${taken.fileName}. Nothing is stored before you save.`}>
                  {taken.remarks.join(' ')}
                </Notice>
              )}
              <FigureGrid
                label={`Figures of the ${kind}`}
                columns={columns}
                grid={grid}
                faults={isJudged ? faults : []}
                onChange={(next, isBlock) => {
                  setGrid(next);
                  if (isBlock) setJudged(true);
                }}
              />
              {isJudged && <FaultList faults={faults} columns={columns} />}
            </div>
          </Sheet>
        </div>
        <div className="min-w-0 lg:sticky lg:top-18">
          <Sheet title="As it will be calculated with">{preview(grid)}</Sheet>
        </div>
      </div>
      <FormTrouble message={errors.root?.message} />
      <div className="flex justify-end gap-2">
        <Link href={listHref} className={`${buttonClass('quiet')} no-underline`}>
          Cancel
        </Link>
        <Button type="submit" look="primary" isPending={save.isPending} pendingText="Saving…">
          {entry ? 'Save as a new version' : `Add the ${kind}`}
        </Button>
      </div>
    </form>
  );
}
