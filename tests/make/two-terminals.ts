import type { LinkKind, LinkOf, NetworkLink } from '@/lib/hydraulics/types';
import type { Drawing } from '@/lib/network/drawing';
import document from '../reference/data/networks/two-terminals.json';
import { drawing, pipe, pump, source, tee, unit, vessel } from './drawing';

/** The document's link of this id and kind. */
function linkOf<K extends LinkKind>(id: string, kind: K): LinkOf<K> {
  const found = (document.links as NetworkLink[]).find((link) => link.id === id && link.kind === kind);
  if (!found) throw new Error(`the document has no ${kind} ${id}`);
  return found as LinkOf<K>;
}

/** Joins pieces that touch in the document but not on a drawing, where every two pieces have a pipe between them. */
const joint = (id: string, from: string, to: string) => ({ ...pipe(id, from, to, 0.001, 300), minorK: 0 });

/**
 * The reference network "two terminals, direct return" as a designer would draw it. Its water is that of 7 °C
 * (mean of 6 and 8), its links are ours by another name, and joints a millimetre long stand where the drawing wants a pipe.
 */
export function drawTwoTerminals(): Drawing {
  const main = (id: string, from: string, to: string) => {
    const { lengthM, boreMm, roughnessMm, minorK = 0 } = linkOf(id, 'pipe');
    return { ...pipe(id, from, to, lengthM, boreMm), roughnessMm, minorK };
  };
  const terminal = (tag: string, coil: string, valve: string) => {
    const made = unit(tag);
    if (made.kind !== 'terminalUnit') throw new Error('not a unit');
    const { designFlowLs, designDropKpa } = linkOf(coil, 'terminal');
    const { kvTable, setting = null } = linkOf(valve, 'balancingValve');
    return {
      ...made,
      designFlowLs,
      coilDropKpa: designDropKpa,
      strainerKv: null,
      controlValve: null,
      balancingValve: { name: valve, kvTable, settingTurns: setting, isLocked: false },
    };
  };
  const made = pump('P-1');
  if (made.kind !== 'pump') throw new Error('not a pump');
  const { curve, speed = 1, nonReturn = true } = linkOf('PU', 'pump');
  const plant = source('CH-1');
  const { designFlowLs = null, designDropKpa = null, kv } = linkOf('CH', 'resistance');
  if (plant.kind !== 'source' || kv !== undefined) throw new Error('the source is given by its design pair');
  return {
    ...drawing(
      [
        { ...made, curve, speed, hasNonReturn: nonReturn },
        { ...plant, designFlowLs, designDropKpa },
        terminal('FC-1', 'T1', 'V1'),
        terminal('FC-2', 'T2', 'V2'),
        tee('S-1'),
        tee('R-0'),
        tee('R-1'),
        vessel('EV-1', document.reference.gaugePressureKpa),
      ],
      [
        joint('j-pump', 'R-0.e', 'P-1.in'),
        joint('j-source', 'P-1.out', 'CH-1.in'),
        main('s1', 'CH-1.out', 'S-1.w'),
        joint('j-in', 'S-1.s', 'FC-1.in'),
        joint('j-out', 'FC-1.out', 'R-1.n'),
        main('s2', 'S-1.e', 'FC-2.in'),
        main('r2', 'FC-2.out', 'R-1.e'),
        main('r1', 'R-1.w', 'R-0.e'),
        joint('j-vessel', 'EV-1.in', 'R-0.s'),
      ],
    ),
    fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 8 },
  };
}
