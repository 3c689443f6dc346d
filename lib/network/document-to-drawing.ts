import { v7 as newId } from 'uuid';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import type { NetworkDocument, NetworkLink, PipeLink } from '@/lib/hydraulics/types';
import { pieceOfLink, unitOf, type PieceLink, type UnitChain } from './document-pieces';
import type { Drawing, DrawingFluid, DrawingPipe, Equipment, PipeEnd, Port } from './drawing';
import { drawnGraph, reach } from './drawn-graph';
import { layered } from './layered-places';
import { nextTag } from './tags';

export interface DrawnDocument {
  drawing: Drawing;
  /** What a drawing has no place for, each in a sentence with the id it is about. */
  notes: string[];
}

/** A joint between a piece and a tee costs nothing that can be read: a centimetre, as wide as the widest pipe allowed in earnest. */
const joint = { lengthM: 0.01, boreMm: 1000, roughnessMm: 0, minorK: 0, series: null, nominal: null };
/** A valve that closes a link which cannot stand closed in a drawing; closed, its Kv means nothing. */
const CLOSING_KV = 100;

interface Joined {
  ends: { end: PipeEnd; elevationM: number }[];
  pipes: { pipe: DrawingPipe; side: 'from' | 'to' }[];
}

/**
 * A drawing of a network document that has been checked, laid out by layers from its pumps on. It solves to the same flows and pressures; what a drawing
 * cannot hold is told in `notes`. Links in series about a terminal become one terminal unit, points where pipes meet tees.
 */
export function documentToDrawing(document: NetworkDocument): DrawnDocument {
  const notes: string[] = [];
  const elevationOf = new Map(document.nodes.map(({ id, elevationM }) => [id, elevationM ?? 0]));
  const levels = [...new Set(elevationOf.values())].sort((a, b) => b - a);
  const storeys = levels.map((elevationM, i) => ({ id: `level-${i}`, name: `At ${elevationM} m`, elevationM, top: 0, height: 1 }));
  const storeyAt = new Map(storeys.map(({ id, elevationM }) => [elevationM, id]));
  const placedAt = (elevationM: number, tag: string) => ({
    ...{ id: newId(), tag: tag.slice(0, 40), storeyId: storeyAt.get(elevationM) ?? null },
    ...{ x: 0, y: 0, rotation: 0 as const, isMirrored: false },
  });

  const held = new Set(document.links.flatMap((link) => (link.kind === 'dpController' ? link.sense : [])));
  if (document.reference) held.add(document.reference.node);
  const links = withClosingValves(document.links, elevationOf);
  const chains = unitChains(links, held);
  const inChain = new Set(chains.flatMap((chain) => Object.values(chain).map((link) => (link as NetworkLink).id)));

  const equipment: Equipment[] = [];
  const pipes: DrawingPipe[] = [];
  const joined = new Map<string, Joined>();
  const at = (node: string): Joined => {
    const known = joined.get(node) ?? { ends: [], pipes: [] };
    joined.set(node, known);
    return known;
  };
  const addPiece = (piece: Equipment, from: string, to: string) => {
    const elevationM = elevationOf.get(from) ?? 0;
    equipment.push(piece);
    at(from).ends.push({ end: { equipmentId: piece.id, port: 'in' }, elevationM });
    at(to).ends.push({ end: { equipmentId: piece.id, port: 'out' }, elevationM });
  };
  for (const chain of chains) {
    const inOrder = [chain.strainer, chain.control, chain.coil, chain.balancing].filter((link) => link !== undefined);
    const [first, last] = [inOrder[0]!, inOrder.at(-1)!];
    addPiece(unitOf(chain, placedAt(elevationOf.get(first.from) ?? 0, tagOf(chain.coil.id)), notes), first.from, last.to);
  }
  const controllers: { piece: Equipment & { kind: 'dpController' }; sense: [string, string] }[] = [];
  for (const link of links) {
    if (inChain.has(link.id)) continue;
    if (link.kind === 'pipe') {
      const pipe = pipeOf(link);
      pipes.push(pipe);
      at(link.from).pipes.push({ pipe, side: 'from' });
      at(link.to).pipes.push({ pipe, side: 'to' });
      continue;
    }
    const piece = pieceOfLink(link as PieceLink, placedAt(elevationOf.get(link.from) ?? 0, tagOf(link.id)), notes);
    addPiece(piece, link.from, link.to);
    if (link.kind === 'dpController' && piece.kind === 'dpController') controllers.push({ piece, sense: link.sense });
  }
  if (document.reference) {
    const { node, gaugePressureKpa } = document.reference;
    if (gaugePressureKpa < 0) notes.push(`reference: ${gaugePressureKpa} kPa is below 0, which a vessel cannot hold; it is taken as 0.`);
    const elevationM = elevationOf.get(node) ?? 0;
    const vessel: Equipment = { ...placedAt(elevationM, 'EV-1'), kind: 'expansionVessel', gaugePressureKpa: Math.max(gaugePressureKpa, 0) };
    equipment.push(vessel);
    at(node).ends.push({ end: { equipmentId: vessel.id, port: 'in' }, elevationM });
  }

  const ends = joinNodes(joined, held, { elevationOf, equipment, pipes, placedAt });
  for (const { piece, sense } of controllers)
    Object.assign(piece, { senseHigh: ends.get(sense[0]) ?? null, senseLow: ends.get(sense[1]) ?? null });
  for (const node of document.nodes)
    if (node.inflowLs) notes.push(`${node.id}: its inflow of ${node.inflowLs} L/s is left out; a drawing is a closed loop.`);

  const drawing: Drawing = {
    format: 'drawing/1',
    fluid: fluidOf(document, notes),
    pumpExcess: document.options?.pumpExcess ?? 'speed',
    storeys,
    equipment,
    pipes,
  };
  return { drawing: layered(withTags(withCircuits(drawing))), notes };
}

