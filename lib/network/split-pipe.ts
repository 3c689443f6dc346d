import { v7 as newId } from 'uuid';
import { isPoint, type Drawing, type DrawingPipe, type Equipment, type EquipmentKind, type Port } from './drawing';
import { newPiece } from './new-piece';
import { portPlace, sideTowards, snap, type Point, type PortPlace } from './piece-geometry';
import { nearestOnRoute, routeOfPipe, type RoutePlace } from './pipe-route';

export interface FoundPipe {
  pipe: DrawingPipe;
  at: RoutePlace;
}

/** The pipe that runs nearest to a point, within a distance on the sheet. */
export function pipeAt(drawing: Drawing, point: Point, within: number, except?: Set<string>): FoundPipe | null {
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  let best: FoundPipe | null = null;
  for (const pipe of drawing.pipes) {
    if (except?.has(pipe.id)) continue;
    const path = routeOfPipe(pipe, pieces);
    if (!path) continue;
    const at = nearestOnRoute(path, point);
    if (at.distance <= within && (!best || at.distance < best.at.distance)) best = { pipe, at };
  }
  return best;
}

const half = (value: number | null) => (value === null ? null : value / 2);

/**
 * Puts a piece that is already on the drawing between the two halves of a pipe. The length and the local losses are
 * shared evenly, so that nothing is lost or gained by it; the first half keeps the pipe's id.
 */
export function splitPipe(drawing: Drawing, pipeId: string, pieceId: string, ends: { into: Port; outOf: Port }, part?: number): Drawing {
  const pipe = drawing.pipes.find(({ id }) => id === pipeId);
  if (!pipe) return drawing;
  const { before, after } = sharedBends(drawing, pipe, pieceId, part);
  const shared = { lengthM: half(pipe.lengthM), minorK: pipe.minorK / 2 };
  const first: DrawingPipe = { ...pipe, ...shared, to: { equipmentId: pieceId, port: ends.into }, bends: before };
  const second: DrawingPipe = { ...pipe, ...shared, id: newId(), from: { equipmentId: pieceId, port: ends.outOf }, bends: after };
  return { ...drawing, pipes: drawing.pipes.flatMap((it) => (it.id === pipeId ? [first, second] : [it])) };
}

/** Each bend stays with the half that runs through it. */
function sharedBends(drawing: Drawing, pipe: DrawingPipe, pieceId: string, part?: number): { before: Point[]; after: Point[] } {
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const path = routeOfPipe(pipe, pieces);
  const piece = pieces.get(pieceId);
  if (!path || !piece || pipe.bends.length === 0) return { before: [], after: [] };
  const cut = part ?? nearestOnRoute(path, piece).part;
  const isBefore = (bend: Point) =>
    path.slice(1).findIndex((corner) => corner.x === bend.x && corner.y === bend.y) < cut &&
    path.some((corner) => corner.x === bend.x && corner.y === bend.y);
  const firstAfter = pipe.bends.findIndex((bend) => !isBefore(bend));
  const at = firstAfter < 0 ? pipe.bends.length : firstAfter;
  return { before: pipe.bends.slice(0, at), after: pipe.bends.slice(at) };
}

/** A tee on a pipe, at a place of its route. */
export function insertTee(drawing: Drawing, { pipe, at }: FoundPipe): { drawing: Drawing; tee: Equipment } {
  const place = at.along.x === 0 ? { x: at.x, y: snap(at.y) } : { x: snap(at.x), y: at.y };
  const tee = newPiece(drawing, 'tee', place);
  const withTee = { ...drawing, equipment: [...drawing.equipment, tee] };
  const ends = { into: sideTowards(at.along, { x: 0, y: 0 }), outOf: sideTowards({ x: 0, y: 0 }, at.along) };
  return { drawing: splitPipe(withTee, pipe.id, tee.id, ends, at.part), tee };
}

/** A vessel hangs on a branch, a header is joined by its places, a decoupler stands between two mains: none goes into a pipe. */
export const goesOnPipe = (kind: EquipmentKind): boolean => !['expansionVessel', 'header', 'decoupler'].includes(kind);

const quarterTurns = [0, 90, 180, 270] as const;

/** Puts a piece with two ends on a pipe: it moves onto the pipe's line and turns so that its outlet looks the pipe's way. */
export function insertOnPipe(drawing: Drawing, pieceId: string, { pipe, at }: FoundPipe): Drawing {
  const piece = drawing.equipment.find(({ id }) => id === pieceId);
  if (!piece || !goesOnPipe(piece.kind)) return drawing;
  const place = at.along.x === 0 ? { x: at.x, y: snap(at.y) } : { x: snap(at.x), y: at.y };
  const isTee = isPoint(piece.kind);
  const rotation = isTee
    ? piece.rotation
    : quarterTurns.find((turn) => looksAlong(portPlace({ ...piece, rotation: turn }, 'out'), at.along));
  const turned: Equipment = { ...piece, ...place, rotation: rotation ?? piece.rotation };
  const moved = { ...drawing, equipment: drawing.equipment.map((it) => (it.id === pieceId ? turned : it)) };
  const ends = isTee
    ? { into: sideTowards(at.along, { x: 0, y: 0 }), outOf: sideTowards({ x: 0, y: 0 }, at.along) }
    : { into: 'in' as const, outOf: 'out' as const };
  return splitPipe(moved, pipe.id, pieceId, ends, at.part);
}

const looksAlong = ({ leaves }: PortPlace, along: Point) => leaves.x === along.x && leaves.y === along.y;
