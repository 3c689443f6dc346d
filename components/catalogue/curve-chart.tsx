'use client';

import { useId, useState } from 'react';
import { linearTicks, logTicks } from '@/lib/catalogue/axis-ticks';
import type { FittedCurve } from '@/lib/catalogue/pump-fit';
import { useWidth } from './use-width';

export interface ChartCurve extends FittedCurve {
  /** Stands at the end of the line. */
  label?: string;
}

interface CurveChartProps {
  /** What the picture shows, for whoever cannot see it. */
  label: string;
  x: { label: string; unit: string; largest: number };
  y: { label: string; unit: string; isLogarithmic?: boolean };
  curves: ChartCurve[];
  height: number;
}

const LEFT = 46;
const TOP = 22;
const BOTTOM = 34;
const POINT_RADIUS = 3;
const LABEL_HEIGHT = 11;
const LABEL_WIDTH = 44;

/** Lines over their points, with the axes of a survey sheet: hairlines across, figures at the left, the unit above them. */
export function CurveChart({ label, x, y, curves, height }: CurveChartProps) {
  const id = useId();
  const [frame, setFrame] = useState<HTMLDivElement | null>(null);
  const width = useWidth(frame);
  const labels = curves.some((curve) => curve.label);
  const right = labels ? 64 : 14;
  const all = curves.flatMap(({ points, line }) => [...points, ...line]);
  const values = all.map((point) => point.y).filter((value) => !y.isLogarithmic || value > 0);
  if (values.length === 0) return null;
  const ticksX = linearTicks(x.largest || 1);
  const ticksY = y.isLogarithmic ? logTicks(Math.min(...values), Math.max(...values)) : linearTicks(Math.max(...values) || 1);
  const [lowY, highY] = [ticksY[0]!, ticksY.at(-1)!];
  const scale = y.isLogarithmic ? Math.log10 : (value: number) => value;
  const left = (value: number) => LEFT + (value / ticksX.at(-1)!) * (width - LEFT - right);
  const top = (value: number) =>
    height -
    BOTTOM -
    ((scale(Math.max(value, y.isLogarithmic ? lowY : value)) - scale(lowY)) / (scale(highY) - scale(lowY) || 1)) * (height - TOP - BOTTOM);
  const path = (line: { x: number; y: number }[]) =>
    line.map((point, i) => `${i ? 'L' : 'M'}${left(point.x).toFixed(1)} ${top(point.y).toFixed(1)}`).join('');

  const labelled = apart(curves, (curve) => ({ left: left(curve.line.at(-1)!.x), top: top(curve.line.at(-1)!.y) }));

  return (
    <div ref={setFrame} style={{ height }}>
      {width > 0 && (
        <svg role="img" aria-labelledby={id} width={width} height={height} className="block overflow-visible">
          <title id={id}>{label}</title>
          <g className="text-quiet figures" fontSize={11} fill="currentColor">
            {ticksY.map((tick) => (
              <g key={tick}>
                <line x1={LEFT} x2={width - right} y1={top(tick)} y2={top(tick)} stroke="var(--rule)" />
                <text x={LEFT - 8} y={top(tick) + 4} textAnchor="end">
                  {tick}
                </text>
              </g>
            ))}
            {ticksX.map((tick) => (
              <text key={tick} x={left(tick)} y={height - BOTTOM + 16} textAnchor="middle">
                {tick}
              </text>
            ))}
          </g>
          <g className="text-quiet font-sans" fontSize={11} fill="currentColor">
            <text x={0} y={10}>
              <tspan className="fill-ink" fontWeight={600}>
                {y.label}
              </tspan>
              {` ${y.unit}`}
            </text>
            <text x={width - right} y={height - 3} textAnchor="end">
              {x.label}, {x.unit}
            </text>
          </g>
          {curves.map((curve, index) => (
            <g key={curve.label ?? index}>
              <path d={path(curve.line)} fill="none" stroke="var(--petrol)" strokeWidth={1.5} strokeLinejoin="round" />
              {curve.points.map((point) => (
                <circle
                  key={point.x}
                  cx={left(point.x)}
                  cy={top(point.y)}
                  r={POINT_RADIUS}
                  fill="var(--sheet)"
                  stroke="var(--brass)"
                  strokeWidth={1.5}
                />
              ))}
            </g>
          ))}
          {curves
            .filter((curve) => curve.label && labelled.has(curve))
            .map(({ label, line }) => (
              <text
                key={label}
                x={left(line.at(-1)!.x) + 7}
                y={top(line.at(-1)!.y) + 4}
                fontSize={11}
                className="fill-ink font-sans"
                fontWeight={600}
                // A rim of paper, over all curves, keeps their lines out of the letters.
                stroke="var(--sheet)"
                strokeWidth={3}
                paintOrder="stroke"
              >
                {label}
              </text>
            ))}
        </svg>
      )}
    </div>
  );
}

/** The curves whose labels can be read: of two that would stand on each other, the one of the larger valve or pump. */
function apart(curves: ChartCurve[], endOf: (curve: ChartCurve) => { left: number; top: number }): Set<ChartCurve> {
  const shown = new Map<ChartCurve, { left: number; top: number }>();
  for (const curve of curves.filter(({ line }) => line.length > 0).reverse()) {
    const end = endOf(curve);
    const isFree = [...shown.values()].every(
      (other) => Math.abs(other.top - end.top) > LABEL_HEIGHT || Math.abs(other.left - end.left) > LABEL_WIDTH,
    );
    if (isFree) shown.set(curve, end);
  }
  return new Set(shown.keys());
}
