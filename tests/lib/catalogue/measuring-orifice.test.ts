import { describe, expect, it } from 'vitest';
import { copiedValve, offeredValves } from '@/lib/catalogue/chosen-entries';
import { flowFromDrop } from '@/lib/commissioning/reading-flow';
import { balance } from '@/lib/hydraulics/balance';
import { drawingSchema } from '@/lib/network/drawing';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { stationsOfDrawing } from '@/lib/network/stations-of-drawing';
import { change, ladder } from '../../make/drawing';

const points = [1, 2, 4].map((setting) => ({ setting, kv: setting / 2, measuringKv: 3 }));
const [offered] = offeredValves([{ name: 'House valve', sizes: [{ nominal: 'DN15', stepTurns: 0.1, points }] }]);
const chosen = { ...copiedValve(offered!), isLocked: false };

describe('a valve whose flow is read over an orifice of its own', () => {
  it('gives the flow of the orifice, 36 q = Kv √dp, whatever the handwheel says', () => {
    const read = (settingTurns: number) => flowFromDrop({ kvTable: points, settingTurns, dropKpa: 4, densityKgM3: 1000 });
    for (const turns of [1, 2.5, 4]) expect(read(turns)).toMatchObject({ ok: true, kv: 3, flowLs: expect.closeTo((3 * 2) / 36, 12) });
    expect(read(4.1)).toMatchObject({ ok: false, path: 'settingTurns' });
  });

  it('gives it by the setting where the orifice moves with the handwheel', () => {
    const moving = points.map((point) => ({ ...point, measuringKv: 2 * point.setting }));
    expect(flowFromDrop({ kvTable: moving, settingTurns: 3, dropKpa: 1, densityKgM3: 1000 })).toMatchObject({ ok: true, kv: 6 });
  });

  it('is balanced by its own Kv and its step, and tells the technician the drop of the orifice', () => {
    const drawing = drawingSchema.parse(change(ladder([0.2]), 'FC-1', { balancingValve: chosen }));
    const { document } = drawingToDocument(drawing, 'Loop');
    const link = document!.links.find(({ id }) => id === 'FC-1:balancing');
    expect(link).toMatchObject({ settingStep: 0.1, kvTable: points.map(({ setting, kv }) => ({ setting, kv })) });
    expect(JSON.stringify(link)).not.toContain('measuringKv');

    const balanced = balance(document!);
    const station = stationsOfDrawing(drawing, balanced).find(({ tag }) => tag === 'FC-1')!;
    // Design flow through Kv 3: (36 · 0.2 / 3)² = 5.76 kPa at 1000 kg/m³, less in lighter water.
    expect(station.expectedDropKpa).toBeCloseTo((5.76 * balanced.solution.fluid.densityKgM3) / 1000, 9);
  });

  it('has a measuring Kv at every setting or at none; drawings from before have none and stay as they are', () => {
    const some = { ...chosen, kvTable: points.map(({ measuringKv, ...point }, i) => (i === 0 ? point : { ...point, measuringKv })) };
    const parse = (balancingValve: object) => drawingSchema.safeParse(change(ladder([0.2]), 'FC-1', { balancingValve }));
    expect(parse(some).success).toBe(false);
    const old = ladder([0.2, 0.3]);
    expect(drawingSchema.parse(old)).toEqual(old);
  });
});
