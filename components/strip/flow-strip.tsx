import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import { stripGeometry } from '@/lib/commissioning/strip-geometry';

/** Width and height in px of the strip in a list row, in a loop's header and on a page of its own. */
const sizes = {
  row: { width: 160, height: 20, tick: 1.25, mark: 2 },
  header: { width: 248, height: 26, tick: 1.5, mark: 2.5 },
  page: { width: 900, height: 96, tick: 2, mark: 4.5 },
} as const;

const colours = { low: 'var(--low)', within: 'var(--ink)', high: 'var(--high)' } as const;

/**
 * One tick a terminal, near to far: from the design line to its per cent of design, with the tolerance band behind.
 * Low, within and high differ in shape as well as in colour; what is not measured yet is a short stroke on the line.
 */
export function FlowStrip({ ticks, band, size = 'header' }: { ticks: StripTick[]; band: StripBand; size?: keyof typeof sizes }) {
  const { width, height, tick: stroke, mark } = sizes[size];
  if (ticks.length === 0) return null;
  const strip = stripGeometry(ticks, band, { width, height, margin: mark * 1.8 });
  const measured = ticks.filter((tick) => tick.percentOfDesign !== null);
  const within = measured.filter((tick) => tick.verdict === 'within').length;
  const says = measured.length
    ? `${within} of ${ticks.length} terminals within ${band.lowerPercent} to ${band.upperPercent} per cent of design, ${ticks.length - measured.length} not measured`
    : `${ticks.length} terminals, none measured yet`;
  // Across in parts of the width, so that a strip as wide as its page keeps its marks round.
  const across = (x: number) => `${(100 * x) / width}%`;
  return (
    <svg
      role="img"
      aria-label={`Flow strip: ${says}`}
      width={size === 'page' ? '100%' : width}
      height={height}
      className="block max-w-full"
    >
      <rect x={0} width="100%" y={strip.bandTop} height={strip.bandBottom - strip.bandTop} fill="var(--rule)" opacity={0.55} />
      <line x1={0} x2="100%" y1={strip.designY} y2={strip.designY} stroke="var(--brass)" strokeWidth={1} />
      {strip.ticks.map(({ x, y, tick }) => {
        if (y === null || tick.verdict === null || tick.percentOfDesign === null) {
          return (
            <line
              key={tick.tag}
              x1={across(x)}
              x2={across(x)}
              y1={strip.designY - 2.5}
              y2={strip.designY + 2.5}
              stroke="var(--quiet)"
              strokeWidth={1}
            />
          );
        }
        const colour = colours[tick.verdict];
        return (
          <svg key={tick.tag} x={across(x)} y={0} overflow="visible" stroke={colour} fill={colour}>
            <title>{`${tick.tag}: ${tick.percentOfDesign.toFixed(1)} % of design`}</title>
            <line y1={strip.designY} y2={y} strokeWidth={stroke} />
            {tick.verdict === 'within' ? (
              <circle cy={y} r={mark} stroke="none" />
            ) : (
              <path
                stroke="none"
                d={
                  tick.verdict === 'high' ? `M${-mark} ${y + mark}H${mark}L0 ${y - mark}Z` : `M${-mark} ${y - mark}H${mark}L0 ${y + mark}Z`
                }
              />
            )}
          </svg>
        );
      })}
    </svg>
  );
}
