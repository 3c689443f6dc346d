import { formatQuantity } from '@/lib/units/format-quantity';
import { unitFor } from '@/lib/units/quantities';
import type { Drawing, DrawingPipe, Equipment } from './drawing';
import type { DrawnFigures } from './drawing-figures';
import { boundsOf, sizeOf, type Point } from './piece-geometry';
import { labelPlace, routeOfPipe } from './pipe-route';
import { symbolOf } from './symbol-shapes';

export interface SheetTitle {
  loop: string;
  project: string;
  /** "Revision 3" or "Draft". */
  revision: string;
  date: string;
  /** What the figures are, e.g. "Flows with the valves as balanced"; empty without figures. */
  figures: string;
}

interface SheetOptions {
  title: SheetTitle;
  figures: DrawnFigures | null;
  /** The reader's units by quantity; the stored ones where it is empty. */
  units?: Record<string, string>;
}

/** For print: dark lines on white, whatever the theme. */
const colours = { ink: '#16232b', quiet: '#53636b', rule: '#d9d5c9', brass: '#8f6210', sheet: '#ffffff', low: '#4a4fb5', high: '#a94f14' };
const words = 'font-family="Commissioner, Segoe UI, Helvetica, Arial, sans-serif"';
const figureFont = 'font-family="B612, Consolas, monospace"';

const MARGIN = 60;
const LEFT = 150;
const TITLE = 110;
const LEAST_WIDTH = 760;

