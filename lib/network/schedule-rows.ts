import type { BalanceResult, SolveResult, ValveState } from '@/lib/hydraulics/types';
import type { ChosenValve, Drawing, Equipment, EquipmentOf, PipeEnd } from './drawing';
import { figuresOfDrawing, type DrawnFigures, type PieceSolution } from './drawing-figures';

/** One valve in a row: where it stands (null = fully open), and what the balance asks of it at design flow. */
export interface ScheduledSetting {
  valveName: string;
  standsTurns: number | null;
  settingTurns: number | null;
  kv: number | null;
  dropKpa: number | null;
  state: ValveState | null;
}

interface Row {
  /** Of the piece or pipe on the drawing. */
  id: string;
  tag: string;
  storey: string;
}

/** Flows as the valves stand now; `percentOfDesign` is theirs of the design flow. */
export interface TerminalRow extends Row, ScheduledSetting {
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

export interface ValveRow extends Row, ScheduledSetting {
  designFlowLs: number | null;
  flowLs: number | null;
  percentOfDesign: number | null;
}

export interface PipeRow extends Row {
  size: string;
  boreMm: number | null;
  lengthM: number | null;
  designFlowLs: number | null;
  flowLs: number | null;
  velocityMs: number | null;
  paPerM: number | null;
  dropKpa: number | null;
}

export interface PumpRow extends Row {
  flowLs: number | null;
  headM: number | null;
  designFlowLs: number | null;
  requiredHeadM: number | null;
  requiredSpeed: number | null;
  shaftKw: number | null;
}

export interface SourceRow extends Row {
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

/** The drawing as tables, with its solved figures; null where it is not solved. Flow in a pipe is without sign: the row says from where to where. */
export function scheduleOf(drawing: Drawing, solved: { solve: SolveResult | null; balance: BalanceResult | null }): Schedule {
  const drawn = figuresOfDrawing(drawing, solved, 'drawn');
  const balanced = figuresOfDrawing(drawing, solved, 'balanced');
  const storeyOf = new Map(drawing.storeys.map(({ id, name }) => [id, name]));
  const base = (piece: Equipment): Row => ({
    id: piece.id,
    tag: piece.tag || piece.id,
    storey: (piece.storeyId && storeyOf.get(piece.storeyId)) || '',
  });
  const ofKind = <K extends Equipment['kind']>(kind: K) =>
    drawing.equipment.filter((piece): piece is EquipmentOf<K> => piece.kind === kind);
  const now = (id: string) => drawn?.pieces.get(id);
  const atDesign = (id: string) => balanced?.pieces.get(id);

  return {
    terminals: ofKind('terminalUnit').map((unit) => ({
      ...base(unit),
      room: unit.room,
      loadKw: unit.loadKw,
      designFlowLs: unit.designFlowLs,
      ...flowsNow(now(unit.id)),
      ...setting(unit.balancingValve, atDesign(unit.id)),
      unitDropKpa: atDesign(unit.id)?.dropKpa ?? null,
      authority: atDesign(unit.id)?.authority ?? null,
      circuitDropKpa: atDesign(unit.id)?.circuitDropKpa ?? null,
      isIndex: atDesign(unit.id)?.isIndex ?? false,
    })),
    valves: ofKind('balancingValve').map((piece) => ({
      ...base(piece),
      designFlowLs: atDesign(piece.id)?.flowLs ?? null,
      ...flowsNow(now(piece.id)),
      ...setting(piece.valve, atDesign(piece.id)),
    })),
    pipes: pipeRows(drawing, drawn, balanced, base),
    pumps: ofKind('pump').map((pump) => ({
      ...base(pump),
      flowLs: now(pump.id)?.flowLs ?? null,
      headM: now(pump.id)?.pump?.headM ?? null,
      designFlowLs: atDesign(pump.id)?.flowLs ?? null,
      requiredHeadM: atDesign(pump.id)?.pump?.requiredHeadM ?? null,
      requiredSpeed: atDesign(pump.id)?.pump?.requiredSpeed ?? null,
      shaftKw: solved.balance?.pumps.find(({ id }) => id === pump.id)?.shaftKw ?? null,
    })),
    sources: ofKind('source').map((source) => ({
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

const setting = (chosen: ChosenValve | null, balanced: PieceSolution | undefined): ScheduledSetting => ({
  valveName: chosen?.name ?? '',
  standsTurns: chosen?.settingTurns ?? null,
  settingTurns: balanced?.valve?.setting ?? null,
  kv: balanced?.valve?.kv ?? null,
  dropKpa: balanced?.valve?.dropKpa ?? null,
  state: balanced?.valve?.state ?? null,
});

function pipeRows(drawing: Drawing, drawn: DrawnFigures | null, balanced: DrawnFigures | null, base: (piece: Equipment) => Row): PipeRow[] {
  const pieceOf = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const named = (end: PipeEnd) => {
    const piece = pieceOf.get(end.equipmentId);
    return piece ? base(piece) : { tag: end.equipmentId, storey: '' };
  };
  return drawing.pipes.map((pipe) => {
    const [from, to] = [named(pipe.from), named(pipe.to)];
    const now = drawn?.pipes.get(pipe.id);
    const design = balanced?.pipes.get(pipe.id);
    return {
      id: pipe.id,
      tag: `${from.tag} – ${to.tag}`,
      storey: from.storey === to.storey ? from.storey : [from.storey, to.storey].filter(Boolean).join(' – '),
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
