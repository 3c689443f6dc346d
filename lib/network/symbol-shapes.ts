import type { Equipment } from './drawing';

/**
 * Graphical symbols after ISO 14617, our own drawing, as lines that the canvas, the exported drawing and the rail of tools share: about the
 * centre of the piece, water from left to right (in a terminal unit and a decoupler from the top down), unturned. The sheet shows through no
 * body, so that pipes end at it.
 */
export interface Stroke {
  /** The `d` of an svg path, in drawing units. */
  d: string;
  /** Of a closed line: filled like the sheet, or like the line. */
  fill?: 'sheet' | 'ink';
  dash?: string;
  isBrass?: boolean;
}

const circle = (r: number, x = 0, y = 0) => `M${x - r} ${y}A${r} ${r} 0 1 1 ${x + r} ${y}A${r} ${r} 0 1 1 ${x - r} ${y}Z`;
const box = (x: number, y: number, width: number, height: number) => `M${x} ${y}h${width}v${height}h${-width}Z`;
/** Between the ends of a piece and its symbol. */
const stubs = (to: number, half = 20): Stroke => ({ d: `M${-half} 0H${-to}M${to} 0H${half}` });
const body = (d: string): Stroke => ({ d, fill: 'sheet' });

const valveBody = 'M-12 -8V8L12 -8V8Z';
const stem: Stroke = { d: 'M0 0V-9' };
const dome = body('M-7 -9A7 7 0 0 1 7 -9Z');

const symbols = {
  pump: [stubs(15), body(circle(15)), { d: 'M-7.5 -13L15 0L-7.5 13' }],
  source: [stubs(20, 30), body(box(-20, -13, 40, 26)), { d: 'M-20 13L20 -13' }],
  isolatingValve: [stubs(12), body(valveBody)],
  // A valve that is set and measured: the handwheel above.
  balancingValve: [stubs(12), body(valveBody), { d: 'M0 0V-10M-5 -10H5' }],
  controlValve: [stubs(12), body(valveBody), stem, dome],
  // Self-acting: a diaphragm in its box, no outside power; the impulse lines are drawn to where they end.
  dpController: [stubs(12), body(valveBody), stem, body(box(-8, -18, 16, 9)), { d: 'M-8 -13.5Q0 -9.5 8 -13.5' }],
  // A control valve that holds its flow by itself: the fixed opening below.
  flowLimiter: [stubs(12), body(valveBody), stem, dome, { d: 'M0 0V7' }, body(box(-6, 7, 12, 7)), { d: 'M-3 7V14M3 7V14' }],
  checkValve: [stubs(11), { d: 'M-11 8V-8L11 8V-8' }, { d: circle(2, -11, -8), fill: 'ink' }],
  strainer: [stubs(12), body('M-12 -8H12V8H-12Z'), { d: 'M-12 8L12 -8', dash: '2.5 2.5' }],
  // The dot of a joint; its sides are all one point.
  tee: [{ d: circle(3.5), fill: 'ink' }],
  header: [body(box(-100, -6, 200, 12))],
  decoupler: [{ d: 'M0 -60V-30M0 30V60' }, body(box(-7, -30, 14, 60)), { d: 'M-3 -15L0 -20L3 -15M-3 15L0 20L3 15M0 -20V20' }],
  flowStation: [stubs(12), body(circle(12)), { d: 'M-12 0H-4M4 0H12M-3 -9V-3.5M3 -9V-3.5M-3 9V3.5M3 9V3.5' }],
  pressureStation: [
    { d: circle(2.5), fill: 'ink' },
    { d: 'M0 0V-11' },
    body(circle(8, 0, -19)),
    { d: 'M-2.5 -14.5V-23.5H0.6A2.6 2.6 0 0 1 0.6 -18.3H-2.5' },
  ],
  expansionVessel: [{ d: 'M0 20V12' }, body(circle(12)), { d: 'M-12 0H12' }],
} satisfies Record<Exclude<Equipment['kind'], 'terminalUnit'>, Stroke[]>;

/** Strainer, control valve, coil and balancing valve in one piece, from the top down in the order of flow. */
const unitParts = {
  strainer: [body(box(-5, -54, 10, 8)), { d: 'M-5 -46L5 -54' }],
  control: [body('M-7 -42H7L-7 -20H7Z'), { d: 'M0 -31H8' }, body('M8 -37.5A6.5 6.5 0 0 1 8 -24.5Z')],
  coil: [body(box(-13, -10, 26, 20)), { d: 'M-7 -5L-3.5 5L0 -3L3.5 5L7 -5' }],
  balancing: [{ ...body('M-7.5 21H7.5L-7.5 45H7.5Z'), isBrass: true }],
} satisfies Record<string, Stroke[]>;

/** The symbol of a piece as it is fitted out. */
export function symbolOf(piece: Equipment): Stroke[] {
  if (piece.kind === 'isolatingValve' && piece.isClosed) return [stubs(12), { d: valveBody, fill: 'ink' }];
  if (piece.kind !== 'terminalUnit') return symbols[piece.kind];
  return [
    { d: 'M0 -60V60' },
    ...(piece.strainerKv === null ? [] : unitParts.strainer),
    ...(piece.controlValve ? unitParts.control : []),
    ...unitParts.coil,
    ...(piece.balancingValve ? unitParts.balancing : []),
  ];
}

/** The symbol of a kind, unfitted; a terminal unit's by its coil. */
export const symbolOfKind = (kind: Equipment['kind']): Stroke[] => (kind === 'terminalUnit' ? unitParts.coil : symbols[kind]);
