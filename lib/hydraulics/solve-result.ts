import { cubicAt, evaluateCubic, monotoneCubic } from './monotone-cubic';
import type { Loops } from './graph/loops';
import { frictionFactor, LAMINAR_RE, TURBULENT_RE } from './friction';
import { GRAVITY_MS2, metresPerKpa } from './links/law';
import { boreAreaM2, reynoldsPerLs } from './links/pipe';
import { headAt, pumpCurve, pumpHead, pumpSpeed } from './links/pump';
import type { PreparedNetwork } from './prepare';
import type { Solution } from './solve';
import { solveWarnings } from './solve-warnings';
import type { FlowRegime, LinkResult, NetworkLink, NodeResult, PumpLink, PumpResult, SolveResult } from './types';

/** Converged means: every loop closes within this, Pa, and every node balances within that, L/s. */
const CONVERGED_LOOP_PA = 1;
const CONVERGED_CONTINUITY_LS = 1e-6;
const MOST_WORST = 10;

/** The tables of a result from flows and losses. */
export function solveResult(network: PreparedNetwork, solution: Solution): SolveResult {
  const { document, fluid } = network;
  const { state, method, iterations } = solution;
  const kpaPerM = 1 / metresPerKpa(fluid.densityKgM3);
  const heads = nodeHeads(network, state.linkLoss);

  const links = document.links.map((link, at) => linkResult(network, solution, link, at, heads, kpaPerM));
  const nodes = document.nodes.map((node, v): NodeResult => {
    return { id: node.id, pressureKpa: (heads[v] - (node.elevationM ?? 0)) * kpaPerM, headM: heads[v] };
  });
  const pumps: PumpResult[] = [];
  document.links.forEach((link, at) => {
    if (link.kind === 'pump') pumps.push(pumpResult(link, links[at].flowLs, -links[at].dropKpa / kpaPerM, fluid.densityKgM3));
  });

  const imbalance = nodeImbalance(network, state.linkFlow);
  const residuals = { continuityLs: largest(imbalance), loopPa: solution.worstM * kpaPerM * 1000 };
  const finite = links.every((link) => Number.isFinite(link.flowLs) && Number.isFinite(link.dropKpa));
  const warnings = solveWarnings(network, solution, links);
  const forced = warnings.some((warning) => warning.code === 'forced-flow');
  const converged =
    solution.closed && finite && !forced && residuals.loopPa <= CONVERGED_LOOP_PA && residuals.continuityLs <= CONVERGED_CONTINUITY_LS;
  const { densityKgM3, viscosityMPaS, specificHeatKJKgK } = fluid;
  const result: SolveResult = {
    converged,
    method,
    iterations,
    residuals,
    fluid: { densityKgM3, viscosityMPaS, specificHeatKJKgK },
    links,
    nodes,
    pumps,
    warnings,
  };
  if (!converged) {
    result.warnings.push({ code: 'not-converged', message: `The network did not close within ${iterations} iterations.` });
    const loops = solution.loops();
    const loopHeads = headsAroundLoops(loops, state.chainLoss);
    result.worst = {
      loops: worstOf(loopHeads).map((l) => ({ links: linksOfLoop(network, loops, l), headPa: loopHeads[l] * kpaPerM * 1000 })),
      nodes: worstOf(imbalance).map((v) => ({ id: document.nodes[v].id, continuityLs: imbalance[v] })),
    };
  }
  if (solution.history) {
    const loops = solution.loops();
    result.history = {
      loops: Array.from({ length: loops.count }, (_, l) => directedLinks(network, loops, l)),
      corrections: solution.history,
    };
  }
  return result;
}

/** Heads carried along the tree; each part stands on its root: the reference node, else its first node at 0 kPa. */
function nodeHeads(network: PreparedNetwork, linkLoss: Float64Array): Float64Array {
  const { document, fluid, forest, from } = network;
  const heads = new Float64Array(document.nodes.length);
  const reference = document.reference && network.nodeIndex.get(document.reference.node);
  for (const v of forest.order) {
    const link = forest.treeLink[v];
    if (link >= 0) {
      heads[v] = heads[forest.parent[v]] + (from[link] === v ? linkLoss[link] : -linkLoss[link]);
      continue;
    }
    const pressure = v === reference ? document.reference!.gaugePressureKpa : 0;
    heads[v] = (document.nodes[v].elevationM ?? 0) + pressure * metresPerKpa(fluid.densityKgM3);
  }
  return heads;
}

