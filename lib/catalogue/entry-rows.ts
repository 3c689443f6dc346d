import type { KvPoint } from '@/lib/network/drawing';
import { figureText, pumpColumns, valveColumns } from './figure-columns';
import type { PumpPoint } from './pump-points';

type Units = Record<string, string>;

/** A family's sizes as the rows that `readValveRows` makes them of again. */
export function rowsOfSizes(sizes: readonly { nominal: string; stepTurns: number | null; points: KvPoint[] }[], units: Units): string[][] {
  return sizes.flatMap(({ nominal, stepTurns, points }) => {
    const isFixed = points.every(({ measuringKv }) => measuringKv === points[0]?.measuringKv);
    return points.map(({ setting, kv, measuringKv }, index) => {
      const figures = { setting, kv, measuringKv: isFixed && index > 0 ? null : measuringKv, step: index > 0 ? null : stepTurns };
      return valveColumns.map((column) =>
        column.key === 'nominal' ? (index > 0 ? '' : nominal) : figureText(column, figures[column.key], units[column.key] ?? ''),
      );
    });
  });
}

/** A pump's points as the rows that `readPumpRows` makes them of again. */
export const rowsOfPump = (points: readonly PumpPoint[], units: Units): string[][] =>
  points.map((point) => pumpColumns.map((column) => figureText(column, point[column.key], units[column.key] ?? '')));
