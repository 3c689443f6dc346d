import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Refusal } from './connect-pipe';
import type { Drawing } from './drawing';
import { unitLinkId } from './drawing-to-document';
import type { Fault } from './fault';
import { takeOverBalance } from './mend-balance';
import { turnAround, turnPipe } from './mend-direction';
import { joinOpenEnds, removeDeadLeg, removePipe, retag } from './mend-ends';
import { flowFromLoad } from './mend-flow';
import { sizePipe } from './mend-pipe-size';
import { isGeneric, smallerBalancingValve, smallerControlValve } from './mend-valve';
import { addVessel } from './mend-vessel';
import { isSeriesId, type PipeFigures } from './pipe-choice';
import { pieceOf } from './piece-geometry';

/** What puts a fault right at a press: the drawing with it done, or why it cannot be. One step of the history. */
export interface Mend {
  label: string;
  apply: (drawing: Drawing) => Drawing | Refusal;
}

interface MendContext {
  /** What new pipes take over. */
  newPipe: PipeFigures;
  balance: BalanceResult | null;
}

/** The one-click mend of a fault; null where only the designer can know. */
export function mendFor({ code, place }: Fault, drawing: Drawing, { newPipe, balance }: MendContext): Mend | null {
  const { id } = place;
  switch (code) {
    case 'tag-repeated':
      return { label: 'Give it the next free tag', apply: (it) => retag(it, id) };
    case 'open-end':
      return (
        joinOpenEnds(drawing, id, newPipe) && { label: 'Join the nearest free end', apply: (it) => joinOpenEnds(it, id, newPipe) ?? it }
      );
    case 'dead-leg':
      return { label: 'Take the dead leg away', apply: (it) => removeDeadLeg(it, id) };
    case 'pipe-end':
    case 'pipe-to-itself':
      return { label: 'Take the pipe away', apply: (it) => removePipe(it, id) };
    case 'pump-backwards':
      return { label: 'Turn the pump around', apply: (it) => turnAround(it, id) };
    case 'supply-backwards':
      return { label: 'Turn the way it is drawn', apply: (it) => turnPipe(it, id) };
    case 'no-vessel':
      return {
        label: 'Add one at the pump’s inlet',
        apply: (it) => addVessel(it, id) ?? { refused: 'No pipe leads to the inlet of the pump yet.' },
      };
    case 'load-flow':
      return { label: 'Take the flow from the load', apply: (it) => flowFromLoad(it, id) };
    case 'pipe-limit':
      return isSeriesId(drawing.pipes.find((pipe) => pipe.id === id)?.series ?? null)
        ? { label: 'Choose the size for it', apply: (it) => sizePipe(it, id) }
        : null;
    case 'unbalanced':
      return balance && { label: 'Take over settings and pump speed of the balance', apply: (it) => takeOverBalance(it, balance) };
    case 'valve-signal':
      return balance && mendSignal(drawing, id, balance);
    case 'authority':
      return balance && mendAuthority(id, balance);
    default:
      return null;
  }
}

function mendSignal(drawing: Drawing, id: string, { valves }: BalanceResult): Mend | null {
  const piece = pieceOf(drawing, id);
  const chosen = piece?.kind === 'balancingValve' ? piece.valve : piece?.kind === 'terminalUnit' ? piece.balancingValve : null;
  const valve = valves.find((it) => it.id === id || it.id === unitLinkId(id, 'balancing'));
  return valve && isGeneric(chosen)
    ? { label: 'Choose a smaller valve', apply: (it) => smallerBalancingValve(it, id, valve.flowLs) }
    : null;
}

function mendAuthority(id: string, { terminals }: BalanceResult): Mend | null {
  const terminal = terminals.find((it) => it.id === unitLinkId(id, 'coil'));
  const authority = terminal?.authority;
  return terminal && authority
    ? { label: 'Choose a smaller control valve', apply: (it) => smallerControlValve(it, id, terminal.designFlowLs, authority) }
    : null;
}
