import { balance } from '@/lib/hydraulics/balance';
import { size } from '@/lib/hydraulics/size';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import { adoptSettings } from '@/lib/network/adopt-settings';
import type { ChosenValve, Drawing } from '@/lib/network/drawing';
import { drawingToDocument, unitLinkId } from '@/lib/network/drawing-to-document';
import { chosenValve, genericValves } from '@/lib/network/valve-families';
import { pumpCurve } from './demo-drawing';

const limits = { maxPaPerM: 250, maxVelocityMs: 1.2 };
/** Widely taught least reading of a balancing valve at design flow; common practice, no source. */
const leastReadingKpa = 3;
/** The pump chosen is a little large, as pumps are: its curve passes this far above the duty. */
const pumpSurplus = 1.12;

/** A drawn demo loop with its pipes sized, valves and pump chosen, and all valves at the settings of the balance. */
export function sizeDemo(drawn: Drawing): Drawing {
  const wide = documentOf(drawn);
  const sized = size({
    ...wide,
    links: wide.links.map((link) => (link.kind === 'pipe' ? { ...link, size: true, series: 'steel-en10255-medium' as const } : link)),
    options: { ...wide.options, sizing: limits },
  });
  const sizeOfPipe = new Map(sized.pipes.map((pipe) => [pipe.id, pipe]));
  const withPipes: Drawing = {
    ...drawn,
    pipes: drawn.pipes.map((pipe) => {
      // The vessel's pipe carries nothing: its size is that of the vessel's connection.
      if (pipe.from.equipmentId === 'vessel') return { ...pipe, nominal: 'DN25', boreMm: 27.3 };
      const { nominal, boreMm } = sizeOfPipe.get(pipe.id)!;
      return { ...pipe, nominal, boreMm };
    }),
  };

  const first = balance(documentOf(withPipes));
  const flowOf = new Map(first.valves.map((valve) => [valve.id, Math.abs(valve.flowLs)]));
  const withValves: Drawing = {
    ...withPipes,
    equipment: withPipes.equipment.map((piece) => {
      if (piece.kind === 'balancingValve') return { ...piece, valve: valveFor(flowOf.get(piece.id)!) };
      if (piece.kind === 'terminalUnit') return { ...piece, balancingValve: valveFor(flowOf.get(unitLinkId(piece.id, 'balancing'))!) };
      return piece;
    }),
  };

  const duty = balance(documentOf(withValves)).pumps[0]!;
  const withPump: Drawing = {
    ...withValves,
    equipment: withValves.equipment.map((piece) =>
      piece.kind === 'pump'
        ? {
            ...piece,
            curve: pumpCurve(duty.requiredHeadM * pumpSurplus, duty.flowLs),
            efficiency: [0.2, 0.5, 0.8, 1, 1.3, 1.6].map((part, i) => ({
              flowLs: Number((part * duty.flowLs).toFixed(3)),
              fraction: [0.25, 0.5, 0.64, 0.68, 0.66, 0.56][i]!,
            })),
          }
        : piece,
    ),
  };
  return adoptSettings(withPump, balance(documentOf(withPump)).valves).drawing;
}

/** The largest generic valve that still reads `leastReadingKpa` at this flow when fully open. */
function valveFor(flowLs: number): ChosenValve {
  const reads = genericValves.filter(({ kvs }) => dropAcrossValveKpa(kvs, flowLs) >= leastReadingKpa);
  return chosenValve(reads.at(-1) ?? genericValves[0]!);
}

function documentOf(drawing: Drawing): NetworkDocument {
  const { document, faults } = drawingToDocument(drawing, 'demo');
  if (!document) throw new Error(`The demo's drawing has faults: ${faults.map(({ message }) => message).join(' ')}`);
  return document;
}
