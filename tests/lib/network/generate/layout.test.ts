import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { drawingSchema, portsOf, type Drawing, type Equipment } from '@/lib/network/drawing';
import { faultsOf } from '@/lib/network/drawing-faults';
import { GRID, sizeOf, type Point } from '@/lib/network/piece-geometry';
import { routeOfPipe } from '@/lib/network/pipe-route';
import { generated } from '../../../make/generated';
import { anyOptions, anySchedule, schedule } from '../../../make/schedule';

vi.setConfig({ testTimeout: 120_000 });

interface Box {
  id: string;
  left: number;
  right: number;
  top: number;
  bottom: number;
}

const boxesOf = ({ equipment }: Drawing): Box[] =>
  equipment.map((piece) => {
    const { width, height } = sizeOf(piece);
    return { id: piece.id, left: piece.x - width / 2, right: piece.x + width / 2, top: piece.y - height / 2, bottom: piece.y + height / 2 };
  });

const unitsBy = <Key>({ equipment }: Drawing, key: (unit: Equipment) => Key): Equipment[][] => {
  const groups = new Map<Key, Equipment[]>();
  for (const unit of equipment) if (unit.kind === 'terminalUnit') groups.set(key(unit), [...(groups.get(key(unit)) ?? []), unit]);
  return [...groups.values()];
};

const overlap = (a: Box, b: Box) => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

const boxOfLine = (id: string, a: Point, b: Point): Box => ({
  id,
  left: Math.min(a.x, b.x) - 1,
  right: Math.max(a.x, b.x) + 1,
  top: Math.min(a.y, b.y) - 1,
  bottom: Math.max(a.y, b.y) + 1,
});

function expectReadable(drawing: Drawing) {
  const boxes = boxesOf(drawing);
  const touching = boxes.flatMap((box, i) => boxes.slice(i + 1).filter((other) => overlap(box, other)));
  expect(touching).toEqual([]);

  const bands = new Map(drawing.storeys.map((storey) => [storey.id, storey]));
  drawing.equipment.forEach((piece, i) => {
    const { top, height } = bands.get(piece.storeyId!)!;
    expect(boxes[i].top).toBeGreaterThanOrEqual(top);
    expect(boxes[i].bottom).toBeLessThanOrEqual(top + height);
    expect([piece.x % GRID, piece.kind === 'terminalUnit' ? 0 : piece.y % GRID]).toEqual([0, 0]);
  });

  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  for (const pipe of drawing.pipes) {
    for (const { equipmentId, port } of [pipe.from, pipe.to]) expect(portsOf(pieces.get(equipmentId)!.kind)).toContain(port);
    const route = routeOfPipe(pipe, pieces)!;
    const ends = new Set([pipe.from.equipmentId, pipe.to.equipmentId]);
    for (let k = 1; k < route.length; k++) {
      expect(route[k].x === route[k - 1].x || route[k].y === route[k - 1].y).toBe(true);
      const line = boxOfLine(pipe.id, route[k - 1], route[k]);
      expect(boxes.filter((box) => !ends.has(box.id) && overlap(line, box))).toEqual([]);
    }
  }
}

describe('a generated drawing', () => {
  it('has pieces apart from one another in the bands of their storeys, and pipes along the sheet that run over none of them', async () => {
    await fc.assert(
      fc.asyncProperty(anySchedule, anyOptions, async (terminals, options) => {
        const { drawing } = await generated(terminals, options);
        expectReadable(drawing);
      }),
      { numRuns: 20 },
    );
  });

  it('is a drawing without a fault', async () => {
    await fc.assert(
      fc.asyncProperty(anySchedule, anyOptions, async (terminals, options) => {
        const { drawing } = await generated(terminals, options);
        expect(drawingSchema.parse(drawing)).toEqual(drawing);
        expect(faultsOf(drawing)).toEqual([]);
      }),
      { numRuns: 12 },
    );
  });

  it('stacks the storeys from the plant room up, without a gap, at their heights', async () => {
    const { drawing } = await generated(schedule(30, { storeys: 3, risers: 1 }), { storeyHeightM: 3.5 });
    const { storeys } = drawing;
    expect(storeys.map(({ name, elevationM }) => [name, elevationM])).toEqual([
      ['Level 3', 10.5],
      ['Level 2', 7],
      ['Level 1', 3.5],
      ['Plant room', 0],
    ]);
    storeys.slice(1).forEach(({ top }, k) => expect(top).toBe(storeys[k].top + storeys[k].height));
  });

  it('draws a storey of many terminals as equal branches, one row above the other, in the order of the schedule', async () => {
    const { drawing, branches } = await generated(schedule(50, { storeys: 1, risers: 1 }), { mostOnBranch: 20 });
    expect(branches).toBe(3);
    const rows = unitsBy(drawing, ({ y }) => y).sort(([a], [b]) => a.y - b.y);
    const inReadingOrder = rows.flatMap((row) => row.sort((a, b) => a.x - b.x));
    expect(rows.map((row) => row.length).sort()).toEqual([16, 17, 17]);
    expect(inReadingOrder.map(({ tag }) => tag)).toEqual(schedule(50, { storeys: 1, risers: 1 }).map(({ tag }) => tag));
  });

  it('places the units of all storeys of a riser in the same columns', async () => {
    const { drawing } = await generated(schedule(24, { storeys: 3, risers: 1 }));
    const [first, ...others] = unitsBy(drawing, ({ storeyId }) => storeyId).map((units) => units.map(({ x }) => x));
    for (const other of others) expect(other).toEqual(first);
  });
});