/** A drawing as one SVG document: storeys, pipes, symbols, tags, flows and settings, a key and a title block. The same drawing gives the same text. */
export function drawingSvg(drawing: Drawing, { title, figures, units = {} }: SheetOptions): { svg: string; width: number; height: number } {
  const box = drawing.equipment.length ? boundsOf(drawing.equipment) : { left: 0, top: 0, width: 600, height: 300 };
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const routes = drawing.pipes.flatMap((pipe) => {
    const route = routeOfPipe(pipe, pieces);
    return route ? [{ pipe, route }] : [];
  });
  const left = Math.min(box.left, ...routes.flatMap(({ route }) => route.map(({ x }) => x))) - LEFT;
  const top = Math.min(box.top, ...routes.flatMap(({ route }) => route.map(({ y }) => y))) - MARGIN;
  const right = Math.max(box.left + box.width, ...routes.flatMap(({ route }) => route.map(({ x }) => x))) + MARGIN + 80;
  const bottom = Math.max(box.top + box.height, ...routes.flatMap(({ route }) => route.map(({ y }) => y))) + MARGIN;
  const width = Math.max(right - left, LEAST_WIDTH);
  const height = bottom - top + TITLE;
  const flow = (flowLs: number) => formatQuantity('flow', Math.abs(flowLs), unitFor('flow', units));
  const svg = [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="${left} ${top} ${width} ${height}" width="${width}" height="${height}" role="img">`,
    `<title>${escaped(`${title.loop}, ${title.revision}`)}</title>`,
    `<rect x="${left}" y="${top}" width="${width}" height="${height}" fill="${colours.sheet}"/>`,
    ...storeyLines(drawing, { left, right: left + width, top, bottom }),
    ...routes.map(({ pipe, route }) => pipeLine(pipe, route, figures?.pipes.get(pipe.id)?.flowLs ?? null)),
    ...drawing.equipment.map(symbol),
    ...drawing.equipment.map((piece) => labels(piece, figures, flow)),
    titleBlock({ left, top: bottom, width }, title, unitFor('flow', units), figures !== null),
    '</svg>',
  ].join('\n');
  return { svg, width, height };
}

function storeyLines({ storeys }: Drawing, box: { left: number; right: number; top: number; bottom: number }): string[] {
  return storeys
    .filter(({ top, height }) => top + height > box.top && top < box.bottom)
    .map((storey) => {
      const line = Math.min(storey.top + storey.height, box.bottom);
      return (
        `<path d="M${box.left} ${line}H${box.right}" stroke="${colours.rule}" stroke-width="1.5"/>` +
        text({ x: box.left + 16, y: line - 10 }, `${storey.name}  ${storey.elevationM >= 0 ? '+' : '−'}${Math.abs(storey.elevationM)} m`, {
          size: 12,
          fill: colours.quiet,
        })
      );
    });
}

/** Solid in supply, dashed in return, with the arrow of its flow. */
function pipeLine(pipe: DrawingPipe, route: Point[], flowLs: number | null): string {
  const d = route.map(({ x, y }, i) => `${i ? 'L' : 'M'}${x} ${y}`).join('');
  const line = `<path d="${d}" fill="none" stroke="${colours.ink}" stroke-width="1.5"${pipe.circuit === 'return' ? ' stroke-dasharray="6 4"' : ''}/>`;
  const at = labelPlace(route);
  if (at.length < 36 || flowLs === 0) return line;
  const turn = (Math.atan2(at.along.y, at.along.x) * 180) / Math.PI + ((flowLs ?? 1) < 0 ? 180 : 0);
  return `${line}<path d="M5 0L-4 -3.5V3.5Z" fill="${colours.ink}" transform="translate(${at.x} ${at.y}) rotate(${turn})"/>`;
}

function symbol(piece: Equipment): string {
  const ink = piece.kind === 'balancingValve' ? colours.brass : colours.ink;
  const fills = { sheet: colours.sheet, ink };
  const strokes = symbolOf(piece).map(
    ({ d, fill, dash, isBrass }) =>
      `<path d="${d}" fill="${fill ? fills[fill] : 'none'}" stroke="${isBrass ? colours.brass : ink}"${dash ? ` stroke-dasharray="${dash}"` : ''}/>`,
  );
  const turn = `translate(${piece.x} ${piece.y}) rotate(${piece.rotation})${piece.isMirrored ? ' scale(-1 1)' : ''}`;
  return `<g transform="${turn}" stroke-width="1.5" stroke-linejoin="round" stroke-linecap="round">${strokes.join('')}</g>`;
}

/** Its tag; of a terminal its flow and the setting of its valve beside it; of a valve the setting. */
function labels(piece: Equipment, figures: DrawnFigures | null, flow: (flowLs: number) => string): string {
  if (piece.kind === 'tee') return '';
  const solution = figures?.pieces.get(piece.id);
  const { width, height } = sizeOf(piece);
  const chosen = piece.kind === 'terminalUnit' ? piece.balancingValve : piece.kind === 'balancingValve' ? piece.valve : null;
  const turns = solution?.valve?.setting ?? chosen?.settingTurns ?? null;
  const setting = turns === null ? '' : turns.toFixed(1);
  if (piece.kind === 'terminalUnit' && height > width) {
    const side = piece.isMirrored ? -1 : 1;
    const anchor = side < 0 ? 'end' : 'start';
    const x = piece.x + side * 18;
    return (
      text({ x, y: piece.y + 12 }, piece.tag, { size: 10, fill: colours.quiet, anchor }) +
      (solution?.flowLs == null
        ? ''
        : text({ x, y: piece.y - 1 }, flow(solution.flowLs), { size: 12, isFigure: true, isBold: true, anchor })) +
      (setting && text({ x: piece.x + side * 12, y: piece.y + 37 }, setting, { size: 11, fill: colours.brass, isFigure: true, anchor }))
    );
  }
  const isUpright = piece.rotation === 90 || piece.rotation === 270;
  const tag = [piece.tag, setting].filter(Boolean).join('  ');
  const at = isUpright
    ? { x: piece.x + width / 2 + 3, y: piece.y + 4 }
    : { x: piece.x, y: piece.y - height / 2 - (piece.kind === 'pressureStation' ? 20 : 3) };
  const pump = piece.kind === 'pump' && solution?.pump && solution.flowLs !== null ? flow(solution.flowLs) : '';
  return (
    text(at, tag, {
      size: 11,
      fill: piece.kind === 'balancingValve' ? colours.brass : colours.ink,
      isBold: true,
      anchor: isUpright ? 'start' : 'middle',
    }) + (pump && text({ x: piece.x, y: piece.y + height / 2 + 14 }, pump, { size: 11, isFigure: true, anchor: 'middle' }))
  );
}

function titleBlock(at: { left: number; top: number; width: number }, title: SheetTitle, flowUnit: string, hasFigures: boolean): string {
  const y = at.top + 20;
  const x = at.left + at.width - 400;
  const key = at.left + 20;
  const lines = [
    `<path d="M${at.left + 10} ${at.top}H${at.left + at.width - 10}" stroke="${colours.ink}" stroke-width="1.5"/>`,
    `<path d="M${key} ${y}h36" stroke="${colours.ink}" stroke-width="1.5"/>`,
    text({ x: key + 46, y: y + 4 }, 'Supply', { size: 11 }),
    `<path d="M${key} ${y + 20}h36" stroke="${colours.ink}" stroke-width="1.5" stroke-dasharray="6 4"/>`,
    text({ x: key + 46, y: y + 24 }, 'Return', { size: 11 }),
    hasFigures ? text({ x: key + 110, y: y + 4 }, `${title.figures}, ${flowUnit}`, { size: 11 }) : '',
    text({ x: key + 110, y: y + 24 }, 'Beside a balancing valve: its setting, turns', { size: 11, fill: colours.brass }),
    text({ x, y: y + 8 }, title.loop, { size: 18, isBold: true }),
    text({ x, y: y + 30 }, title.project, { size: 12, fill: colours.quiet }),
    text({ x, y: y + 52 }, `${title.revision}, ${title.date}`, { size: 12 }),
    text({ x, y: y + 72 }, 'Symbols after ISO 14617. Not to scale.', { size: 10, fill: colours.quiet }),
  ];
  return lines.join('');
}

interface TextLook {
  size: number;
  fill?: string;
  isFigure?: boolean;
  isBold?: boolean;
  anchor?: 'start' | 'middle' | 'end';
}

function text({ x, y }: Point, said: string, { size, fill = colours.ink, isFigure, isBold, anchor = 'start' }: TextLook): string {
  if (!said) return '';
  return `<text x="${x}" y="${y}" font-size="${size}" fill="${fill}" text-anchor="${anchor}" ${isFigure ? figureFont : words}${isBold ? ' font-weight="600"' : ''}>${escaped(said)}</text>`;
}

/** What a person typed must stay text. Characters that XML does not allow at all are left out. */
const escaped = (said: string): string =>
  said
    .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '')
    .replace(/[&<>"']/g, (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[sign]!);
