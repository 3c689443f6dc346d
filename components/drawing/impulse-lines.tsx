'use client';

import type { EquipmentOf, PipeEnd } from '@/lib/network/drawing';
import { pieceOf, portPlace } from '@/lib/network/piece-geometry';
import { useDrawing } from './editor-context';

/** Thin dashed lines from a differential pressure controller to the points that it holds apart. */
export function ImpulseLines({ controller }: { controller: EquipmentOf<'dpController'> }) {
  return (
    <>
      {[controller.senseHigh, controller.senseLow].map(
        (end, i) => end && <Line key={i} from={controller} end={end} sign={i === 0 ? '+' : '−'} />,
      )}
    </>
  );
}

/** From the top of the diaphragm, along the sheet, to a point elsewhere; about the centre of the controller. */
function Line({ from, end, sign }: { from: EquipmentOf<'dpController'>; end: PipeEnd; sign: string }) {
  const piece = useDrawing((drawing) => pieceOf(drawing, end.equipmentId));
  if (!piece) return null;
  const place = portPlace(piece, end.port);
  const [x, y] = [place.x - from.x, place.y - from.y];
  return (
    <>
      <path d={`M0 0H${x}V${y}`} fill="none" stroke="var(--quiet)" strokeWidth="calc(1px * var(--lines, 1))" strokeDasharray="2 3" />
      <text x={x + 4} y={y - 5} className="fill-quiet figures" fontSize={10}>
        {sign}
      </text>
    </>
  );
}
