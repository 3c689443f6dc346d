import { coilAtFlow, type CoilModel } from './coil';
import { capacityKwPerLsK } from './thermal';
import type { NetworkDocument, SolveResult } from './types';

/** What a link does to the water that passes it; a link without a law passes it on unchanged. Heat is counted as given TO the water. */
export type ThermalLaw =
  | { kind: 'fixedOutlet'; outletC: number }
  | { kind: 'heat'; heatToWaterKw: number }
  | { kind: 'coil'; coil: CoilModel; designFlowLs: number; airInC: number };

export type ThermalInput = {
  laws: ReadonlyMap<string, ThermalLaw>;
  /** Temperature of what flows in from outside, by node: needed for every node whose inflow is above 0. */
  inflowC?: ReadonlyMap<string, number>;
};

export type LinkTemperature = { id: string; inletC: number | null; outletC: number | null; heatToWaterKw: number };
export type TemperatureWarning = { code: 'no-flow' | 'no-source'; id: string; message: string };
export type Temperatures = {
  converged: boolean;
  /** Passes over the nodes: two without recirculation. */
  sweeps: number;
  nodes: { id: string; temperatureC: number | null }[];
  links: LinkTemperature[];
  /** Heat to the water from links that fix their outlet, from all other links, and by what crosses the boundary; and what fails to sum to 0. */
  balance: { sourcesKw: number; loadsKw: number; boundaryKw: number; imbalanceKw: number };
  warnings: TemperatureWarning[];
};
export type TemperatureError = { code: 'inflow-temperature-missing'; id: string; message: string };
export type TemperatureResult = { ok: true; temperatures: Temperatures } | { ok: false; error: TemperatureError };

/** Below the solver's own continuity tolerance a flow is none. */
const LEAST_FLOW_LS = 1e-6;
const TOLERANCE_K = 1e-9;
/** Changes this small are rounding of temperatures near 100. */
const ROUNDING_K = 1e-12;
const MOST_SWEEPS = 20_000;

type Stream = { id: string; from: number; to: number; flowLs: number; law: ThermalLaw | undefined };

/**
 * Steady temperatures through a solved network: at every node the streams that arrive mix in proportion to flow, and every link adds the heat
 * of its law (one density and specific heat throughout, no heat lost from pipes). Nodes are swept in the order of flow from the
 * sources, again and again while water recirculates, until the remaining error is under 1e-9 K. A part that no source feeds has
 * null temperatures and a warning: it has no steady state. A heat law without flow gives nothing, and a warning.
 */
export function networkTemperatures(
  document: Pick<NetworkDocument, 'nodes' | 'links'>,
  solution: Pick<SolveResult, 'links' | 'fluid'>,
  { laws, inflowC = new Map() }: ThermalInput,
): TemperatureResult {
  const missing = document.nodes.find((node) => (node.inflowLs ?? 0) > 0 && !inflowC.has(node.id));
  if (missing) {
    const message = `The temperature of the water that flows in at ${missing.id} is not given.`;
    return { ok: false, error: { code: 'inflow-temperature-missing', id: missing.id, message } };
  }
  const capacity = capacityKwPerLsK(solution.fluid);
  const streams = streamsOf(document, solution, laws);
  const arriving = document.nodes.map((): Stream[] => []);
  const leaving = document.nodes.map((): Stream[] => []);
  for (const stream of streams) {
    arriving[stream.to].push(stream);
    leaving[stream.from].push(stream);
  }
  const entering = document.nodes.map((node) => ({ flowLs: Math.max(0, node.inflowLs ?? 0), temperatureC: inflowC.get(node.id) ?? 0 }));
  const order = orderOfFlow(streams, leaving, entering);
  const temperatureC = new Float64Array(document.nodes.length);
  const { converged, sweeps } = sweepUntilSteady(order, arriving, entering, temperatureC, capacity);

  const known = new Set(order);
  const nodes = document.nodes.map((node, i) => ({ id: node.id, temperatureC: known.has(i) ? temperatureC[i] : null }));
  const byId = new Map(streams.map((stream) => [stream.id, stream]));
  const links = document.links.map(({ id }): LinkTemperature => {
    const stream = byId.get(id);
    const inletC = stream ? nodes[stream.from].temperatureC : null;
    if (!stream || inletC === null) return { id, inletC: null, outletC: null, heatToWaterKw: 0 };
    const outletC = outletOf(stream, inletC, capacity);
    return { id, inletC, outletC, heatToWaterKw: capacity * stream.flowLs * (outletC - inletC) };
  });
  const boundaryKw = document.nodes.reduce((sum, node, i) => {
    const inflowLs = node.inflowLs ?? 0;
    return sum + capacity * inflowLs * (inflowLs > 0 ? entering[i].temperatureC : (nodes[i].temperatureC ?? 0));
  }, 0);
  const balance = heatBalance(links, laws, boundaryKw);
  const warnings = warningsFor(document, nodes, byId, arriving, laws);
  return { ok: true, temperatures: { converged, sweeps, nodes, links, balance, warnings } };
}

