import { circuitAt, isPoint, type Drawing, type DrawingPipe, type Equipment, type PipeEnd, type Place } from './drawing';
import { at, nameOf, type Fault } from './fault';
import { drawnGraph, reach, type DrawnGraph } from './drawn-graph';

/** What the way the pieces are joined tells, whatever flows: pumps the wrong way, supply joined to return, what a loop must have. */
export function layoutFaults(drawing: Drawing): Fault[] {
  const pumps = drawing.equipment.filter(({ kind }) => kind === 'pump');
  if (pumps.length === 0) {
    const place: Place = { kind: 'equipment', id: drawing.equipment[0]!.id };
    return [
      { code: 'no-pump', severity: 'warning', message: 'The loop has no pump: nothing will flow.', place },
      ...shortCircuits(drawing),
    ];
  }
  const graph = drawnGraph(drawing);
  const faults = pumps
    .filter((pump) => standsBackwards(graph, pump))
    .map((pump): Fault => ({
      code: 'pump-backwards',
      severity: 'warning',
      message: `${nameOf(pump)} stands the wrong way: its outlet leads to where water comes back.`,
      place: at(pump),
    }));
  if (drawing.pipes.length > 0 && !drawing.equipment.some(({ kind }) => kind === 'expansionVessel')) {
    faults.push({
      code: 'no-vessel',
      severity: 'warning',
      message: 'The loop has no expansion vessel: nothing holds its pressure, and gauge pressures count from 0.',
      place: at(pumps[0]!),
    });
  }
  return [...faults, ...shortCircuits(drawing)];
}

/** All that the outlet leads to before it meets a coil, source or pump takes water away, all that the inlet leads to gives it. */
function standsBackwards(graph: DrawnGraph, pump: Equipment): boolean {
  const met = (port: PipeEnd['port']) => {
    const kinds = new Set<'takes' | 'gives'>();
    for (const { piece, port: its } of reach(graph, { equipmentId: pump.id, port }, isInLine).ends) {
      if (piece.kind === 'terminalUnit' || piece.kind === 'source') kinds.add(its === 'in' ? 'takes' : 'gives');
    }
    return kinds;
  };
  const [out, inlet] = [met('out'), met('in')];
  const isWrong = (found: Set<string>, wrong: string) => found.size === 1 && found.has(wrong);
  return (isWrong(out, 'gives') && !isWrong(inlet, 'gives')) || (isWrong(inlet, 'takes') && !isWrong(out, 'takes'));
}

/** What water goes through on its way without being driven, heated or cooled. */
const isInLine = ({ kind }: Equipment) => kind !== 'terminalUnit' && kind !== 'source' && kind !== 'pump' && kind !== 'decoupler';

/** What lets water through unthrottled: a bypass through a valve that is set or controlled is meant to be there. */
const isOpenWay = (piece: Equipment) =>
  ['tee', 'header', 'pressureStation', 'flowStation', 'strainer', 'checkValve', 'expansionVessel'].includes(piece.kind) ||
  (piece.kind === 'isolatingValve' && !piece.isClosed);

/** Open ways from the supply side of the coils to their return side, past no decoupler. */
function shortCircuits(drawing: Drawing): Fault[] {
  const graph = drawnGraph(drawing);
  const seen = new Set<string>();
  const faults: Fault[] = [];
  for (const unit of drawing.equipment) {
    if (unit.kind !== 'terminalUnit' || seen.has(`${unit.id}.in`)) continue;
    const { ends, pipes } = reach(graph, { equipmentId: unit.id, port: 'in' }, isOpenWay);
    const coils = ends.filter(({ piece }) => piece.kind === 'terminalUnit');
    for (const { piece, port } of coils) seen.add(`${piece.id}.${port}`);
    const circuits = new Set(coils.map(({ piece, port }) => circuitAt(piece.kind, port)));
    // Two coils one behind the other are a series, no short circuit.
    if (circuits.size < 2 || coils.length <= 2) continue;
    const joining = joiningPipe(drawing, pipes) ?? pipes.at(-1);
    if (!joining) continue;
    faults.push({
      code: 'short-circuit',
      severity: 'warning',
      message: 'Supply is joined to return with no decoupler, valve or coil between: water takes the short way.',
      place: { kind: 'pipe', id: joining },
    });
  }
  return faults;
}

/** The pipe at which one side goes over into the other: the only one of its circuit at a joint of pipes of the other. */
function joiningPipe(drawing: Drawing, among: string[]): string | undefined {
  const joints = new Set(drawing.equipment.filter(({ kind }) => isPoint(kind)).map(({ id }) => id));
  const pipesAt = new Map<string, DrawingPipe[]>();
  for (const pipe of drawing.pipes) {
    for (const { equipmentId } of [pipe.from, pipe.to]) {
      if (joints.has(equipmentId)) pipesAt.set(equipmentId, [...(pipesAt.get(equipmentId) ?? []), pipe]);
    }
  }
  const ids = new Set(among);
  const isOdd = (pipe: DrawingPipe, joint: string) => {
    const others = (pipesAt.get(joint) ?? []).filter(({ id }) => id !== pipe.id);
    return others.length > 1 && others.every(({ circuit }) => circuit !== pipe.circuit);
  };
  return drawing.pipes.find((pipe) => ids.has(pipe.id) && (isOdd(pipe, pipe.from.equipmentId) || isOdd(pipe, pipe.to.equipmentId)))?.id;
}
