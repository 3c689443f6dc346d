import type { Drawing, DrawingPipe, Equipment } from '@/lib/network/drawing';
import { chosenValve, genericValves } from '@/lib/network/valve-families';

const STOREYS = 20;
const PITCH = 100;
const HEIGHT = 320;

/** A loop of so many terminals on two mains a storey, each on its own pair of tees, as a designer lays it out: 3 pieces and 4 pipes a terminal. */
export function drawingOfTerminals(terminals: number): Drawing {
  const perStorey = terminals / STOREYS;
  const equipment: Equipment[] = [];
  const pipes: DrawingPipe[] = [];
  const storeys = Array.from({ length: STOREYS }, (_, i) => ({
    id: `l${i}`,
    name: `Level ${i}`,
    elevationM: 4 * i,
    top: -HEIGHT * i,
    height: HEIGHT,
  }));
  const valve = chosenValve(genericValves[1]);
  const put = (piece: Partial<Equipment> & { kind: Equipment['kind']; id: string }, storeyId: string, x: number, y: number) =>
    equipment.push({ storeyId, x, y, tag: piece.id, rotation: 0, isMirrored: false, ...piece } as Equipment);
  const join = (circuit: 'supply' | 'return', from: string, fromPort: string, to: string, toPort: string) =>
    pipes.push({
      ...{
        id: `${from}.${fromPort}-${to}.${toPort}`,
        circuit,
        lengthM: 3,
        series: null,
        nominal: 'DN25',
        boreMm: 27.3,
        roughnessMm: 0.045,
        minorK: 1,
        bends: [],
      },
      from: { equipmentId: from, port: fromPort as DrawingPipe['from']['port'] },
      to: { equipmentId: to, port: toPort as DrawingPipe['from']['port'] },
    });
  put(
    {
      kind: 'pump',
      id: 'P-1',
      curve: [0, 150, 300].map((flowLs) => ({ flowLs, headM: 40 - flowLs / 20 })),
      efficiency: [],
      speed: 1,
      hasNonReturn: true,
    },
    'l0',
    -60,
    60,
  );
  put({ kind: 'source', id: 'CH-1', sourceKind: 'chiller', designFlowLs: 0.2 * terminals, designDropKpa: 30 }, 'l0', -60, 250);
  join('supply', 'CH-1', 'out', 'P-1', 'in');
  for (let storey = 0; storey < STOREYS; storey++) {
    const top = -HEIGHT * storey;
    for (let k = 0; k < perStorey; k++) {
      const at = `${storey}.${k}`;
      const x = 80 + k * PITCH;
      put({ kind: 'tee', id: `S${at}` }, `l${storey}`, x, top + 60);
      put({ kind: 'tee', id: `R${at}` }, `l${storey}`, x, top + 260);
      put(
        {
          ...{ kind: 'terminalUnit', id: `FC${at}`, room: '', loadKw: 5, designFlowLs: 0.2, coilDropKpa: 15, strainerKv: null },
          ...{ controlValve: { kvs: 2.5, characteristic: 'equalPercentage', opening: 1 }, balancingValve: valve },
        } as Partial<Equipment> & { kind: 'terminalUnit'; id: string },
        `l${storey}`,
        x,
        top + 160,
      );
      join('supply', `S${at}`, 's', `FC${at}`, 'in');
      join('return', `FC${at}`, 'out', `R${at}`, 'n');
      const before = k > 0 ? `${storey}.${k - 1}` : storey > 0 ? `${storey - 1}.0` : null;
      if (before) {
        join('supply', `S${before}`, 'e', `S${at}`, 'w');
        join('return', `R${at}`, 'w', `R${before}`, 'e');
      } else {
        join('supply', 'P-1', 'out', `S${at}`, 'w');
        join('return', `R${at}`, 'w', 'CH-1', 'in');
      }
    }
  }
  return {
    format: 'drawing/1',
    fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 },
    pumpExcess: 'speed',
    storeys,
    equipment,
    pipes,
  };
}
