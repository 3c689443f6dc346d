'use client';

import { useState } from 'react';
import { z } from 'zod';
import { v7 as uuidv7 } from 'uuid';
import {
  methods,
  recordReadingSchema,
  type Instrument,
  type Reading,
  type ReadingMethod,
  type RecordReading,
  type Station,
} from '@/lib/api/commissioning';
import { isOverdue } from '@/lib/commissioning/calibration';
import { judgeReading, type Judgement, type Measured } from '@/lib/commissioning/judge-reading';
import { questionsAbout, type Question } from '@/lib/commissioning/suspicion';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { unitFor } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import { bandOf, type Commissioning } from './commissioning-context';
import { useDeviceMemory } from './use-device-memory';

export const quantityOf = { setting: 'setting', drop: 'pressure', flow: 'flow' } as const;
export type Field = keyof typeof quantityOf;

const typedSchema = z.object({
  method: z.enum(methods),
  setting: z.string().max(40),
  drop: z.string().max(40),
  flow: z.string().max(40),
  note: z.string().max(1000),
  correctsReadingId: z.uuid().nullable(),
});
type Typed = z.infer<typeof typedSchema>;

const deviceSchema = z.object({
  method: z.enum(methods).optional(),
  units: z.object({ pressure: z.string().optional(), flow: z.string().optional() }),
  instruments: z.partialRecord(z.enum(methods), z.string()),
});
const plainDevice: z.infer<typeof deviceSchema> = { units: {}, instruments: {} };

const kindFor = { 'valve-drop': 'differential-pressure', 'direct-flow': 'flow' } as const;
export const fieldsOf: Record<ReadingMethod, Field[]> = { 'valve-drop': ['setting', 'drop'], 'direct-flow': ['flow'] };

