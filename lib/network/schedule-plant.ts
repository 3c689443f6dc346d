import { z } from 'zod';
import { sourceSchema, type EquipmentOf } from './drawing';
import { yesOrNo, type ScheduleTable } from './schedule-column';
import type { PumpRow, SourceRow } from './schedule-rows';
import { flowNow, ofDesign, storeyColumn, tagColumn } from './schedule-shared-columns';
import { sourceOptions } from './schedule-words';

const { designFlowLs, designDropKpa } = sourceSchema.shape;

export const pumpTable: ScheduleTable<PumpRow> = {
  key: 'pumps',
  name: 'Pumps',
  of: 'equipment',
  columns: [
    tagColumn('Pump'),
    storeyColumn(),
    {
      key: 'speed',
      head: 'Speed',
      kind: 'number',
      unit: '%',
      decimals: 1,
      // As the drawing: up to twice its full speed.
      range: z.number().min(0).max(200),
      read: ({ item }) => item.speed * 100,
      write: (item, value) => ({ ...item, speed: Number(value) / 100 }),
    },
    {
      key: 'nonReturn',
      head: 'Non-return valve',
      kind: 'choice',
      read: ({ item }) => (item.hasNonReturn ? 'yes' : 'no'),
      options: () => yesOrNo,
      write: (item, value) => ({ ...item, hasNonReturn: value === 'yes' }),
    },
    {
      key: 'curve',
      head: 'Points of its curve',
      kind: 'number',
      unit: null,
      decimals: 0,
      isExtra: true,
      read: ({ item }) => item.curve.length,
    },
    flowNow(),
    { key: 'head', head: 'Head now', kind: 'quantity', quantity: 'head', read: ({ headM }) => headM },
    { key: 'design', head: 'Duty flow', kind: 'quantity', quantity: 'flow', total: 'sum', read: ({ designFlowLs: flowLs }) => flowLs },
    { key: 'required', head: 'Duty head', kind: 'quantity', quantity: 'head', total: 'most', read: ({ requiredHeadM }) => requiredHeadM },
    {
      key: 'dutySpeed',
      head: 'Duty speed',
      kind: 'number',
      unit: '%',
      decimals: 1,
      read: ({ requiredSpeed }) => (requiredSpeed === null ? null : requiredSpeed * 100),
    },
    { key: 'shaft', head: 'Duty shaft power', kind: 'quantity', quantity: 'power', total: 'sum', read: ({ shaftKw }) => shaftKw },
  ],
};

export const sourceTable: ScheduleTable<SourceRow> = {
  key: 'sources',
  name: 'Sources',
  of: 'equipment',
  columns: [
    tagColumn('Source'),
    storeyColumn(),
    {
      key: 'kind',
      head: 'Kind',
      kind: 'choice',
      widthRem: 9,
      read: ({ kind }) => kind,
      options: () => sourceOptions,
      write: (item, value) => ({ ...item, sourceKind: value as EquipmentOf<'source'>['sourceKind'] }),
    },
    {
      key: 'design',
      head: 'Design flow',
      kind: 'quantity',
      quantity: 'flow',
      range: designFlowLs,
      total: 'sum',
      read: ({ item }) => item.designFlowLs,
      write: (item, value) => ({ ...item, designFlowLs: value as number | null }),
    },
    {
      key: 'designDrop',
      head: 'Drop at design',
      kind: 'quantity',
      quantity: 'pressure',
      range: designDropKpa,
      read: ({ item }) => item.designDropKpa,
      write: (item, value) => ({ ...item, designDropKpa: value as number | null }),
    },
    flowNow('sum'),
    ofDesign(),
    { key: 'drop', head: 'Drop now', kind: 'quantity', quantity: 'pressure', total: 'most', read: ({ dropKpa }) => dropKpa },
  ],
};
