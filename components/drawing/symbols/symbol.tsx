import type { CSSProperties } from 'react';
import type { Equipment, EquipmentKind } from '@/lib/network/drawing';
import { symbolOf, symbolOfKind, type Stroke } from '@/lib/network/symbol-shapes';
import { Strokes } from './strokes';

/** The symbol of a piece as it is fitted out; to be drawn inside an svg about its centre. */
export const PieceSymbol = ({ piece }: { piece: Equipment }) => <Strokes strokes={symbolOf(piece)} />;

/** Kinds whose symbol does not fit a square, drawn for the rail by what tells them. */
const icons: Partial<Record<EquipmentKind, Stroke[]>> = {
  terminalUnit: [{ d: 'M0 -22V-11M0 11V22M-15 -11H15V11H-15Z' }, { d: 'M-8 -5L-4 5L0 -3L4 5L8 -5' }],
  tee: [{ d: 'M-16 0H16M0 0V14' }, { d: 'M-3.5 0A3.5 3.5 0 1 1 3.5 0A3.5 3.5 0 1 1 -3.5 0Z', fill: 'ink' }],
  header: [{ d: 'M-19 -3H19V4H-19Z' }, { d: 'M-12 -3V-15M0 -3V-15M12 -3V-15M-6 4V15M6 4V15' }],
  decoupler: [{ d: 'M-19 -14H19M-19 14H19M0 -14V14' }, { d: 'M-3.5 -6L0 -11L3.5 -6M-3.5 6L0 11L3.5 6' }],
  pressureStation: [
    { d: 'M-18 13H18M0 13V2' },
    { d: 'M-9 -7A9 9 0 1 1 9 -7A9 9 0 1 1 -9 -7Z' },
    { d: 'M-2.5 -2V-12H1A2.7 2.7 0 0 1 1 -6.5H-2.5' },
  ],
};

/** The symbol of a kind, for the rail of tools. */
export const KindIcon = ({ kind }: { kind: EquipmentKind }) => (
  <svg viewBox="-22 -22 44 44" width={30} height={30} aria-hidden style={{ '--symbol-fill': 'none' } as CSSProperties}>
    <g transform={kind === 'source' ? 'scale(0.72)' : undefined}>
      <Strokes strokes={icons[kind] ?? symbolOfKind(kind)} />
    </g>
  </svg>
);
