import type { BalanceResult, SolveResult, ValveState } from '@/lib/hydraulics/types';
import type { ChosenValve, Drawing, DrawingPipe, Equipment, EquipmentOf, PipeEnd, TerminalUnit } from './drawing';
import { figuresOfDrawing, type DrawnFigures, type PieceSolution } from './drawing-figures';
import type { RowOf } from './schedule-column';
import { valveOfferOf, type ValveOffer } from './schedule-valve-offer';

/** One valve in a row: where it stands (null = fully open), and what the balance asks of it at design flow. */
export interface ScheduledSetting {
  valveName: string;
  standsTurns: number | null;
  settingTurns: number | null;
  kv: number | null;
  dropKpa: number | null;
  state: ValveState | null;
}

interface Row<Item> extends RowOf<Item> {
  storey: string;
}

/** Flows as the valves stand now; `percentOfDesign` is theirs of the design flow. */
export interface TerminalRow extends Row<TerminalUnit>, ScheduledSetting {
  room: string;
  loadKw: number | null;
  designFlowLs: number | null;
  flowLs: number | null;
  percentOfDesign: number | null;
  unitDropKpa: number | null;
  authority: number | null;
  circuitDropKpa: number | null;
  isIndex: boolean;
}

/** The pieces that the table of valves lists; a strainer is one Kv like them. */
export const valveKinds = [
  'balancingValve',
  'controlValve',
  'flowLimiter',
  'dpController',
  'isolatingValve',
  'checkValve',
  'strainer',
] as const;
export type ScheduledValve = EquipmentOf<(typeof valveKinds)[number]>;

export interface ValveRow extends Row<ScheduledValve>, ScheduledSetting {
  designFlowLs: number | null;
  flowLs: number | null;
  percentOfDesign: number | null;
  /** Across the piece as it stands. */
  dropNowKpa: number | null;
}

export interface PipeRow extends Row<DrawingPipe> {
  size: string;
  boreMm: number | null;
  lengthM: number | null;
  designFlowLs: number | null;
  flowLs: number | null;
  velocityMs: number | null;
  paPerM: number | null;
  dropKpa: number | null;
}

export interface PumpRow extends Row<EquipmentOf<'pump'>> {
  flowLs: number | null;
  headM: number | null;
  designFlowLs: number | null;
  requiredHeadM: number | null;
  requiredSpeed: number | null;
  shaftKw: number | null;
}

export interface SourceRow extends Row<EquipmentOf<'source'>> {
  kind: EquipmentOf<'source'>['sourceKind'];
  designFlowLs: number | null;
  flowLs: number | null;
  percentOfDesign: number | null;
  dropKpa: number | null;
}

export interface Schedule {
  terminals: TerminalRow[];
  valves: ValveRow[];
  pipes: PipeRow[];
  pumps: PumpRow[];
  sources: SourceRow[];
}

/** What was solved of a drawing, piece by piece: as the valves stand, and with the settings of the balance. */
export interface ScheduleFigures {
  drawn: DrawnFigures | null;
  balanced: DrawnFigures | null;
  shaftKw: ReadonlyMap<string, number | null>;
}

/** Before anything is solved. */
export const noFigures: ScheduleFigures = { drawn: null, balanced: null, shaftKw: new Map() };

/** The figures of the tables, out of what was solved for this drawing or an earlier state of it. */
export function scheduleFigures(drawing: Drawing, solved: { solve: SolveResult | null; balance: BalanceResult | null }): ScheduleFigures {
  return {
    drawn: figuresOfDrawing(drawing, solved, 'drawn'),
    balanced: figuresOfDrawing(drawing, solved, 'balanced'),
    shaftKw: new Map(solved.balance?.pumps.map(({ id, shaftKw }) => [id, shaftKw])),
  };
}

/** The drawing as tables, with its solved figures; null where it is not solved. Flow in a pipe is without sign: the row says from where to where. */
export const scheduleOf = (drawing: Drawing, solved: { solve: SolveResult | null; balance: BalanceResult | null }): Schedule =>
  scheduleRows(drawing, scheduleFigures(drawing, solved));

