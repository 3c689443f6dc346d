import { z } from 'zod';

/**
 * The drawing: what a designer edits. Lenient, because a draft may lack any figure (null = not known yet); the strict
 * check is the network document that `drawing-to-document.ts` makes of it. Position, rotation and bends are
 * layout and never change the calculation. Quantities are SI in the unit that the name ends with.
 */

const id = z.string().min(1).max(64);
const text = z.string().max(200);
const positive = z.number().positive().max(1e9).nullable();
const notNegative = z.number().min(0).max(1e9).nullable();
/** A place on the sheet: far enough for any drawing, near enough that sums of places stay numbers. */
const coordinate = z.number().min(-1e9).max(1e9);

/**
 * Kv by handwheel setting. `measuringKv` is that between the measuring points, where flow is read over an orifice of its own: the same at
 * every setting where the orifice is fixed. Absent, the valve is measured by its own Kv.
 */
export const kvTableSchema = z
  .array(z.object({ setting: z.number(), kv: z.number().min(0), measuringKv: z.number().positive().optional() }))
  .max(200)
  .refine((points) => new Set(points.map(({ measuringKv }) => measuringKv === undefined)).size < 2, {
    message: 'A measuring Kv stands at every setting or at none.',
  });

/** A balancing valve as chosen: its name, the largest-to-smallest Kv by handwheel setting, and where it stands (null = fully open). */
export const valveSchema = z.object({
  name: text,
  kvTable: kvTableSchema,
  settingTurns: z.number().nullable(),
  isLocked: z.boolean(),
  /** Smallest step of the handwheel's scale; settings that are looked for are rounded to it. */
  stepTurns: z.number().positive().max(1000).nullish(),
});

export const characteristics = ['linear', 'equalPercentage', 'quickOpening'] as const;

const placed = {
  id,
  tag: z.string().max(40),
  storeyId: id.nullable(),
  x: coordinate,
  y: coordinate,
  rotation: z.union([z.literal(0), z.literal(90), z.literal(180), z.literal(270)]),
  isMirrored: z.boolean().default(false),
};

export const pumpSchema = z.object({
  ...placed,
  kind: z.literal('pump'),
  curve: z.array(z.object({ flowLs: z.number().min(0), headM: z.number().min(0) })).max(100),
  efficiency: z.array(z.object({ flowLs: z.number().min(0), fraction: z.number().min(0).max(1) })).max(100),
  /** Net positive suction head that the pump requires at full speed. */
  suctionHeadRequired: z
    .array(z.object({ flowLs: z.number().min(0), headM: z.number().min(0) }))
    .max(100)
    .optional(),
  speed: z.number().min(0).max(2),
  hasNonReturn: z.boolean(),
});

export const sourceKinds = ['chiller', 'boiler', 'heat-exchanger'] as const;

export const sourceSchema = z.object({
  ...placed,
  kind: z.literal('source'),
  sourceKind: z.enum(sourceKinds),
  designFlowLs: positive,
  designDropKpa: positive,
});

/** One piece on the drawing that holds, in the order of flow, strainer, control valve, coil and balancing valve. */
export const terminalUnitSchema = z.object({
  ...placed,
  kind: z.literal('terminalUnit'),
  room: text,
  loadKw: positive,
  designFlowLs: positive,
  coilDropKpa: positive,
  strainerKv: positive,
  controlValve: z.object({ kvs: positive, characteristic: z.enum(characteristics), opening: z.number().min(0).max(1) }).nullable(),
  balancingValve: valveSchema.nullable(),
});

export const balancingValveSchema = z.object({ ...placed, kind: z.literal('balancingValve'), valve: valveSchema });

export const controlValveSchema = z.object({
  ...placed,
  kind: z.literal('controlValve'),
  kvs: positive,
  characteristic: z.enum(characteristics),
  opening: z.number().min(0).max(1),
});

