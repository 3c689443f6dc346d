'use client';

import { z } from 'zod';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import { pipeSchema, type DrawingPipe } from '@/lib/network/drawing';
import { chosenSize, isSeriesId, seriesIds, sizeSource, type PipeFigures } from '@/lib/network/pipe-choice';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { NumberRow, QuantityRow, Section, SelectRow } from './rows';
import { useEdit } from './use-edit';

const { lengthM, boreMm, roughnessMm } = pipeSchema.shape;
const schema = z.object({
  lengthM,
  series: z.string().nullable(),
  nominal: z.string().nullable(),
  boreMm,
  roughnessMm,
  minorK: z.number().min(0, '0 or more.').max(1e6).nullable(),
  circuit: z.enum(['supply', 'return']).nullable(),
});
type PipeValues = z.infer<typeof schema>;

const FREE = 'free';
const seriesWords: [string, string][] = [...seriesIds.map((id): [string, string] => [id, pipeSeries[id].name]), [FREE, 'Free bore']];

/** What a change in the form means for a pipe: a size of a series brings its bore and roughness. */
export function changedPipe<P extends PipeFigures>(pipe: P, changed: Partial<PipeValues>): P {
  const { series, nominal, ...rest } = changed;
  const plain = Object.fromEntries(
    Object.entries(rest).filter(([key, value]) => value !== null || key === 'lengthM' || key === 'boreMm' || key === 'roughnessMm'),
  );
  const next = { ...pipe, ...plain };
  if (series === FREE) return { ...next, series: null, nominal: null };
  if (series === undefined && nominal === undefined) return next;
  const seriesId = series ?? next.series;
  if (!isSeriesId(seriesId)) return next;
  return { ...next, ...chosenSize(seriesId, nominal ?? next.nominal) };
}

/** Length, size and local losses of one pipe, or of many at once. */
export function PipeForm({ pipes }: { pipes: DrawingPipe[] }) {
  const { canEdit, canvasStore } = useEditor();
  const { editPipes } = useEdit();
  const commit = (changed: Partial<PipeValues>) => {
    editPipes(pipes, (pipe) => changedPipe(pipe, changed));
    const { lengthM: length, series, nominal, boreMm: bore, roughnessMm: roughness, minorK } = changedPipe(pipes[0], changed);
    canvasStore.setState({ newPipe: { lengthM: length, series, nominal, boreMm: bore, roughnessMm: roughness, minorK } });
  };
  const circuit = commonValues(pipes.map((pipe) => ({ circuit: pipe.circuit })));
  const bent = pipes.filter(({ bends }) => bends.length > 0);
  return (
    <>
      <PipeFields figures={pipes} label="Pipe" disabled={!canEdit} onCommit={commit} circuit={circuit} />
      {canEdit && bent.length > 0 && (
        <button
          type="button"
          className="text-petrol min-h-8 text-sm font-semibold hover:underline"
          onClick={() => editPipes(bent, (pipe) => ({ ...pipe, bends: [] }))}
        >
          Let it find its own way again
        </button>
      )}
    </>
  );
}

interface PipeFieldsProps {
  figures: PipeFigures[];
  label: string;
  disabled: boolean;
  onCommit: (changed: Partial<PipeValues>) => void;
  circuit?: { values: { circuit: DrawingPipe['circuit'] | null }; mixed: Set<'circuit'> };
}

export function PipeFields({ figures, label, disabled, onCommit, circuit }: PipeFieldsProps) {
  const { values, mixed } = commonValues(
    figures.map(({ lengthM: length, series, nominal, boreMm: bore, roughnessMm: roughness, minorK }) => ({
      lengthM: length,
      series: isSeriesId(series) ? series : FREE,
      nominal,
      boreMm: bore,
      roughnessMm: roughness,
      minorK: minorK as number | null,
    })),
  );
  const series = values.series;
  const sizes = isSeriesId(series) ? pipeSeries[series].sizes : [];
  return (
    <CommitForm
      schema={schema}
      values={{ ...values, circuit: circuit?.values.circuit ?? null }}
      label={label}
      disabled={disabled}
      onCommit={onCommit}
    >
      <Section title={label}>
        <QuantityRow name="lengthM" label="Length" quantity="length" isMixed={mixed.has('lengthM')} />
        <SelectRow name="series" label="Series" options={seriesWords} isMixed={mixed.has('series')} />
        {sizes.length > 0 && (
          <SelectRow
            name="nominal"
            label="Size"
            options={sizes.map((size) => [size.nominal, `${size.nominal}, bore ${size.boreMm} mm`])}
            isMixed={mixed.has('nominal') || values.nominal === null}
          />
        )}
        {series === FREE && (
          <>
            <QuantityRow name="boreMm" label="Bore" quantity="bore" isMixed={mixed.has('boreMm')} />
            <QuantityRow name="roughnessMm" label="Roughness" quantity="bore" isMixed={mixed.has('roughnessMm')} />
          </>
        )}
        <NumberRow name="minorK" label="Local losses, sum of K" isMixed={mixed.has('minorK')} />
        {circuit && (
          <SelectRow
            name="circuit"
            label="Circuit"
            options={[
              ['supply', 'Supply (solid)'],
              ['return', 'Return (dashed)'],
            ]}
            isMixed={circuit.mixed.has('circuit')}
          />
        )}
      </Section>
      {isSeriesId(series) && (
        <p className="text-quiet pt-1 text-xs">
          {values.boreMm !== null && `Bore ${values.boreMm} mm, roughness ${values.roughnessMm} mm. `}
          {sizeSource({ series })}
        </p>
      )}
    </CommitForm>
  );
}
