import type { Drawing } from './drawing';
import { mapPieces } from './move-pieces';
import { designFlowOfLoad } from './working';

/** Gives a terminal unit the flow that carries its load between the temperatures of the fluid; four digits, as no load is known better. */
export const flowFromLoad = (drawing: Drawing, pieceId: string): Drawing =>
  mapPieces(drawing, new Set([pieceId]), (piece) => {
    if (piece.kind !== 'terminalUnit' || piece.loadKw === null) return piece;
    const flow = designFlowOfLoad(piece.loadKw, drawing.fluid);
    return 'refused' in flow ? piece : { ...piece, designFlowLs: Number(flow.flowLs.toPrecision(4)) };
  });
