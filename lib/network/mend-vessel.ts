import { connect } from './connect-pipe';
import type { Drawing } from './drawing';
import { newPiece } from './new-piece';
import { firstPipeFigures } from './pipe-choice';
import { labelPlace, nearestOnRoute, routeOfPipe } from './pipe-route';
import { insertTee } from './split-pipe';

/** Above the pipe that it hangs on, drawing units. */
const HANGS_AT = 60;

/** An expansion vessel on a tee in the pipe to the pump's inlet, where the pressure of a loop is usually held. Null where no pipe leads there. */
export function addVessel(drawing: Drawing, pumpId: string): Drawing | null {
  const pipe = drawing.pipes.find(({ from, to }) => [from, to].some(({ equipmentId, port }) => equipmentId === pumpId && port === 'in'));
  const path = pipe && routeOfPipe(pipe, new Map(drawing.equipment.map((piece) => [piece.id, piece])));
  if (!pipe || !path) return null;
  const { drawing: withTee, tee } = insertTee(drawing, { pipe, at: nearestOnRoute(path, labelPlace(path)) });
  const vessel = newPiece(withTee, 'expansionVessel', { x: tee.x, y: tee.y - HANGS_AT });
  const withVessel = { ...withTee, equipment: [...withTee.equipment, vessel] };
  // Nothing flows in the vessel's pipe: any length will do, and a metre is a fair one.
  const made = connect(
    withVessel,
    { equipmentId: vessel.id, port: 'in' },
    { equipmentId: tee.id, port: 'n' },
    { ...firstPipeFigures, lengthM: 1 },
  );
  return 'refused' in made ? null : made.drawing;
}
