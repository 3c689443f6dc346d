import { changeLinks, prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, solve, startIteration } from '@/lib/hydraulics/solve';
import type { LinkOf, NetworkDocument } from '@/lib/hydraulics/types';
import { distribution } from '../make/distribution';
import { epanetInput, epanetWorkspace, runEpanet } from '../make/epanet';
import { coldMs } from './cold-solve';
import type { Suite } from './run';

/** SOLVER_TERMINALS=100,1000 makes it a quick look; without it it is the whole of it. */
const sizes = (process.env.SOLVER_TERMINALS ?? '100,300,1000,3000,10000').split(',').map(Number);
/** Summed flow change over summed flow at which both stop. */
const TOLERANCE = 1e-6;
const WARM_UPS = 8;
const runsFor = (terminals: number) => (terminals > 2_000 ? 11 : 25);
/** The size at which the first solve of a fresh process and the solve after a valve has moved are promised. */
const PROMISED_TERMINALS = 1_000;

const median = (values: number[]) => values.toSorted((a, b) => a - b)[values.length >> 1];
const rounded = (value: number, digits = 4) => Number(value.toPrecision(digits));

/** Milliseconds that this process has worked: other programs on the machine lengthen a wall clock's time several times over, this one hardly. */
const workedMs = () => {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1000;
};

function timed<T>(work: () => T): { took: number; result: T } {
  const begun = workedMs();
  const result = work();
  return { took: workedMs() - begun, result };
}

/**
 * The engine beside EPANET 2.2 (compiled to JavaScript) on the same networks in one process, by turns, to the same tolerance, after a warm-up;
 * medians of the processor's time, so that a busy machine does not decide. `solveMs` is the iteration alone on both sides; `totalMs`
 * from the parsed document to the whole result, against EPANET's open, initialise and solve. `resolveMs`: one balancing valve is moved
 * after a solution. `coldMs`: by the wall clock, the first solve of a fresh process. Accuracy stands beside: heads left round the
 * loops and flows against a run to a far smaller tolerance for ours, EPANET's own largest head error for it. Friction here is
 * Colebrook-White to rounding, there an explicit formula within 3.4 %, so flows are not compared.
 */
export async function solverSuite(): Promise<Suite> {
  const workspace = await epanetWorkspace();
  const rows: Suite['rows'] = [];
  for (const network of ['direct-return', 'meshed'])
    for (const terminals of sizes) {
      const isMeshed = network === 'meshed';
      const document = JSON.parse(JSON.stringify(distribution(terminals, isMeshed))) as NetworkDocument;
      const input = epanetInput(document, TOLERANCE);
      const ours = { solve: [] as number[], total: [] as number[], again: [] as number[] };
      const theirs = { solve: [] as number[], total: [] as number[] };
      let headErrorM = 0;
      const runs = runsFor(terminals);
      for (let run = -WARM_UPS; run < runs; run++) {
        const other = runEpanet(workspace, input, 0, workedMs);
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
        ...(terminals === PROMISED_TERMINALS && { coldMs: rounded(coldMs(terminals, isMeshed)) }),
        iterations,
        loopPa: rounded(residuals.loopPa),
        flowError: rounded(flowError(document)),
        referenceHeadErrorM: rounded(headErrorM),
        bytesPerLink: Math.round(bytesIn(startIteration(prepareNetwork(document))) / links.length),
      });
    }
  const growth = Object.fromEntries(
    ['direct-return', 'meshed'].map((network) => [network, rounded(growthOf(rows.filter((row) => row.network === network)))]),
  );
  return { suite: 'solver', rows, growth, tolerance: TOLERANCE };
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
  const [small, large] = [rows[Math.max(0, rows.length - 3)], rows[rows.length - 1]];
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
