import { designFlows } from '@/lib/hydraulics/design-flows';
import type { FluidSpecification } from '@/lib/hydraulics/fluids';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { Drawing, DrawingFluid } from '../drawing';
import { drawingToDocument } from '../drawing-to-document';

/** The document of a drawing that was made whole; a fault in it is a mistake of whoever made it. */
export function solvableDocument(drawing: Drawing): NetworkDocument {
  const { document, faults } = drawingToDocument(drawing, 'generated');
  if (!document) throw new Error(`The drawing cannot be solved: ${faults.map(({ message }) => message).join(' ')}`);
  return document;
}

/** L/s through each open link when every terminal has its design flow, by the link's id. */
export function designFlowOfLinks(document: NetworkDocument): Map<string, number> {
  const { network, flow } = designFlows(document);
  return new Map(Array.from(network.position, (at, i) => [document.links[at].id, Math.abs(flow[i])]));
}

/** The fluid at the mean of supply and return, as `drawingToDocument` takes it. */
export function meanFluid({ medium, massFraction, supplyC, returnC }: DrawingFluid): FluidSpecification {
  const temperatureC = (supplyC + returnC) / 2;
  return medium === 'water' ? { medium, temperatureC } : { medium, temperatureC, massFraction };
}
