import type { ChosenValve, EquipmentOf, KvPoint } from '@/lib/network/drawing';
import type { PumpPoint } from './pump-points';

interface Family {
  name: string;
  sizes: { nominal: string; stepTurns: number | null; points: KvPoint[] }[];
}

/** A valve to choose from, in the form of the generic ones of `lib/network/valve-families.ts`. */
export interface OfferedValve {
  name: string;
  nominal: string;
  /** m³/h at 1 bar, fully open. */
  kvs: number;
  turns: number;
  kvTable: KvPoint[];
  stepTurns: number | null;
}

/** The organisation's families as single valves, smallest first within each: for the inspector and for the generation of a loop. */
export const offeredValves = (families: readonly Family[]): OfferedValve[] =>
  families.flatMap(({ name, sizes }) =>
    sizes
      .map(({ nominal, stepTurns, points }) => ({
        name: `${name} ${nominal}`,
        nominal,
        kvs: points.at(-1)!.kv,
        turns: points.at(-1)!.setting,
        kvTable: points,
        stepTurns,
      }))
      .sort((a, b) => a.kvs - b.kvs),
  );

/** What a piece takes of a valve: a copy, so that a loop keeps what it was issued with when the catalogue changes. Fully open. */
export const copiedValve = ({
  name,
  kvTable,
  stepTurns = null,
}: Pick<OfferedValve, 'name' | 'kvTable'> & Partial<Pick<OfferedValve, 'stepTurns'>>): Omit<ChosenValve, 'isLocked'> => ({
  name,
  kvTable: kvTable.map((point) => ({ ...point })),
  settingTurns: null,
  stepTurns,
});

type Curves = Pick<EquipmentOf<'pump'>, 'curve' | 'efficiency' | 'suctionHeadRequired'>;

/** What a piece takes of a pump: a copy of its curves. */
export const copiedPump = (points: readonly PumpPoint[]): Required<Curves> => ({
  curve: points.map(({ flowLs, headM }) => ({ flowLs, headM })),
  efficiency: points.flatMap(({ flowLs, efficiency }) => (efficiency === null ? [] : [{ flowLs, fraction: efficiency }])),
  suctionHeadRequired: points.flatMap(({ flowLs, suctionHeadM }) => (suctionHeadM === null ? [] : [{ flowLs, headM: suctionHeadM }])),
});
