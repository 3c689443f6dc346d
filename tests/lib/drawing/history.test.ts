import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { beginGesture, createDrawingStore } from '@/components/drawing/store';
import { commandFor, commands, commandsFor, keyWords } from '@/components/drawing/commands';
import { duplicatePieces } from '@/lib/network/duplicate-pieces';
import { mirrorPieces, nudgePieces, rotatePieces } from '@/lib/network/move-pieces';
import { removeFromDrawing } from '@/lib/network/remove-pieces';
import type { Drawing } from '@/lib/network/drawing';
import { anyDrawing } from '../../make/any-drawing';

const edits: ((drawing: Drawing, ids: Set<string>) => Drawing)[] = [
  (drawing, ids) => nudgePieces(drawing, ids, { x: 10, y: 320 }),
  rotatePieces,
  mirrorPieces,
  (drawing, ids) => duplicatePieces(drawing, ids).drawing,
  (drawing, ids) => removeFromDrawing(drawing, ids, new Set()),
];

describe('the history of a drawing', () => {
  it('undoes every edit to exactly what was there, and redoes to exactly what came of it', () => {
    fc.assert(
      fc.property(anyDrawing, fc.array(fc.tuple(fc.nat(edits.length - 1), fc.nat(11)), { minLength: 1, maxLength: 8 }), (start, steps) => {
        const store = createDrawingStore(start);
        const text = () => JSON.stringify(store.getState().drawing);
        const seen = [text()];
        for (const [edit, pick] of steps) {
          const before = store.getState().drawing;
          const piece = before.equipment[pick % Math.max(1, before.equipment.length)];
          if (!piece) continue;
          store.getState().change((drawing) => edits[edit](drawing, new Set([piece.id])));
          if (store.getState().drawing !== before) seen.push(text());
        }
        const history = store.temporal.getState();
        for (const was of [...seen].reverse().slice(1)) {
          history.undo();
          expect(text()).toBe(was);
        }
        for (const was of seen.slice(1)) {
          history.redo();
          expect(text()).toBe(was);
        }
      }),
      { numRuns: 60 },
    );
  });

  it('takes a whole drag as one step', () => {
    fc.assert(
      fc.property(anyDrawing, (start) => {
        const store = createDrawingStore(start);
        const ids = new Set([start.equipment[0].id]);
        const end = beginGesture(store);
        for (let i = 0; i < 5; i++) store.getState().change((drawing) => nudgePieces(drawing, ids, { x: 10, y: 0 }));
        end();
        expect(store.getState().drawing.equipment[0].x).toBe(start.equipment[0].x + 50);
        expect(store.temporal.getState().pastStates).toHaveLength(1);
        store.temporal.getState().undo();
        expect(store.getState().drawing).toBe(start);
      }),
      { numRuns: 20 },
    );
  });

  it('keeps no step of a drag that came to nothing', () => {
    const store = createDrawingStore({
      format: 'drawing/1',
      fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 },
      pumpExcess: 'speed',
      storeys: [],
      equipment: [],
      pipes: [],
    });
    beginGesture(store)();
    expect(store.temporal.getState().pastStates).toEqual([]);
  });
});

describe('the keys', () => {
  const press = (key: string, held: Partial<Record<'ctrlKey' | 'metaKey' | 'shiftKey' | 'altKey', boolean>> = {}) =>
    commandFor({ key, ctrlKey: false, metaKey: false, shiftKey: false, altKey: false, ...held });

  it('tell undo from redo, find from fit and copy from the control valve', () => {
    expect(press('z', { ctrlKey: true })).toBe('undo');
    expect(press('Z', { ctrlKey: true, shiftKey: true })).toBe('redo');
    expect(press('y', { metaKey: true })).toBe('redo');
    expect(press('f', { ctrlKey: true })).toBe('find');
    expect(press('f')).toBe('fit');
    expect(press('c', { ctrlKey: true })).toBe('copy');
    expect(press('c')).toBe('tool-controlValve');
  });

  it('take a sign whether or not the keyboard needs Shift for it', () => {
    expect(press('?', { shiftKey: true })).toBe('shortcuts');
    expect(press('+', { shiftKey: true })).toBe('zoom-in');
    expect(press('+')).toBe('zoom-in');
  });

  it('leave to the browser what is not theirs', () => {
    expect(press('r', { ctrlKey: true })).toBeNull();
    expect(press('p', { altKey: true })).toBeNull();
    expect(press('5')).toBeNull();
  });

  it('tell a nudge from a longer move, a line-up and going to the next piece', () => {
    expect(press('ArrowLeft')).toBe('nudge-left');
    expect(press('ArrowLeft', { shiftKey: true })).toBe('shift-left');
    expect(press('ArrowLeft', { ctrlKey: true, shiftKey: true })).toBe('align-left');
    expect(press('ArrowLeft', { altKey: true })).toBe('go-left');
    expect(press('ArrowLeft', { altKey: true, shiftKey: true })).toBe('add-left');
  });

  it('are one a thing, every command has one, and each is found by its own', () => {
    const all = commands.flatMap(({ keys }) => keys.map(keyWords));
    expect(new Set(all).size).toBe(all.length);
    for (const { id, keys } of commands) {
      expect(keys.length, id).toBeGreaterThan(0);
      for (const { key, mod, shift, alt } of keys)
        expect(press(key, { ctrlKey: mod ?? false, shiftKey: shift ?? false, altKey: alt ?? false })).toBe(id);
    }
  });

  it('change nothing for those who only read', () => {
    const readable = commandsFor(false).map(({ id }) => id);
    expect(readable).toContain('zoom-selection');
    for (const id of ['delete', 'rotate', 'paste', 'storey-remove', 'renumber', 'tool-pump']) expect(readable).not.toContain(id);
  });
});
