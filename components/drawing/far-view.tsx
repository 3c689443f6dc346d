'use client';

import { useEffect, useMemo, useRef } from 'react';
import { useStore, useStoreApi } from 'reactflow';
import type { Drawing } from '@/lib/network/drawing';
import { farSheetOf, PART, SYMBOLS_FROM_ZOOM, type FarSheet } from './far-sheet';
import { useCanvas, useDrawing, useEditor, useResults } from './editor-context';

/** Above this many pieces in view each is a stroke on one sheet instead of a part of the page. */
const MOST_AS_PARTS = 260;

/** Beyond each side of the view, as a part of it, the sheet is drawn already: a view that moves a little needs no new one. */
const MARGIN = 0.35;
const SETTLES_AFTER_MS = 140;

/** Whether more is in view than can be drawn piece by piece at the pace of the hand. */
export function useIsFar({ equipment }: Drawing): boolean {
  return useStore(({ transform: [x, y, zoom], width, height }) => {
    if (equipment.length <= MOST_AS_PARTS) return false;
    // Before the first measure of the page all of a large drawing counts as in view.
    if (width === 0) return true;
    const [left, top] = [-x / zoom, -y / zoom];
    const [right, bottom] = [left + width / zoom, top + height / zoom];
    let inView = 0;
    for (const piece of equipment) {
      if (piece.x >= left && piece.x <= right && piece.y >= top && piece.y <= bottom && ++inView > MOST_AS_PARTS) return true;
    }
    return false;
  });
}

/** The drawing from far away, on one canvas that follows the view: pipes as lines, pieces as symbols or dots, no words. */
export function FarView() {
  const canvas = useRef<HTMLCanvasElement>(null);
  const store = useStoreApi();
  const { band } = useEditor();
  const drawing = useDrawing((it) => it);
  const pieces = useCanvas((state) => state.pieces);
  const pipes = useCanvas((state) => state.pipes);
  const { figures, faulty, index } = useResults();
  const sheet = useMemo(
    () => farSheetOf(drawing, new Set([...pieces, ...pipes]), { figures, faulty, index }, band),
    [drawing, pieces, pipes, figures, faulty, index, band],
  );
  useEffect(() => {
    const target = canvas.current!;
    let drawn: View | null = null;
    let settling: ReturnType<typeof setTimeout> | undefined;
    const view = (): View => {
      const { transform, width, height } = store.getState();
      return { transform, width, height };
    };
    const draw = () => {
      clearTimeout(settling);
      drawn = view();
      drawSheet(target, sheet, drawn);
      target.style.transform = '';
    };
    /** While the view moves the sheet that is there moves along; it is drawn afresh once it no longer covers the view, or the hand rests. */
    const follow = () => {
      const now = view();
      if (!drawn || !covers(drawn, now)) return draw();
      const [x, y, zoom] = now.transform;
      const [x0, y0, zoom0] = drawn.transform;
      const scale = zoom / zoom0;
      if (x === x0 && y === y0 && scale === 1) return;
      target.style.transform = `translate(${x - x0 * scale}px, ${y - y0 * scale}px) scale(${scale})`;
      clearTimeout(settling);
      settling = setTimeout(draw, SETTLES_AFTER_MS);
    };
    draw();
    const stopListening = store.subscribe(follow);
    const theme = new MutationObserver(draw);
    theme.observe(document.documentElement, { attributeFilter: ['data-theme'] });
    return () => {
      stopListening();
      theme.disconnect();
      clearTimeout(settling);
    };
  }, [sheet, store]);
  return <canvas ref={canvas} className="pointer-events-none absolute origin-top-left will-change-transform" aria-hidden />;
}

interface View {
  transform: [x: number, y: number, zoom: number];
  width: number;
  height: number;
}

/** Whether what was drawn for one view, with its margin, shows all of another, and not too coarsely. */
function covers(drawn: View, now: View): boolean {
  if (drawn.width !== now.width || drawn.height !== now.height) return false;
  const scale = now.transform[2] / drawn.transform[2];
  if (scale > 1.6 || scale < 0.6) return false;
  const [left, top] = [now.transform[0] - drawn.transform[0] * scale, now.transform[1] - drawn.transform[1] * scale];
  const [across, down] = [now.width * MARGIN * scale, now.height * MARGIN * scale];
  return left <= across && top <= down && left + now.width * scale + across >= now.width && top + now.height * scale + down >= now.height;
}

function drawSheet(canvas: HTMLCanvasElement, sheet: FarSheet, { transform: [x, y, zoom], width, height }: View): void {
  const context = canvas.getContext('2d');
  if (!context || width === 0) return;
  const density = Math.min(window.devicePixelRatio || 1, 2);
  const [marginX, marginY] = [width * MARGIN, height * MARGIN];
  const [across, down] = [Math.round((width + 2 * marginX) * density), Math.round((height + 2 * marginY) * density)];
  if (canvas.width !== across || canvas.height !== down) {
    Object.assign(canvas, { width: across, height: down });
    // The margin lies outside of the view; what is turned about is the view's own corner.
    Object.assign(canvas.style, {
      left: `${-marginX}px`,
      top: `${-marginY}px`,
      width: `${width + 2 * marginX}px`,
      height: `${height + 2 * marginY}px`,
      transformOrigin: `${marginX}px ${marginY}px`,
    });
  }
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.clearRect(0, 0, across, down);
  context.setTransform(zoom * density, 0, 0, zoom * density, (x + marginX) * density, (y + marginY) * density);
  const colours = getComputedStyle(canvas);
  const isInView = (part: { x: number; y: number }) =>
    (part.x + PART) * zoom + x > -marginX &&
    part.x * zoom + x < width + marginX &&
    (part.y + PART) * zoom + y > -marginY &&
    part.y * zoom + y < height + marginY;
  const pieces = zoom < SYMBOLS_FROM_ZOOM ? sheet.dots : sheet.symbols.filter(isInView).flatMap(({ layers }) => layers);
  for (const { ink, path, widthPx, opacity } of [...sheet.pipes, ...pieces]) {
    context.globalAlpha = opacity ?? 1;
    const colour = colours.getPropertyValue(`--${ink}`);
    if (widthPx) {
      context.lineWidth = widthPx / zoom;
      context.strokeStyle = colour;
      context.stroke(path);
    } else {
      context.fillStyle = colour;
      context.fill(path);
    }
  }
}
