import type { Stroke } from '@/lib/network/symbol-shapes';

const fills = { sheet: 'var(--symbol-fill, var(--paper))', ink: 'currentColor' };

/** The lines of a symbol, 1.5 px in the colour of the text, to be drawn inside an svg about the centre of the piece. */
export const Strokes = ({ strokes }: { strokes: Stroke[] }) => (
  <g stroke="currentColor" strokeWidth="calc(1.5px * var(--lines, 1))" strokeLinejoin="round" strokeLinecap="round">
    {strokes.map(({ d, fill, dash, isBrass }) => (
      <path key={d} d={d} fill={fill ? fills[fill] : 'none'} strokeDasharray={dash} stroke={isBrass ? 'var(--brass)' : undefined} />
    ))}
  </g>
);
