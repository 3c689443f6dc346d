import type { BalanceResult, LinkResult, SolveResult } from '@/lib/hydraulics/types';
import { isPoint, type Drawing, type DrawingPipe, type Equipment } from './drawing';
import { nodeIdOf, unitLinkId, unitLinks, type UnitLink } from './drawing-to-document';

/** Flows as the valves stand in the drawing, or as they will be with the settings of the balance. */
export type Basis = 'drawn' | 'balanced';

export interface PipeSolution {
  /** From `from` to `to`. */
  flowLs: number;
  velocityMs: number;
  /** Friction alone, without the local losses. */
  paPerM: number;
  dropKpa: number;
  fromKpa: number | null;
  toKpa: number | null;
  percentOfDesign: number | null;
  reynolds: number | null;
  frictionFactor: number | null;
}

export interface ValveSolution {
  setting: number;
  kv: number;
  dropKpa: number;
  state: BalanceResult['valves'][number]['state'];
  flowLs: number;
}

export interface PieceSolution {
  flowLs: number | null;
  /** Of the whole piece, in the direction of its flow; a pump's is minus its gain. */
  dropKpa: number | null;
  inletKpa: number | null;
  outletKpa: number | null;
  percentOfDesign: number | null;
  /** What the balance found for the piece's balancing valve. */
  valve: ValveSolution | null;
  authority: number | null;
  circuitDropKpa: number | null;
  isIndex: boolean;
  pump: { headM: number; shaftKw: number | null; requiredHeadM: number | null; requiredSpeed: number | null } | null;
  parts: Partial<Record<UnitLink, LinkResult>>;
}

export interface DrawnFigures {
  basis: Basis;
  fluid: SolveResult['fluid'];
  pieces: Map<string, PieceSolution>;
  pipes: Map<string, PipeSolution>;
}

interface Solved {
  solve: SolveResult | null;
  balance: BalanceResult | null;
}

/** The figures of each piece and pipe of a drawing, out of the results of its network; null where that basis has no result. */
export function figuresOfDrawing(drawing: Drawing, { solve, balance }: Solved, basis: Basis): DrawnFigures | null {
  const result = basis === 'drawn' ? solve : (balance?.solution ?? null);
  if (!result) return null;
  const linkOf = new Map(result.links.map((link) => [link.id, link]));
  const pressureOf = new Map(result.nodes.map((node) => [node.id, node.pressureKpa]));
  const design = designFlows(balance);
  const pipes = new Map<string, PipeSolution>();
  for (const pipe of drawing.pipes) {
    const link = linkOf.get(pipe.id);
    if (!link) continue;
    const ends = { fromKpa: pressureOf.get(nodeIdOf(pipe.from)) ?? null, toKpa: pressureOf.get(nodeIdOf(pipe.to)) ?? null };
    pipes.set(pipe.id, {
      ...pipeFigures(pipe, link, result.fluid.densityKgM3),
      ...ends,
      percentOfDesign: percent(link.flowLs, design?.get(pipe.id)),
    });
  }
  const pieces = new Map(
    drawing.equipment.map((piece) => [piece.id, pieceFigures(piece, { result, linkOf, pressureOf, design, balance })]),
  );
  return { basis, fluid: result.fluid, pieces, pipes };
}

/** Flow of each link with every terminal at its design flow; null where the balance does not reach it. */
function designFlows(balance: BalanceResult | null): Map<string, number> | null {
  if (!balance?.converged || balance.warnings.some(({ code }) => code === 'pump-too-small' || code === 'no-pump')) return null;
  return new Map(balance.solution.links.map((link) => [link.id, link.flowLs]));
}

const percent = (flowLs: number, designLs: number | null | undefined) => (designLs ? (100 * flowLs) / designLs : null);

function pipeFigures(pipe: DrawingPipe, link: LinkResult, densityKgM3: number) {
  const velocityMs = link.velocityMs ?? 0;
  const frictionFactor = link.frictionFactor ?? null;
  const paPerM = frictionFactor && pipe.boreMm ? (frictionFactor * densityKgM3 * velocityMs ** 2) / (2 * (pipe.boreMm / 1000)) : 0;
  return {
    flowLs: link.flowLs,
    velocityMs: Math.abs(velocityMs),
    paPerM,
    dropKpa: link.dropKpa,
    reynolds: link.reynolds ?? null,
    frictionFactor,
  };
}

interface Results {
  result: SolveResult;
  linkOf: Map<string, LinkResult>;
  pressureOf: Map<string, number>;
  design: Map<string, number> | null;
  balance: BalanceResult | null;
}

function pieceFigures(piece: Equipment, { result, linkOf, pressureOf, design, balance }: Results): PieceSolution {
  const isUnit = piece.kind === 'terminalUnit';
  const links = isUnit ? unitLinks.map((part) => linkOf.get(unitLinkId(piece.id, part))) : [linkOf.get(piece.id)];
  const present = links.filter((link) => link !== undefined);
  const flowLs = present[0]?.flowLs ?? null;
  const terminal = isUnit ? balance?.terminals.find(({ id }) => id === unitLinkId(piece.id, 'coil')) : undefined;
  const valve = balance?.valves.find(({ id }) => id === (isUnit ? unitLinkId(piece.id, 'balancing') : piece.id));
  const pump = piece.kind === 'pump' ? result.pumps.find(({ id }) => id === piece.id) : undefined;
  const duty = piece.kind === 'pump' ? balance?.pumps.find(({ id }) => id === piece.id) : undefined;
  const inletId = isPoint(piece.kind) ? piece.id : `${piece.id}.in`;
  const designLs = isUnit ? piece.designFlowLs : design?.get(piece.id);
  return {
    flowLs,
    dropKpa: present.length ? present.reduce((sum, link) => sum + link.dropKpa, 0) : null,
    inletKpa: pressureOf.get(inletId) ?? null,
    outletKpa: pressureOf.get(`${piece.id}.out`) ?? null,
    percentOfDesign: flowLs === null ? null : percent(flowLs, designLs),
    valve: valve ? { setting: valve.setting, kv: valve.kv, dropKpa: valve.dropKpa, state: valve.state, flowLs: valve.flowLs } : null,
    authority: terminal?.authority ?? null,
    circuitDropKpa: terminal?.circuitDropKpa ?? null,
    isIndex: balance?.indexTerminal === unitLinkId(piece.id, 'coil'),
    pump: pump
      ? { headM: pump.headM, shaftKw: pump.shaftKw, requiredHeadM: duty?.requiredHeadM ?? null, requiredSpeed: duty?.speed ?? null }
      : null,
    parts: isUnit ? Object.fromEntries(unitLinks.flatMap((part, i) => (links[i] ? [[part, links[i]]] : []))) : {},
  };
}
