import { toast } from 'sonner';
import type { DrawingPipe, EquipmentKind, PipeEnd } from '@/lib/network/drawing';
import { kindNames } from '@/lib/network/fault';
import { connect, freePortTowards } from '@/lib/network/connect-pipe';
import { newPiece } from '@/lib/network/new-piece';
import { pieceOf, snapPoint, type Point } from '@/lib/network/piece-geometry';
import { goesOnPipe, insertOnPipe, insertTee, pipeAt } from '@/lib/network/split-pipe';
import { selectOnly } from './canvas-state';
import type { Editor } from './editor-context';

/** How near to a pipe, in px on the screen, counts as on it. */
export const ON_PIPE_PX = 14;

const tellSplit = (what: string, pipe: DrawingPipe) =>
  toast(
    `${what} put on the pipe. ${pipe.lengthM === null ? 'The pipe has no length yet.' : `Its ${pipe.lengthM} m are shared evenly: ${pipe.lengthM / 2} m each.`}`,
  );

/** A new piece at a point of the sheet; on a pipe it goes between its two halves. One step of the history. */
export function placePiece({ drawingStore, canvasStore }: Editor, kind: EquipmentKind, at: Point, withinUnits: number): void {
  const { drawing, change } = drawingStore.getState();
  const like = canvasStore.getState().isLikeLast && kind !== 'tee' ? drawing.equipment.findLast((piece) => piece.kind === kind) : undefined;
  const found = goesOnPipe(kind) ? pipeAt(drawing, at, withinUnits) : null;
  const piece = newPiece(drawing, kind, snapPoint(at), like);
  change((before) => {
    const added = { ...before, equipment: [...before.equipment, piece] };
    return found ? insertOnPipe(added, piece.id, found) : added;
  });
  if (found) tellSplit(piece.tag || kindNames[kind], found.pipe);
  selectOnly(canvasStore, [piece.id]);
}

/** A piece with free ends that was dragged onto a pipe goes between its two halves. */
export function dropOntoPipe({ drawingStore }: Editor, pieceId: string, withinUnits: number): void {
  const { drawing, change } = drawingStore.getState();
  const piece = pieceOf(drawing, pieceId);
  const isJoined = drawing.pipes.some(({ from, to }) => from.equipmentId === pieceId || to.equipmentId === pieceId);
  if (!piece || isJoined || !goesOnPipe(piece.kind)) return;
  const found = pipeAt(drawing, piece, withinUnits);
  if (!found) return;
  change((before) => insertOnPipe(before, pieceId, found));
  tellSplit(piece.tag || kindNames[piece.kind], found.pipe);
}

/** Joins two ends with a pipe of the last-used figures, or says why not. */
export function joinEnds({ drawingStore, canvasStore }: Editor, a: PipeEnd, b: PipeEnd, bends: Point[] = []): void {
  const made = connect(drawingStore.getState().drawing, a, b, canvasStore.getState().newPipe, bends);
  if ('refused' in made) {
    toast(made.refused);
    return;
  }
  drawingStore.getState().change(() => made.drawing);
  selectOnly(canvasStore, [], [made.pipe.id]);
}

/** Ends a pipe in the middle of another one: a tee there, and the pipe to it, in one step. */
export function joinToPipe(
  { drawingStore, canvasStore }: Editor,
  start: PipeEnd,
  at: Point,
  withinUnits: number,
  bends: Point[] = [],
): boolean {
  const { drawing, change } = drawingStore.getState();
  const own = new Set(
    drawing.pipes
      .filter(({ from, to }) => from.equipmentId === start.equipmentId || to.equipmentId === start.equipmentId)
      .map(({ id }) => id),
  );
  const found = pipeAt(drawing, at, withinUnits, own);
  if (!found) return false;
  const { drawing: withTee, tee } = insertTee(drawing, found);
  const startPiece = pieceOf(withTee, start.equipmentId);
  const end = startPiece && freePortTowards(withTee, tee, bends.at(-1) ?? startPiece);
  if (!end) return false;
  const made = connect(withTee, start, end, canvasStore.getState().newPipe, bends);
  if ('refused' in made) {
    toast(made.refused);
    return true;
  }
  change(() => made.drawing);
  tellSplit(`Tee ${tee.tag}`, found.pipe);
  selectOnly(canvasStore, [], [made.pipe.id]);
  return true;
}

/** What the pipe tool does with a press: begins at an end, adds a corner, or ends the pipe. */
export function pressWithPipeTool(editor: Editor, at: Point, target: { pieceId?: string; end?: PipeEnd }, withinUnits: number): void {
  const { canvasStore, drawingStore } = editor;
  const { pipeStart } = canvasStore.getState();
  const drawing = drawingStore.getState().drawing;
  const piece = target.pieceId ? pieceOf(drawing, target.pieceId) : undefined;
  const end = target.end ?? (piece && freePortTowards(drawing, piece, pipeStart ? (pipeStart.bends.at(-1) ?? at) : at));
  if (piece && !end) {
    toast(`${piece.tag || 'This piece'} has no free end. Press on one of its pipes to branch off with a tee.`);
    return;
  }
  if (!pipeStart) {
    const start = end ?? teeOn(editor, at, withinUnits);
    if (start) canvasStore.setState({ pipeStart: { end: start, bends: [] } });
    else toast('Begin a pipe at the end of a piece, at a tee or on another pipe.');
    return;
  }
  if (end) {
    canvasStore.setState({ pipeStart: null });
    joinEnds(editor, pipeStart.end, end, pipeStart.bends);
  } else if (joinToPipe(editor, pipeStart.end, at, withinUnits, pipeStart.bends)) {
    canvasStore.setState({ pipeStart: null });
  } else {
    canvasStore.setState({ pipeStart: { ...pipeStart, bends: [...pipeStart.bends, snapPoint(at)].slice(0, 20) } });
  }
}

function teeOn({ drawingStore }: Editor, at: Point, withinUnits: number): PipeEnd | null {
  const { drawing, change } = drawingStore.getState();
  const found = pipeAt(drawing, at, withinUnits);
  if (!found) return null;
  const { drawing: withTee, tee } = insertTee(drawing, found);
  change(() => withTee);
  tellSplit(`Tee ${tee.tag}`, found.pipe);
  return { equipmentId: tee.id, port: found.at.along.x === 0 ? 'e' : 's' };
}
