import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawingSchema, emptyDrawing, type TagRules } from '@/lib/network/drawing';
import { newPiece } from '@/lib/network/new-piece';
import { renumberTags, tagChanges } from '@/lib/network/renumber-tags';
import { nextTag, ruleFault } from '@/lib/network/tags';
import { anyDrawing } from '../../make/any-drawing';

const empty = emptyDrawing('chilled');
const at = (places: [x: number, y: number][], tags: string[] = []) => ({
  ...empty,
  equipment: places.map(([x, y], i) => ({ ...newPiece(empty, 'terminalUnit', { x, y }), tag: tags[i] ?? `old ${i}` })),
});
const toOf = (drawing: ReturnType<typeof at>, rules: TagRules, ids: Set<string> | null = null) => {
  const after = renumberTags(drawing, rules, ids);
  return after.equipment.map(({ tag }) => tag);
};

describe('a rule for tags', () => {
  it('is refused where it has no place for the number, two of them or a placeholder that is not one', () => {
    expect(ruleFault('{kind}-{storey}.{nn}')).toBeNull();
    expect(ruleFault('VAV {nnn}')).toBeNull();
    expect(ruleFault('{kind}')).toMatch(/\{n\} once/);
    expect(ruleFault('{n}-{nn}')).toMatch(/\{n\} once/);
    expect(ruleFault('{room}-{n}')).toMatch(/braces/);
    expect(ruleFault(' {n}')).toMatch(/blank/);
  });

  it('holds for pieces that come later', () => {
    const ruled = { ...empty, tagRules: { pump: 'PU/{storey}/{nn}' } };
    expect(nextTag(ruled, newPiece(ruled, 'pump', { x: 0, y: 400 }))).toBe('PU/1/01');
    expect(nextTag({ ...ruled, storeys: [] }, newPiece({ ...ruled, storeys: [] }, 'pump', { x: 0, y: 0 }))).toBe('PU/01');
  });
});

describe('renumbering', () => {
  it('counts each storey for itself, from the left', () => {
    const drawing = at([
      [300, 100],
      [100, 100],
      [200, 400],
    ]);
    expect(toOf(drawing, { terminalUnit: 'U{storey}-{nn}' })).toEqual(['U2-02', 'U2-01', 'U1-01']);
  });

  it('counts through the loop where the rule has no storey, from the lowest storey up', () => {
    expect(
      toOf(
        at([
          [300, 100],
          [100, 100],
          [200, 400],
        ]),
        { terminalUnit: 'U{nnn}' },
      ),
    ).toEqual(['U003', 'U002', 'U001']);
  });

  it('passes over the tags of what was not chosen', () => {
    const drawing = at(
      [
        [0, 100],
        [100, 100],
        [200, 100],
      ],
      ['U1', 'x', 'y'],
    );
    const chosen = new Set(drawing.equipment.slice(1).map(({ id }) => id));
    expect(toOf(drawing, { terminalUnit: 'U{n}' }, chosen)).toEqual(['U1', 'U2', 'U3']);
  });

  it('never makes a tag twice, changes nothing the second time, and touches nothing but tags', () => {
    const rules: TagRules = { tee: 'X{n}', pump: 'X{n}', terminalUnit: '{kind}{storey}{nn}', source: 'X{nn}' };
    fc.assert(
      fc.property(anyDrawing, fc.array(fc.nat(11)), fc.boolean(), (before, picks, isAll) => {
        const ids = isAll ? null : new Set(picks.flatMap((i) => before.equipment[i]?.id ?? []));
        const after = renumberTags(before, rules, ids);
        expect(new Set(after.equipment.map(({ tag }) => tag)).size).toBe(after.equipment.length);
        expect(tagChanges(after, rules, ids)).toEqual([]);
        expect(drawingSchema.safeParse(after).success).toBe(true);
        expect(after.equipment.map((piece) => ({ ...piece, tag: '' }))).toEqual(before.equipment.map((piece) => ({ ...piece, tag: '' })));
        expect(after.pipes).toBe(before.pipes);
      }),
    );
  });
});
