import { describe, expect, it } from 'vitest';
import { emptyDrawing } from '@/lib/network/drawing';
import { newPiece } from '@/lib/network/new-piece';
import { addStorey, removeStorey, resizeStorey, storeyAt } from '@/lib/network/storeys';
import { nextTag } from '@/lib/network/tags';

const empty = emptyDrawing('chilled');

describe('the next free tag', () => {
  it('counts terminal units through their storey and everything else through the loop', () => {
    let drawing = empty;
    for (const [kind, y] of [
      ['terminalUnit', 100],
      ['terminalUnit', 110],
      ['terminalUnit', 400],
      ['pump', 700],
      ['pump', 100],
    ] as const) {
      drawing = { ...drawing, equipment: [...drawing.equipment, newPiece(drawing, kind, { x: 0, y })] };
    }
    expect(drawing.equipment.map(({ tag }) => tag)).toEqual(['FC-2.01', 'FC-2.02', 'FC-1.01', 'P-1', 'P-2']);
  });

  it('fills the gap that a removed piece left', () => {
    const [first, second] = [newPiece(empty, 'pump', { x: 0, y: 0 }), newPiece(empty, 'pump', { x: 0, y: 0 })];
    expect(nextTag({ ...empty, equipment: [{ ...second, tag: 'P-2' }] }, first)).toBe('P-1');
  });

  it('numbers a storey without a number in its name from the lowest, which is 0', () => {
    expect(newPiece(empty, 'terminalUnit', { x: 0, y: 700 }).tag).toBe('FC-0.01');
  });

  it('names a source by what it is', () => {
    const boiler = { ...newPiece(empty, 'source', { x: 0, y: 0 }), sourceKind: 'boiler' as const };
    expect(nextTag(empty, boiler as Parameters<typeof nextTag>[1])).toBe('BO-1');
  });
});

describe('storeys', () => {
  it('hold what lies in their band, and the nearest what lies outside of all', () => {
    expect(storeyAt(empty, 319)?.name).toBe('Level 2');
    expect(storeyAt(empty, 321)?.name).toBe('Level 1');
    expect(storeyAt(empty, -5000)?.name).toBe('Level 2');
    expect(storeyAt({ ...empty, storeys: [] }, 0)).toBeNull();
  });

  it('are added above and below without touching the bands that are there', () => {
    const more = addStorey(addStorey(empty, 'above'), 'below');
    expect(more.storeys.slice(0, 3)).toEqual(empty.storeys);
    expect(more.storeys.slice(3).map(({ top, elevationM }) => [top, elevationM])).toEqual([
      [-320, 8],
      [960, -8],
    ]);
    expect(new Set(more.storeys.map(({ name }) => name)).size).toBe(5);
  });

  it('are removed only while empty, and what is drawn above comes down', () => {
    const pump = newPiece(empty, 'pump', { x: 0, y: 100 });
    const drawing = { ...empty, equipment: [pump] };
    expect(removeStorey(drawing, 'storey-2')).toBe(drawing);
    const after = removeStorey(drawing, 'storey-1');
    expect(after.equipment[0].y).toBe(420);
    expect(storeyAt(after, after.equipment[0].y)?.id).toBe('storey-2');
  });

  it('make room for a band that grows, and every piece stays in its storey', () => {
    const pieces = [100, 400, 700].map((y) => newPiece(empty, 'pump', { x: 0, y }));
    const after = resizeStorey({ ...empty, equipment: pieces }, 'storey-1', 500);
    expect(after.storeys.map(({ top, height }) => [top, height])).toEqual([
      [-180, 320],
      [140, 500],
      [640, 320],
    ]);
    for (const piece of after.equipment) expect(storeyAt(after, piece.y)?.id).toBe(piece.storeyId);
  });
});
