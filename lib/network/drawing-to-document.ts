import type { NetworkDocument, NetworkLink, NetworkNode } from '@/lib/hydraulics/types';
import {
  portsOf,
  type ChosenValve,
  type Drawing,
  type DrawingPipe,
  type Equipment,
  type PipeEnd,
  type Place,
  type TerminalUnit,
} from './drawing';
import { faultsOf } from './drawing-faults';
import type { Fault } from './fault';

export interface DrawnNetwork {
  /** Null while a fault of severity `error` stands. */
  document: NetworkDocument | null;
  faults: Fault[];
}

/** Link ids of the pieces inside a terminal unit, in the order of flow. */
export const unitLinks = ['strainer', 'control', 'coil', 'balancing'] as const;
export type UnitLink = (typeof unitLinks)[number];

export const unitLinkId = (equipmentId: string, part: UnitLink) => `${equipmentId}:${part}`;

/** Where an id of the document is drawn. A node's is its piece's, with the port behind a dot; a link's has its part behind a colon. */
export function placeFinder(drawing: Drawing): (id: string | undefined) => Place {
  // A large drawing can have as many faults as pipes: each must not look through all of them.
  const pipes = new Set(drawing.pipes.map((pipe) => pipe.id));
  return (id) => {
    if (!id) return { kind: 'equipment', id: drawing.equipment[0]?.id ?? '' };
    return pipes.has(id) ? { kind: 'pipe', id } : { kind: 'equipment', id: id.split(/[.:]/)[0] };
  };
}

/** The point of the network at which a pipe end stands: all sides of a tee or header are one point. */
export const nodeIdOf = (end: PipeEnd): string =>
  end.port === 'in' || end.port === 'out' ? `${end.equipmentId}.${end.port}` : end.equipmentId;

/**
 * The network document (strict, solvable) of a drawing, and what keeps it from being one. Every length, bore and Kv is
 * taken as drawn; nothing is guessed. Elevations are those of the storeys.
 */
export function drawingToDocument(drawing: Drawing, name: string): DrawnNetwork {
  const faults = faultsOf(drawing);
  if (faults.some((fault) => fault.severity === 'error')) return { document: null, faults };

  const elevationOf = new Map(drawing.storeys.map((storey) => [storey.id, storey.elevationM]));
  const nodes: NetworkNode[] = [];
  const links: NetworkLink[] = [];
  for (const piece of drawing.equipment) {
    const elevationM = (piece.storeyId && elevationOf.get(piece.storeyId)) || 0;
    const made = linksOf(piece);
    const ids = new Set(made.flatMap((link) => [link.from, link.to]));
    if (ids.size === 0) ids.add(nodeIdOf({ equipmentId: piece.id, port: portsOf(piece.kind)[0]! }));
    for (const id of ids) nodes.push({ id, elevationM });
    links.push(...made);
  }
  for (const pipe of drawing.pipes) links.push(pipeLink(pipe));

  const vessel = drawing.equipment.find((piece) => piece.kind === 'expansionVessel');
  const { medium, massFraction, supplyC, returnC } = drawing.fluid;
  const temperatureC = (supplyC + returnC) / 2;
  return {
    faults,
    document: {
      format: 'network/1',
      name,
      // Friction is that of the mean temperature: half of the pipes carry supply, half return.
      fluid: medium === 'water' ? { medium, temperatureC } : { medium, temperatureC, massFraction },
      ...(vessel && {
        reference: { node: nodeIdOf({ equipmentId: vessel.id, port: 'in' }), gaugePressureKpa: vessel.gaugePressureKpa ?? 0 },
      }),
      nodes,
      links,
      options: { pumpExcess: drawing.pumpExcess },
    },
  };
}

function pipeLink(pipe: DrawingPipe): NetworkLink {
  return {
    id: pipe.id,
    kind: 'pipe',
    from: nodeIdOf(pipe.from),
    to: nodeIdOf(pipe.to),
    lengthM: pipe.lengthM!,
    boreMm: pipe.boreMm!,
    roughnessMm: pipe.roughnessMm!,
    minorK: pipe.minorK,
  };
}

