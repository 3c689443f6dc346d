'use client';

import { useEffect } from 'react';
import { internalsSymbol, Position, useStoreApi, type HandleElement, type Node } from 'reactflow';
import { portsOf, type Equipment } from '@/lib/network/drawing';
import { portOffset, sizeOf } from '@/lib/network/piece-geometry';
import type { PieceNodeProps } from './piece-node';

/**
 * Tells React Flow the sizes and ends of pieces, which are known without being drawn. Left to itself it puts every piece into the page once to
 * measure it, which takes a drawing of thousands of pieces longer than a person waits, and draws no pipe to a piece that was not in view yet.
 */
export function KnownEnds(): null {
  const store = useStoreApi();
  useEffect(() => {
    let seen: unknown = null;
    const tell = () => {
      const { nodeInternals } = store.getState();
      if (nodeInternals === seen) return;
      seen = nodeInternals;
      for (const node of nodeInternals.values() as Iterable<Node<PieceNodeProps>>) {
        const internals = node[internalsSymbol];
        if (internals && !internals.handleBounds) internals.handleBounds = { source: endsOf(node.data.piece), target: null };
      }
    };
    tell();
    return store.subscribe(tell);
  }, [store]);
  return null;
}

function endsOf(piece: Equipment): HandleElement[] {
  const { width, height } = sizeOf(piece);
  return portsOf(piece.kind).map((port) => {
    const { at } = portOffset(piece, port);
    return { id: port, position: Position.Top, x: width / 2 + at.x, y: height / 2 + at.y, width: 0, height: 0 };
  });
}
