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
import { measuredOf, type ReadFigures } from '@/lib/commissioning/measured-of';
import { methodsAt, readingMethods, type ReadingField } from '@/lib/commissioning/reading-methods';
import { judgeReading, type Judgement, type Measured } from '@/lib/commissioning/judge-reading';
import { questionsAbout, type Question } from '@/lib/commissioning/suspicion';
import { clockOffsetMs } from '@/lib/client/server-clock';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { unitFor, type Quantity } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import { bandOf } from '@/lib/api/tolerances';
import type { Commissioning } from './commissioning-context';
import { useDeviceMemory } from './use-device-memory';

export const quantityOf = {
  setting: 'setting',
  drop: 'pressure',
  flow: 'flow',
  heat: 'power',
  supply: 'temperature',
  return: 'temperature',
  speed: 'speed',
} as const satisfies Record<ReadingField, Quantity>;
export type Field = ReadingField;

/** Where each field of the page stands in an entry. */
const figureOf = {
  setting: 'settingTurns',
  drop: 'dropKpa',
  flow: 'flowLs',
  heat: 'heatKw',
  supply: 'supplyC',
  return: 'returnC',
  speed: 'pumpSpeed',
} as const;
const figures = Object.keys(figureOf) as Field[];
/** What an entry calls what was typed; of two temperatures it must say which. */
const enteredAs: Record<Field, string> = { ...quantityOf, supply: 'supply temperature', return: 'return temperature' };

const text = z.string().max(40).default('');
const typedSchema = z.object({
  method: z.enum(methods),
  setting: text,
  drop: text,
  flow: text,
  heat: text,
  supply: text,
  return: text,
  speed: text,
  note: z.string().max(1000),
  correctsReadingId: z.uuid().nullable(),
});
type Typed = z.infer<typeof typedSchema>;

const deviceSchema = z.object({
  method: z.enum(methods).optional(),
  units: z.record(z.string(), z.string()),
  instruments: z.partialRecord(z.enum(methods), z.string()),
});
const plainDevice: z.infer<typeof deviceSchema> = { units: {}, instruments: {} };

/** What is being typed at one station: kept on the device at each key, judged at each key, made into a reading when it is kept. */
export function useEntry(commissioning: Commissioning, station: Station) {
  const { personId, body, round } = commissioning;
  const [device, rememberDevice] = useDeviceMemory(`evenhead.meter.${personId}`, deviceSchema, plainDevice);
  const possible = methodsAt(station);
  const usual = possible.find((method) => method === device.method) ?? possible[0]!;
  const [blank] = useState<Typed>({
    method: usual,
    setting: '',
    drop: '',
    flow: '',
    heat: '',
    supply: '',
    return: '',
    speed: '',
    note: '',
    correctsReadingId: null,
  });
  const [stored, remember] = useDeviceMemory<Typed | null>(`evenhead.typing.${personId}.${round?.id}.${station.id}`, typedSchema, null);
  const typed = stored ?? { ...blank, method: usual };
  const [active, setActive] = useState<Field | null>(null);
  const choice = useUnitChoice();

  const fields: readonly Field[] = readingMethods[typed.method].fields;
  const unitOf = (field: Field): string => {
    const own = device.units[quantityOf[field]];
    return unitFor(quantityOf[field], own ? { [quantityOf[field]]: own } : choice);
  };
  const read = Object.fromEntries(
    fields
      .filter((field) => typed[field].trim() !== '')
      .map((field) => [field, parseQuantity(quantityOf[field], typed[field], unitOf(field))]),
  ) as Partial<Record<Field, ReturnType<typeof parseQuantity>>>;
  const siOf = (field: Field): number | null => {
    const found = read[field];
    if (!found?.ok) return null;
    return field === 'speed' ? found.si / 100 : found.si;
  };

  const meters = body.instruments.filter(({ kind, isRetired }) => kind === readingMethods[typed.method].instrument && !isRetired);
  const meter: Instrument | null =
    meters.find(({ id }) => id === device.instruments[typed.method]) ?? (meters.length === 1 ? meters[0]! : null);
  const figuresRead = Object.fromEntries(figures.map((field) => [figureOf[field], fields.includes(field) ? siOf(field) : null])) as Omit<
    ReadFigures,
    'method'
  >;
  const isRead = fields.every((field) => siOf(field) !== null);
  const measured: Measured | null = isRead ? measuredOf({ method: typed.method, ...figuresRead }) : null;
  const band = bandOf(body.tolerances, station);
  const judgement =
    measured && body.densityKgM3 !== null && body.specificHeatKJKgK !== null
      ? judgeReading(measured, {
          ...station,
          densityKgM3: body.densityKgM3,
          specificHeatKJKgK: body.specificHeatKJKgK,
          accuracy: meter ?? { accuracyPercent: 0, accuracyAbsolute: 0 },
          band,
        })
      : null;

  return {
    typed,
    isBlank: stored === null,
    isCorrecting: typed.correctsReadingId !== null,
    fields,
    possible,
    active: active !== null && fields.includes(active) ? active : (fields.find((field) => typed[field] === '') ?? fields.at(-1)!),
    setActive,
    unitOf,
    siOf,
    messageOf: (field: Field): string | null => {
      const found = read[field];
      if (found && !found.ok) return found.message;
      return judgement && !judgement.ok && judgement.path === figureOf[field] ? judgement.message : null;
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
      const textOf = (field: Field) => entered.find(({ quantity }) => quantity === enteredAs[field])?.text ?? '';
      const units = Object.fromEntries(
        figures.flatMap((field) => {
          const found = entered.find(({ quantity }) => quantity === enteredAs[field]);
          return found && field !== 'setting' ? [[quantityOf[field], found.unit]] : [];
        }),
      );
      rememberDevice({ ...device, units: { ...device.units, ...units } });
      remember({
        method,
        ...(Object.fromEntries(figures.map((field) => [field, textOf(field)])) as Record<Field, string>),
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
        ...figuresRead,
        entered: fields.map((field) => {
          const found = read[field] as { text: string; unit: string };
          return { quantity: enteredAs[field], text: found.text, unit: found.unit };
        }),
        instrumentId: meter.id,
        takenAt: at.toISOString(),
        clockOffsetMs: clockOffsetMs(),
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
      lastFlowLs: commissioning.lastStanding.get(station.id)?.flowLs ?? null,
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
  heat: 'Type the heat that the circuit carries.',
  supply: 'Type the supply temperature.',
  return: 'Type the return temperature.',
  speed: 'Type the speed that the pump runs at, per cent of full.',
};
