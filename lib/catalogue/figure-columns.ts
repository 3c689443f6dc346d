import { typedQuantity } from '@/lib/units/format-quantity';
import { readNumber } from '@/lib/units/number-text';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { definitionsOf, unitFor, unitsOf, type Quantity, type UnitChoice } from '@/lib/units/quantities';

/** A column of a table of figures that is typed, pasted or uploaded as text. */
export interface FigureColumn<Key extends string = string> {
  key: Key;
  label: string;
  /** What its cells mean: words, an efficiency, or a quantity with units to choose from. */
  quantity: Quantity | 'words' | 'efficiency';
  isRequired: boolean;
  /** How other people head this column, lower case. */
  heading: RegExp;
}

export const valveColumns = [
  { key: 'nominal', label: 'Size', quantity: 'words', isRequired: true, heading: /^((valve )?size|nominal|dn|nps|diameter)/ },
  {
    key: 'setting',
    label: 'Setting',
    quantity: 'setting',
    isRequired: true,
    heading: /^((valve )?setting(?! step)|turns?|position|pre-?setting|hand ?wheel)/,
  },
  { key: 'kv', label: 'Kv', quantity: 'valveCoefficient', isRequired: true, heading: /^[kc]vs?\b(?! ?(signal|measur))/ },
  {
    key: 'measuringKv',
    label: 'Measuring Kv',
    quantity: 'valveCoefficient',
    isRequired: false,
    heading: /^(measuring|orifice|signal|kvm|[kc]v ?signal)/,
  },
  { key: 'step', label: 'Step', quantity: 'setting', isRequired: false, heading: /^(setting )?step/ },
] as const satisfies FigureColumn[];

export const pumpColumns = [
  { key: 'flowLs', label: 'Flow', quantity: 'flow', isRequired: true, heading: /^(flow|q\b|capacity|rate)/ },
  { key: 'headM', label: 'Head', quantity: 'head', isRequired: true, heading: /^(head|h\b|total head|lift)/ },
  { key: 'efficiency', label: 'Efficiency', quantity: 'efficiency', isRequired: false, heading: /^(eff|eta|η)/ },
  { key: 'suctionHeadM', label: 'Suction head required', quantity: 'head', isRequired: false, heading: /^(npsh|suction|required suction)/ },
] as const satisfies FigureColumn[];

export type ValveCell = (typeof valveColumns)[number]['key'];
export type PumpCell = (typeof pumpColumns)[number]['key'];

/** The units a column's figures may be in; none where it holds words or has but one. */
export function unitsOfColumn({ quantity }: FigureColumn): readonly string[] {
  if (quantity === 'words') return [];
  return quantity === 'efficiency' ? ['%', 'fraction'] : unitsOf(quantity);
}

/** The unit that a column begins with: the person's own. */
export function usualUnit({ quantity }: FigureColumn, choice: UnitChoice): string {
  if (quantity === 'words') return '';
  return quantity === 'efficiency' ? '%' : unitFor(quantity, choice);
}

export type ReadCell = { ok: true; value: number } | { ok: false; message: string };

/** A cell's text as the stored value. Never NaN; a formula, words or an ambiguous "1,234" is refused with the reason. */
export function readFigure({ quantity }: FigureColumn, text: string, unit: string): ReadCell {
  if (quantity === 'words') return { ok: false, message: 'This column holds words.' };
  if (quantity !== 'efficiency') {
    const parsed = parseQuantity(quantity, text, unit);
    return parsed.ok ? { ok: true, value: parsed.si } : parsed;
  }
  const isPercent = unit === '%' || text.trim().endsWith('%');
  const read = readNumber(text.trim().replace(/\s*%$/, ''));
  return read.ok ? { ok: true, value: isPercent ? read.value / 100 : read.value } : read;
}

/** A stored value as the text of a cell, with the digits it was given. */
export function figureText({ quantity }: FigureColumn, value: number | null | undefined, unit: string): string {
  if (value === null || value === undefined || quantity === 'words') return '';
  if (quantity !== 'efficiency') return typedQuantity(quantity, value, unit);
  return String(Number((unit === '%' ? value * 100 : value).toPrecision(12)));
}

/** The unit that a heading names: "Flow (m3/h)", "Head, ft", "Cv". */
export function unitInHeading(column: FigureColumn, heading: string): string | null {
  const spelled = heading
    .toLowerCase()
    .replaceAll('³', '3')
    .split(/[()[\],;:]|\s+in\s+/)
    .map((part) => part.replace(/\s/g, ''))
    .filter(Boolean);
  if (column.quantity === 'efficiency')
    return spelled.includes('%') ? '%' : spelled.includes('fraction') || spelled.includes('-') ? 'fraction' : null;
  if (column.quantity === 'words') return null;
  if (column.quantity === 'valveCoefficient') return /cvs?\b/i.test(heading) ? 'Cv' : /kvs?\b/i.test(heading) ? 'Kv' : null;
  const known = definitionsOf(column.quantity).find(({ unit, typed }) =>
    [unit.toLowerCase().replaceAll('³', '3').replace(/\s/g, ''), ...typed].some((spelling) => spelled.includes(spelling)),
  );
  return known?.unit ?? null;
}
