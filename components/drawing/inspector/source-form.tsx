'use client';

import { z } from 'zod';
import { sourceKinds, sourceSchema, type EquipmentOf } from '@/lib/network/drawing';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { QuantityRow, Section, SelectRow } from './rows';
import { useEdit } from './use-edit';

const { designFlowLs, designDropKpa } = sourceSchema.shape;
const schema = z.object({ sourceKind: z.enum(sourceKinds).nullable(), designFlowLs, designDropKpa });

const kindWords: [string, string][] = [
  ['chiller', 'Chiller'],
  ['boiler', 'Boiler'],
  ['heat-exchanger', 'Heat exchanger'],
];

type Source = EquipmentOf<'source'>;

export function SourceForm({ sources }: { sources: Source[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const { values, mixed } = commonValues(
    sources.map((source) => ({ sourceKind: source.sourceKind, designFlowLs: source.designFlowLs, designDropKpa: source.designDropKpa })),
  );
  return (
    <Section title="Design">
      <CommitForm
        schema={schema}
        values={values}
        label="Source"
        disabled={!canEdit}
        onCommit={(changed) => editPieces(sources, (source) => ({ ...source, ...changed }) as Source)}
      >
        <SelectRow name="sourceKind" label="Kind" options={kindWords} isMixed={mixed.has('sourceKind')} />
        <QuantityRow name="designFlowLs" label="Design flow" quantity="flow" isMixed={mixed.has('designFlowLs')} />
        <QuantityRow name="designDropKpa" label="Drop at design" quantity="pressure" isMixed={mixed.has('designDropKpa')} />
      </CommitForm>
    </Section>
  );
}