/** Ends meet directly where a pipe comes to a piece; else in a tee, to which each piece is joined. Answers an end at each node. */
function joinNodes(
  joined: Map<string, Joined>,
  held: Set<string>,
  made: {
    elevationOf: Map<string, number>;
    equipment: Equipment[];
    pipes: DrawingPipe[];
    placedAt: (elevationM: number, tag: string) => Omit<Equipment & { kind: 'tee' }, 'kind'>;
  },
): Map<string, PipeEnd> {
  const ends = new Map<string, PipeEnd>();
  const sides: Port[] = ['n', 'e', 's', 'w'];
  for (const [node, { ends: its, pipes }] of joined) {
    const elevationM = made.elevationOf.get(node) ?? 0;
    const isLevel = its.every((it) => it.elevationM === elevationM);
    const [first, second] = its;
    if (first && isLevel && !held.has(node) && its.length === 1 && pipes.length === 1) {
      pipes[0]!.pipe[pipes[0]!.side] = first.end;
      ends.set(node, first.end);
      continue;
    }
    if (first && second && isLevel && !held.has(node) && its.length === 2 && pipes.length === 0) {
      const [from, to] = first.end.port === 'out' ? [first.end, second.end] : [second.end, first.end];
      made.pipes.push({ ...joint, id: newId(), from, to, circuit: 'supply', bends: [] });
      ends.set(node, first.end);
      continue;
    }
    const tee: Equipment = { ...made.placedAt(elevationM, ''), kind: 'tee' };
    made.equipment.push(tee);
    let count = 0;
    const side = (): PipeEnd => ({ equipmentId: tee.id, port: sides[count++ % 4]! });
    for (const { pipe, side: which } of pipes) pipe[which] = side();
    for (const { end } of its) {
      const [from, to] = end.port === 'out' ? [end, side()] : [side(), end];
      made.pipes.push({ ...joint, id: newId(), from, to, circuit: 'supply', bends: [] });
    }
    ends.set(node, { equipmentId: tee.id, port: 'n' });
  }
  return ends;
}

/** Links that stand closed get a closed isolating valve before them; a plain Kv is one itself. */
function withClosingValves(links: NetworkLink[], elevationOf: Map<string, number>): NetworkLink[] {
  return links.flatMap((link): NetworkLink[] => {
    if (!link.closed || (link.kind === 'resistance' && link.kv !== undefined)) return [link];
    const node = `${link.id} closed`;
    elevationOf.set(node, elevationOf.get(link.from) ?? 0);
    return [
      { id: node, kind: 'resistance', kv: CLOSING_KV, closed: true, from: link.from, to: node },
      { ...link, closed: false, from: node },
    ];
  });
}

