import type { Drawing, Equipment } from './drawing';
import { sizeOf } from './piece-geometry';

export interface LabelBox {
  id: string;
  left: number;
  top: number;
  right: number;
  bottom: number;
  /** The lower, the sooner it has its place. */
  rank: number;
}

const CELL = 100;
/** Width of a letter as a part of its size, a little more than the widest usual text needs. */
const LETTER = 0.62;
const FIGURE_LETTERS = 7;

/** Those labels that stand side by side without covering one another: by rank, then in the order given, each where nothing stands yet. */
export function fittingLabels(labels: LabelBox[]): Set<string> {
  const placed = new Map<string, LabelBox[]>();
  const shown = new Set<string>();
  for (const label of [...labels].sort((a, b) => a.rank - b.rank)) {
    const cells = cellsOf(label);
    if (cells.some((cell) => placed.get(cell)?.some((other) => covers(label, other)))) continue;
    shown.add(label.id);
    for (const cell of cells) placed.set(cell, [...(placed.get(cell) ?? []), label]);
  }
  return shown;
}

export const covers = (a: LabelBox, b: LabelBox): boolean => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

function cellsOf({ left, top, right, bottom }: LabelBox): string[] {
  const cells: string[] = [];
  for (let x = Math.floor(left / CELL); x <= Math.floor(right / CELL); x++)
    for (let y = Math.floor(top / CELL); y <= Math.floor(bottom / CELL); y++) cells.push(`${x} ${y}`);
  return cells;
}

const rankOf = ({ kind }: Equipment) =>
  kind === 'pump' || kind === 'source' ? 0 : kind === 'terminalUnit' ? 1 : kind === 'balancingValve' ? 2 : 3;

/** Where the words of a piece stand on the sheet, when they are `words` times their usual size. */
export function labelBox(piece: Equipment, words: number): LabelBox {
  const { width, height } = sizeOf(piece);
  const text = (letters: number, size: number) => letters * size * LETTER * words;
  const base = { id: piece.id, rank: rankOf(piece) };
  if (piece.kind === 'terminalUnit' && height > width) {
    const wide = Math.max(text(piece.tag.length, 11), text(FIGURE_LETTERS, 13));
    const left = piece.isMirrored ? piece.x - 20 - wide : piece.x + 20;
    return { ...base, left, right: left + wide, top: piece.y - 15 * words, bottom: piece.y + 15 * words };
  }
  const wide = text(piece.tag.length + (piece.kind === 'balancingValve' ? 5 : 0), 12);
  if (piece.rotation === 90 || piece.rotation === 270) {
    const left = piece.x + width / 2 + 4;
    return { ...base, left, right: left + wide, top: piece.y - 8 * words, bottom: piece.y + 8 * words };
  }
  const isBelow = piece.kind === 'balancingValve';
  const top = isBelow ? piece.y + 10 : piece.y - 17 - 14 * words;
  return { ...base, left: piece.x - wide / 2, right: piece.x + wide / 2, top, bottom: top + 14 * words };
}

const known = new WeakMap<Drawing, Map<number, Set<string>>>();

/** Whether the words of a piece have room beside those of its neighbours; worked out once a drawing and size of words. */
export function hasRoom(drawing: Drawing, words: number, pieceId: string): boolean {
  const sizes = known.get(drawing) ?? new Map<number, Set<string>>();
  known.set(drawing, sizes);
  let shown = sizes.get(words);
  if (!shown) {
    shown = fittingLabels(drawing.equipment.filter(({ kind }) => kind !== 'tee').map((piece) => labelBox(piece, words)));
    sizes.set(words, shown);
  }
  return shown.has(pieceId);
}
