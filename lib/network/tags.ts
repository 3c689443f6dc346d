import type { Drawing, Equipment, EquipmentKind, sourceKinds } from './drawing';

/**
 * A rule says how the tags of a kind are made. In it `{kind}` stands for the letters of the kind, `{storey}` for the number of
 * the storey and `{n}`, `{nn}` or `{nnn}` for a running number of at least as many digits; anything else stands for itself.
 */

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
  dpController: 'DPC',
  flowLimiter: 'PI',
  header: 'H',
  decoupler: 'D',
  flowStation: 'FS',
  pressureStation: 'PS',
};
const sourcePrefixes: Record<SourceKind, string> = { chiller: 'CH', boiler: 'BO', 'heat-exchanger': 'HX' };

/** The letters of a kind; of a source, of what it is. */
export const prefixOf = (piece: Equipment): string => (piece.kind === 'source' ? sourcePrefixes[piece.sourceKind] : prefixes[piece.kind]);

/** Terminal units count through their storey, `FC-2.03` being the third of storey 2; everything else counts through the loop. */
export const usualRule = (kind: EquipmentKind): string => (kind === 'terminalUnit' ? '{kind}-{storey}.{nn}' : '{kind}-{n}');

const numberPlace = /\{(n{1,3})\}/;
const placeholders = /\{(kind|storey|n{1,3})\}/g;

/** What is wrong with a rule, in words; null where it can be used. */
export function ruleFault(rule: string): string | null {
  if (rule.trim() !== rule || rule === '') return 'Leave no blank before or after it.';
  const left = rule.replace(placeholders, '');
  if (/[{}]/.test(left)) return 'In braces stand only {kind}, {storey}, {n}, {nn} or {nnn}.';
  const numbers = rule.match(/\{n{1,3}\}/g)?.length ?? 0;
  if (numbers !== 1) return 'Put {n} once, where the running number belongs.';
  return rule.length > 24 ? 'At most 24 characters.' : null;
}

/** A piece's tag by its rule, but for the running number. Where no storey is, its place and the sign after it fall away. */
export function tagMaker(drawing: Drawing, piece: Equipment, rules = drawing.tagRules): (count: number) => string {
  const own = rules?.[piece.kind];
  const rule = own && ruleFault(own) === null ? own : usualRule(piece.kind);
  const storeyed = piece.storeyId
    ? rule.replaceAll('{storey}', storeyNumber(drawing, piece.storeyId))
    : rule.replace(/\{storey\}[^{}A-Za-z0-9]?/g, '');
  const text = storeyed.replaceAll('{kind}', prefixOf(piece));
  return (count) => text.replace(numberPlace, (_, digits: string) => String(count).padStart(digits.length, '0'));
}

/** The next free tag for a piece by the rule of its kind. `taken` holds the tags that are in use. */
export function nextTag(drawing: Drawing, piece: Equipment, taken: Set<string> = tagsOf(drawing)): string {
  const make = tagMaker(drawing, piece);
  for (let count = 1; ; count++) {
    const tag = make(count);
    if (!taken.has(tag)) return tag;
  }
}

export const tagsOf = (drawing: Drawing): Set<string> => new Set(drawing.equipment.map((piece) => piece.tag));

/** The number in a storey's name ("Level 2"), or its place counted from the lowest, which is 0. */
function storeyNumber(drawing: Drawing, storeyId: string): string {
  const storey = drawing.storeys.find(({ id }) => id === storeyId);
  const inName = storey?.name.match(/-?\d{1,4}/)?.[0];
  if (inName) return inName;
  const rising = [...drawing.storeys].sort((a, b) => a.elevationM - b.elevationM);
  return String(
    Math.max(
      0,
      rising.findIndex(({ id }) => id === storeyId),
    ),
  );
}
