import type { Drawing, DrawingFluid, Place } from './drawing';
import { pieceNames } from './piece-names';

export interface Difference {
  message: string;
  place: Place;
  by: 'you' | 'them';
}

/** One piece that both changed, each in another way; `null` where that side removed it. */
export interface Conflict {
  place: Place;
  name: string;
  mine: unknown;
  theirs: unknown;
}

export interface Merge {
  /** Both sides' changes together; where they touch the same piece, mine. */
  merged: Drawing;
  conflicts: Conflict[];
  differences: Difference[];
}

type Kind = Place['kind'];
type Item = { id: string };
type Choice = { item: Item | null; isConflict: boolean };

/**
 * Joins two drawings that were both changed from `base`, piece by piece: a piece that only one side changed takes that
 * change, one that both changed differently is a conflict. Layout counts as a change too: nobody's work is lost.
 */
export function mergeDrawings(base: Drawing, mine: Drawing, theirs: Drawing): Merge {
  const conflicts: Conflict[] = [];
  const differences: Difference[] = [];
  const name = namer([mine, theirs, base]);

  const mergeList = <T extends Item>(kind: Kind, was: T[], ours: T[], others: T[]): T[] => {
    const [wasById, oursById, othersById] = [byId(was), byId(ours), byId(others)];
    const order = [...new Set([...others, ...ours].map((item) => item.id)), ...was.map((item) => item.id)];
    const kept: T[] = [];
    for (const id of new Set(order)) {
      const place: Place = { kind, id };
      const [before, my, their] = [wasById.get(id), oursById.get(id), othersById.get(id)];
      if (!same(before, my)) differences.push({ place, by: 'you', message: told(name(place), before, my) });
      if (!same(before, their)) differences.push({ place, by: 'them', message: told(name(place), before, their) });
      const { item, isConflict } = choose(before, my, their);
      if (isConflict) conflicts.push({ place, name: name(place), mine: my ?? null, theirs: their ?? null });
      if (item) kept.push(item as T);
    }
    return kept;
  };

  const merged: Drawing = {
    format: 'drawing/1',
    ...ofSettings(mergeList('loop', settingsOf(base), settingsOf(mine), settingsOf(theirs))),
    storeys: mergeList('storey', base.storeys, mine.storeys, theirs.storeys),
    equipment: mergeList('equipment', base.equipment, mine.equipment, theirs.equipment),
    pipes: mergeList('pipe', base.pipes, mine.pipes, theirs.pipes),
  };
  return { merged, conflicts, differences };
}

/**
 * Both sides' changes together where they do not touch: no piece was changed by both, and no pipe of one side leads to a piece that the other
 * took away. Null where somebody has to look.
 */
export function mergeByItself(base: Drawing, mine: Drawing, theirs: Drawing): Drawing | null {
  const { merged, conflicts } = mergeDrawings(base, mine, theirs);
  if (conflicts.length > 0) return null;
  const lostBefore = new Set([...lostPipes(mine), ...lostPipes(theirs)]);
  return lostPipes(merged).every((id) => lostBefore.has(id)) ? merged : null;
}

/** Pipes that end in nothing, or impulse lines: what refers to a piece that is gone. */
function lostPipes({ equipment, pipes }: Drawing): string[] {
  const known = new Set(equipment.map(({ id }) => id));
  const controllers = equipment.filter(
    (piece) => piece.kind === 'dpController' && [piece.senseHigh, piece.senseLow].some((end) => end && !known.has(end.equipmentId)),
  );
  const lost = pipes.filter(({ from, to }) => !known.has(from.equipmentId) || !known.has(to.equipmentId));
  return [...lost, ...controllers].map(({ id }) => id);
}

/** The merged drawing with their side of one conflict taken instead of mine. */
export function takeTheirs(merged: Drawing, conflict: Conflict): Drawing {
  if (conflict.place.kind === 'loop') {
    return {
      ...merged,
      ...ofSettings(settingsOf(merged).map((setting) => (setting.id === conflict.place.id ? (conflict.theirs as Setting) : setting))),
    };
  }
  const list = { equipment: 'equipment', pipe: 'pipes', storey: 'storeys' } as const;
  const key = list[conflict.place.kind];
  const others = (merged[key] as Item[]).filter((item) => item.id !== conflict.place.id);
  return { ...merged, [key]: conflict.theirs === null ? others : [...others, conflict.theirs as Item] };
}

