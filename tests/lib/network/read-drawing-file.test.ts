import { expect, it } from 'vitest';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { readDrawingFile } from '@/lib/network/read-drawing-file';
import { ladder } from '../../make/drawing';

const loop = ladder([0.2, 0.3]);

it('an exported drawing comes back as it was', () => {
  expect(readDrawingFile(JSON.stringify(loop))).toEqual({ ok: true, read: { drawing: loop, notes: [] } });
});

it('a network document comes in with a piece for each of its links', () => {
  const file = readDrawingFile(JSON.stringify(drawingToDocument(loop, 'Level 2').document));
  expect(
    file.ok &&
      file.read.drawing.equipment
        .filter(({ kind }) => kind !== 'tee')
        .map(({ kind }) => kind)
        .sort(),
  ).toEqual(['expansionVessel', 'pump', 'source', 'terminalUnit', 'terminalUnit']);
});

it('every fault of a document is named with its place, and what is no JSON is said to be none', () => {
  const { document } = drawingToDocument(loop, 'Level 2');
  const broken = { ...document!, links: document!.links.map((link) => (link.id === 's-1' ? { ...link, boreMm: -1 } : link)) };
  const file = readDrawingFile(JSON.stringify(broken));
  expect(file).toMatchObject({ ok: false, issues: [expect.stringMatching(/^links\[\d+\]\.boreMm \(s-1\) must be greater than 0/)] });
  expect(readDrawingFile('teapot')).toMatchObject({ ok: false, message: expect.stringContaining('not JSON') });
  expect(readDrawingFile('{"format":"drawing/1","pipes":[]}')).toMatchObject({ ok: false });
});
