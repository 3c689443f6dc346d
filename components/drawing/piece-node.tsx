'use client';

import { memo, useEffect } from 'react';
import { Handle, Position, useUpdateNodeInternals, type NodeProps } from 'reactflow';
import { portsOf, type Equipment } from '@/lib/network/drawing';
import { portOffset, sizeOf } from '@/lib/network/piece-geometry';
import { useDetail } from './detail';
import { useResults } from './editor-context';
import { IndexUnderlay } from './index-underlay';
import { PieceLabels } from './piece-labels';
import { PieceSymbol } from './symbols/symbol';

export interface PieceNodeProps {
  piece: Equipment;
}

const inkOf = (piece: Equipment) => (piece.kind === 'balancingValve' ? 'var(--brass)' : 'var(--ink)');

/** One piece of equipment on the canvas: its symbol, its ends, and what is said beside it. */
export const PieceNode = memo(function PieceNode({ id, data, selected, isConnectable }: NodeProps<PieceNodeProps>) {
  const { piece } = data;
  const { width, height } = sizeOf(piece);
  const { index, faulty } = useResults();
  const detail = useDetail();
  const update = useUpdateNodeInternals();
  // React Flow measures the ends when a size changes; a turn or a mirror may leave the size as it is.
  useEffect(() => update(id), [update, id, piece.rotation, piece.isMirrored]);
  const isFaulty = faulty.has(piece.id);

  return (
    <div style={{ width, height }} className="relative">
      {selected && piece.kind !== 'tee' && <div className="border-brass absolute -inset-1.5 rounded border-2" />}
      {selected && piece.kind === 'tee' && <div className="border-brass absolute inset-0.5 rounded-full border-2" />}
      <svg
        viewBox={`${-width / 2} ${-height / 2} ${width} ${height}`}
        width={width}
        height={height}
        className="absolute inset-0 overflow-visible"
        aria-hidden
      >
        {index.has(piece.id) && piece.kind !== 'tee' && <IndexUnderlay piece={piece} />}
        <g transform={`rotate(${piece.rotation})${piece.isMirrored ? ' scale(-1 1)' : ''}`} color={inkOf(piece)}>
          <PieceSymbol piece={piece} />
        </g>
      </svg>
      {detail !== 'far' && <PieceLabels piece={piece} detail={detail} isFaulty={isFaulty} isSelected={selected} />}
      {portsOf(piece.kind).map((port) => {
        const { at, leaves } = portOffset(piece, port);
        const reach = piece.kind === 'tee' ? 'calc(var(--reach) + 8px)' : 'var(--reach)';
        return (
          <Handle
            key={port}
            id={port}
            type="source"
            position={Position.Top}
            isConnectable={isConnectable}
            className="piece-port"
            style={{ left: `calc(50% + ${at.x}px + ${leaves.x} * ${reach})`, top: `calc(50% + ${at.y}px + ${leaves.y} * ${reach})` }}
          />
        );
      })}
    </div>
  );
});
