import { describe, expect, it } from 'vitest';
import { connect, freePortTowards } from '@/lib/network/connect-pipe';
import { circuitAt, drawingSchema, portsOf, type Drawing, type Equipment, type EquipmentOf } from '@/lib/network/drawing';
import { faultsOf } from '@/lib/network/drawing-faults';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { duplicatePieces } from '@/lib/network/duplicate-pieces';
import { blankPiece } from '@/lib/network/new-piece';
import { portPlace } from '@/lib/network/piece-geometry';
import { firstPipeFigures } from '@/lib/network/pipe-choice';
import { removeFromDrawing } from '@/lib/network/remove-pieces';
import { decoupler, drawing, ladder, pipe } from '../../make/drawing';
import { solved } from '../../make/solved';

const placed = (id: string) => ({ id, tag: id, storeyId: null, x: 0, y: 0, rotation: 0 as const, isMirrored: false });
const make = <K extends Equipment['kind']>(kind: K, id: string, fields: object = {}) =>
  ({ ...blankPiece(kind, placed(id)), ...fields }) as EquipmentOf<K>;

/** A piece with two ends put into the pipe `b-1`, the return of the first terminal. */
function inReturn(loop: Drawing, piece: Equipment): Drawing {
  const pipes = loop.pipes.flatMap((it) =>
    it.id === 'b-1' ? [{ ...it, to: { equipmentId: piece.id, port: 'in' as const } }, pipe('b-1x', `${piece.id}.out`, 'R-1.n', 1)] : [it],
  );
  return { ...loop, equipment: [...loop.equipment, piece], pipes };
}

const flowOf = (from: Drawing, id: string) => figuresOfDrawing(from, solved(from), 'drawn')!.pieces.get(id)!;

describe('differential pressure controller', () => {
  const controller = make('dpController', 'DPC', { setpointKpa: 25, kvs: 10, senseHigh: { equipmentId: 'S-1', port: 'n' } });

  it('holds its set point between the two points that its impulse lines end at', () => {
    const loop = inReturn(ladder([0.2, 0.3]), controller);
    const { nodes } = solved(loop).solve;
    const at = (id: string) => nodes.find((node) => node.id === id)!.pressureKpa;
    expect(at('S-1') - at('DPC.in')).toBeCloseTo(25, 2);
  });

  it('lacks its figures until they are said', () => {
    const bare = inReturn(ladder([0.2]), { ...controller, setpointKpa: null, kvs: null });
    expect(faultsOf(bare).map(({ message }) => message)).toEqual(['DPC has no set point.', 'DPC has no Kvs.']);
  });

  it('a copy senses the copy of what it sensed, and lets go of what is taken away', () => {
    const loop = inReturn(ladder([0.2]), controller);
    const { added } = duplicatePieces(loop, new Set(['DPC', 'S-1']));
    const tee = added.equipment.find(({ kind }) => kind === 'tee')!;
    expect(added.equipment.find(({ kind }) => kind === 'dpController')).toMatchObject({ senseHigh: { equipmentId: tee.id, port: 'n' } });
    expect(duplicatePieces(loop, new Set(['DPC'])).added.equipment).toMatchObject([{ senseHigh: { equipmentId: 'S-1' } }]);
    expect(removeFromDrawing(loop, new Set(['S-1']), new Set()).equipment.find(({ id }) => id === 'DPC')).toMatchObject({
      senseHigh: null,
    });
  });
});

it('a pressure-independent control valve holds its flow however strong the pump is', () => {
  const limiter = make('flowLimiter', 'PI', { limitLs: 0.15, minDropKpa: 20 });
  const loop = inReturn(ladder([0.2, 0.3]), limiter);
  expect(flowOf(loop, 'PI').flowLs).toBeCloseTo(0.15, 6);
  expect(flowOf(loop, 'FC-1').flowLs).toBeCloseTo(0.15, 6);
});

