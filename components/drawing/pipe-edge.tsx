'use client';

import { memo } from 'react';
import type { EdgeProps } from 'reactflow';
import type { DrawingPipe } from '@/lib/network/drawing';
import type { PipeSolution } from '@/lib/network/drawing-figures';
import type { Point } from '@/lib/network/piece-geometry';
import type { Hop } from '@/lib/network/pipe-crossings';
import { labelPlace } from '@/lib/network/pipe-route';
import { formatQuantity } from '@/lib/units/format-quantity';
import { unitFor, type Quantity } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import type { Overlay } from './canvas-state';
import { useDetail } from './detail';
import { useCanvas, useResults } from './editor-context';
import { underlay } from './index-underlay';
import { hoppingPathText, pathText } from './path-text';

export interface PipeEdgeProps {
  pipe: DrawingPipe;
  path: Point[];
  /** Where it passes over other pipes. */
  hops: readonly Hop[];
}

const SHORT = 36;

/** A pipe: solid in supply, dashed in return, with the arrow of its flow and the figure of the overlay. */
export const PipeEdge = memo(function PipeEdge({ data, selected }: EdgeProps<PipeEdgeProps>) {
  const { figures, index, faulty } = useResults();
  const overlay = useCanvas((state) => state.overlay);
  const detail = useDetail();
  if (!data) return null;
  const { pipe, path, hops } = data;
  const d = pathText(path);
  const solution = figures?.pipes.get(pipe.id);
  const isFaulty = faulty.has(pipe.id);
  const colour = selected ? 'var(--brass)' : isFaulty ? 'var(--high)' : 'var(--ink)';
  const place = labelPlace(path);
  return (
    <>
      {index.has(pipe.id) && <path {...underlay} d={d} />}
      <path d={d} fill="none" stroke="transparent" strokeWidth={20} />
      <path
        className="pipe-line"
        d={detail === 'far' ? d : hoppingPathText(path, hops)}
        fill="none"
        stroke={colour}
        style={{ strokeWidth: `calc(${selected ? 2.5 : 1.5}px * var(--lines, 1))` }}
        strokeDasharray={pipe.circuit === 'return' ? '6 4' : undefined}
      />
      {detail !== 'far' && place.length >= SHORT && <FlowArrow at={place} flowLs={solution?.flowLs ?? 1} colour={colour} />}
      {solution && place.length >= (detail === 'near' ? SHORT : 2 * SHORT) && detail !== 'far' && (
        <PipeFigure overlay={overlay} solution={solution} at={place} />
      )}
    </>
  );
});

function FlowArrow({ at, flowLs, colour }: { at: ReturnType<typeof labelPlace>; flowLs: number; colour: string }) {
  if (flowLs === 0) return null;
  const turn = (Math.atan2(at.along.y, at.along.x) * 180) / Math.PI + (flowLs < 0 ? 180 : 0);
  return (
    <path
      d="M5 0L-4 -3.5V3.5Z"
      fill={colour}
      style={{ transform: `translate(${at.x}px, ${at.y}px) rotate(${turn}deg) scale(var(--lines, 1))` }}
    />
  );
}

const pipeFigures: Partial<Record<Overlay, { quantity: Quantity; of: (solution: PipeSolution) => number }>> = {
  flow: { quantity: 'flow', of: ({ flowLs }) => Math.abs(flowLs) },
  velocity: { quantity: 'velocity', of: ({ velocityMs }) => velocityMs },
  gradient: { quantity: 'gradient', of: ({ paPerM }) => paPerM },
  drop: { quantity: 'pressure', of: ({ dropKpa }) => Math.abs(dropKpa) },
};

function PipeFigure({ overlay, solution, at }: { overlay: Overlay; solution: PipeSolution; at: ReturnType<typeof labelPlace> }) {
  const choice = useUnitChoice();
  const shown = pipeFigures[overlay];
  if (!shown) return null;
  const text = formatQuantity(shown.quantity, shown.of(solution), unitFor(shown.quantity, choice));
  const isUpright = at.along.x === 0;
  return (
    <text
      x={at.x + (isUpright ? 8 : 0)}
      y={at.y + (isUpright ? 4 : -8)}
      textAnchor={isUpright ? 'start' : 'middle'}
      className="figures fill-ink pointer-events-none"
      style={{ paintOrder: 'stroke', stroke: 'var(--paper)', strokeWidth: 4, fontSize: 'calc(11px * var(--words, 1))' }}
    >
      {text}
    </text>
  );
}