function streamsOf(
  document: Pick<NetworkDocument, 'nodes' | 'links'>,
  solution: Pick<SolveResult, 'links'>,
  laws: ReadonlyMap<string, ThermalLaw>,
): Stream[] {
  const index = new Map(document.nodes.map((node, i) => [node.id, i]));
  const flows = new Map(solution.links.map((link) => [link.id, link.flowLs]));
  return document.links.flatMap((link): Stream[] => {
    const flowLs = flows.get(link.id) ?? 0;
    if (Math.abs(flowLs) < LEAST_FLOW_LS) return [];
    const [from, to] = [index.get(link.from)!, index.get(link.to)!];
    const law = laws.get(link.id);
    return [flowLs > 0 ? { id: link.id, from, to, flowLs, law } : { id: link.id, from: to, to: from, flowLs: -flowLs, law }];
  });
}

function outletOf({ law, flowLs }: Stream, inletC: number, capacity: number): number {
  if (law === undefined) return inletC;
  switch (law.kind) {
    case 'fixedOutlet':
      return law.outletC;
    case 'heat':
      return inletC + law.heatToWaterKw / (flowLs * capacity);
    case 'coil':
      return coilAtFlow(law.coil, flowLs / law.designFlowLs, inletC, law.airInC).waterOutC;
  }
}

/** Nodes that a source feeds, each after as many of its feeders as cycles allow: reverse postorder of a depth-first walk downstream. */
function orderOfFlow(streams: Stream[], leaving: Stream[][], entering: { flowLs: number }[]): number[] {
  const starts = streams.filter((stream) => stream.law?.kind === 'fixedOutlet').map((stream) => stream.to);
  entering.forEach(({ flowLs }, node) => flowLs > 0 && starts.push(node));
  const seen = new Uint8Array(leaving.length);
  const order: number[] = [];
  for (const start of starts) {
    if (seen[start]) continue;
    seen[start] = 1;
    const path = [{ node: start, next: 0 }];
    while (path.length > 0) {
      const top = path[path.length - 1];
      const stream = leaving[top.node][top.next++];
      if (!stream) order.push(path.pop()!.node);
      else if (!seen[stream.to]) {
        seen[stream.to] = 1;
        path.push({ node: stream.to, next: 0 });
      }
    }
  }
  return order.reverse();
}

/** Gauss-Seidel on the mixing equations; stops when the geometric tail of the changes, change * ratio / (1 - ratio), is under tolerance. */
function sweepUntilSteady(
  order: number[],
  arriving: Stream[][],
  entering: { flowLs: number; temperatureC: number }[],
  temperatureC: Float64Array,
  capacity: number,
): { converged: boolean; sweeps: number } {
  let before = Infinity;
  for (let sweeps = 1; sweeps <= MOST_SWEEPS; sweeps++) {
    let change = 0;
    for (const node of order) {
      let flow = entering[node].flowLs;
      let heat = flow * entering[node].temperatureC;
      for (const stream of arriving[node]) {
        flow += stream.flowLs;
        heat += stream.flowLs * outletOf(stream, temperatureC[stream.from], capacity);
      }
      change = Math.max(change, Math.abs(heat / flow - temperatureC[node]));
      temperatureC[node] = heat / flow;
    }
    const ratio = change / before;
    if (change < ROUNDING_K || (ratio < 1 && change < 1e-6 && (change * ratio) / (1 - ratio) < TOLERANCE_K))
      return { converged: true, sweeps };
    before = change;
  }
  return { converged: false, sweeps: MOST_SWEEPS };
}

function heatBalance(links: LinkTemperature[], laws: ReadonlyMap<string, ThermalLaw>, boundaryKw: number): Temperatures['balance'] {
  let sourcesKw = 0;
  let loadsKw = 0;
  for (const link of links) {
    if (laws.get(link.id)?.kind === 'fixedOutlet') sourcesKw += link.heatToWaterKw;
    else loadsKw += link.heatToWaterKw;
  }
  return { sourcesKw, loadsKw, boundaryKw, imbalanceKw: sourcesKw + loadsKw + boundaryKw };
}

function warningsFor(
  document: Pick<NetworkDocument, 'links'>,
  nodes: Temperatures['nodes'],
  streams: ReadonlyMap<string, Stream>,
  arriving: Stream[][],
  laws: ReadonlyMap<string, ThermalLaw>,
): TemperatureWarning[] {
  const idle = document.links.filter(({ id }) => laws.has(id) && !streams.has(id));
  const unfed = nodes.filter((node, i) => node.temperatureC === null && arriving[i].length > 0);
  return [
    ...idle.map(({ id }) => ({ code: 'no-flow' as const, id, message: `No water flows through ${id}: it exchanges no heat.` })),
    ...unfed.map(({ id }) => ({ code: 'no-source' as const, id, message: `No source of known temperature feeds ${id}.` })),
  ];
}
