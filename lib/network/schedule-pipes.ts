import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import { pipeSchema, type DrawingPipe } from './drawing';
import { chosenSize, isSeriesId, seriesIds } from './pipe-choice';
import type { Option, ScheduleTable } from './schedule-column';
import type { PipeRow } from './schedule-rows';
import { flowNow, storeyColumn } from './schedule-shared-columns';
import { circuitOptions } from './schedule-words';

const { lengthM, boreMm, roughnessMm, minorK } = pipeSchema.shape;

const FREE = 'free';
const seriesOptions: readonly Option[] = [...seriesIds.map((id): Option => [id, pipeSeries[id].name]), [FREE, 'Free bore']];
const ofItsSize = { refused: 'It comes with the size: choose Free bore as the series to type it.' };

/** Another series keeps the nominal size where it has one of that name. */
function withSeries(pipe: DrawingPipe, series: string): DrawingPipe {
  if (!isSeriesId(series)) return { ...pipe, series: null, nominal: null };
  return { ...pipe, ...chosenSize(series, pipe.nominal)! };
}

export const pipeTable: ScheduleTable<PipeRow> = {
  key: 'pipes',
  name: 'Pipes',
  of: 'pipes',
  columns: [
    { key: 'tag', head: 'From – to', kind: 'text', widthRem: 12, read: ({ tag }) => tag },
    storeyColumn(),
    {
      key: 'side',
      head: 'Side',
      kind: 'choice',
      widthRem: 6,
      read: ({ item }) => item.circuit,
      options: () => circuitOptions,
      write: (item, value) => ({ ...item, circuit: value as DrawingPipe['circuit'] }),
    },
    {
      key: 'series',
      head: 'Series',
      kind: 'choice',
      widthRem: 14,
      read: ({ item }) => (isSeriesId(item.series) ? item.series : FREE),
      options: () => seriesOptions,
      write: (item, value) => withSeries(item, String(value)),
    },
    {
      key: 'size',
      head: 'Size',
      kind: 'choice',
      widthRem: 6,
      read: ({ item }) => item.nominal,
      options: ({ series }) => (isSeriesId(series) ? pipeSeries[series].sizes.map(({ nominal }): Option => [nominal, nominal]) : []),
      write: (item, value) =>
        isSeriesId(item.series)
          ? { ...item, ...chosenSize(item.series, String(value))! }
          : { refused: 'A free bore has no size; choose a series first.' },
    },
    {
      key: 'bore',
      head: 'Bore',
      kind: 'quantity',
      quantity: 'bore',
      range: boreMm,
      read: ({ item }) => item.boreMm,
      write: (item, value) => (isSeriesId(item.series) ? ofItsSize : { ...item, boreMm: value as number | null }),
    },
    {
      key: 'roughness',
      head: 'Roughness',
      kind: 'quantity',
      quantity: 'bore',
      range: roughnessMm,
      isExtra: true,
      read: ({ item }) => item.roughnessMm,
      write: (item, value) => (isSeriesId(item.series) ? ofItsSize : { ...item, roughnessMm: value as number | null }),
    },
    {
      key: 'length',
      head: 'Length',
      kind: 'quantity',
      quantity: 'length',
      range: lengthM,
      total: 'sum',
      read: ({ item }) => item.lengthM,
      write: (item, value) => ({ ...item, lengthM: value as number | null }),
    },
    {
      key: 'minorK',
      head: 'Local losses',
      kind: 'number',
      unit: 'sum of K',
      decimals: 2,
      range: minorK,
      read: ({ item }) => item.minorK,
      write: (item, value) => ({ ...item, minorK: Number(value) }),
    },
    { key: 'design', head: 'Design flow', kind: 'quantity', quantity: 'flow', read: ({ designFlowLs }) => designFlowLs },
    flowNow(),
    { key: 'velocity', head: 'Velocity', kind: 'quantity', quantity: 'velocity', total: 'most', read: ({ velocityMs }) => velocityMs },
    { key: 'gradient', head: 'Friction', kind: 'quantity', quantity: 'gradient', total: 'most', read: ({ paPerM }) => paPerM },
    { key: 'drop', head: 'Drop', kind: 'quantity', quantity: 'pressure', total: 'most', read: ({ dropKpa }) => dropKpa },
  ],
};
