import type { DrawingFluid } from '../drawing';
import { designFlowOfLoad, digits, type DesignFlow } from '../working';
import type { CellFault } from './read-cell';

/** A schedule that states load and flow may round both; beyond this they contradict one another. */
export const AGREEMENT_PERCENT = 5;

type FlowOfOneKw = DesignFlow | { refused: string };
let recent: { key: string; found: FlowOfOneKw }[] = [];

/** Flow is in proportion to load, so that one calculation serves all rows of the same temperatures. */
function flowOfOneKw(fluid: DrawingFluid): FlowOfOneKw {
  const key = `${fluid.medium} ${fluid.massFraction} ${fluid.supplyC} ${fluid.returnC}`;
  const known = recent.find((it) => it.key === key);
  if (known) return known.found;
  const found = designFlowOfLoad(1, fluid);
  recent = [{ key, found }, ...recent.slice(0, 7)];
  return found;
}

/**
 * The design flow of a row, L/s: as given, else from load (kW) and the temperatures of `fluid`. Adds a fault where neither
 * leads to a flow, and a warning where the two disagree by more than 5 %; the flow as given then stands.
 */
export function flowFromLoad(loadKw: number | null, flowLs: number | null, fluid: DrawingFluid, faults: CellFault[]): number | null {
  const isAtFault = (meaning: CellFault['meaning']) => faults.some((fault) => fault.meaning === meaning && fault.severity === 'error');
  if (isAtFault('flow') || isAtFault('load')) return null;
  if (flowLs === null && loadKw === null) {
    faults.push({ meaning: 'flow', severity: 'error', message: 'Neither flow nor load is given.' });
    return null;
  }
  if (loadKw === null) return flowLs;
  if (isAtFault('supply') || isAtFault('return')) return null;

  const perKw = flowOfOneKw(fluid);
  if ('refused' in perKw) {
    if (flowLs !== null) return flowLs;
    faults.push({ meaning: 'flow', severity: 'error', message: perKw.refused });
    return null;
  }
  const needed = loadKw * perKw.flowLs;
  if (flowLs === null) return needed;
  const apartPercent = (flowLs / needed - 1) * 100;
  if (Math.abs(apartPercent) > AGREEMENT_PERCENT) {
    const carries = `${digits(loadKw)} kW at ${digits(fluid.supplyC)} and ${digits(fluid.returnC)} °C need ${digits(needed)} L/s`;
    const message = `${comparison(apartPercent)} the load needs: ${carries}. The flow is used as given.`;
    faults.push({ meaning: 'flow', severity: 'warning', message });
  }
  return flowLs;
}

function comparison(apartPercent: number): string {
  if (apartPercent >= 100) return `${digits(1 + apartPercent / 100)} times what`;
  return `${digits(Math.abs(apartPercent))} % ${apartPercent > 0 ? 'more' : 'less'} than`;
}
