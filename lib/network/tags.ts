import type { Drawing, Equipment, EquipmentKind } from './drawing';
import type { sourceKinds } from './drawing';

type SourceKind = (typeof sourceKinds)[number];

const prefixes: Record<Exclude<EquipmentKind, 'source'>, string> = {
  pump: 'P',
  terminalUnit: 'FC',
  balancingValve: 'BV',
  controlValve: 'CV',
  checkValve: 'NR',
  isolatingValve: 'IV',
  strainer: 'ST',
  tee: 'T',
  expansionVessel: 'EV',
};
const sourcePrefixes: Record<SourceKind, string> = { chiller: 'CH', boiler: 'BO', 'heat-exchanger': 'HX' };

const prefixOf = (piece: Equipment) => (piece.kind === 'source' ? sourcePrefixes[piece.sourceKind] : prefixes[piece.kind]);

/**
 * The next free tag for a piece: `P-1` counts through the loop; terminal units count through their storey,
 * `FC-2.03` being the third of storey 2. `taken` holds the tags that are in use.
 */
export function nextTag(drawing: Drawing, piece: Equipment, taken: Set<string> = tagsOf(drawing)): string {
  const prefix = prefixOf(piece);
  const storey = piece.kind === 'terminalUnit' && piece.storeyId ? `${storeyNumber(drawing, piece.storeyId)}.` : '';
  for (let count = 1; ; count++) {
    const tag = `${prefix}-${storey}${storey ? String(count).padStart(2, '0') : count}`;
    if (!taken.has(tag)) return tag;
  }
}

export const tagsOf = (drawing: Drawing): Set<string> => new Set(drawing.equipment.map((piece) => piece.tag));

/** The number in a storey's name ("Level 2"), or its place counted from the lowest, which is 0. */
function storeyNumber(drawing: Drawing, storeyId: string): string {
  const storey = drawing.storeys.find(({ id }) => id === storeyId);
  const inName = storey?.name.match(/-?\d+/)?.[0];
  if (inName) return inName;
  const rising = [...drawing.storeys].sort((a, b) => a.elevationM - b.elevationM);
  return String(
    Math.max(
      0,
      rising.findIndex(({ id }) => id === storeyId),
    ),
  );
}
