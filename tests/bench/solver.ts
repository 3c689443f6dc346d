import { changeLinks, prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, solve, startIteration } from '@/lib/hydraulics/solve';
import type { LinkOf, NetworkDocument } from '@/lib/hydraulics/types';
import { distribution } from '../make/distribution';
import { epanetInput, epanetWorkspace, runEpanet } from '../make/epanet';
import type { Suite } from './run';

const SIZES = [100, 300, 1_000, 3_000, 10_000];
/** Summed flow change over summed flow at which both stop. */
const TOLERANCE = 1e-6;
const runsFor = (terminals: number) => (terminals > 2_000 ? 7 : 15);

const median = (values: number[]) => values.toSorted((a, b) => a - b)[values.length >> 1];
const rounded = (value: number, digits = 4) => Number(value.toPrecision(digits));

function timed<T>(work: () => T): { took: number; result: T } {
  const begun = performance.now();
  const result = work();
  return { took: performance.now() - begun, result };
}

/**
 * The engine beside EPANET 2.2 (compiled to JavaScript) on the same networks in one process, by turns, to the same tolerance, after a warm-up;
 * medians. `solveMs` is the iteration alone on both sides; `totalMs` from the parsed document to the whole result, against EPANET's
 * open, initialise and solve. Accuracy stands beside: heads left round the loops and flows against a run to a far smaller
 * tolerance for ours, EPANET's own largest head error for it. Their friction formulas differ, so flows are not compared here.
 */
export async function solverSuite(): Promise<Suite> {
  const workspace = await epanetWorkspace();
  const rows: Suite['rows'] = [];
  for (const network of ['direct-return', 'meshed'])
    for (const terminals of SIZES) {
      const document = distribution(terminals, network === 'meshed');
      const input = epanetInput(document, TOLERANCE);
      const ours = { solve: [] as number[], total: [] as number[], again: [] as number[] };
      const theirs = { solve: [] as number[], total: [] as number[] };
      let headErrorM = 0;
      const runs = runsFor(terminals);
      for (let run = -2; run < runs; run++) {
        const other = runEpanet(workspace, input, 0);
        const iteration = startIteration(prepareNetwork(document));
        const alone = timed(() => iteration.run(null));
        const whole = timed(() => solve(document));
        const again = timed(resolver(document, run));
        if (run < 0) continue;
        theirs.solve.push(other.solveMs);
        theirs.total.push(other.openMs + other.solveMs);
        headErrorM = other.headErrorM;
        ours.solve.push(alone.took);
        ours.total.push(whole.took);
        ours.again.push(again.took);
      }
      const { residuals, iterations, links } = solve(document);
      rows.push({
        network,
        terminals,
        links: links.length,
        solveMs: rounded(median(ours.solve)),
        referenceSolveMs: rounded(median(theirs.solve)),
        solveRatio: rounded(median(ours.solve) / median(theirs.solve)),
        totalMs: rounded(median(ours.total)),
        referenceTotalMs: rounded(median(theirs.total)),
        totalRatio: rounded(median(ours.total) / median(theirs.total)),
        resolveMs: rounded(median(ours.again)),
        iterations,
        loopPa: rounded(residuals.loopPa),
        flowError: rounded(flowError(document)),
        referenceHeadErrorM: rounded(headErrorM),
        bytesPerLink: Math.round(bytesIn(startIteration(prepareNetwork(document))) / links.length),
      });
    }
  const direct = rows.filter((row) => row.network === 'direct-return');
  return { suite: 'solver', rows, growth: rounded(growthOf(direct)), tolerance: TOLERANCE };
}

/** Bytes of all typed arrays that a value holds on to. */
function bytesIn(value: unknown, seen = new Set<unknown>()): number {
  if (typeof value !== 'object' || value === null || seen.has(value)) return 0;
  seen.add(value);
  if (ArrayBuffer.isView(value)) return value.byteLength;
  return Object.values(value).reduce((sum: number, each) => sum + bytesIn(each, seen), 0);
}

/** The exponent of N in the time of the whole, from the three largest sizes. */
function growthOf(rows: Suite['rows']): number {
  const [small, large] = [rows[rows.length - 3], rows[rows.length - 1]];
  return Math.log(Number(large.totalMs) / Number(small.totalMs)) / Math.log(Number(large.terminals) / Number(small.terminals));
}

/** A solution is at hand and one balancing valve is moved: the work of finding the flows anew. */
function resolver(document: NetworkDocument, run: number): () => void {
  const network = prepareNetwork(document);
  const first = findFlows(network);
  const valve = document.links.find((link): link is LinkOf<'balancingValve'> => link.kind === 'balancingValve')!;
  return () => {
    changeLinks(network, [{ ...valve, setting: 2 + (run & 1) }]);
    findFlows(network, { startFlows: first.state.linkFlow });
  };
}

/** Largest difference in flow from the same network iterated on to rounding, over the largest flow. */
function flowError(document: NetworkDocument): number {
  const network = prepareNetwork(document);
  const first = findFlows(network);
  const flows = first.state.linkFlow.slice();
  for (let k = 0; k < 3; k++) findFlows(network, { startFlows: first.state.linkFlow });
  const largest = flows.reduce((most, flow) => Math.max(most, Math.abs(flow)), 0);
  return flows.reduce((most, flow, i) => Math.max(most, Math.abs(flow - first.state.linkFlow[i])), 0) / largest;
}