/** What is being typed at one station: kept on the device at each key, judged at each key, made into a reading when it is kept. */
export function useEntry(commissioning: Commissioning, station: Station) {
  const { personId, body, round } = commissioning;
  const [device, rememberDevice] = useDeviceMemory(`evenhead.meter.${personId}`, deviceSchema, plainDevice);
  const usual: ReadingMethod = station.kvTable ? (device.method ?? 'valve-drop') : 'direct-flow';
  const [blank] = useState<Typed>({ method: usual, setting: '', drop: '', flow: '', note: '', correctsReadingId: null });
  const [stored, remember] = useDeviceMemory<Typed | null>(`evenhead.typing.${personId}.${round?.id}.${station.id}`, typedSchema, null);
  const typed = stored ?? { ...blank, method: usual };
  const [active, setActive] = useState<Field | null>(null);
  const choice = useUnitChoice();

  const fields = fieldsOf[typed.method];
  const unitOf = (field: Field): string => {
    const own = field === 'drop' ? device.units.pressure : field === 'flow' ? device.units.flow : undefined;
    return unitFor(quantityOf[field], own ? { [quantityOf[field]]: own } : choice);
  };
  const read = Object.fromEntries(
    fields
      .filter((field) => typed[field].trim() !== '')
      .map((field) => [field, parseQuantity(quantityOf[field], typed[field], unitOf(field))]),
  ) as Partial<Record<Field, ReturnType<typeof parseQuantity>>>;
  const siOf = (field: Field): number | null => {
    const found = read[field];
    return found?.ok ? found.si : null;
  };

  const meters = body.instruments.filter(({ kind, isRetired }) => kind === kindFor[typed.method] && !isRetired);
  const meter: Instrument | null =
    meters.find(({ id }) => id === device.instruments[typed.method]) ?? (meters.length === 1 ? meters[0]! : null);
  const measured = measuredOf(typed.method, siOf('setting'), siOf('drop'), siOf('flow'));
  const band = bandOf(body.tolerances, station);
  const judgement =
    measured && body.densityKgM3 !== null
      ? judgeReading(measured, {
          ...station,
          densityKgM3: body.densityKgM3,
          accuracy: meter ?? { accuracyPercent: 0, accuracyAbsolute: 0 },
          band,
        })
      : null;

  return {
    typed,
    isBlank: stored === null,
    isCorrecting: typed.correctsReadingId !== null,
    fields,
    active: active !== null && fields.includes(active) ? active : (fields.find((field) => typed[field] === '') ?? fields.at(-1)!),
    setActive,
    unitOf,
    siOf,
    messageOf: (field: Field): string | null => {
      const found = read[field];
      if (found && !found.ok) return found.message;
      const path = { setting: 'settingTurns', drop: 'dropKpa', flow: 'flowLs' }[field];
      return judgement && !judgement.ok && judgement.path === path ? judgement.message : null;
    },
    band,
    meters,
    meter,
    measured,
    judgement: judgement?.ok ? judgement : null,
    type: (field: Field | 'note', text: string) => remember({ ...typed, [field]: text }),
    chooseMethod: (method: ReadingMethod) => {
      rememberDevice({ ...device, method });
      if (stored) remember({ ...typed, method });
    },
    chooseMeter: (id: string) => rememberDevice({ ...device, instruments: { ...device.instruments, [typed.method]: id } }),
    chooseUnit: (field: Field, unit: string) => rememberDevice({ ...device, units: { ...device.units, [quantityOf[field]]: unit } }),
    /** Takes an earlier entry up again, in the units it was typed in: to put it right, or because the server did not take it. */
    takeUp: ({ method, entered, note }: Pick<Reading, 'method' | 'entered' | 'note'>, correctsReadingId: string | null) => {
      const textOf = (field: Field) => entered.find(({ quantity }) => quantity === quantityOf[field])?.text ?? '';
      const units = Object.fromEntries(
        entered.filter(({ quantity }) => quantity !== 'setting').map(({ quantity, unit }) => [quantity, unit]),
      );
      rememberDevice({ ...device, units: { ...device.units, ...units } });
      remember({
        method,
        setting: textOf('setting'),
        drop: textOf('drop'),
        flow: textOf('flow'),
        note: correctsReadingId ? '' : note,
        correctsReadingId,
      });
    },
    clear: () => remember(null),
    /** The reading as it goes to the server, or why it cannot be kept yet. */
    finish: (): { reading: RecordReading; questions: Question[] } | { message: string } => {
      const unread = fields.find((field) => read[field]?.ok !== true);
      if (unread) return { message: (read[unread] as { message?: string } | undefined)?.message ?? missing[unread] };
      if (!meter)
        return {
          message: meters.length ? 'Choose the meter that you read.' : 'No meter of this kind is in the list. Add it under Instruments.',
        };
      if (!measured || !judgement) return { message: 'The loop’s fluid is not known.' };
      if (!judgement.ok) return { message: judgement.message };
      const at = new Date();
      const made = recordReadingSchema.safeParse({
        id: uuidv7(),
        stationId: station.id,
        method: typed.method,
        settingTurns: typed.method === 'valve-drop' ? siOf('setting') : null,
        dropKpa: typed.method === 'valve-drop' ? siOf('drop') : null,
        flowLs: typed.method === 'direct-flow' ? siOf('flow') : null,
        entered: fields.map((field) => {
          const found = read[field] as { text: string; unit: string };
          return { quantity: quantityOf[field], text: found.text, unit: found.unit };
        }),
        instrumentId: meter.id,
        takenAt: at.toISOString(),
        note: typed.note,
        correctsReadingId: typed.correctsReadingId,
      });
      if (!made.success) return { message: made.error.issues[0]!.message };
      return { reading: made.data, questions: askedOf(judgement, measured, meter, at) };
    },
  };

  function askedOf({ flowLs }: Judgement, what: Measured, instrument: Instrument, at: Date): Question[] {
    return questionsAbout({
      measured: what,
      flowLs,
      designFlowLs: station.designFlowLs,
      pumpShutOffKpa: body.pumpShutOffKpa,
      instrument: { ...instrument, isOverdue: isOverdue(instrument, at) },
    });
  }
}

export type Entry = ReturnType<typeof useEntry>;

const missing: Record<Field, string> = {
  setting: 'Type the turns that the valve stands at: a drop without them says nothing.',
  drop: 'Type the differential pressure.',
  flow: 'Type the flow.',
};

function measuredOf(method: ReadingMethod, settingTurns: number | null, dropKpa: number | null, flowLs: number | null): Measured | null {
  if (method === 'direct-flow') return flowLs !== null && flowLs >= 0 ? { method, flowLs } : null;
  return settingTurns !== null && dropKpa !== null ? { method, settingTurns, dropKpa } : null;
}
