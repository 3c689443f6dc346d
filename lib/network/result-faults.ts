import type { BalanceResult, SolveResult } from '@/lib/hydraulics/types';
import type { Drawing, Equipment, Place } from './drawing';
import { figuresOfDrawing, type DrawnFigures } from './drawing-figures';
import { at, nameOf, type Fault } from './fault';
import { pieceNames } from './piece-names';
import { limitFor } from './pipe-limits';
import { digits } from './working';

/** Below this a balancing valve cannot be read well; widely taught, no source. */
export const LEAST_READING_KPA = 3;
/** Below this a control valve no longer controls; the usual range for sizing is 0.3 to 0.5. */
export const LEAST_AUTHORITY = 0.3;
/** How far a flow may be from design before its branch is called unbalanced, per cent. */
export const MOST_DEVIATION_PERCENT = 10;
/** L/s; less than this flows nowhere. */
const STILL_LS = 1e-4;

interface Solved {
  solve: SolveResult | null;
  balance: BalanceResult | null;
}

/** What the flows tell: limits of pipes, valves that cannot be read or do not control, water that runs backwards, what is not balanced. */
export function resultFaults(drawing: Drawing, solved: Solved): Fault[] {
  const drawn = figuresOfDrawing(drawing, solved, 'drawn');
  const isReached = solved.balance?.converged && solved.balance.terminals.length > 0;
  const design = isReached ? figuresOfDrawing(drawing, solved, 'balanced') : null;
  const decisive = design ?? drawn;
  return [
    ...(decisive ? pipeFaults(drawing, decisive) : []),
    ...(design ? valveFaults(drawing, design) : []),
    ...(decisive ? backwardFaults(drawing, decisive) : []),
    ...(drawn && design ? balanceFaults(drawing, drawn) : []),
  ];
}

const warning = (code: string, message: string, place: Place): Fault => ({ code, severity: 'warning', message, place });

function pipeFaults(drawing: Drawing, { pipes }: DrawnFigures): Fault[] {
  const names = pieceNames(drawing);
  return drawing.pipes.flatMap((pipe) => {
    const figures = pipes.get(pipe.id);
    if (!figures || pipe.boreMm === null) return [];
    const { maxVelocityMs, maxPaPerM } = limitFor(drawing, pipe.boreMm);
    const over = [
      figures.velocityMs > maxVelocityMs && `${digits(figures.velocityMs)} m/s (at most ${digits(maxVelocityMs)})`,
      figures.paPerM > maxPaPerM && `${digits(figures.paPerM)} Pa/m (at most ${digits(maxPaPerM)})`,
    ].filter((it) => it !== false);
    if (over.length === 0) return [];
    const message = `${names.get(pipe.id)}, ${pipe.nominal ?? `bore ${digits(pipe.boreMm)} mm`}: ${over.join(', ')} at ${digits(Math.abs(figures.flowLs))} L/s.`;
    return [warning('pipe-limit', message, { kind: 'pipe', id: pipe.id })];
  });
}

/** Valves at design flow and at the settings of the balance. */
function valveFaults(drawing: Drawing, { pieces }: DrawnFigures): Fault[] {
  return drawing.equipment.flatMap((piece) => {
    const { valve, authority } = pieces.get(piece.id) ?? { valve: null, authority: null };
    const faults: Fault[] = [];
    if (valve && valve.flowLs !== 0 && valve.dropKpa < LEAST_READING_KPA) {
      const message = `${nameOf(piece)}: ${digits(valve.dropKpa)} kPa over its balancing valve at design flow, too little to be read well (at least ${LEAST_READING_KPA} kPa).`;
      faults.push(warning('valve-signal', message, at(piece)));
    }
    if (authority !== null && authority < LEAST_AUTHORITY) {
      const message = `${nameOf(piece)}: its control valve has an authority of ${authority.toFixed(2)}, under ${LEAST_AUTHORITY}.`;
      faults.push(warning('authority', message, at(piece)));
    }
    return faults;
  });
}

function backwardFaults(drawing: Drawing, { pieces, pipes }: DrawnFigures): Fault[] {
  const names = pieceNames(drawing);
  const through = (piece: Equipment) => pieces.get(piece.id)?.flowLs ?? 0;
  return [
    ...drawing.equipment
      .filter((piece) => piece.kind !== 'decoupler' && through(piece) < -STILL_LS)
      .map((piece) =>
        warning('flow-backwards', `Water runs backwards through ${nameOf(piece)}: ${digits(-through(piece))} L/s.`, at(piece)),
      ),
    ...drawing.pipes
      .filter(({ id, circuit }) => circuit === 'supply' && (pipes.get(id)?.flowLs ?? 0) < -STILL_LS)
      .map(({ id }) =>
        warning('supply-backwards', `Supply runs against the way that ${names.get(id)?.replace(/^Pipe/, 'pipe')} is drawn.`, {
          kind: 'pipe',
          id,
        }),
      ),
  ];
}

/** With the valves as drawn: each storey whose terminals, and each branch valve that, miss their design flow. */
function balanceFaults(drawing: Drawing, { pieces }: DrawnFigures): Fault[] {
  const misses = (piece: Equipment) => {
    const percent = pieces.get(piece.id)?.percentOfDesign ?? null;
    return percent !== null && Math.abs(percent - 100) > MOST_DEVIATION_PERCENT ? Math.abs(percent - 100) : 0;
  };
  const faults: Fault[] = [];
  for (const storeyId of new Set(drawing.equipment.map((piece) => piece.storeyId))) {
    const units = drawing.equipment.filter((piece) => piece.kind === 'terminalUnit' && piece.storeyId === storeyId);
    const off = units.filter((unit) => misses(unit) > 0);
    if (off.length === 0) continue;
    const worst = off.reduce((a, b) => (misses(b) > misses(a) ? b : a));
    const storey = drawing.storeys.find(({ id }) => id === storeyId)?.name;
    const message = `${storey ? `${storey}: ` : ''}${off.length} of ${units.length} terminal units miss their design flow with the valves as drawn, ${nameOf(worst)} with ${digits(pieces.get(worst.id)!.percentOfDesign!)} %.`;
    faults.push(warning('unbalanced', message, at(worst)));
  }
  for (const piece of drawing.equipment) {
    if (piece.kind !== 'balancingValve' || misses(piece) === 0) continue;
    faults.push(
      warning(
        'unbalanced',
        `The branch of ${nameOf(piece)} has ${digits(pieces.get(piece.id)!.percentOfDesign!)} % of its design flow with the valves as drawn.`,
        at(piece),
      ),
    );
  }
  return faults;
}
