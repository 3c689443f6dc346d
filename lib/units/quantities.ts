/** One unit that a person can choose: what is shown, how mathjs writes it, the decimals a figure is read with, and how it may be typed. */
interface UnitOfQuantity {
  unit: string;
  expression: string;
  decimals: number;
  /** Other spellings, lower case and without spaces, besides `unit` itself. */
  typed: readonly string[];
}

/** The first unit of each quantity is the one that is stored and computed in (SI, or the trade's SI-based one). */
const table = {
  flow: [
    { unit: 'L/s', expression: 'L/s', decimals: 3, typed: ['ls', 'lps'] },
    { unit: 'm³/h', expression: 'm^3/h', decimals: 2, typed: ['m^3/h', 'm3h', 'cmh'] },
    { unit: 'US gpm', expression: 'gpm', decimals: 2, typed: ['gpm', 'gal/min', 'usgal/min'] },
  ],
  pressure: [
    { unit: 'kPa', expression: 'kPa', decimals: 2, typed: [] },
    { unit: 'mbar', expression: 'mbar', decimals: 1, typed: [] },
    { unit: 'm water', expression: 'metreOfWater', decimals: 3, typed: ['m', 'mh2o', 'mwc', 'mwg'] },
    { unit: 'psi', expression: 'poundPerSquareInch', decimals: 3, typed: [] },
    { unit: 'ft water', expression: 'footOfWater', decimals: 2, typed: ['ft', 'fth2o', 'ftwc', 'ftwg'] },
  ],
  head: [
    { unit: 'm', expression: 'm', decimals: 2, typed: [] },
    { unit: 'ft', expression: 'ft', decimals: 1, typed: ["'", '′'] },
  ],
  length: [
    { unit: 'm', expression: 'm', decimals: 2, typed: [] },
    { unit: 'ft', expression: 'ft', decimals: 1, typed: ["'", '′'] },
  ],
  bore: [
    { unit: 'mm', expression: 'mm', decimals: 1, typed: [] },
    { unit: 'in', expression: 'in', decimals: 3, typed: ['inch', 'inches', '"', '″'] },
  ],
  temperature: [
    { unit: '°C', expression: 'degC', decimals: 1, typed: ['c', 'degc'] },
    { unit: '°F', expression: 'degF', decimals: 1, typed: ['f', 'degf'] },
  ],
  power: [
    { unit: 'kW', expression: 'kW', decimals: 2, typed: [] },
    { unit: 'hp', expression: 'mechanicalHorsepower', decimals: 2, typed: [] },
  ],
  valveCoefficient: [
    { unit: 'Kv', expression: 'Kv', decimals: 2, typed: [] },
    { unit: 'Cv', expression: 'Cv', decimals: 2, typed: [] },
  ],
  velocity: [
    { unit: 'm/s', expression: 'm/s', decimals: 2, typed: [] },
    { unit: 'ft/s', expression: 'ft/s', decimals: 1, typed: ['fps'] },
  ],
  gradient: [
    { unit: 'Pa/m', expression: 'Pa/m', decimals: 0, typed: [] },
    { unit: 'ft/100 ft', expression: 'footOfWaterPer100Feet', decimals: 2, typed: [] },
  ],
  speed: [{ unit: '%', expression: 'percentOfFull', decimals: 1, typed: ['percent'] }],
  setting: [{ unit: 'turns', expression: 'turn', decimals: 2, typed: ['turn', 't'] }],
} as const satisfies Record<string, readonly UnitOfQuantity[]>;

export type Quantity = keyof typeof table;

/** Choices by quantity, as a person keeps them; a missing or unknown entry means the stored unit. */
export type UnitChoice = Record<string, string>;

export const quantities = Object.keys(table) as Quantity[];

/** The definitions of a quantity's units, the stored one first. */
export const definitionsOf = (quantity: Quantity): readonly UnitOfQuantity[] => table[quantity];

/** The definition of one unit; throws for a unit that is not of this quantity (a mistake in the program, not of a person). */
export function definitionOf(quantity: Quantity, unit: string): UnitOfQuantity {
  const found = definitionsOf(quantity).find((it) => it.unit === unit);
  if (!found) throw new RangeError(`${unit} is not a unit of ${quantity}`);
  return found;
}

/** The units that a person can choose for a quantity, as they are shown; the first is the stored one. */
export const unitsOf = (quantity: Quantity): readonly string[] => definitionsOf(quantity).map(({ unit }) => unit);

/** The unit that a quantity is stored and computed in. */
export const storedUnitOf = (quantity: Quantity): string => table[quantity][0].unit;

/** The unit that this person reads and types; the stored one where they chose none, or one that is not known. */
export function unitFor(quantity: Quantity, choice: UnitChoice): string {
  const chosen = choice[quantity];
  return chosen && unitsOf(quantity).includes(chosen) ? chosen : storedUnitOf(quantity);
}
