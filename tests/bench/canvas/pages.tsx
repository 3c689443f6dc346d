import { useEffect } from 'react';
import { createRoot } from 'react-dom/client';
import ReactFlow, { ReactFlowProvider, useReactFlow, type Edge, type Node } from 'reactflow';
import 'reactflow/dist/style.css';
import { Canvas } from '@/components/drawing/canvas';
import { createCanvasStore } from '@/components/drawing/canvas-state';
import { EditorContext, ResultsContext, type Editor, type Results } from '@/components/drawing/editor-context';
import { createDrawingStore } from '@/components/drawing/store';
import type { Drawing } from '@/lib/network/drawing';
import type { PieceSolution, PipeSolution } from '@/lib/network/drawing-figures';
import { zooms, type Place } from './places';
import { drawingOfTerminals } from './terminals';

/** Both pages of the measurement, chosen by the address: the canvas of the product, and React Flow with default nodes and edges, as many of each. */

declare global {
  interface Window {
    /** Moves the view, for the measurement. */
    view: { set: (x: number, y: number, zoom: number) => void; get: () => { x: number; y: number; zoom: number } };
    openedMs: number;
    framesPerSecond: (place: Place, seconds: number) => Promise<number>;
  }
}

const drawing = drawingOfTerminals(Number(new URLSearchParams(location.search).get('terminals')));

function Handle() {
  const flow = useReactFlow();
  useEffect(() => {
    window.view = { set: (x, y, zoom) => flow.setViewport({ x, y, zoom }), get: () => flow.getViewport() };
  }, [flow]);
  return null;
}

/** Figures at every piece and pipe, so that every label is drawn that the product would draw. */
function figuresFor({ equipment, pipes }: Drawing): Results {
  const piece = (flowLs: number, isIndex: boolean): PieceSolution => ({
    ...{
      flowLs,
      dropKpa: 12,
      inletKpa: 150,
      outletKpa: 138,
      percentOfDesign: 93 + ((flowLs * 1000) % 15),
      authority: 0.4,
      circuitDropKpa: 90,
      isIndex,
    },
    ...{ valve: { setting: 2.4, kv: 3, dropKpa: 6, state: 'throttled', flowLs }, pump: null, parts: {} },
  });
  const pipe: PipeSolution = {
    flowLs: 1,
    velocityMs: 0.6,
    paPerM: 150,
    dropKpa: 2,
    fromKpa: 150,
    toKpa: 148,
    percentOfDesign: 100,
    reynolds: 20000,
    frictionFactor: 0.03,
  };
  const figures = {
    basis: 'balanced' as const,
    fluid: { densityKgM3: 999.8, viscosityMPaS: 1.35, specificHeatKJKgK: 4.19 },
    pieces: new Map(equipment.map(({ id }, i) => [id, piece(0.19 + (i % 7) * 0.005, i === 40)])),
    pipes: new Map(pipes.map(({ id }) => [id, pipe])),
  };
  return { solved: null, figures, faults: [], faulty: new Set(), isOld: false, index: new Set(pipes.slice(0, 60).map(({ id }) => id)) };
}

function Ours() {
  const editor: Editor = {
    drawingStore: createDrawingStore(drawing),
    canvasStore: createCanvasStore({ overlay: 'flow' }),
    canEdit: true,
    band: { lowerPercent: 95, upperPercent: 110 },
  };
  return (
    <EditorContext value={editor}>
      <ResultsContext value={figuresFor(drawing)}>
        <ReactFlowProvider>
          <Canvas />
          <Handle />
        </ReactFlowProvider>
      </ResultsContext>
    </EditorContext>
  );
}

function Bare() {
  const nodes: Node[] = drawing.equipment.map(({ id, x, y }) => ({ id, position: { x, y }, data: { label: id } }));
  const edges: Edge[] = drawing.pipes.map(({ id, from, to }) => ({ id, source: from.equipmentId, target: to.equipmentId }));
  return (
    <ReactFlowProvider>
      <ReactFlow defaultNodes={nodes} defaultEdges={edges} minZoom={0.05} maxZoom={3} fitView />
      <Handle />
    </ReactFlowProvider>
  );
}

createRoot(document.getElementById('sheet')!).render(location.search.includes('bare') ? <Bare /> : <Ours />);

/** Opened: there is something of the drawing on the page, and the browser has painted it. */
const isThere = () => document.querySelector('.drawing-canvas canvas, .react-flow__node') !== null;
const watch = () =>
  isThere() ? requestAnimationFrame(() => setTimeout(() => (window.openedMs = performance.now()))) : requestAnimationFrame(watch);
watch();

/** Pans and zooms about a place for some seconds, one step a frame. */
window.framesPerSecond = (place, seconds) =>
  new Promise((resolve) => {
    // Levels lie 320 apart upwards from 0, terminals 100 apart: the middle of the drawing comes to the middle of the view.
    const centre = { x: 2500, y: -2900 };
    const begun = performance.now();
    let frames = 0;
    const step = (now: number) => {
      const part = (now - begun) / 1000;
      if (part >= seconds) return resolve(frames / part);
      const zoom = zooms[place] * (1 + 0.1 * Math.sin(part * 3));
      const away = 150 * Math.sin(part * 2);
      window.view.set(window.innerWidth / 2 - centre.x * zoom + away, window.innerHeight / 2 - centre.y * zoom + away / 2, zoom);
      frames++;
      requestAnimationFrame(step);
    };
    requestAnimationFrame(step);
  });