/** Pieces that are one Kv: a check valve lets nothing back, an isolating valve may stand closed. */
export const checkValveSchema = z.object({ ...placed, kind: z.literal('checkValve'), kv: positive });
export const isolatingValveSchema = z.object({ ...placed, kind: z.literal('isolatingValve'), kv: positive, isClosed: z.boolean() });
export const strainerSchema = z.object({ ...placed, kind: z.literal('strainer'), kv: positive });
export const teeSchema = z.object({ ...placed, kind: z.literal('tee') });
export const expansionVesselSchema = z.object({ ...placed, kind: z.literal('expansionVessel'), gaugePressureKpa: notNegative });

/** `in` and `out` of a piece with two ends; the sides of a tee and the places along a header are one point of the network; a vessel has `in` only. */
export const ports = ['in', 'out', 'n', 'e', 's', 'w', 'n1', 'n2', 'n3', 'n4', 's1', 's2', 's3', 's4'] as const;
const pipeEndSchema = z.object({ equipmentId: id, port: z.enum(ports) });

/** Throttles so that the differential pressure between its two impulse lines stays at the set point; a line that is null ends at its own inlet. */
export const dpControllerSchema = z.object({
  ...placed,
  kind: z.literal('dpController'),
  setpointKpa: positive,
  kvs: positive,
  senseHigh: pipeEndSchema.nullable(),
  senseLow: pipeEndSchema.nullable(),
});

/** A pressure-independent control valve: holds `limitLs` while the drop across it is at least `minDropKpa`. */
export const flowLimiterSchema = z.object({ ...placed, kind: z.literal('flowLimiter'), limitLs: positive, minDropKpa: positive });

/** A bar that many pipes join: one point of the network. */
export const headerSchema = z.object({ ...placed, kind: z.literal('header') });

/** The open pipe between supply and return that lets the flows on its two sides differ. */
export const decouplerSchema = z.object({
  ...placed,
  kind: z.literal('decoupler'),
  lengthM: positive,
  boreMm: positive,
  roughnessMm: notNegative,
  minorK: z.number().min(0).max(1e6),
});

/** A measuring orifice. `signalKv` turns the differential read at it into flow; `lossKv` is what it costs the loop (null = the same). */
export const flowStationSchema = z.object({ ...placed, kind: z.literal('flowStation'), signalKv: positive, lossKv: positive });

/** Where pressure is read: a point that costs nothing. */
export const pressureStationSchema = z.object({ ...placed, kind: z.literal('pressureStation') });

export const equipmentSchema = z.discriminatedUnion('kind', [
  pumpSchema,
  sourceSchema,
  terminalUnitSchema,
  balancingValveSchema,
  controlValveSchema,
  checkValveSchema,
  isolatingValveSchema,
  strainerSchema,
  teeSchema,
  expansionVesselSchema,
  dpControllerSchema,
  flowLimiterSchema,
  headerSchema,
  decouplerSchema,
  flowStationSchema,
  pressureStationSchema,
]);

export const pipeSchema = z.object({
  id,
  from: pipeEndSchema,
  to: pipeEndSchema,
  circuit: z.enum(['supply', 'return']),
  lengthM: positive,
  series: z.string().max(60).nullable(),
  nominal: z.string().max(20).nullable(),
  boreMm: positive,
  roughnessMm: notNegative,
  minorK: z.number().min(0).max(1e6),
  bends: z
    .array(z.object({ x: coordinate, y: coordinate }))
    .max(20)
    .default([]),
});

export const storeySchema = z.object({
  id,
  name: z.string().max(60),
  elevationM: z.number().min(-1000).max(2000),
  top: coordinate,
  height: z.number().positive().max(1e9),
});

export const drawingFluidSchema = z.object({
  medium: z.enum(['water', 'propylene-glycol', 'ethylene-glycol']),
  massFraction: z.number().min(0).max(0.6),
  supplyC: z.number().min(-40).max(200),
  returnC: z.number().min(-40).max(200),
});

/** What a pipe may have at most, up to a bore (the last one: beyond them all). */
export const pipeLimitSchema = z.object({
  upToBoreMm: z.number().positive().max(1e4).nullable(),
  maxPaPerM: z.number().positive().max(1e5),
  maxVelocityMs: z.number().positive().max(50),
});

