'use client';

import type { ReactNode } from 'react';
import { Figure } from '@/components/ui/figure';
import { classNames } from '@/components/ui/class-names';
import type { Equipment } from '@/lib/network/drawing';
import { sizeOf } from '@/lib/network/piece-geometry';
import { hasRoom } from '@/lib/network/label-room';
import { useGrowth, type Detail } from './detail';
import { signs, tones, verdictOf } from './deviation-mark';
import { useCanvas, useDrawing, useEditor, useResults } from './editor-context';

interface PieceLabelsProps {
  piece: Equipment;
  detail: Detail;
  isFaulty: boolean;
  isSelected: boolean;
}

/** What is said beside a piece: its tag, the figure of the overlay, the setting of its valve. */
export function PieceLabels({ piece, detail, isFaulty, isSelected }: PieceLabelsProps) {
  const { width, height } = sizeOf(piece);
  const isUpright = piece.kind === 'terminalUnit' ? height > width : piece.rotation === 90 || piece.rotation === 270;
  const { words } = useGrowth();
  const isRoomy = useDrawing((drawing) => piece.kind === 'tee' || hasRoom(drawing, words, piece.id));
  const figure = <OverlayFigure piece={piece} />;
  const tag = piece.kind === 'tee' ? (isSelected || isFaulty) && piece.tag : piece.tag;
  const fault = isFaulty && (
    <span className="text-high" title="Faults: see the list">
      ▴{' '}
    </span>
  );

  // What is wrong or selected is named even where it covers a neighbour's words.
  if (!isRoomy && !isFaulty && !isSelected) return null;
  if (piece.kind === 'terminalUnit') {
    const side = piece.isMirrored && isUpright ? 'right-1/2 mr-5 items-end' : 'left-1/2 ml-5';
    return (
      <>
        <Column
          className={isUpright ? classNames('top-1/2 -translate-y-1/2', side) : 'top-full left-1/2 mt-0.5 -translate-x-1/2 items-center'}
        >
          {figure}
          {(detail === 'near' || isFaulty || isSelected) && (
            <span className="text-quiet text-[calc(11px*var(--words))]">
              {fault}
              {tag}
            </span>
          )}
        </Column>
        <IndexName piece={piece} />
        <Column
          className={
            isUpright
              ? classNames('top-[calc(50%+33px)] -translate-y-1/2', piece.isMirrored ? 'right-1/2 mr-3.5' : 'left-1/2 ml-3.5')
              : 'top-1/2 left-full ml-1'
          }
        >
          <SettingFigure piece={piece} />
        </Column>
      </>
    );
  }
  if (detail === 'middle' && !isFaulty && piece.kind !== 'pump' && piece.kind !== 'source') return null;
  const isBrass = piece.kind === 'balancingValve';
  return isUpright ? (
    <Column className="top-1/2 left-full ml-1 -translate-y-1/2">
      <span className={classNames('text-[calc(12px*var(--words))] font-semibold', isBrass && 'text-brass')}>
        {fault}
        {tag} <SettingFigure piece={piece} />
      </span>
      {figure}
    </Column>
  ) : (
    <>
      {tag && (
        <Column
          className={classNames(
            'left-1/2 -translate-x-1/2',
            piece.kind === 'tee' ? 'bottom-full' : isBrass ? 'top-[calc(50%+10px)]' : 'bottom-[calc(50%+17px)]',
          )}
        >
          <span className={classNames('text-[calc(12px*var(--words))] font-semibold', isBrass && 'text-brass')}>
            {fault}
            {tag} <SettingFigure piece={piece} />
          </span>
        </Column>
      )}
      <Column
        className={classNames('left-1/2 -translate-x-1/2 items-center', isBrass ? 'bottom-[calc(50%+12px)]' : 'top-[calc(50%+17px)]')}
      >
        {figure}
      </Column>
    </>
  );
}

const Column = ({ className, children }: { className: string; children: ReactNode }) => (
  <div className={classNames('pointer-events-none absolute flex flex-col leading-tight whitespace-nowrap', className)}>{children}</div>
);

function IndexName({ piece }: { piece: Equipment }) {
  const { figures } = useResults();
  if (!figures?.pieces.get(piece.id)?.isIndex) return null;
  return <Column className="text-petrol top-1.5 left-full ml-1 text-[calc(11px*var(--words))] font-semibold">index</Column>;
}

/** The setting that the balance found; where it has none, the one that the valve stands at. */
function SettingFigure({ piece }: { piece: Equipment }) {
  const { figures } = useResults();
  const chosen = piece.kind === 'balancingValve' ? piece.valve : piece.kind === 'terminalUnit' ? piece.balancingValve : null;
  if (!chosen) return null;
  const setting = figures?.pieces.get(piece.id)?.valve?.setting ?? chosen.settingTurns;
  return setting === null || setting === undefined ? null : (
    <span className="figures text-brass ml-1 text-[calc(12px*var(--words))]">{setting.toFixed(1)}</span>
  );
}

function OverlayFigure({ piece }: { piece: Equipment }) {
  const { figures } = useResults();
  const { band } = useEditor();
  const overlay = useCanvas((state) => state.overlay);
  const solution = figures?.pieces.get(piece.id);
  if (!solution || piece.kind === 'expansionVessel') return null;
  const figureClass = 'text-[calc(13px*var(--words))] font-bold';
  if (piece.kind === 'pump' && solution.pump && overlay !== 'pressure') {
    return (
      <span className="text-quiet text-[calc(12px*var(--words))]">
        <Figure quantity="flow" si={solution.flowLs} hasUnit />, <Figure quantity="head" si={solution.pump.headM} hasUnit />
      </span>
    );
  }
  if (overlay === 'pressure')
    return solution.inletKpa === null ? null : (
      <Figure quantity="pressure" si={solution.inletKpa} className="text-[calc(11px*var(--words))]" />
    );
  if (piece.kind === 'tee' || solution.flowLs === null) return null;
  if (overlay === 'percent') {
    if (piece.kind !== 'terminalUnit' || solution.percentOfDesign === null) return null;
    const verdict = verdictOf(solution.percentOfDesign, band);
    return (
      <span className={classNames('figures', figureClass, tones[verdict])}>
        <span className="font-sans font-normal">{signs[verdict]}</span> {solution.percentOfDesign.toFixed(0)}
      </span>
    );
  }
  if (overlay === 'flow')
    return (
      <Figure
        quantity="flow"
        si={Math.abs(solution.flowLs)}
        className={piece.kind === 'terminalUnit' ? figureClass : 'text-[calc(11px*var(--words))]'}
      />
    );
  if (overlay === 'drop')
    return (
      <Figure
        quantity="pressure"
        si={Math.abs(solution.dropKpa ?? 0)}
        className={piece.kind === 'terminalUnit' ? figureClass : 'text-[calc(11px*var(--words))]'}
      />
    );
  return null;
}
