import type { BalanceResult } from '@/lib/hydraulics/types';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { Drawing, TerminalUnit } from '../drawing';
import { unitLinkId } from '../drawing-to-document';
import type { ValveWish } from './balancing-valve-choice';
import { LEAST_AUTHORITY, preferredKvs } from './preferred-kv';

type Reading = Omit<ValveWish, 'sizes'>;

/**
 * The drawing with smaller control valves where the balance found head to spare: near the pump the balancing valve would burn it, and the control valve's authority
 * over its branch would be small. Each takes the largest Kvs with an authority of 0.5, or else the smallest that leaves the balancing valve enough to read. No
 * circuit needs more head than before, so the pump's duty stays.
 */
export function withHigherAuthority(drawing: Drawing, { valves }: BalanceResult, reading: Reading): Drawing {
  const setDropKpa = new Map(valves.map(({ id, dropKpa }) => [id, dropKpa]));
  const equipment = drawing.equipment.map((piece) => {
    if (piece.kind !== 'terminalUnit' || !piece.controlValve) return piece;
    const kvs = smallerKvs(piece, setDropKpa.get(unitLinkId(piece.id, 'balancing')) ?? 0, reading);
    return { ...piece, controlValve: { ...piece.controlValve, kvs } };
  });
  return { ...drawing, equipment };
}

function smallerKvs(unit: TerminalUnit, setDropKpa: number, { minReadingKpa, densityKgM3 }: Reading): number {
  const drop = (kv: number) => dropAcrossValveKpa(kv, unit.designFlowLs!, densityKgM3);
  const kvs = unit.controlValve!.kvs!;
  const open = unit.balancingValve!.kvTable.at(-1)!;
  const leastSetKpa = open.measuringKv === undefined ? Math.max(drop(open.kv), minReadingKpa) : drop(open.kv);
  const branchKpa = unit.coilDropKpa! + drop(unit.strainerKv!) + drop(kvs) + setDropKpa;
  const mostKpa = drop(kvs) + setDropKpa - leastSetKpa;
  const fitting = preferredKvs.filter((kv) => kv <= kvs && drop(kv) <= mostKpa);
  return fitting.findLast((kv) => drop(kv) >= LEAST_AUTHORITY * branchKpa) ?? fitting[0] ?? kvs;
}
