import { balance } from '@/lib/hydraulics/balance';
import { solve } from '@/lib/hydraulics/solve';
import type { Drawing } from '@/lib/network/drawing';
import { drawingToDocument } from '@/lib/network/drawing-to-document';

/** A drawing solved and balanced by the engine; throws where it has faults. */
export function solved(drawing: Drawing) {
  const { document, faults } = drawingToDocument(drawing, 'test');
  if (!document) throw new Error(`Not to be solved: ${faults.map(({ message }) => message).join(' ')}`);
  return { solve: solve(document), balance: balance(document) };
}
