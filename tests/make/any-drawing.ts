import fc from 'fast-check';
import { emptyDrawing, type Drawing, type EquipmentKind } from '@/lib/network/drawing';
import { joinPieces } from '@/lib/network/connect-pipe';
import { newPiece } from '@/lib/network/new-piece';
import { firstPipeFigures } from '@/lib/network/pipe-choice';

const kinds: EquipmentKind[] = [
  'pump',
  'source',
  'terminalUnit',
  'balancingValve',
  'controlValve',
  'checkValve',
  'isolatingValve',
  'strainer',
  'tee',
  'expansionVessel',
  'dpController',
  'flowLimiter',
  'header',
  'decoupler',
  'flowStation',
  'pressureStation',
];

/** Drawings as a designer makes them: pieces put down anywhere, some joined; whatever refuses to be joined stays apart. */
export const anyDrawing: fc.Arbitrary<Drawing> = fc
  .record({
    pieces: fc.array(
      fc.record({ kind: fc.constantFrom(...kinds), x: fc.integer({ min: -50, max: 150 }), y: fc.integer({ min: -20, max: 120 }) }),
      { minLength: 2, maxLength: 12 },
    ),
    joins: fc.array(fc.record({ a: fc.nat(11), b: fc.nat(11), lengthM: fc.integer({ min: 1, max: 400 }) }), { maxLength: 14 }),
  })
  .map(({ pieces, joins }) => {
    let drawing = emptyDrawing('chilled');
    for (const { kind, x, y } of pieces) {
      drawing = { ...drawing, equipment: [...drawing.equipment, newPiece(drawing, kind, { x: x * 10, y: y * 10 })] };
    }
    for (const { a, b, lengthM } of joins) {
      const [first, second] = [drawing.equipment[a], drawing.equipment[b]];
      if (!first || !second) continue;
      const made = joinPieces(drawing, first, second, { ...firstPipeFigures, lengthM: lengthM / 4, minorK: 1 });
      if ('drawing' in made) drawing = made.drawing;
    }
    return drawing;
  });
