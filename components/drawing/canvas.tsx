'use client';

import 'reactflow/dist/base.css';
import './canvas.css';
import { useCallback, useMemo, useRef, useState, type CSSProperties, type DragEvent, type MouseEvent } from 'react';
import ReactFlow, {
  Background,
  BackgroundVariant,
  ConnectionMode,
  SelectionMode,
  useReactFlow,
  type Connection,
  type EdgeChange,
  type NodeChange,
} from 'reactflow';
import type { EquipmentKind, Port } from '@/lib/network/drawing';
import { placePieces } from '@/lib/network/move-pieces';
import { GRID, sizeOf } from '@/lib/network/piece-geometry';
import { crossingRegister } from '@/lib/network/pipe-crossings';
import { BendHolds } from './bend-holds';
import { BoxPicker } from './box-picker';
import { useGrowth } from './detail';
import { edgesOf, nodesOf } from './canvas-elements';
import { useCanvas, useDrawing, useEditor } from './editor-context';
import { selectBox, selectNear } from './far-choice';
import { FarView, useIsFar } from './far-view';
import { KnownEnds } from './known-ends';
import { PieceNode } from './piece-node';
import { PipeEdge } from './pipe-edge';
import { PipePreview, ConnectionPreview } from './pipe-preview';
import { dropOntoPipe, joinEnds, joinToPipe, ON_PIPE_PX, placePiece, pressWithPipeTool } from './placing';
import { beginGesture } from './store';
import { showAll } from './show-all';
import { placeAskedFor, useShowPlace } from './show-place';
import { SmallMap } from './small-map';
import { StoreyBands, StoreyNames } from './storey-bands';
import { useAskedMenu } from './use-asked-menu';
import { useCoarsePointer } from './use-media';

const nodeTypes = { piece: PieceNode };
const edgeTypes = { pipe: PipeEdge };
/** Above this many pieces only those in view are in the page. */
const MANY_PIECES = 300;

export const draggedKind = 'application/x-equipment-kind';