export const equipmentKinds = equipmentSchema.options.map((option) => option.shape.kind.value);

/** How tags are made, by kind; see `tags.ts` for what may stand in one. */
export const tagRulesSchema = z.partialRecord(z.enum(equipmentKinds), z.string().min(1).max(24));

export const drawingSchema = z.object({
  format: z.literal('drawing/1'),
  fluid: drawingFluidSchema,
  pumpExcess: z.enum(['speed', 'throttle']),
  /** Limits of this loop's pipes; the usual ones of `pipe-limits.ts` where it has none of its own. */
  pipeLimits: z.array(pipeLimitSchema).min(1).max(10).optional(),
  /** The usual rules hold for kinds that have none of their own. */
  tagRules: tagRulesSchema.optional(),
  storeys: z.array(storeySchema).max(200),
  equipment: z.array(equipmentSchema).max(20_000),
  pipes: z.array(pipeSchema).max(40_000),
});

export type Drawing = z.infer<typeof drawingSchema>;
export type DrawingFluid = z.infer<typeof drawingFluidSchema>;
export type Equipment = z.infer<typeof equipmentSchema>;
export type EquipmentKind = Equipment['kind'];
export type EquipmentOf<K extends EquipmentKind> = Extract<Equipment, { kind: K }>;
export type TerminalUnit = EquipmentOf<'terminalUnit'>;
export type DrawingPipe = z.infer<typeof pipeSchema>;
export type Port = (typeof ports)[number];
export type PipeEnd = z.infer<typeof pipeEndSchema>;
export type Storey = z.infer<typeof storeySchema>;
export type ChosenValve = z.infer<typeof valveSchema>;
export type PipeLimit = z.infer<typeof pipeLimitSchema>;
export type TagRules = z.infer<typeof tagRulesSchema>;
export type KvPoint = z.infer<typeof kvTableSchema>[number];

/** Where a fault, a result or a difference belongs: what the canvas selects when it is chosen. `loop` is what holds for all of it, e.g. its fluid. */
export type Place = { kind: 'equipment' | 'pipe' | 'storey' | 'loop'; id: string };

/** Pieces that are a single point of the network, whichever of their sides a pipe joins. */
export const isPoint = (kind: EquipmentKind): kind is 'tee' | 'header' | 'pressureStation' =>
  kind === 'tee' || kind === 'header' || kind === 'pressureStation';

const sides: readonly Port[] = ['n', 'e', 's', 'w'];
const alongHeader: readonly Port[] = ['w', 'n1', 'n2', 'n3', 'n4', 'e', 's1', 's2', 's3', 's4'];
const throughPorts: readonly Port[] = ['in', 'out'];

/** The ends by which pipes may join a piece. */
export function portsOf(kind: EquipmentKind): readonly Port[] {
  if (kind === 'header') return alongHeader;
  if (isPoint(kind)) return sides;
  return kind === 'expansionVessel' ? ['in'] : throughPorts;
}

/** Whether supply or return belongs at an end; null where either may be. */
export function circuitAt(kind: EquipmentKind, port: Port): DrawingPipe['circuit'] | null {
  if (kind === 'terminalUnit' || kind === 'decoupler') return port === 'in' ? 'supply' : 'return';
  if (kind === 'source') return port === 'in' ? 'return' : 'supply';
  return null;
}

export const emptyDrawing = (service: 'chilled' | 'hot'): Drawing => ({
  format: 'drawing/1',
  fluid: {
    medium: 'water',
    massFraction: 0,
    ...(service === 'chilled' ? { supplyC: 6, returnC: 12 } : { supplyC: 80, returnC: 60 }),
  },
  pumpExcess: 'speed',
  storeys: [
    { id: 'storey-2', name: 'Level 2', elevationM: 4, top: 0, height: 320 },
    { id: 'storey-1', name: 'Level 1', elevationM: 0, top: 320, height: 320 },
    { id: 'storey-0', name: 'Plant room', elevationM: -4, top: 640, height: 320 },
  ],
  equipment: [],
  pipes: [],
});
