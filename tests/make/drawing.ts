import type { Drawing, DrawingPipe, Equipment, PipeEnd, Port } from '@/lib/network/drawing';

const at = { storeyId: null, x: 0, y: 0, rotation: 0 as const, isMirrored: false };
const turns = [0, 1, 2, 3, 4];

export const valve = (kvs: number, settingTurns: number | null = null) => ({
  name: `Test valve Kvs ${kvs}`,
  kvTable: turns.map((setting) => ({ setting, kv: (kvs * (setting + 0.2)) / 4.2 })),
  settingTurns,
  isLocked: false,
});

export const pump = (id: string, headM = 10, flowLs = 4): Equipment => ({
  ...at,
  kind: 'pump',
  id,
  tag: id,
  curve: [0, 0.5, 1].map((part) => ({ flowLs: part * flowLs, headM: headM * (1 - 0.5 * part * part) })),
  efficiency: [],
  speed: 1,
  hasNonReturn: true,
});

export const source = (id: string, designFlowLs = 1): Equipment => ({
  ...at,
  kind: 'source',
  id,
  tag: id,
  sourceKind: 'chiller',
  designFlowLs,
  designDropKpa: 20,
});
export const tee = (id: string): Equipment => ({ ...at, kind: 'tee', id, tag: id });
export const vessel = (id: string, gaugePressureKpa = 150): Equipment => ({
  ...at,
  kind: 'expansionVessel',
  id,
  tag: id,
  gaugePressureKpa,
});

export const unit = (id: string, designFlowLs = 0.2): Equipment => ({
  ...at,
  kind: 'terminalUnit',
  id,
  tag: id,
  room: '',
  loadKw: null,
  designFlowLs,
  coilDropKpa: 15,
  strainerKv: 6,
  controlValve: { kvs: 2.5, characteristic: 'equalPercentage', opening: 1 },
  balancingValve: valve(2.5),
});

export const decoupler = (id: string): Equipment => ({
  ...at,
  kind: 'decoupler',
  id,
  tag: id,
  lengthM: 1,
  boreMm: 52.5,
  roughnessMm: 0.045,
  minorK: 0,
});
export const isolator = (id: string, kv = 20): Equipment => ({ ...at, kind: 'isolatingValve', id, tag: id, kv, isClosed: false });

/** A piece of the drawing with some fields changed. */
export const change = (from: Drawing, id: string, fields: object): Drawing => ({
  ...from,
  equipment: from.equipment.map((piece) => (piece.id === id ? ({ ...piece, ...fields } as typeof piece) : piece)),
});

/** "P-1.out" is the outlet of P-1; "T-1.n" the upper side of tee T-1. */
const end = (text: string): PipeEnd => {
  const [equipmentId, port] = text.split('.') as [string, Port];
  return { equipmentId, port };
};

export const pipe = (id: string, from: string, to: string, lengthM = 5, boreMm = 26.64): DrawingPipe => ({
  id,
  from: end(from),
  to: end(to),
  circuit: 'supply',
  lengthM,
  series: null,
  nominal: null,
  boreMm,
  roughnessMm: 0.045,
  minorK: 1,
  bends: [],
});

export const drawing = (equipment: Equipment[], pipes: DrawingPipe[]): Drawing => ({
  format: 'drawing/1',
  fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 },
  pumpExcess: 'speed',
  storeys: [],
  equipment,
  pipes,
});

/** Pump, chiller and terminals side by side on two mains, each on its own pair of tees: the smallest loop that balances. */
export function ladder(flowsLs: number[]): Drawing {
  const pieces: Equipment[] = [
    pump('P-1', 12, 4 * flowsLs.reduce((a, b) => a + b, 0)),
    source(
      'CH-1',
      flowsLs.reduce((a, b) => a + b, 0),
    ),
    vessel('EV-1'),
    tee('R-0'),
  ];
  const pipes = [pipe('p-pump', 'R-0.e', 'P-1.in'), pipe('p-source', 'P-1.out', 'CH-1.in'), pipe('p-vessel', 'EV-1.in', 'R-0.s')];
  flowsLs.forEach((flowLs, i) => {
    pieces.push(tee(`S-${i + 1}`), tee(`R-${i + 1}`), unit(`FC-${i + 1}`, flowLs));
    pipes.push(
      pipe(`s-${i + 1}`, i === 0 ? 'CH-1.out' : `S-${i}.e`, `S-${i + 1}.w`, 8, 40.94),
      pipe(`r-${i + 1}`, `R-${i + 1}.w`, `R-${i}.e`, 8, 40.94),
      pipe(`a-${i + 1}`, `S-${i + 1}.s`, `FC-${i + 1}.in`, 2),
      pipe(`b-${i + 1}`, `FC-${i + 1}.out`, `R-${i + 1}.n`, 2),
    );
  });
  return drawing(pieces, pipes);
}