/** The drawing as React Flow shows it: a projection of the document, to which every gesture is written back. */
export function Canvas() {
  const editor = useEditor();
  const { drawingStore, canvasStore, canEdit } = editor;
  const view = useReactFlow();
  const showPlace = useShowPlace();
  const drawing = useDrawing((it) => it);
  const tool = useCanvas((state) => state.tool);
  const pieces = useCanvas((state) => state.pieces);
  const pipes = useCanvas((state) => state.pipes);
  const isCoarse = useCoarsePointer();
  const growth = useGrowth();
  const [crossingsOf] = useState(crossingRegister);
  const [isConnecting, setConnecting] = useState(false);
  const menuHandlers = useAskedMenu();
  /** What stays selected while a box is drawn with Ctrl or Shift. */
  const kept = useRef<{ pieces: ReadonlySet<string>; pipes: ReadonlySet<string> } | null>(null);
  const endGesture = useRef<(() => void) | null>(null);
  /** Any release of the button over the sheet is told as the end of a box: only one that began is one. */
  const boxStart = useRef<{ x: number; y: number } | null>(null);
  const started = useRef<{ id: string; port: Port; isDone: boolean } | null>(null);

  const isFar = useIsFar(drawing);
  const nodes = useMemo(() => (isFar ? [] : nodesOf(drawing, pieces)), [isFar, drawing, pieces]);
  const edges = useMemo(() => (isFar ? [] : edgesOf(drawing, pipes, crossingsOf)), [isFar, drawing, pipes, crossingsOf]);
  const within = () => ON_PIPE_PX / view.getZoom();
  const pointOf = (event: { clientX: number; clientY: number }) => view.screenToFlowPosition({ x: event.clientX, y: event.clientY });

  const changeNodes = useCallback(
    (changes: NodeChange[]) => {
      const places = new Map<string, { x: number; y: number }>();
      const selected = new Set(canvasStore.getState().pieces);
      let isSelection = false;
      const pieceById = new Map(drawingStore.getState().drawing.equipment.map((piece) => [piece.id, piece]));
      for (const change of changes) {
        if (change.type === 'select') {
          isSelection = true;
          if (change.selected) selected.add(change.id);
          else selected.delete(change.id);
        } else if (change.type === 'position' && change.position) {
          const piece = pieceById.get(change.id);
          if (!piece) continue;
          const { width, height } = sizeOf(piece);
          places.set(change.id, { x: change.position.x + width / 2, y: change.position.y + height / 2 });
        }
      }
      for (const id of kept.current?.pieces ?? []) selected.add(id);
      if (isSelection) canvasStore.setState({ pieces: selected, page: 'properties' });
      if (places.size && canEdit) drawingStore.getState().change((before) => placePieces(before, places));
    },
    [canvasStore, drawingStore, canEdit],
  );

  const changeEdges = useCallback(
    (changes: EdgeChange[]) => {
      const selected = new Set(canvasStore.getState().pipes);
      for (const change of changes) {
        if (change.type !== 'select') continue;
        if (change.selected) selected.add(change.id);
        else selected.delete(change.id);
      }
      canvasStore.setState({ pipes: selected, page: 'properties' });
    },
    [canvasStore],
  );

  const keepSelection = (event: MouseEvent) => {
    const { pieces: chosen, pipes: chosenPipes } = canvasStore.getState();
    const isAdded =
      event.button === 0 && (event.shiftKey || event.ctrlKey || event.metaKey) && (event.target as Element).matches('.react-flow__pane');
    kept.current = isAdded ? { pieces: chosen, pipes: chosenPipes } : null;
  };
  /** A box selects the pieces in it and the pipes among them, not those that lead out of it; with Ctrl or Shift what was selected stays. */
  const keepInnerPipes = () => {
    const { pieces: chosen } = canvasStore.getState();
    const inner = drawingStore
      .getState()
      .drawing.pipes.filter(({ from, to }) => chosen.has(from.equipmentId) && chosen.has(to.equipmentId));
    canvasStore.setState({ pipes: new Set([...(kept.current?.pipes ?? []), ...inner.map(({ id }) => id)]) });
    kept.current = null;
  };

  const beginDrag = () => {
    endGesture.current ??= beginGesture(drawingStore);
  };
  const endDrag = () => {
    const chosen = [...canvasStore.getState().pieces];
    if (chosen.length === 1) dropOntoPipe(editor, chosen[0], within());
    endGesture.current?.();
    endGesture.current = null;
  };

  const pressCanvas = (event: MouseEvent, pieceId?: string) => {
    if (tool === 'select' && isFar) selectNear(canvasStore, drawing, pointOf(event), event, view.getZoom());
    if (!canEdit || tool === 'select') return;
    if (tool === 'pipe') {
      const port = (event.target as Element).closest<HTMLElement>('.piece-port')?.dataset.handleid as Port | undefined;
      pressWithPipeTool(editor, pointOf(event), { pieceId, end: pieceId && port ? { equipmentId: pieceId, port } : undefined }, within());
    } else if (!pieceId) placePiece(editor, tool, pointOf(event), within());
  };

  const connectEnds = ({ source, target, sourceHandle, targetHandle }: Connection) => {
    if (!source || !target) return;
    if (started.current) started.current.isDone = true;
    joinEnds(editor, { equipmentId: source, port: sourceHandle as Port }, { equipmentId: target, port: targetHandle as Port });
  };
  const endConnecting = (event: globalThis.MouseEvent | TouchEvent) => {
    const begun = started.current;
    started.current = null;
    setConnecting(false);
    if (!begun || begun.isDone) return;
    const at = 'changedTouches' in event ? event.changedTouches[0] : event;
    const start = { equipmentId: begun.id, port: begun.port };
    const overId = document.elementFromPoint(at.clientX, at.clientY)?.closest('.react-flow__node')?.getAttribute('data-id');
    if (overId && overId !== begun.id) {
      canvasStore.setState({ pipeStart: { end: start, bends: [] } });
      pressWithPipeTool(editor, pointOf(at), { pieceId: overId }, within());
      canvasStore.setState({ pipeStart: null });
    } else if (!overId) joinToPipe(editor, start, pointOf(at), within());
  };

  const drop = (event: DragEvent) => {
    const kind = event.dataTransfer.getData(draggedKind);
    if (!kind || !canEdit) return;
    event.preventDefault();
    placePiece(editor, kind as EquipmentKind, pointOf(event), within());
  };

  return (
    <div
      className="drawing-canvas absolute inset-0"
      style={{ '--words': growth.words, '--lines': growth.lines } as CSSProperties}
      data-can-edit={canEdit}
      data-tool={tool}
      data-is-connecting={isConnecting || tool === 'pipe'}
      onDragOver={(event) => event.dataTransfer.types.includes(draggedKind) && event.preventDefault()}
      onDrop={drop}
      onMouseDownCapture={keepSelection}
      {...menuHandlers}
    >
      <ReactFlow
        aria-label="Drawing of the loop"
        nodes={nodes}
        edges={edges}
        nodeTypes={nodeTypes}
        edgeTypes={edgeTypes}
        onNodesChange={changeNodes}
        onEdgesChange={changeEdges}
        onNodeDragStart={beginDrag}
        onNodeDragStop={endDrag}
        onSelectionDragStart={beginDrag}
        onSelectionDragStop={endDrag}
        onSelectionStart={(event) => {
          boxStart.current = pointOf(event);
        }}
        onSelectionEnd={(event) => {
          const from = boxStart.current;
          boxStart.current = null;
          if (from && isFar) selectBox(canvasStore, drawing, from, pointOf(event));
          else if (from) keepInnerPipes();
        }}
        onPaneClick={pressCanvas}
        onNodeClick={(event, node) => pressCanvas(event, node.id)}
        onEdgeClick={(event) => pressCanvas(event)}
        onConnectStart={(_, { nodeId, handleId }) => {
          started.current = nodeId ? { id: nodeId, port: handleId as Port, isDone: false } : null;
          setConnecting(true);
        }}
        onConnect={connectEnds}
        onConnectEnd={endConnecting}
        onInit={(instance) => {
          showAll(instance, drawing);
          const asked = placeAskedFor(drawing, window.location.search);
          if (asked) showPlace(asked);
        }}
        connectionLineComponent={ConnectionPreview}
        connectionMode={ConnectionMode.Loose}
        connectOnClick={false}
        connectionRadius={isCoarse ? 28 : 16}
        nodesDraggable={canEdit && tool === 'select'}
        nodesConnectable={canEdit}
        elementsSelectable
        selectionOnDrag={tool === 'select' && !isCoarse}
        selectionMode={SelectionMode.Partial}
        panOnDrag={isCoarse ? true : [1]}
        multiSelectionKeyCode={['Meta', 'Control', 'Shift']}
        selectionKeyCode={null}
        deleteKeyCode={null}
        disableKeyboardA11y
        snapToGrid
        snapGrid={[GRID, GRID]}
        minZoom={0.05}
        maxZoom={3}
        onlyRenderVisibleElements={nodes.length > MANY_PIECES}
        zoomOnDoubleClick={false}
        proOptions={{ hideAttribution: true }}
      >
        {/* From far away the dots would be a grey haze, and a slow one. */}
        {!isFar && <Background variant={BackgroundVariant.Dots} gap={GRID * 4} size={2.5} color="var(--paper-dot)" />}
        <StoreyBands />
        {isFar && <FarView />}
        <KnownEnds />
        {tool === 'pipe' && <PipePreview />}
        <StoreyNames />
        <BendHolds />
        <BoxPicker />
        <SmallMap />
      </ReactFlow>
    </div>
  );
}
