import { isPoint, portsOf, type Drawing } from './drawing';
import { at, kindNames, nameOf, type Fault } from './fault';
import { loadFaults } from './load-faults';
import { missingFigures } from './missing-figures';
import { layoutFaults } from './layout-faults';

/** What a drawing lacks before it can be solved, and what a designer should look at; in the order of the drawing. */
export function faultsOf(drawing: Drawing): Fault[] {
  const faults: Fault[] = [];
  if (drawing.equipment.length === 0) return faults;
  faults.push(...repeatedTags(drawing), ...openEnds(drawing));
  for (const piece of drawing.equipment) faults.push(...missingFigures(piece));
  for (const pipe of drawing.pipes) {
    const lacking = [pipe.lengthM === null && 'length', pipe.boreMm === null && 'size', pipe.roughnessMm === null && 'roughness'].filter(
      (what): what is string => Boolean(what),
    );
    if (lacking.length) {
      faults.push({
        code: 'pipe-data',
        severity: 'error',
        message: `A pipe has no ${lacking.join(' and no ')}.`,
        place: { kind: 'pipe', id: pipe.id },
      });
    }
  }
  faults.push(...senseFaults(drawing), ...layoutFaults(drawing), ...loadFaults(drawing));
  return faults;
}

function repeatedTags(drawing: Drawing): Fault[] {
  const seen = new Set<string>();
  return drawing.equipment.flatMap((piece) => {
    if (!piece.tag || !seen.has(piece.tag)) {
      seen.add(piece.tag);
      return [];
    }
    return [
      {
        code: 'tag-repeated',
        severity: 'error' as const,
        message: `The tag ${piece.tag} stands on more than one piece.`,
        place: at(piece),
      },
    ];
  });
}

/** Ends with no pipe, and pipes whose piece is gone. A tee or header may leave sides free but joins at least two pipes. */
function openEnds(drawing: Drawing): Fault[] {
  const byId = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const joined = new Map<string, number>();
  const faults: Fault[] = [];
  for (const pipe of drawing.pipes) {
    for (const end of [pipe.from, pipe.to]) {
      const piece = byId.get(end.equipmentId);
      if (!piece || !portsOf(piece.kind).includes(end.port)) {
        faults.push({ code: 'pipe-end', severity: 'error', message: 'A pipe ends in nothing.', place: { kind: 'pipe', id: pipe.id } });
        continue;
      }
      const key = isPoint(piece.kind) ? piece.id : `${piece.id}.${end.port}`;
      joined.set(key, (joined.get(key) ?? 0) + 1);
    }
    const only = pipe.from.equipmentId === pipe.to.equipmentId && byId.get(pipe.from.equipmentId);
    if (only && isPoint(only.kind)) {
      faults.push({
        code: 'pipe-to-itself',
        severity: 'error',
        message: `A pipe joins a ${kindNames[only.kind].toLowerCase()} to itself.`,
        place: { kind: 'pipe', id: pipe.id },
      });
    }
  }
  for (const piece of drawing.equipment) {
    if (isPoint(piece.kind)) {
      if ((joined.get(piece.id) ?? 0) < 2) {
        faults.push({
          code: 'dead-leg',
          severity: 'warning',
          message: `${nameOf(piece)} joins fewer than two pipes: a dead leg.`,
          place: at(piece),
        });
      }
      continue;
    }
    for (const port of portsOf(piece.kind)) {
      if (joined.has(`${piece.id}.${port}`)) continue;
      const which = piece.kind === 'expansionVessel' ? 'is not connected' : `has no pipe at its ${port === 'in' ? 'inlet' : 'outlet'}`;
      faults.push({ code: 'open-end', severity: 'error', message: `${nameOf(piece)} ${which}.`, place: at(piece) });
    }
  }
  return faults;
}

/** Impulse lines of differential pressure controllers that end in nothing, or both in the same point. */
function senseFaults(drawing: Drawing): Fault[] {
  const byId = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  return drawing.equipment.flatMap((piece): Fault[] => {
    if (piece.kind !== 'dpController') return [];
    const own = { equipmentId: piece.id, port: 'in' as const };
    const [high, low] = [piece.senseHigh ?? own, piece.senseLow ?? own];
    const isLost = [high, low].some(
      (end) => !portsOf(byId.get(end.equipmentId)?.kind ?? 'tee').includes(end.port) || !byId.has(end.equipmentId),
    );
    const isSame = pointOf(high) === pointOf(low);
    if (!isLost && !isSame) return [];
    const what = isLost ? 'An impulse line ends in nothing' : 'Both impulse lines end in the same point';
    return [{ code: 'sense', severity: 'error', message: `${what}: ${nameOf(piece)} needs two points to hold apart.`, place: at(piece) }];
  });
}

const pointOf = ({ equipmentId, port }: { equipmentId: string; port: string }) =>
  port === 'in' || port === 'out' ? `${equipmentId}.${port}` : equipmentId;