export function scheduleRows(drawing: Drawing, { drawn, balanced, shaftKw }: ScheduleFigures): Schedule {
  const storeyOf = new Map(drawing.storeys.map(({ id, name }) => [id, name]));
  const valves = valveOfferOf(drawing);
  const base = <Item extends Equipment>(item: Item): Row<Item> => ({
    id: item.id,
    tag: item.tag || item.id,
    storey: (item.storeyId && storeyOf.get(item.storeyId)) || '',
    item,
  });
  const ofKinds = <K extends Equipment['kind']>(...kinds: readonly K[]) =>
    drawing.equipment.filter((piece): piece is EquipmentOf<K> => kinds.some((kind) => kind === piece.kind));
  const now = (id: string) => drawn?.pieces.get(id);
  const atDesign = (id: string) => balanced?.pieces.get(id);

  return {
    terminals: ofKinds('terminalUnit').map((unit) => ({
      ...base(unit),
      room: unit.room,
      loadKw: unit.loadKw,
      designFlowLs: unit.designFlowLs,
      ...flowsNow(now(unit.id)),
      ...setting(unit.balancingValve, valves, atDesign(unit.id)),
      unitDropKpa: atDesign(unit.id)?.dropKpa ?? null,
      authority: atDesign(unit.id)?.authority ?? null,
      circuitDropKpa: atDesign(unit.id)?.circuitDropKpa ?? null,
      isIndex: atDesign(unit.id)?.isIndex ?? false,
    })),
    valves: ofKinds(...valveKinds).map((piece) => ({
      ...base(piece),
      designFlowLs: atDesign(piece.id)?.flowLs ?? null,
      ...flowsNow(now(piece.id)),
      dropNowKpa: now(piece.id)?.dropKpa ?? null,
      ...setting(piece.kind === 'balancingValve' ? piece.valve : null, valves, atDesign(piece.id)),
    })),
    pipes: pipeRows(drawing, drawn, balanced),
    pumps: ofKinds('pump').map((pump) => ({
      ...base(pump),
      flowLs: now(pump.id)?.flowLs ?? null,
      headM: now(pump.id)?.pump?.headM ?? null,
      designFlowLs: atDesign(pump.id)?.flowLs ?? null,
      requiredHeadM: atDesign(pump.id)?.pump?.requiredHeadM ?? null,
      requiredSpeed: atDesign(pump.id)?.pump?.requiredSpeed ?? null,
      shaftKw: shaftKw.get(pump.id) ?? null,
    })),
    sources: ofKinds('source').map((source) => ({
      ...base(source),
      kind: source.sourceKind,
      designFlowLs: source.designFlowLs,
      flowLs: now(source.id)?.flowLs ?? null,
      percentOfDesign: ratio(now(source.id)?.flowLs, source.designFlowLs),
      dropKpa: now(source.id)?.dropKpa ?? null,
    })),
  };
}

const ratio = (flowLs: number | null | undefined, designLs: number | null) =>
  flowLs == null || !designLs ? null : (100 * flowLs) / designLs;

const flowsNow = (piece: PieceSolution | undefined) => ({ flowLs: piece?.flowLs ?? null, percentOfDesign: piece?.percentOfDesign ?? null });

const setting = (chosen: ChosenValve | null, valves: ValveOffer, balanced: PieceSolution | undefined): ScheduledSetting => ({
  valveName: chosen ? valves.nameOf(chosen) : '',
  standsTurns: chosen?.settingTurns ?? null,
  settingTurns: balanced?.valve?.setting ?? null,
  kv: balanced?.valve?.kv ?? null,
  dropKpa: balanced?.valve?.dropKpa ?? null,
  state: balanced?.valve?.state ?? null,
});

function pipeRows(drawing: Drawing, drawn: DrawnFigures | null, balanced: DrawnFigures | null): PipeRow[] {
  const storeyOf = new Map(drawing.storeys.map(({ id, name }) => [id, name]));
  const pieceOf = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const named = (end: PipeEnd) => {
    const piece = pieceOf.get(end.equipmentId);
    return { tag: piece?.tag || end.equipmentId, storey: (piece?.storeyId && storeyOf.get(piece.storeyId)) || '' };
  };
  return drawing.pipes.map((pipe) => {
    const [from, to] = [named(pipe.from), named(pipe.to)];
    const now = drawn?.pipes.get(pipe.id);
    const design = balanced?.pipes.get(pipe.id);
    return {
      id: pipe.id,
      tag: `${from.tag} – ${to.tag}`,
      storey: from.storey === to.storey ? from.storey : [from.storey, to.storey].filter(Boolean).join(' – '),
      item: pipe,
      size: pipe.nominal ?? '',
      boreMm: pipe.boreMm,
      lengthM: pipe.lengthM,
      designFlowLs: design ? Math.abs(design.flowLs) : null,
      flowLs: now ? Math.abs(now.flowLs) : null,
      velocityMs: now?.velocityMs ?? null,
      paPerM: now?.paPerM ?? null,
      dropKpa: now ? Math.abs(now.dropKpa) : null,
    };
  });
}