describe('header', () => {
  const header = make('header', 'H');

  it('has ten places, all one point of the network', () => {
    expect(new Set(portsOf('header').map((port) => JSON.stringify(portPlace(header, port)))).size).toBe(10);
    const loop = ladder([0.2]);
    const onHeader: Drawing = {
      ...loop,
      equipment: loop.equipment.map((piece) => (piece.id === 'R-0' ? { ...header, id: 'R-0' } : piece)),
      pipes: loop.pipes.map((it) => {
        const moved = (end: typeof it.from) =>
          end.equipmentId === 'R-0'
            ? { ...end, port: it.id === 'p-pump' ? ('n1' as const) : it.id === 'p-vessel' ? ('s4' as const) : ('e' as const) }
            : end;
        return { ...it, from: moved(it.from), to: moved(it.to) };
      }),
    };
    expect(faultsOf(onHeader)).toEqual([]);
    expect(solved(onHeader).solve.pumps[0]!.flowLs).toBeCloseTo(solved(loop).solve.pumps[0]!.flowLs, 9);
  });

  it('gives each pipe a place of its own, the nearest that is free', () => {
    const pieces = [header, make('tee', 'A', { x: -60, y: -200 }), make('tee', 'B', { x: -50, y: -200 })];
    let sheet = drawing(pieces, []);
    for (const other of ['A', 'B']) {
      const piece = sheet.equipment.find(({ id }) => id === other)!;
      const made = connect(sheet, freePortTowards(sheet, header, piece)!, freePortTowards(sheet, piece, header)!, firstPipeFigures);
      if ('refused' in made) throw new Error(made.refused);
      sheet = made.drawing;
    }
    expect(sheet.pipes.map(({ from }) => from.port)).toEqual(['n1', 'n2']);
  });
});

describe('decoupler', () => {
  it('lets the flows on its two sides differ', () => {
    const loop = ladder([0.2, 0.3]);
    const bypass: Drawing = {
      ...loop,
      equipment: [...loop.equipment, decoupler('D')],
      pipes: [...loop.pipes, pipe('d-1', 'S-1.n', 'D.in', 1, 52.5), pipe('d-2', 'D.out', 'R-1.s', 1, 52.5)],
    };
    const figures = figuresOfDrawing(bypass, solved(bypass), 'drawn')!;
    const throughPump = figures.pieces.get('P-1')!.flowLs!;
    const throughCoils = ['FC-1', 'FC-2'].reduce((sum, id) => sum + figures.pieces.get(id)!.flowLs!, 0);
    expect(throughPump - throughCoils).toBeCloseTo(figures.pieces.get('D')!.flowLs!, 6);
    expect(figures.pieces.get('D')!.flowLs).toBeGreaterThan(0.1);
  });

  it('its ends know supply and return, as those of a coil and a source do', () => {
    expect([circuitAt('decoupler', 'in'), circuitAt('decoupler', 'out')]).toEqual(['supply', 'return']);
    expect([circuitAt('source', 'in'), circuitAt('source', 'out')]).toEqual(['return', 'supply']);
    expect(circuitAt('pump', 'in')).toBeNull();
  });
});

it('a flow station costs its loss, or its whole signal where no loss is known', () => {
  const kvOf = (fields: object) => {
    const { document } = drawingToDocument(inReturn(ladder([0.2]), make('flowStation', 'FS', fields)), '');
    return document!.links.find(({ id }) => id === 'FS');
  };
  expect(kvOf({ signalKv: 5, lossKv: 8 })).toMatchObject({ kind: 'resistance', kv: 8 });
  expect(kvOf({ signalKv: 5 })).toMatchObject({ kind: 'resistance', kv: 5 });
});

it('a pressure station is a point that costs nothing, and shows its pressure', () => {
  const loop = ladder([0.2]);
  const station = { ...loop, equipment: loop.equipment.map((piece) => (piece.id === 'S-1' ? make('pressureStation', 'S-1') : piece)) };
  expect(solved(station).solve.pumps[0]!.flowLs).toBeCloseTo(solved(loop).solve.pumps[0]!.flowLs, 9);
  expect(flowOf(station, 'S-1').inletKpa).toBeCloseTo(flowOf(loop, 'S-1').inletKpa!, 6);
});

it('a drawing from before these pieces still reads, unchanged', () => {
  const old = ladder([0.2]);
  expect(drawingSchema.parse(JSON.parse(JSON.stringify(old)))).toEqual(old);
});
