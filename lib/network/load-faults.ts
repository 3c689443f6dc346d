import type { Drawing } from './drawing';
import { at, nameOf, type Fault } from './fault';
import { designFlowOfLoad, digits } from './working';

/** By how much of the flow that its load needs a design flow may differ before it is pointed out. */
export const MOST_FLOW_DIFFERENCE = 0.1;

/** Terminal units whose load and design flow cannot both be right with the temperatures of the fluid. */
export function loadFaults({ equipment, fluid }: Drawing): Fault[] {
  return equipment.flatMap((piece): Fault[] => {
    if (piece.kind !== 'terminalUnit' || piece.loadKw === null || piece.designFlowLs === null) return [];
    const needed = designFlowOfLoad(piece.loadKw, fluid);
    if ('refused' in needed) return [];
    const difference = piece.designFlowLs / needed.flowLs - 1;
    if (Math.abs(difference) <= MOST_FLOW_DIFFERENCE) return [];
    const message = `${nameOf(piece)}: ${digits(piece.loadKw)} kW between ${digits(fluid.supplyC)} and ${digits(fluid.returnC)} °C needs ${digits(needed.flowLs)} L/s, but ${digits(piece.designFlowLs)} L/s is drawn (${difference > 0 ? '+' : '−'}${Math.abs(100 * difference).toFixed(0)} %).`;
    return [{ code: 'load-flow', severity: 'warning', message, place: at(piece) }];
  });
}
