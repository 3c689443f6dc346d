import { describe, expect, it } from 'vitest';
import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { drawingSchema } from '@/lib/network/drawing';
import { documentToDrawing } from '@/lib/network/document-to-drawing';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { ladder } from '../../make/drawing';

const documentOf = (drawing: Parameters<typeof drawingToDocument>[0]) => {
  const { document, faults } = drawingToDocument(drawing, 'again');
  if (!document) throw new Error(faults.map(({ message }) => message).join(' '));
  return document;
};

/** Flow and inlet pressure of each piece of a drawing, by its tag. */
function byTag(document: NetworkDocument) {
  const { drawing, notes } = documentToDrawing(document);
  const figures = figuresOfDrawing(drawing, { solve: solve(documentOf(drawing)), balance: null }, 'drawn')!;
  return { drawing, notes, of: new Map(drawing.equipment.map((piece) => [piece.tag, figures.pieces.get(piece.id)!])) };
}

const pipe = (id: string, from: string, to: string) => ({
  id,
  kind: 'pipe' as const,
  from,
  to,
  lengthM: 10,
  boreMm: 41.8,
  roughnessMm: 0.045,
  minorK: 2,
});

/** Every kind of link there is, two elevations, a closed link and a reference that is not the first node. */
const everyKind: NetworkDocument = {
  format: 'network/1',
  name: 'Every kind',
  fluid: { medium: 'propylene-glycol', massFraction: 0.3, temperatureC: 9 },
  reference: { node: 'R0', gaugePressureKpa: 180 },
  nodes: ['A', 'B', 'C', 'D', 'S1', 'S2', 'R1', 'R0', 'a1', 'a2', 'a3', 'b1', 'b2', 'x1'].map((id) => ({
    id,
    elevationM: ['S2', 'b1', 'b2', 'a3'].includes(id) ? 8 : 0,
  })),
  links: [
    { id: 'PU', kind: 'pump', from: 'R0', to: 'A', curve: [0, 2, 4].map((flowLs) => ({ flowLs, headM: 20 - flowLs })), speed: 0.9 },
    { id: 'NR', kind: 'checkValve', from: 'A', to: 'B', kv: 30 },
    { id: 'CH', kind: 'resistance', from: 'B', to: 'C', designFlowLs: 1.5, designDropKpa: 25 },
    { id: 'ST', kind: 'resistance', from: 'C', to: 'D', kv: 25 },
    pipe('p1', 'D', 'S1'),
    pipe('p2', 'S1', 'S2'),
    { id: 'CV', kind: 'controlValve', from: 'S1', to: 'a1', kvs: 6.3, characteristic: 'linear', opening: 0.8 },
    { id: 'T1', kind: 'terminal', from: 'a1', to: 'a2', designFlowLs: 0.6, designDropKpa: 20, loadKw: 14 },
    {
      id: 'BV',
      kind: 'balancingValve',
      from: 'a2',
      to: 'R1',
      kvTable: [
        { setting: 0, kv: 0.2 },
        { setting: 4, kv: 6 },
      ],
      setting: 3,
    },
    { id: 'T2', kind: 'terminal', from: 'S2', to: 'b1', designFlowLs: 0.5, designDropKpa: 18 },
    { id: 'PI', kind: 'flowLimiter', from: 'b1', to: 'b2', limitLs: 0.4, minDropKpa: 15 },
    pipe('p3', 'b2', 'R1'),
    { id: 'DP', kind: 'dpController', from: 'R1', to: 'x1', setpointKpa: 60, kvs: 16, sense: ['S1', 'R1'] },
    pipe('p4', 'x1', 'R0'),
    { ...pipe('shut', 'S1', 'R0'), closed: true },
    { id: 'T3', kind: 'terminal', from: 'S2', to: 'a3', designFlowLs: 0.3, designDropKpa: 18 },
    pipe('p5', 'a3', 'R1'),
  ],
  options: { pumpExcess: 'throttle' },
};

describe('a network document as a drawing', () => {
  it('has a piece for every kind of link, and solves to the same flows and pressures', () => {
    const { drawing, notes, of } = byTag(everyKind);
    expect(notes).toEqual([]);
    expect(drawingSchema.safeParse(drawing).success).toBe(true);
    const { links, nodes } = solve(everyKind);
    const flow = (id: string) => links.find((link) => link.id === id)!.flowLs;
    const pressure = (id: string) => nodes.find((node) => node.id === id)!.pressureKpa;
    for (const id of ['PU', 'NR', 'CH', 'ST', 'T1', 'T2', 'PI', 'DP', 'T3']) expect(of.get(id)!.flowLs, id).toBeCloseTo(flow(id), 5);
    for (const [tag, node] of [
      ['PU', 'R0'],
      ['NR', 'A'],
      ['CH', 'B'],
      ['PI', 'b1'],
      ['DP', 'R1'],
    ] as const)
      expect(of.get(tag)!.inletKpa, tag).toBeCloseTo(pressure(node), 2);
    expect(drawing.pumpExcess).toBe('throttle');
  });

  it('control valve, coil and balancing valve in series become one terminal unit', () => {
    const { drawing } = byTag(everyKind);
    expect(drawing.equipment.find(({ tag }) => tag === 'T1')).toMatchObject({
      kind: 'terminalUnit',
      loadKw: 14,
      controlValve: { kvs: 6.3, opening: 0.8 },
      balancingValve: { settingTurns: 3 },
    });
    expect(drawing.equipment.some(({ tag }) => tag === 'CV' || tag === 'BV')).toBe(false);
  });

  it('no two pieces lie on one another, each in the band of its elevation', () => {
    const { drawing } = byTag(everyKind);
    expect(new Set(drawing.equipment.map(({ x, y }) => `${x} ${y}`)).size).toBe(drawing.equipment.length);
    for (const { y, storeyId } of drawing.equipment) {
      const { top, height } = drawing.storeys.find(({ id }) => id === storeyId)!;
      expect(y > top && y < top + height).toBe(true);
    }
  });

  it('a drawing that goes out as a document and comes back solves as before', () => {
    const loop = ladder([0.2, 0.3, 0.25]);
    const { of, notes, drawing } = byTag(documentOf(loop));
    expect(notes).toEqual([]);
    expect(drawing.equipment.filter(({ kind }) => kind === 'terminalUnit')).toHaveLength(3);
    const before = figuresOfDrawing(loop, { solve: solve(documentOf(loop)), balance: null }, 'drawn')!;
    for (const id of ['P-1', 'CH-1', 'FC-1', 'FC-2', 'FC-3']) {
      expect(of.get(id)!.flowLs, id).toBeCloseTo(before.pieces.get(id)!.flowLs!, 5);
      expect(of.get(id)!.inletKpa, id).toBeCloseTo(before.pieces.get(id)!.inletKpa!, 2);
    }
  });

  it('names what a drawing has no place for', () => {
    const odd: NetworkDocument = {
      ...everyKind,
      fluid: { medium: 'custom', densityKgM3: 900, viscosityMPaS: 2, specificHeatKJKgK: 3.5 },
      links: everyKind.links.map((link) =>
        link.kind === 'terminal' ? { ...link, exponent: 1.8 } : link.kind === 'controlValve' ? { ...link, rangeability: 30 } : link,
      ),
    };
    expect(
      documentToDrawing(odd)
        .notes.map((note) => note.split(':')[0])
        .sort(),
    ).toEqual(['CV', 'T1', 'T2', 'T3', 'fluid']);
  });
});
