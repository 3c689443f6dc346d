import { fluidProperties } from '@/lib/hydraulics/fluids';
import type { Drawing } from '@/lib/network/drawing';
import { unitLinkId } from '@/lib/network/drawing-to-document';
import { chooseBalancingValve } from '@/lib/network/generate/balancing-valve-choice';
import { setValves } from '@/lib/network/generate/set-valves';
import { sizePipes } from '@/lib/network/generate/size-pipes';
import { designFlowOfLinks, meanFluid, solvableDocument } from '@/lib/network/generate/solvable-document';
import { genericValves } from '@/lib/network/valve-families';

const pipeRules = { series: 'steel-en10255-medium', maxPaPerM: 250, maxVelocityMs: 1.2 } as const;
/** Widely taught least reading of a balancing valve at design flow; common practice, no source. */
const minReadingKpa = 3;
/** The pump chosen is a little large, as pumps are: its curve passes this far above the duty. */
const pumpSurplus = 1.12;

/** A drawn demo loop with its pipes sized, valves and pump chosen, and all valves at the settings of the balance, as a generated loop has them. */
export function sizeDemo(drawn: Drawing): Drawing {
  const water = fluidProperties(meanFluid(drawn.fluid));
  if (!water.ok) throw new Error(water.error.message);
  const wish = { sizes: genericValves, minReadingKpa, densityKgM3: water.properties.densityKgM3 };

  const { drawing: piped } = sizePipes(drawn, new Map(), pipeRules);
  const flowOf = designFlowOfLinks(solvableDocument(piped));
  const valveFor = (linkId: string) => chooseBalancingValve(flowOf.get(linkId)!, wish);
  const equipment = piped.equipment.map((piece) => {
    if (piece.kind === 'balancingValve') return { ...piece, valve: valveFor(piece.id) };
    return piece.kind === 'terminalUnit' ? { ...piece, balancingValve: valveFor(unitLinkId(piece.id, 'balancing')) } : piece;
  });
  const set = setValves({ ...piped, equipment }, wish, pumpSurplus);
  if ('unfit' in set) throw new Error(set.unfit);
  return set.drawing;
}
