import fc from 'fast-check';
import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';

/** Repeatable numbers from 0 to 1 (Park and Miller's generator), for networks too large to shrink. */
export function numbersFrom(seed: number): () => number {
  let state = (seed % 2147483646) + 1;
  return () => (state = (state * 16807) % 2147483647) / 2147483647;
}

/** Each link's kind is drawn from these by name; pumps are added apart, so that something flows. */
type PassiveKind = 'pipe' | 'terminal' | 'controlValve' | 'balancingValve' | 'resistance' | 'checkValve' | 'flowLimiter';
export const quadraticKinds: PassiveKind[] = ['terminal', 'balancingValve', 'resistance'];
export const passiveKinds: PassiveKind[] = [...quadraticKinds, 'pipe', 'pipe', 'controlValve', 'checkValve', 'flowLimiter'];

function passiveLink(kind: PassiveKind, id: string, from: string, to: string, random: () => number): NetworkLink {
  const between = (least: number, most: number) => least + (most - least) * random();
  const ends = { id, from, to };
  switch (kind) {
    case 'pipe':
      return { ...ends, kind, lengthM: between(1, 60), boreMm: between(15, 80), roughnessMm: between(0.001, 0.1), minorK: between(0, 5) };
    case 'terminal':
      return { ...ends, kind, designFlowLs: between(0.1, 1), designDropKpa: between(5, 40) };
    case 'controlValve':
      return {
        ...ends,
        kind,
        kvs: between(2, 16),
        characteristic: random() < 0.5 ? 'linear' : 'equalPercentage',
        opening: between(0.3, 1),
      };
    case 'balancingValve': {
      const kvs = between(3, 20);
      return { ...ends, kind, kvTable: [1, 2, 4].map((setting) => ({ setting, kv: (kvs * setting) / 4 })), setting: between(1, 4) };
    }
    case 'resistance':
      return { ...ends, kind, kv: between(2, 30) };
    case 'checkValve':
      return { ...ends, kind, kv: between(2, 30) };
    case 'flowLimiter':
      return { ...ends, kind, limitLs: between(0.1, 1), minDropKpa: between(5, 20) };
  }
}

/** A mesh: a random tree of `nodes` nodes with `chords` further links, one pump from the last node to the first and perhaps another. */
export function randomMesh(seed: number, nodes: number, chords: number, kinds: PassiveKind[], pumps = 1): NetworkDocument {
  const random = numbersFrom(seed);
  const pick = (count: number) => Math.floor(random() * count);
  const links: NetworkLink[] = [];
  const join = (a: number, b: number) => links.push(passiveLink(kinds[pick(kinds.length)], `L${links.length}`, `N${a}`, `N${b}`, random));
  for (let v = 1; v < nodes; v++) join(Math.max(0, v - 1 - pick(3)), v);
  for (let k = 0; k < chords; k++) {
    const a = pick(nodes);
    const b = pick(nodes);
    if (a !== b) join(a, b);
  }
  for (let k = 0; k < pumps; k++) {
    const shutOff = 8 + 12 * random();
    const most = 2 + 6 * random();
    const curve = [0, 0.25, 0.5, 0.75, 1].map((part) => ({ flowLs: part * most, headM: shutOff * (1 - 0.7 * part ** 2) }));
    links.push({ id: `PU${k}`, kind: 'pump', from: `N${nodes - 1 - k}`, to: `N${k}`, curve });
  }
  return {
    format: 'network/1',
    fluid: { medium: 'custom', densityKgM3: 998, viscosityMPaS: 1.1, specificHeatKJKgK: 4.19 },
    reference: { node: 'N0', gaugePressureKpa: 100 },
    nodes: Array.from({ length: nodes }, (_, v) => ({ id: `N${v}`, elevationM: Math.round(20 * random()) })),
    links,
  };
}

export const anyNetwork = (kinds: PassiveKind[] = passiveKinds) =>
  fc
    .record({
      seed: fc.integer({ min: 0, max: 1e9 }),
      nodes: fc.integer({ min: 3, max: 30 }),
      chords: fc.integer({ min: 0, max: 25 }),
      pumps: fc.integer({ min: 0, max: 2 }),
    })
    .map(({ seed, nodes, chords, pumps }) => randomMesh(seed, nodes, chords, kinds, Math.min(pumps, nodes - 2)));
