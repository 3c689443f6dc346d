import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Drawing, Equipment, KvPoint } from './drawing';
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
}

const kindRank = { pump: 0, branch: 1, terminal: 2 } as const;

/**
 * The places where flow will be measured: each terminal unit, each balancing valve of a branch or main, each pump, in
 * walking order: storey by storey from the lowest, along the drawing from left to right, branch before its terminals.
 * Settings and expected drops are those of the balance.
 */
export function stationsOfDrawing(drawing: Drawing, balance: BalanceResult): DrawnStation[] {
  const valveOf = new Map(balance.valves.map((valve) => [valve.id, valve]));
  const pumpOf = new Map(balance.pumps.map((pump) => [pump.id, pump]));
  const storeyOf = new Map(drawing.storeys.map((storey) => [storey.id, storey]));
  const elevation = (piece: Equipment) => (piece.storeyId && storeyOf.get(piece.storeyId)?.elevationM) || 0;

  const found: { piece: Equipment; station: Omit<DrawnStation, 'walkingOrder'> }[] = [];
  for (const piece of drawing.equipment) {
    const base = {
      elementId: piece.id,
      tag: piece.tag || piece.id,
      storey: (piece.storeyId && storeyOf.get(piece.storeyId)?.name) || '',
      room: '',
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
          ...valveFields(piece.balancingValve, valve),
        },
      });
    } else if (piece.kind === 'balancingValve') {
      const valve = valveOf.get(piece.id);
      if (valve && Math.abs(valve.flowLs) > 0) {
        found.push({
          piece,
          station: { ...base, kind: 'branch', designFlowLs: Math.abs(valve.flowLs), ...valveFields(piece.valve, valve) },
        });
      }
    } else if (piece.kind === 'pump') {
      const pump = pumpOf.get(piece.id);
      if (pump && pump.flowLs > 0) {
        found.push({ piece, station: { ...base, kind: 'pump', designFlowLs: pump.flowLs, ...valveFields(null, undefined) } });
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

const valveFields = (chosen: { name: string; kvTable: KvPoint[] } | null, solved: BalanceResult['valves'][number] | undefined) => ({
  valveName: chosen?.name ?? '',
  kvTable: chosen?.kvTable ?? null,
  settingTurns: solved?.setting ?? null,
  expectedDropKpa: solved?.dropKpa ?? null,
});