/** What changed from one drawing to the next, in words; used for the list of changes of a new revision. */
export function changesBetween(before: Drawing, after: Drawing): { message: string; place: Place }[] {
  return mergeDrawings(before, after, before).differences.map(({ message, place }) => ({ message, place }));
}

type Setting =
  | ({ id: 'fluid' } & DrawingFluid)
  | { id: 'pumpExcess'; pumpExcess: Drawing['pumpExcess'] }
  | { id: 'pipeLimits'; pipeLimits: Drawing['pipeLimits'] }
  | { id: 'tagRules'; tagRules: Drawing['tagRules'] };

/** What holds for the whole loop, as items that can be compared like its pieces. */
const settingsOf = ({ fluid, pumpExcess, pipeLimits, tagRules }: Drawing): Setting[] => [
  { id: 'fluid', ...fluid },
  { id: 'pumpExcess', pumpExcess },
  { id: 'pipeLimits', pipeLimits },
  { id: 'tagRules', tagRules },
];

function ofSettings(settings: Setting[]): Pick<Drawing, 'fluid' | 'pumpExcess' | 'pipeLimits' | 'tagRules'> {
  const [{ id: _, ...fluid }, { pumpExcess }, { pipeLimits }, { tagRules }] = settings as [
    Extract<Setting, { id: 'fluid' }>,
    Extract<Setting, { id: 'pumpExcess' }>,
    Extract<Setting, { id: 'pipeLimits' }>,
    Extract<Setting, { id: 'tagRules' }>,
  ];
  return { fluid, pumpExcess, ...(pipeLimits && { pipeLimits }), ...(tagRules && { tagRules }) };
}

function choose(before: Item | undefined, mine: Item | undefined, theirs: Item | undefined): Choice {
  if (same(mine, theirs) || same(before, theirs)) return { item: mine ?? null, isConflict: false };
  if (same(before, mine)) return { item: theirs ?? null, isConflict: false };
  return { item: mine ?? theirs ?? null, isConflict: true };
}

/** Names from the first drawing that still has the thing. */
function namer(drawings: Drawing[]) {
  const names = drawings.map(pieceNames);
  const settingNames: Record<string, string> = {
    fluid: 'Fluid',
    pumpExcess: 'Excess head',
    pipeLimits: 'Pipe limits',
    tagRules: 'Rules for tags',
  };
  return ({ kind, id }: Place): string =>
    (kind === 'loop' ? settingNames[id] : undefined) ?? names.find((known) => known.has(id))?.get(id) ?? id;
}

function told(name: string, before: Item | undefined, after: Item | undefined): string {
  if (!before) return `${name} added`;
  if (!after) return `${name} removed`;
  const fields = Object.keys({ ...before, ...after }).filter((key) => !same((before as never)[key], (after as never)[key]));
  const said = fields.filter((field) => !['x', 'y', 'rotation', 'isMirrored', 'bends', 'top', 'height'].includes(field));
  return said.length === 0 ? `${name} moved` : `${name} changed: ${said.map(fieldWords).join(', ')}`;
}

/** `coilDropKpa` reads as "coil drop". */
const fieldWords = (field: string) =>
  field
    .replace(/(Ls|Kpa|Kw|Mm|M|C|Turns)$/, '')
    .replace(/([A-Z])/g, ' $1')
    .toLowerCase()
    .trim();

const byId = <T extends Item>(items: T[]) => new Map(items.map((item) => [item.id, item]));

/** Deep equality of two JSON values, whatever the order of their keys: PostgreSQL's jsonb does not keep it. */
export function same(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  if (Array.isArray(a) !== Array.isArray(b)) return false;
  const keys = Object.keys(a);
  return keys.length === Object.keys(b).length && keys.every((key) => Object.hasOwn(b, key) && same((a as never)[key], (b as never)[key]));
}
