import type { Equipment } from '@/lib/network/drawing';
import { portOffset } from '@/lib/network/piece-geometry';

/** The petrol band under the index circuit, as wide under pieces as under pipes. */
export const underlay = { stroke: 'var(--petrol)', strokeWidth: 9, strokeOpacity: 0.2, fill: 'none' } as const;

export function IndexUnderlay({ piece }: { piece: Equipment }) {
  const start = portOffset(piece, 'in').at;
  const end = piece.kind === 'expansionVessel' ? start : portOffset(piece, 'out').at;
  return <path {...underlay} d={`M${start.x} ${start.y}L${end.x} ${end.y}`} />;
}