/** Terminals with the strainer and control valve before them and the balancing valve behind, where nothing else joins between. */
function unitChains(links: NetworkLink[], held: Set<string>): UnitChain[] {
  const at = new Map<string, NetworkLink[]>();
  for (const link of links) for (const node of [link.from, link.to]) at.set(node, [...(at.get(node) ?? []), link]);
  const taken = new Set<string>();
  /** The only other link at a node, where the water comes from it or goes on into it. */
  const next = (link: NetworkLink, node: string, way: 'from' | 'to'): NetworkLink | null => {
    const others = (at.get(node) ?? []).filter((it) => it !== link);
    const [only] = others;
    return !held.has(node) && others.length === 1 && only && only[way] === node && !only.closed && !taken.has(only.id) ? only : null;
  };
  return links.flatMap((coil): UnitChain[] => {
    if (coil.kind !== 'terminal' || coil.closed) return [];
    const chain: UnitChain = { coil };
    let before = next(coil, coil.from, 'to');
    if (before?.kind === 'controlValve') {
      chain.control = before;
      before = next(before, before.from, 'to');
    }
    if (before?.kind === 'resistance' && before.kv !== undefined) chain.strainer = before;
    const behind = next(coil, coil.to, 'from');
    if (behind?.kind === 'balancingValve') chain.balancing = behind;
    for (const link of Object.values(chain)) taken.add((link as NetworkLink).id);
    return [chain];
  });
}

const nowhere: PipeEnd = { equipmentId: '', port: 'n' };

function pipeOf({ series, boreMm, roughnessMm, lengthM, minorK }: PipeLink): DrawingPipe {
  const nominal = series ? (pipeSeries[series].sizes.find((size) => size.boreMm === boreMm)?.nominal ?? null) : null;
  return {
    ...{ id: newId(), lengthM, boreMm, roughnessMm, minorK: minorK ?? 0 },
    series: nominal ? series! : null,
    nominal,
    from: nowhere,
    to: nowhere,
    circuit: 'supply',
    bends: [],
  };
}

/** A mean temperature says nothing of supply and return: the usual difference of its service is put about it. */
function fluidOf({ fluid }: NetworkDocument, notes: string[]): DrawingFluid {
  if (fluid.medium === 'custom') {
    notes.push('fluid: a fluid of its own is taken as water at 20 °C.');
    return { medium: 'water', massFraction: 0, supplyC: 17, returnC: 23 };
  }
  const { temperatureC } = fluid;
  const [supplyC, returnC] = temperatureC < 30 ? [temperatureC - 3, temperatureC + 3] : [temperatureC + 10, temperatureC - 10];
  return { medium: fluid.medium, massFraction: fluid.medium === 'water' ? 0 : fluid.massFraction, supplyC, returnC };
}

/** A tag is what people read; an id made by a machine is none. */
const tagOf = (id: string) => (/^[0-9a-f-]{36}/i.test(id) ? '' : id.replace(/:coil$/, ''));

function withTags(drawing: Drawing): Drawing {
  const taken = new Set<string>();
  const equipment = drawing.equipment.map((piece): Equipment => {
    const tag = piece.tag && !taken.has(piece.tag) ? piece.tag : nextTag(drawing, piece, taken);
    taken.add(tag);
    return { ...piece, tag };
  });
  return { ...drawing, equipment };
}

/** Return is what the outlets of the coils lead to before anything that drives, heats or cools; all else is supply. */
function withCircuits(drawing: Drawing): Drawing {
  const graph = drawnGraph(drawing);
  const back = new Set<string>();
  const isInLine = ({ kind }: Equipment) => kind !== 'terminalUnit' && kind !== 'source' && kind !== 'pump';
  for (const unit of drawing.equipment) {
    if (unit.kind !== 'terminalUnit' || graph.pipesAt.get(`${unit.id}.out`)?.every(({ id }) => back.has(id))) continue;
    for (const id of reach(graph, { equipmentId: unit.id, port: 'out' }, isInLine).pipes) back.add(id);
  }
  return { ...drawing, pipes: drawing.pipes.map((pipe) => (back.has(pipe.id) ? { ...pipe, circuit: 'return' } : pipe)) };
}
