/**
 * Graphical symbols after ISO 14617, our own drawing: 1.5 px ink lines about the centre of the piece, water from left to
 * right, unturned. The sheet shows through no body, so that pipes end at it.
 */

const body = {
  fill: 'var(--symbol-fill, var(--paper))',
  stroke: 'currentColor',
  strokeWidth: 'calc(1.5px * var(--lines, 1))',
  strokeLinejoin: 'round',
  strokeLinecap: 'round',
} as const;
const line = { ...body, fill: 'none' } as const;

const valve = 'M-12 -8V8L12 -8V8Z';

/** The stubs between the ends of a piece 40 wide and its symbol. */
const Stubs = ({ to, half = 20 }: { to: number; half?: number }) => <path {...line} d={`M${-half} 0H${-to}M${to} 0H${half}`} />;

export const Pump = () => (
  <>
    <Stubs to={15} />
    <circle {...body} r={15} />
    <path {...line} d="M-7.5 -13L15 0L-7.5 13" />
  </>
);

export const Source = () => (
  <>
    <Stubs to={20} half={30} />
    <rect {...body} x={-20} y={-13} width={40} height={26} />
    <path {...line} d="M-20 13L20 -13" />
  </>
);

export const IsolatingValve = ({ isClosed }: { isClosed?: boolean }) => (
  <>
    <Stubs to={12} />
    <path {...body} d={valve} fill={isClosed ? 'currentColor' : body.fill} />
  </>
);

/** A valve that is set and measured: the handwheel above, the two measuring points on its body. */
export const BalancingValve = () => (
  <>
    <Stubs to={12} />
    <path {...body} d={valve} />
    <path {...line} d="M0 0V-10M-5 -10H5" />
  </>
);

export const ControlValve = () => (
  <>
    <Stubs to={12} />
    <path {...body} d={valve} />
    <path {...line} d="M0 0V-9" />
    <path {...body} d="M-7 -9A7 7 0 0 1 7 -9Z" />
  </>
);

export const CheckValve = () => (
  <>
    <Stubs to={11} />
    <path {...line} d="M-11 8V-8L11 8V-8" />
    <circle r={2} cx={-11} cy={-8} fill="currentColor" />
  </>
);

export const Strainer = () => (
  <>
    <Stubs to={12} />
    <path {...body} d="M-12 -8H12V8H-12Z" />
    <path {...line} strokeDasharray="2.5 2.5" d="M-12 8L12 -8" />
  </>
);

/** The dot of a joint; its sides are all one point. */
export const Tee = () => <circle r={3.5} fill="currentColor" />;

export const ExpansionVessel = () => (
  <>
    <path {...line} d="M0 20V12" />
    <circle {...body} r={12} cy={0} />
    <path {...line} d="M-12 0H12" />
  </>
);

/** Control valve, coil and balancing valve in one piece, from the top down in the order of flow. */
export function TerminalUnit({
  hasControl = true,
  hasBalancing = true,
  hasStrainer = false,
}: {
  hasControl?: boolean;
  hasBalancing?: boolean;
  hasStrainer?: boolean;
}) {
  return (
    <>
      <path {...line} d="M0 -60V60" />
      {hasStrainer && (
        <g transform="translate(0 -50)">
          <rect {...body} x={-5} y={-4} width={10} height={8} />
          <path {...line} d="M-5 4L5 -4" />
        </g>
      )}
      {hasControl && (
        <g transform="translate(0 -31)">
          <path {...body} d="M-7 -11H7L-7 11H7Z" />
          <path {...line} d="M0 0H8" />
          <path {...body} d="M8 -6.5A6.5 6.5 0 0 1 8 6.5Z" />
        </g>
      )}
      <rect {...body} x={-13} y={-10} width={26} height={20} />
      <path {...line} d="M-7 -5L-3.5 5L0 -3L3.5 5L7 -5" />
      {hasBalancing && (
        <g transform="translate(0 33)" color="var(--brass)">
          <path {...body} d="M-7.5 -12H7.5L-7.5 12H7.5Z" />
        </g>
      )}
    </>
  );
}
