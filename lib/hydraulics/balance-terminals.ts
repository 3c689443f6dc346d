import type { DesignFlows } from './design-flows';
import { metresPerKpa } from './links/law';
import type { PreparedNetwork } from './prepare';
import type { PumpCircuits } from './pump-circuits';
import type { BalancedTerminal, LinkOf, SolveResult } from './types';
import { dropAcrossValveKpa } from './valve-coefficient';

/** What each terminal gets, the drop once round through it with valves open, and its control valve's authority. */
export function balancedTerminals(
  network: PreparedNetwork,
  { flow, live }: DesignFlows,
  solution: SolveResult,
  { stretches, stretchOf }: PumpCircuits,
  openCircuitHead: Float64Array,
  loss: Float64Array,
): BalancedTerminal[] {
  const { document, numberOf, fluid } = network;
  const kpaPerM = 1 / metresPerKpa(fluid.densityKgM3);
  return document.links.flatMap((link, at): BalancedTerminal[] => {
    if (link.kind !== 'terminal' || !live.has(link.id)) return [];
    const i = numberOf[at];
    const head = stretchOf[i] < 0 ? -Infinity : openCircuitHead[stretchOf[i]];
    const flowLs = solution.links[at].flowLs;
    return [
      {
        id: link.id,
        designFlowLs: link.designFlowLs,
        flowLs,
        percentOfDesign: (100 * flowLs) / link.designFlowLs,
        circuitDropKpa: head > -Infinity ? head * kpaPerM : null,
        authority: authorityOf(i),
      },
    ];
  });

  /** Drop of the control valve in series with a terminal at design flow, full open, over the differential across that whole branch. */
  function authorityOf(terminal: number): number | null {
    const { chains, position } = network;
    const c = chains.chainOf[terminal];
    let valve: LinkOf<'controlValve'> | null = null;
    let branchHead = 0;
    for (let p = chains.start[c]; p < chains.start[c + 1]; p++) {
      const i = chains.member[p];
      const link = document.links[position[i]];
      if (link.kind === 'controlValve') valve = link;
      if (link.kind !== 'pump') branchHead += stretchOf[i] < 0 ? Math.abs(loss[i]) : stretches[stretchOf[i]].head;
    }
    if (!valve || branchHead <= 0) return null;
    return dropAcrossValveKpa(valve.kvs, Math.abs(flow[terminal]), fluid.densityKgM3) / (branchHead * kpaPerM);
  }
}
