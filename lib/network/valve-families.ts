import type { ChosenValve, KvPoint } from './drawing';

/**
 * Generic balancing valves, DN15 to DN400, for a draft whose valve is not chosen yet. The data is our own and no
 * maker's: fully open each has a loss coefficient of 9 on its nominal bore, so Kvs = 3600 A sqrt(2 · 10⁵ Pa / (1000 kg/m³ · 9)),
 * and with the handwheel at the part x of its turns Kv = Kvs · x (0.12 + 0.88 x^1.2), rounded to three digits. Replace it by the chart of
 * the valve that is bought.
 */
export interface GenericValve {
  name: string;
  nominal: string;
  /** m³/h at 1 bar, fully open. */
  kvs: number;
  turns: number;
  kvTable: KvPoint[];
}

export const genericValveSource =
  'Generic data of Evenhead, no maker’s: loss coefficient 9 fully open. Replace it by the chart of the valve that is bought.';

const OPEN_LOSS_COEFFICIENT = 9;
const FIRST_TURN = 0.5;
const STEP_TURNS = 0.5;

const sizes: [boreMm: number, turns: number][] = [
  [15, 4],
  [20, 4],
  [25, 4],
  [32, 4],
  [40, 4],
  [50, 4],
  [65, 8],
  [80, 8],
  [100, 8],
  [125, 8],
  [150, 8],
  [200, 12],
  [250, 12],
  [300, 12],
  [350, 16],
  [400, 16],
];

const threeDigits = (value: number) => Number(value.toPrecision(3));

function genericValve([boreMm, turns]: [number, number]): GenericValve {
  const areaM2 = (Math.PI / 4) * (boreMm / 1000) ** 2;
  const kvs = 3600 * areaM2 * Math.sqrt(2e5 / (1000 * OPEN_LOSS_COEFFICIENT));
  const kvTable: KvPoint[] = [];
  for (let setting = FIRST_TURN; setting <= turns; setting += STEP_TURNS) {
    const open = setting / turns;
    kvTable.push({ setting, kv: threeDigits(kvs * open * (0.12 + 0.88 * open ** 1.2)) });
  }
  return { name: `Generic DN${boreMm}, fixed orifice`, nominal: `DN${boreMm}`, kvs: threeDigits(kvs), turns, kvTable };
}

export const genericValves: readonly GenericValve[] = sizes.map(genericValve);

/** A generic valve as chosen for a piece, standing fully open. */
export const chosenValve = ({ name, kvTable }: GenericValve): ChosenValve => ({ name, kvTable, settingTurns: null, isLocked: false });
