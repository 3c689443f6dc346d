import { type SpanningForest, spanningForest } from './graph/adjacency';
import { WALL_SLOPE } from './links/law';
import { pumpSpeed } from './links/pump';
import type { PreparedNetwork } from './prepare';
import type { Solution } from './solve';
import type { LinkResult, LinkOf, NetworkDocument, Warning } from './types';

/** A wall that lets this much through, L/s, is being forced by an inflow: no steady flow exists. */
const FORCED_LS = 1e-5;
/** Names that a message lists before it stops. */
const MOST_NAMES = 12;

/** What a person should know about a solution. */
export function solveWarnings(network: PreparedNetwork, solution: Solution, links: LinkResult[]): Warning[] {
  return [
    ...solution.warnings,
    ...network.cautions,
    ...partWarnings(network),
    ...transitionWarnings(links),
    ...pumpWarnings(network, links),
    ...wallWarnings(network, solution),
    ...controllerWarnings(network, solution),
  ];
}

export const listed = (ids: string[]) =>
  ids.length > MOST_NAMES ? `${ids.slice(0, MOST_NAMES).join(', ')} and ${ids.length - MOST_NAMES} more` : ids.join(', ');

/** Networks that nothing joins to the one with the reference stand on their own first node at 0 kPa. */
function loneNetworkWarnings(document: NetworkDocument, whole: SpanningForest, reference: number): Warning[] {
  return whole.roots.flatMap((root, network): Warning[] => {
    if (network === whole.part[reference]) return [];
    const { id } = document.nodes[root];
    return [
      { code: 'no-reference', id, message: `Nothing joins ${id} to the reference: pressures there are counted from 0 kPa at ${id}.` },
    ];
  });
}

/** Parts that hang on the rest only by shut links: their flows are zero unless they have a pump of their own, their pressures are not known. */
function partWarnings({ document, nodeIndex, forest }: PreparedNetwork): Warning[] {
  const { nodes, links } = document;
  if (forest.roots.length === 1) return [];
  const from = Int32Array.from(links, (link) => nodeIndex.get(link.from)!);
  const to = Int32Array.from(links, (link) => nodeIndex.get(link.to)!);
  const whole = spanningForest(nodes.length, from, to);
  const reference = document.reference ? nodeIndex.get(document.reference.node)! : 0;

  // Of each network the part with the reference stands for the rest, else the part with most nodes.
  const size = new Int32Array(forest.roots.length);
  for (const part of forest.part) size[part]++;
  const referencePart = forest.part[reference];
  const main = new Int32Array(whole.roots.length).fill(-1);
  forest.roots.forEach((root, part) => {
    const network = whole.part[root];
    const held = main[network];
    if (held < 0 || part === referencePart || (held !== referencePart && size[part] > size[held])) main[network] = part;
  });

  const members: string[][] = forest.roots.map(() => []);
  nodes.forEach((node, v) => members[forest.part[v]].push(node.id));
  const cutOff = forest.roots.flatMap((root, part): Warning[] => {
    if (main[whole.part[root]] === part) return [];
    const ids = members[part];
    const message = `Closed links cut off ${listed(ids)}: nothing flows to or from there, and its pressure is not known.`;
    return [{ code: 'cut-off', id: ids[0], message }];
  });
  return [...cutOff, ...loneNetworkWarnings(document, whole, reference)];
}

/** Between Re 2000 and 4000 no law is sure: the pipes there are named together. */
function transitionWarnings(links: LinkResult[]): Warning[] {
  const ids = links.filter((link) => link.regime === 'transition').map((link) => link.id);
  if (!ids.length) return [];
  const message = `Flow is between laminar and turbulent in ${listed(ids)}: the friction there is uncertain.`;
  return [{ code: 'transition-flow', id: ids[0], message }];
}

function pumpWarnings({ document, kinds, position }: PreparedNetwork, links: LinkResult[]): Warning[] {
  const pumps = kinds.find(({ kind }) => kind === 'pump');
  return Array.from(position.subarray(pumps?.first ?? 0, pumps?.last ?? 0)).flatMap((at): Warning[] => {
    const link = document.links[at] as LinkOf<'pump'>;
    if (pumpSpeed(link) <= 0) return [];
    const last = link.curve[link.curve.length - 1].flowLs * pumpSpeed(link);
    if (links[at].flowLs <= last) return [];
    const message = `${link.id} runs at ${links[at].flowLs.toFixed(3)} L/s, past the last point of its curve (${last.toFixed(3)} L/s at this speed); the curve is drawn straight on.`;
    return [{ code: 'pump-past-curve', id: link.id, message }];
  });
}

/** Check valves, non-returns and limiters through which an inflow is forced, and limiters that lack the head to hold their limit. */
function wallWarnings({ kinds, document, position }: PreparedNetwork, { state }: Solution): Warning[] {
  const warnings: Warning[] = [];
  for (const { kind, first, last } of kinds) {
    if (kind !== 'checkValve' && kind !== 'pump' && kind !== 'flowLimiter') continue;
    for (let i = first; i < last; i++) {
      const link = document.links[position[i]];
      if (state.linkSlope[i] === WALL_SLOPE) {
        const beyond = kind === 'flowLimiter' ? state.linkFlow[i] - (link as LinkOf<'flowLimiter'>).limitLs : -state.linkFlow[i];
        if (beyond > FORCED_LS)
          warnings.push({
            code: 'forced-flow',
            id: link.id,
            message: `Inflows force flow through ${link.id}, which does not let it pass.`,
          });
      } else if (kind === 'flowLimiter') {
        const { limitLs } = link as LinkOf<'flowLimiter'>;
        const flow = state.linkFlow[i];
        if (flow < limitLs * (1 - 1e-6))
          warnings.push({
            code: 'limiter-starved',
            id: link.id,
            message: `${link.id} passes ${flow.toFixed(3)} L/s, below its limit of ${limitLs} L/s: it has less than its least differential pressure.`,
          });
      }
    }
  }
  return warnings;
}

function controllerWarnings({ document, position }: PreparedNetwork, { control }: Solution): Warning[] {
  return (control?.controllers ?? []).flatMap(({ link, state }): Warning[] => {
    const { id } = document.links[position[link]];
    if (state === 'open') return [{ code: 'controller-open', id, message: `${id} stands wide open: its set point cannot be reached.` }];
    if (state === 'shut')
      return [
        { code: 'controller-shut', id, message: `${id} is shut: the sensed differential pressure stays above its set point without it.` },
      ];
    return [];
  });
}
