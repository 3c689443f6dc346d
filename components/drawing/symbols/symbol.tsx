import type { Equipment, EquipmentKind } from '@/lib/network/drawing';
import {
  BalancingValve,
  CheckValve,
  ControlValve,
  ExpansionVessel,
  IsolatingValve,
  Pump,
  Source,
  Strainer,
  Tee,
  TerminalUnit,
} from './shapes';

const shapes = {
  pump: Pump,
  source: Source,
  balancingValve: BalancingValve,
  controlValve: ControlValve,
  checkValve: CheckValve,
  isolatingValve: IsolatingValve,
  strainer: Strainer,
  tee: Tee,
  expansionVessel: ExpansionVessel,
  terminalUnit: TerminalUnit,
} satisfies Record<EquipmentKind, unknown>;

/** The symbol of a piece as it is fitted out; to be drawn inside an svg about its centre. */
export function PieceSymbol({ piece }: { piece: Equipment }) {
  if (piece.kind === 'terminalUnit') {
    return (
      <TerminalUnit
        hasControl={piece.controlValve !== null}
        hasBalancing={piece.balancingValve !== null}
        hasStrainer={piece.strainerKv !== null}
      />
    );
  }
  if (piece.kind === 'isolatingValve') return <IsolatingValve isClosed={piece.isClosed} />;
  const Shape = shapes[piece.kind];
  return <Shape />;
}

/** The symbol of a kind, for the rail of tools. */
export function KindIcon({ kind }: { kind: EquipmentKind }) {
  if (kind === 'terminalUnit') return <UnitIcon />;
  if (kind === 'tee') return <TeeIcon />;
  const Shape = shapes[kind];
  return (
    <svg viewBox="-22 -22 44 44" width={30} height={30} aria-hidden style={{ '--symbol-fill': 'none' } as React.CSSProperties}>
      {kind === 'source' ? (
        <g transform="scale(0.72)">
          <Shape />
        </g>
      ) : (
        <Shape />
      )}
    </svg>
  );
}

const strokes = { fill: 'none', stroke: 'currentColor', strokeWidth: 1.5 };

const UnitIcon = () => (
  <svg viewBox="-22 -22 44 44" width={30} height={30} aria-hidden>
    <path {...strokes} d="M0 -22V-11M0 11V22M-15 -11H15V11H-15Z" />
    <path {...strokes} d="M-8 -5L-4 5L0 -3L4 5L8 -5" />
  </svg>
);

const TeeIcon = () => (
  <svg viewBox="-22 -22 44 44" width={30} height={30} aria-hidden>
    <path {...strokes} d="M-16 0H16M0 0V14" />
    <circle r={3.5} fill="currentColor" />
  </svg>
);
