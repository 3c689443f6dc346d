'use client';

import { toast } from 'sonner';
import { z } from 'zod';
import { characteristics, terminalUnitSchema, type ChosenValve, type TerminalUnit } from '@/lib/network/drawing';
import { designFlowOfLoad } from '@/lib/network/working';
import { fromUnit, toUnit } from '@/lib/units/format-quantity';
import { unitFor } from '@/lib/units/quantities';
import { useUnitChoice } from '../../shell/units-context';
import { useDrawing, useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { characteristicWords } from './control-valve-form';
import { NumberRow, QuantityRow, Section, SelectRow, TextRow } from './rows';
import { useEdit } from './use-edit';
import { ValveChoice } from './valve-choice';
import { WorkingList } from './working-list';

const { room, loadKw, designFlowLs, coilDropKpa, strainerKv } = terminalUnitSchema.shape;
const schema = z.object({ room: room.nullable(), loadKw, designFlowLs, coilDropKpa, strainerKv });
const controlSchema = z.object({
  kvs: z.number().positive('Kvs is above 0.').nullable(),
  characteristic: z.enum(characteristics).nullable(),
  opening: z.number().min(0, 'From 0 to 100 %.').max(1, 'From 0 to 100 %.').nullable(),
});

const noControl = { kvs: null, characteristic: 'equalPercentage', opening: 1 } as const;
const noValve: ChosenValve = { name: '', kvTable: [], settingTurns: null, isLocked: false };

/** Coil, control valve and balancing valve of one terminal unit, or of many at once. */
export function UnitForm({ units }: { units: TerminalUnit[] }) {
  const { canEdit } = useEditor();
  const fluid = useDrawing((drawing) => drawing.fluid);
  const { editPieces } = useEdit();
  const flowUnit = unitFor('flow', useUnitChoice());
  const isSingle = units.length === 1;
  const coil = commonValues(
    units.map((unit) => ({
      room: unit.room,
      loadKw: unit.loadKw,
      designFlowLs: unit.designFlowLs,
      coilDropKpa: unit.coilDropKpa,
      strainerKv: unit.strainerKv,
    })),
  );
  const loaded = units.filter((unit) => unit.loadKw !== null);
  const asked = isSingle && loaded.length ? designFlowOfLoad(loaded[0].loadKw!, fluid) : null;

  const takeFromLoad = () => {
    const found = loaded.map((unit) => designFlowOfLoad(unit.loadKw!, fluid));
    const refusal = found.find((it) => 'refused' in it);
    if (refusal && 'refused' in refusal) {
      toast(refusal.refused);
      return;
    }
    // Four digits as they are read: more would be a precision that no load has.
    const rounded = (flowLs: number) => fromUnit('flow', Number(toUnit('flow', flowLs, flowUnit).toPrecision(4)), flowUnit);
    editPieces(loaded, (unit) => {
      const flow = designFlowOfLoad(unit.loadKw!, fluid);
      return 'refused' in flow ? unit : { ...unit, designFlowLs: rounded(flow.flowLs) };
    });
  };

  return (
    <>
      <CommitForm
        schema={schema}
        values={coil.values}
        label="Coil"
        disabled={!canEdit}
        onCommit={(changed) => editPieces(units, (unit) => ({ ...unit, ...changed }) as TerminalUnit)}
      >
        {isSingle && <TextRow name="room" label="Room" />}
        <Section
          title="Design"
          action={
            canEdit &&
            loaded.length > 0 && (
              <button type="button" className="text-petrol min-h-6 text-xs font-semibold hover:underline" onClick={takeFromLoad}>
                Design flow from load
              </button>
            )
          }
        >
          <QuantityRow name="loadKw" label="Load" quantity="power" isMixed={coil.mixed.has('loadKw')} />
          <QuantityRow name="designFlowLs" label="Design flow" quantity="flow" isMixed={coil.mixed.has('designFlowLs')} />
          <QuantityRow name="coilDropKpa" label="Coil drop at design" quantity="pressure" isMixed={coil.mixed.has('coilDropKpa')} />
          <QuantityRow
            name="strainerKv"
            label="Strainer, none if empty"
            quantity="valveCoefficient"
            isMixed={coil.mixed.has('strainerKv')}
          />
        </Section>
      </CommitForm>
      {asked && !('refused' in asked) && <WorkingList workings={[asked.working]} title={`From the load: ${asked.working.result}`} />}
      {asked && 'refused' in asked && <p className="text-high pt-1 text-xs">▴ {asked.refused}</p>}
      <ControlPart units={units} />
      <BalancingPart units={units} />
    </>
  );
}

/** A part that a unit has or has not, with the way to the other. */
const Fitted = ({ has, onChange, what }: { has: boolean; onChange: () => void; what: string }) => (
  <button
    type="button"
    className="text-petrol min-h-6 text-xs font-semibold hover:underline"
    onClick={onChange}
    aria-label={`${has ? 'Take out' : 'Fit'} the ${what}`}
  >
    {has ? 'Take out' : 'Fit one'}
  </button>
);

function ControlPart({ units }: { units: TerminalUnit[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const fitted = units.filter((unit) => unit.controlValve !== null);
  const toggle = () => editPieces(units, (unit) => ({ ...unit, controlValve: fitted.length ? null : noControl }));
  const common = fitted.length ? commonValues(fitted.map((unit) => unit.controlValve!)) : null;
  return (
    <Section title="Control valve" action={canEdit && <Fitted has={fitted.length > 0} onChange={toggle} what="control valve" />}>
      {common && (
        <CommitForm
          schema={controlSchema}
          values={common.values}
          label="Control valve"
          disabled={!canEdit}
          onCommit={(changed) =>
            editPieces(fitted, (unit) => ({ ...unit, controlValve: { ...unit.controlValve, ...changed } as TerminalUnit['controlValve'] }))
          }
        >
          <QuantityRow name="kvs" label="Fully open, Kvs" quantity="valveCoefficient" isMixed={common.mixed.has('kvs')} />
          <SelectRow
            name="characteristic"
            label="Characteristic"
            options={characteristicWords}
            isMixed={common.mixed.has('characteristic')}
          />
          <NumberRow name="opening" label="Opening" isPercent isMixed={common.mixed.has('opening')} />
        </CommitForm>
      )}
    </Section>
  );
}

function BalancingPart({ units }: { units: TerminalUnit[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const fitted = units.filter((unit) => unit.balancingValve !== null);
  const toggle = () => editPieces(units, (unit) => ({ ...unit, balancingValve: fitted.length ? null : noValve }));
  return (
    <Section title="Balancing valve" action={canEdit && <Fitted has={fitted.length > 0} onChange={toggle} what="balancing valve" />}>
      {fitted.length > 0 && (
        <ValveChoice
          valve={fitted[0].balancingValve!}
          isMixed={
            commonValues(fitted.map((unit) => ({ name: unit.balancingValve!.name, kvTable: unit.balancingValve!.kvTable }))).mixed.size > 0
          }
          disabled={!canEdit}
          onCommit={(change) => editPieces(fitted, (unit) => ({ ...unit, balancingValve: { ...unit.balancingValve!, ...change } }))}
        />
      )}
    </Section>
  );
}
