import { v7 as newId } from 'uuid';
import type { ChosenValve, Drawing, Equipment, EquipmentKind } from './drawing';
import type { Point } from './piece-geometry';
import { storeyAt } from './storeys';
import { nextTag } from './tags';

const noValve = (): ChosenValve => ({ name: '', kvTable: [], settingTurns: null, isLocked: false });

type Placed = Pick<Equipment, 'id' | 'tag' | 'storeyId' | 'x' | 'y' | 'rotation' | 'isMirrored'>;

/** A piece with no figures yet: what a calculation needs is left for the designer to say. */
export function blankPiece(kind: EquipmentKind, placed: Placed): Equipment {
  switch (kind) {
    case 'pump':
      return { ...placed, kind, curve: [], efficiency: [], speed: 1, hasNonReturn: true };
    case 'source':
      return { ...placed, kind, sourceKind: 'chiller', designFlowLs: null, designDropKpa: null };
    case 'terminalUnit':
      return {
        ...placed,
        kind,
        room: '',
        loadKw: null,
        designFlowLs: null,
        coilDropKpa: null,
        strainerKv: null,
        controlValve: { kvs: null, characteristic: 'equalPercentage', opening: 1 },
        balancingValve: noValve(),
      };
    case 'balancingValve':
      return { ...placed, kind, valve: noValve() };
    case 'controlValve':
      return { ...placed, kind, kvs: null, characteristic: 'equalPercentage', opening: 1 };
    case 'checkValve':
    case 'strainer':
      return { ...placed, kind, kv: null };
    case 'isolatingValve':
      return { ...placed, kind, kv: null, isClosed: false };
    case 'tee':
    case 'header':
    case 'pressureStation':
      return { ...placed, kind };
    case 'dpController':
      return { ...placed, kind, setpointKpa: null, kvs: null, senseHigh: null, senseLow: null };
    case 'flowLimiter':
      return { ...placed, kind, limitLs: null, minDropKpa: null };
    case 'decoupler':
      return { ...placed, kind, lengthM: null, boreMm: null, roughnessMm: 0.045, minorK: 0 };
    case 'flowStation':
      return { ...placed, kind, signalKv: null, lossKv: null };
    case 'expansionVessel':
      return { ...placed, kind, gaugePressureKpa: null };
  }
}

/**
 * A new piece at a place, in the storey that lies there, with the next free tag. With `like`, its figures and its
 * turn are those of that piece.
 */
export function newPiece(drawing: Drawing, kind: EquipmentKind, { x, y }: Point, like?: Equipment): Equipment {
  const placed: Placed = { id: newId(), tag: '', storeyId: storeyAt(drawing, y)?.id ?? null, x, y, rotation: 0, isMirrored: false };
  const { rotation, isMirrored } = like?.kind === kind ? like : placed;
  const piece: Equipment = like?.kind === kind ? { ...withoutSense(like), ...placed, rotation, isMirrored } : blankPiece(kind, placed);
  return withRoomOfItsOwn({ ...piece, tag: nextTag(drawing, piece) });
}

/** A room is where a unit stands: a copy stands elsewhere. */
export const withRoomOfItsOwn = (piece: Equipment): Equipment => (piece.kind === 'terminalUnit' ? { ...piece, room: '' } : piece);

/** Where the impulse lines of a controller end belongs to its place, not to its make. */
const withoutSense = (piece: Equipment): Equipment =>
  piece.kind === 'dpController' ? { ...piece, senseHigh: null, senseLow: null } : piece;