/** The links inside one piece. `faultsOf` has already made sure that what a law needs is there. */
function linksOf(piece: Equipment): NetworkLink[] {
  const ends = { id: piece.id, from: `${piece.id}.in`, to: `${piece.id}.out` };
  switch (piece.kind) {
    case 'pump':
      return [
        {
          ...ends,
          kind: 'pump',
          curve: piece.curve,
          speed: piece.speed,
          nonReturn: piece.hasNonReturn,
          ...(piece.efficiency.length ? { efficiency: piece.efficiency } : {}),
        },
      ];
    case 'source':
      return [{ ...ends, kind: 'resistance', designFlowLs: piece.designFlowLs!, designDropKpa: piece.designDropKpa! }];
    case 'terminalUnit':
      return linksOfUnit(piece);
    case 'balancingValve':
      return [{ ...ends, kind: 'balancingValve', ...balancing(piece.valve) }];
    case 'controlValve':
      return [{ ...ends, kind: 'controlValve', kvs: piece.kvs!, characteristic: piece.characteristic, opening: piece.opening }];
    case 'checkValve':
      return [{ ...ends, kind: 'checkValve', kv: piece.kv! }];
    case 'isolatingValve':
      return [{ ...ends, kind: 'resistance', kv: piece.kv!, closed: piece.isClosed }];
    case 'strainer':
      return [{ ...ends, kind: 'resistance', kv: piece.kv! }];
    case 'dpController': {
      const own: PipeEnd = { equipmentId: piece.id, port: 'in' };
      const sense: [string, string] = [nodeIdOf(piece.senseHigh ?? own), nodeIdOf(piece.senseLow ?? own)];
      return [{ ...ends, kind: 'dpController', setpointKpa: piece.setpointKpa!, kvs: piece.kvs!, sense }];
    }
    case 'flowLimiter':
      return [{ ...ends, kind: 'flowLimiter', limitLs: piece.limitLs!, minDropKpa: piece.minDropKpa! }];
    case 'decoupler': {
      const { lengthM, boreMm, roughnessMm, minorK } = piece;
      return [{ ...ends, kind: 'pipe', lengthM: lengthM!, boreMm: boreMm!, roughnessMm: roughnessMm!, minorK }];
    }
    case 'flowStation':
      return [{ ...ends, kind: 'resistance', kv: (piece.lossKv ?? piece.signalKv)! }];
    case 'tee':
    case 'header':
    case 'pressureStation':
    case 'expansionVessel':
      return [];
  }
}

const balancing = ({ kvTable, settingTurns, isLocked, stepTurns }: ChosenValve) => ({
  kvTable: kvTable.map(({ setting, kv }) => ({ setting, kv })),
  ...(settingTurns === null ? {} : { setting: settingTurns }),
  locked: isLocked,
  ...(stepTurns ? { settingStep: stepTurns } : {}),
});

function linksOfUnit(unit: TerminalUnit): NetworkLink[] {
  const parts: Partial<Record<UnitLink, (ends: { id: string; from: string; to: string }) => NetworkLink>> = {
    coil: (ends) => ({
      ...ends,
      kind: 'terminal',
      designFlowLs: unit.designFlowLs!,
      designDropKpa: unit.coilDropKpa!,
      ...(unit.loadKw === null ? {} : { loadKw: unit.loadKw }),
    }),
  };
  const { strainerKv, controlValve, balancingValve } = unit;
  if (strainerKv !== null) parts.strainer = (ends) => ({ ...ends, kind: 'resistance', kv: strainerKv });
  if (controlValve)
    parts.control = (ends) => ({
      ...ends,
      kind: 'controlValve',
      kvs: controlValve.kvs!,
      characteristic: controlValve.characteristic,
      opening: controlValve.opening,
    });
  if (balancingValve) parts.balancing = (ends) => ({ ...ends, kind: 'balancingValve', ...balancing(balancingValve) });

  const present = unitLinks.filter((part) => parts[part]);
  return present.map((part, at) =>
    parts[part]!({
      id: unitLinkId(unit.id, part),
      from: at === 0 ? `${unit.id}.in` : `${unit.id}.${present[at]}`,
      to: at === present.length - 1 ? `${unit.id}.out` : `${unit.id}.${present[at + 1]}`,
    }),
  );
}
