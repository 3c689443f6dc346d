'use client';

import type { ReactNode } from 'react';
import { isPoint, type DrawingPipe, type Equipment, type EquipmentKind, type EquipmentOf } from '@/lib/network/drawing';
import { kindNames } from '@/lib/network/fault';
import { useCanvas, useDrawing } from '../editor-context';
import { BalancingValveForm } from './balancing-valve-form';
import { ControlValveForm } from './control-valve-form';
import { ControllerForm } from './controller-form';
import { FiguresForm } from './figures-form';
import { LoopForm } from './loop-form';
import { PieceResults } from './piece-results';
import { PipeForm } from './pipe-form';
import { PipeResults } from './pipe-results';
import { PumpForm } from './pump-form';
import { SingleKvForm } from './single-kv-form';
import { SourceForm } from './source-form';
import { TagForm } from './tag-form';
import { UnitForm } from './unit-form';
import { VesselForm } from './vessel-form';
import { PieceFaults } from './piece-faults';

/** Figures of what is selected: one piece, one pipe, many alike, or the loop. */
export function Inspector() {
  const drawing = useDrawing((it) => it);
  const pieceIds = useCanvas((state) => state.pieces);
  const pipeIds = useCanvas((state) => state.pipes);
  const pieces = drawing.equipment.filter(({ id }) => pieceIds.has(id));
  const pipes = drawing.pipes.filter(({ id }) => pipeIds.has(id));
  if (pieces.length + pipes.length === 0) return <LoopForm />;
  if (pieces.length === 1 && pipes.length === 0) return <OnePiece key={pieces[0].id} piece={pieces[0]} />;
  if (pieces.length === 0 && pipes.length === 1) return <OnePipe key={pipes[0].id} pipe={pipes[0]} />;
  return <Many pieces={pieces} pipes={pipes} />;
}

function OnePiece({ piece }: { piece: Equipment }) {
  const storey = useDrawing((drawing) => drawing.storeys.find(({ id }) => id === piece.storeyId));
  const place = [storey?.name, piece.kind === 'terminalUnit' && piece.room].filter(Boolean).join(', ');
  return (
    <>
      <Heading title={piece.tag || 'Untagged'} kind={kindNames[piece.kind].toLowerCase()} under={place} />
      <PieceFaults id={piece.id} />
      <TagForm piece={piece} />
      <KindForm pieces={[piece]} />
      <PieceResults piece={piece} />
    </>
  );
}

function OnePipe({ pipe }: { pipe: DrawingPipe }) {
  const pieces = useDrawing((drawing) => drawing.equipment);
  const tagOf = (id: string) => pieces.find((piece) => piece.id === id)?.tag || '?';
  return (
    <>
      <Heading
        title={`${tagOf(pipe.from.equipmentId)} to ${tagOf(pipe.to.equipmentId)}`}
        kind="pipe"
        under={pipe.circuit === 'supply' ? 'Supply' : 'Return'}
      />
      <PieceFaults id={pipe.id} />
      <PipeForm pipes={[pipe]} />
      <PipeResults pipe={pipe} />
    </>
  );
}

/** Many at once: their common fields, a group a kind. */
function Many({ pieces, pipes }: { pieces: Equipment[]; pipes: DrawingPipe[] }) {
  const kinds = [...new Set(pieces.map(({ kind }) => kind))].filter((kind) => !isPoint(kind) && kind !== 'expansionVessel');
  const words = [
    pieces.length && `${pieces.length} ${pieces.length === 1 ? 'piece' : 'pieces'}`,
    pipes.length && `${pipes.length} ${pipes.length === 1 ? 'pipe' : 'pipes'}`,
  ];
  return (
    <>
      <Heading title={words.filter(Boolean).join(' and ')} kind="selected" under="What you type here goes to all of them." />
      {kinds.map((kind) => {
        const alike = pieces.filter((piece) => piece.kind === kind);
        return (
          <div key={`${kind}${alike.map(({ id }) => id).join()}`} className="mt-3 border-t pt-2">
            <p className="text-sm font-semibold">
              {alike.length} × {kindNames[kind].toLowerCase()}
            </p>
            <KindForm pieces={alike} />
          </div>
        );
      })}
      {pipes.length > 0 && (
        <div className="mt-3 border-t" key={pipes.map(({ id }) => id).join()}>
          <PipeForm pipes={pipes} />
        </div>
      )}
    </>
  );
}

/** The form of a kind; all pieces given are of it. */
function KindForm({ pieces }: { pieces: Equipment[] }): ReactNode {
  const as = <K extends EquipmentKind>(_kind: K) => pieces as EquipmentOf<K>[];
  switch (pieces[0].kind) {
    case 'terminalUnit':
      return <UnitForm units={as('terminalUnit')} />;
    case 'balancingValve':
      return <BalancingValveForm valves={as('balancingValve')} />;
    case 'controlValve':
      return <ControlValveForm valves={as('controlValve')} />;
    case 'source':
      return <SourceForm sources={as('source')} />;
    case 'pump':
      return pieces.length === 1 ? (
        <PumpForm pump={as('pump')[0]} />
      ) : (
        <p className="text-quiet text-sm">Select one pump to edit its curve.</p>
      );
    case 'expansionVessel':
      return <VesselForm vessel={as('expansionVessel')[0]} />;
    case 'checkValve':
    case 'isolatingValve':
    case 'strainer':
      return <SingleKvForm pieces={pieces as EquipmentOf<'checkValve' | 'isolatingValve' | 'strainer'>[]} />;
    case 'dpController':
      return <ControllerForm controllers={as('dpController')} />;
    case 'flowLimiter':
    case 'decoupler':
    case 'flowStation':
      return <FiguresForm pieces={pieces as EquipmentOf<'flowLimiter' | 'decoupler' | 'flowStation'>[]} />;
    case 'tee':
    case 'header':
    case 'pressureStation':
      return null;
  }
}

const Heading = ({ title, kind, under }: { title: string; kind: string; under?: string }) => (
  <div className="mb-2">
    <div className="flex items-baseline justify-between gap-3">
      <h2 className="truncate">{title}</h2>
      <span className="text-quiet shrink-0 text-sm">{kind}</span>
    </div>
    {under && <p className="text-quiet text-sm">{under}</p>}
  </div>
);
