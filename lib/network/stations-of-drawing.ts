import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Drawing, Equipment, KvPoint, TerminalUnit } from './drawing';
import { unitLinkId } from './drawing-to-document';

export interface DrawnStation {
  elementId: string;
  kind: 'terminal' | 'branch' | 'pump';
  tag: string;
  storey: string;
  room: string;
  walkingOrder: number;
  designFlowLs: number;
  valveName: string;
  kvTable: KvPoint[] | null;
  settingTurns: number | null;
  expectedDropKpa: number | null;
  /** The index terminal, a terminal of less than 0.1 L/s, a valve that carries the whole of a pump's flow; 'all' otherwise. */
  rank: 'all' | 'index' | 'small' | 'main';
  coilDropKpa: number | null;
  /** A pump's curve at full speed, and the speed of the balance. */
  pumpCurve: { flowLs: number; headM: number }[] | null;
  pumpSpeed: number | null;
}

const kindRank = { pump: 0, branch: 1, terminal: 2 } as const;

/**
 * The places where flow will be measured: each terminal unit, each balancing valve or measuring orifice of a branch or main, each pump, in
 * walking order: storey by storey from the lowest, along the drawing from left to right, branch before its terminals.
 * Settings and expected drops are those of the balance.
 */
export function stationsOfDrawing(drawing: Drawing, balance: BalanceResult): DrawnStation[] {
  const valveOf = new Map(balance.valves.map((valve) => [valve.id, valve]));
  const pumpOf = new Map(balance.pumps.map((pump) => [pump.id, pump]));
  const flowOf = new Map(balance.solution.links.map((link) => [link.id, link.flowLs]));
  const { densityKgM3 } = balance.solution.fluid;
  const storeyOf = new Map(drawing.storeys.map((storey) => [storey.id, storey]));
  const elevation = (piece: Equipment) => (piece.storeyId && storeyOf.get(piece.storeyId)?.elevationM) || 0;

  const found: { piece: Equipment; station: Omit<DrawnStation, 'walkingOrder'> }[] = [];
  for (const piece of drawing.equipment) {
    const base = {
      elementId: piece.id,
      tag: piece.tag || piece.id,
      storey: (piece.storeyId && storeyOf.get(piece.storeyId)?.name) || '',
      room: '',
      rank: 'all' as const,
      coilDropKpa: null,
      pumpCurve: null,
      pumpSpeed: null,
    };
    if (piece.kind === 'terminalUnit' && piece.designFlowLs !== null) {
      const valve = valveOf.get(unitLinkId(piece.id, 'balancing'));
      found.push({
        piece,
        station: {
          ...base,
          kind: 'terminal',
          room: piece.room,
          designFlowLs: piece.designFlowLs,
          rank: terminalRank(piece, balance),
          coilDropKpa: piece.coilDropKpa,
          ...valveFields(piece.balancingValve, valve),
        },
      });
    } else if (piece.kind === 'balancingValve') {
      const valve = valveOf.get(piece.id);
      if (valve && Math.abs(valve.flowLs) > 0) {
        found.push({
          piece,
          station: {
            ...base,
            kind: 'branch',
            designFlowLs: Math.abs(valve.flowLs),
            rank: isMain(valve.flowLs, balance) ? 'main' : 'all',
            ...valveFields(piece.valve, valve),
          },
        });
      }
    } else if (piece.kind === 'flowStation' && piece.signalKv !== null) {
      const flowLs = Math.abs(flowOf.get(piece.id) ?? 0);
      if (flowLs > 0) {
        found.push({
          piece,
          station: { ...base, kind: 'branch', designFlowLs: flowLs, ...orificeFields(piece.signalKv, flowLs, densityKgM3) },
        });
      }
    } else if (piece.kind === 'pump') {
      const pump = pumpOf.get(piece.id);
      if (pump && pump.flowLs > 0) {
        found.push({
          piece,
          station: {
            ...base,
            kind: 'pump',
            designFlowLs: pump.flowLs,
            pumpCurve: piece.curve,
            pumpSpeed: pump.speed,
            ...valveFields(null, undefined),
          },
        });
      }
    }
  }
  found.sort(
    (a, b) =>
      elevation(a.piece) - elevation(b.piece) ||
      kindRank[a.station.kind] - kindRank[b.station.kind] ||
      a.piece.x - b.piece.x ||
      a.piece.y - b.piece.y,
  );
  return found.map(({ station }, i) => ({ ...station, walkingOrder: i + 1 }));
}

/** Below this a terminal's flow is small, L/s: common practice gives it a wider band. */
const SMALL_FLOW_LS = 0.1;
const SAME_FLOW = 0.005;

function terminalRank({ id, designFlowLs }: TerminalUnit, { indexTerminal }: BalanceResult): DrawnStation['rank'] {
  if (indexTerminal === unitLinkId(id, 'coil')) return 'index';
  return designFlowLs !== null && designFlowLs < SMALL_FLOW_LS ? 'small' : 'all';
}

const isMain = (flowLs: number, { pumps }: BalanceResult): boolean =>
  pumps.some((pump) => pump.flowLs > 0 && Math.abs(Math.abs(flowLs) / pump.flowLs - 1) < SAME_FLOW);

const valveFields = (chosen: { name: string; kvTable: KvPoint[] } | null, solved: BalanceResult['valves'][number] | undefined) => ({
  valveName: chosen?.name ?? '',
  kvTable: chosen?.kvTable ?? null,
  settingTurns: solved?.setting ?? null,
  expectedDropKpa: solved ? dropAtMeasuringPointsKpa(solved, chosen?.kvTable ?? []) : null,
});

/** What a meter at the valve shows: the valve's own drop, or that of its measuring orifice, which passes the same flow: dp' = dp (Kv / Kv')². */
function dropAtMeasuringPointsKpa({ kv, setting, dropKpa }: BalanceResult['valves'][number], kvTable: KvPoint[]): number {
  if (!kvTable[0]?.measuringKv) return dropKpa;
  const measuring = kvTable.map((point) => ({ setting: point.setting, kv: point.measuringKv ?? point.kv }));
  return dropKpa * (kv / kvAtSetting(measuring, setting)) ** 2;
}

/** A fixed orifice reads like a valve that knows one setting alone. */
const ORIFICE_SETTING = 1;

const orificeFields = (signalKv: number, designFlowLs: number, densityKgM3: number) => ({
  valveName: 'Measuring orifice',
  kvTable: [{ setting: ORIFICE_SETTING, kv: signalKv }],
  settingTurns: ORIFICE_SETTING,
  expectedDropKpa: dropAcrossValveKpa(signalKv, designFlowLs, densityKgM3),
});
