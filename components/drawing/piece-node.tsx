'use client';

import { memo, useEffect, useRef } from 'react';
import { Handle, Position, useUpdateNodeInternals, type NodeProps } from 'reactflow';
import { isPoint, portsOf, type Equipment } from '@/lib/network/drawing';
import { portOffset, sizeOf } from '@/lib/network/piece-geometry';
import { useDetail } from './detail';
import { useResults } from './editor-context';
import { ImpulseLines } from './impulse-lines';
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
  const stands = `${piece.rotation} ${piece.isMirrored}`;
  const stood = useRef(stands);
  // React Flow measures the ends when a size changes; a turn or a mirror may leave the size as it is.
  useEffect(() => {
    if (stood.current === stands) return;
    stood.current = stands;
    update(id);
  }, [update, id, stands]);
  const isFaulty = faulty.has(piece.id);
  const isSmall = piece.kind === 'tee' || piece.kind === 'pressureStation';

  return (
    <div style={{ width, height }} className="relative">
      {selected && !isSmall && <div className="border-brass absolute -inset-1.5 rounded border-2" />}
      {selected && isSmall && <div className="border-brass absolute inset-0.5 rounded-full border-2" />}
      <svg
        viewBox={`${-width / 2} ${-height / 2} ${width} ${height}`}
        width={width}
        height={height}
        className="absolute inset-0 overflow-visible"
        aria-hidden
      >
        {index.has(piece.id) && !isPoint(piece.kind) && <IndexUnderlay piece={piece} />}
        {piece.kind === 'dpController' && <ImpulseLines controller={piece} />}
        <g transform={`rotate(${piece.rotation})${piece.isMirrored ? ' scale(-1 1)' : ''}`} color={inkOf(piece)}>
          <PieceSymbol piece={piece} />
        </g>
      </svg>
      {detail !== 'far' && <PieceLabels piece={piece} detail={detail} isFaulty={isFaulty} isSelected={selected} />}
      {portsOf(piece.kind).map((port) => {
        const { at, leaves } = portOffset(piece, port);
        const reach = isSmall ? 'calc(var(--reach) + 8px)' : 'var(--reach)';
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
