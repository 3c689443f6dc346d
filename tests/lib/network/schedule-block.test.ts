import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { blockText, fillDownEdits, parseBlock, pasteEdits } from '@/lib/network/schedule-block';

const seen = { rowIds: ['a', 'b', 'c'], keys: ['load', 'design', 'drop'] };
const at = (top: number, left: number, bottom = top, right = left) => ({ top, left, bottom, right });

describe('a block from a spreadsheet', () => {
  it('is read row by row, with the line ends of any system and cells that hold them', () => {
    expect(parseBlock('1\t2\r\n3\t4\r\n')).toEqual([
      ['1', '2'],
      ['3', '4'],
    ]);
    expect(parseBlock('"two\nlines"\t5')).toEqual([['two\nlines', '5']]);
    expect(parseBlock('1;2')).toEqual([['1;2']]);
  });

  it('changes the cells from the upper left of the range, in the order in which they are seen', () => {
    const pasted = pasteEdits([['1', '2'], ['3']], at(1, 1), seen);
    expect(pasted).toEqual({
      ok: true,
      edits: [
        { id: 'b', key: 'design', text: '1' },
        { id: 'b', key: 'drop', text: '2' },
        { id: 'c', key: 'design', text: '3' },
      ],
    });
  });

  it('that reaches beyond the table is refused', () => {
    expect(pasteEdits([['1'], ['2']], at(2, 0), seen)).toEqual({
      ok: false,
      message: 'The block has 2 rows; from here only 1 stand below.',
    });
    expect(pasteEdits([['1', '2']], at(0, 2), seen)).toMatchObject({ ok: false });
  });

  it('of one cell fills all that is selected', () => {
    const pasted = pasteEdits([['9']], at(0, 0, 1, 1), seen);
    expect(pasted.ok && pasted.edits.map(({ id, key }) => id + key)).toEqual(['aload', 'adesign', 'bload', 'bdesign']);
  });
});

it('copied cells come back as they were, and none of them is a formula to a spreadsheet', () => {
  const cell = fc.string({ maxLength: 8 }).filter((text) => !text.startsWith("'") && !/\r/.test(text));
  fc.assert(
    fc.property(fc.array(fc.tuple(cell, cell), { minLength: 1, maxLength: 5 }), (rows) => {
      fc.pre(rows.at(-1)!.some((text) => text !== '') && rows.every(([first, second]) => !/^\t/.test(first) && !/^\t/.test(second)));
      const text = blockText(rows.map((row) => row.map((it) => ({ text: it, isFigure: false }))));
      for (const row of rows.keys()) expect(text.split('\n')[row] ?? '').not.toMatch(/^[=+\-@]/);
      expect(parseBlock(text)).toEqual(rows);
    }),
  );
});

it('fills down from the first row of the range, column by column', () => {
  const edits = fillDownEdits(at(0, 1, 2, 2), seen, (id, key) => `${id}.${key}`);
  expect(edits).toEqual([
    { id: 'b', key: 'design', value: 'a.design' },
    { id: 'c', key: 'design', value: 'a.design' },
    { id: 'b', key: 'drop', value: 'a.drop' },
    { id: 'c', key: 'drop', value: 'a.drop' },
  ]);
});