function linkResult(
  network: PreparedNetwork,
  { state }: Solution,
  link: NetworkLink,
  at: number,
  heads: Float64Array,
  kpaPerM: number,
): LinkResult {
  const { numberOf, nodeIndex, fluid } = network;
  const i = numberOf[at];
  const isOpen = i >= 0;
  const flowLs = isOpen ? state.linkFlow[i] : 0;
  const from = isOpen ? network.from[i] : nodeIndex.get(link.from)!;
  const to = isOpen ? network.to[i] : nodeIndex.get(link.to)!;
  const dropKpa = (heads[from] - heads[to]) * kpaPerM;
  if (link.kind !== 'pipe') return { id: link.id, flowLs, dropKpa };
  const reynolds = Math.abs(flowLs) * reynoldsPerLs(link.boreMm, fluid);
  return {
    id: link.id,
    flowLs,
    dropKpa,
    velocityMs: Math.abs(flowLs) / 1000 / boreAreaM2(link.boreMm),
    reynolds,
    // At rest 64/Re has no bound and the loss none: the factor is then given as 0.
    frictionFactor: reynolds > 0 ? frictionFactor(reynolds, link.roughnessMm / link.boreMm) : 0,
    regime: regimeOf(reynolds),
  };
}

function regimeOf(reynolds: number): FlowRegime {
  if (reynolds < 1e-6) return 'at-rest';
  if (reynolds < LAMINAR_RE) return 'laminar';
  return reynolds < TURBULENT_RE ? 'transition' : 'turbulent';
}

/** A pump's head and powers, kW: hydraulic rho g Q H, shaft that over the efficiency at Q / speed. */
export function pumpResult(link: PumpLink, flowLs: number, headM: number, densityKgM3: number): PumpResult {
  const hydraulicKw = (densityKgM3 * GRAVITY_MS2 * (flowLs / 1000) * headM) / 1000;
  const efficiency = pumpEfficiency(link, flowLs);
  return { id: link.id, flowLs, headM, hydraulicKw, shaftKw: efficiency ? hydraulicKw / efficiency : null };
}

/** Efficiency at a flow, held at the ends of its points; null where there is none or it is 0. */
export function pumpEfficiency(link: PumpLink, flowLs: number, speed = pumpSpeed(link)): number | null {
  if (!link.efficiency?.length || speed <= 0 || flowLs <= 0) return null;
  const flows = link.efficiency.map((point) => point.flowLs);
  const fractions = link.efficiency.map((point) => point.fraction);
  if (flows.length === 1) return fractions[0] || null;
  const at = Math.min(Math.max(flowLs / speed, flows[0]), flows[flows.length - 1]);
  evaluateCubic(monotoneCubic(flows, fractions), at);
  return cubicAt.value > 0 ? cubicAt.value : null;
}

/** Head of a pump's curve at a flow and speed ratio, m. */
export function pumpHeadAt(link: PumpLink, flowLs: number, speed: number): number {
  pumpHead(pumpCurve(link), flowLs, speed);
  return headAt.headM;
}

function nodeImbalance({ document, from, to }: PreparedNetwork, linkFlow: Float64Array): Float64Array {
  const imbalance = new Float64Array(document.nodes.length);
  for (let v = 0; v < imbalance.length; v++) imbalance[v] = document.nodes[v].inflowLs ?? 0;
  for (let i = 0; i < linkFlow.length; i++) {
    imbalance[from[i]] -= linkFlow[i];
    imbalance[to[i]] += linkFlow[i];
  }
  return imbalance;
}

function headsAroundLoops(loops: Loops, chainLoss: Float64Array): Float64Array {
  const heads = new Float64Array(loops.count);
  for (let l = 0; l < loops.count; l++)
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) heads[l] += loops.sign[p] * chainLoss[loops.chain[p]];
  return heads;
}

function largest(values: Float64Array): number {
  let worst = 0;
  for (let k = 0; k < values.length; k++) worst = Math.max(worst, Math.abs(values[k]));
  return worst;
}

const worstOf = (values: Float64Array) =>
  Array.from(values.keys())
    .sort((a, b) => Math.abs(values[b]) - Math.abs(values[a]))
    .slice(0, MOST_WORST)
    .filter((i) => values[i] !== 0);

function directedLinks({ chains, document, position }: PreparedNetwork, loops: Loops, loop: number) {
  const links: { link: string; direction: 1 | -1 }[] = [];
  for (let p = loops.start[loop]; p < loops.start[loop + 1]; p++) {
    const c = loops.chain[p];
    const own: typeof links = [];
    for (let k = chains.start[c]; k < chains.start[c + 1]; k++) {
      const direction = loops.sign[p] * chains.sign[k] > 0 ? 1 : -1;
      own.push({ link: document.links[position[chains.member[k]]].id, direction });
    }
    links.push(...(loops.sign[p] > 0 ? own : own.reverse()));
  }
  return links;
}

const linksOfLoop = (network: PreparedNetwork, loops: Loops, loop: number) => directedLinks(network, loops, loop).map(({ link }) => link);
