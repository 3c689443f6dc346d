import type { Measured } from './judge-reading';
import type { ReadingMethodName } from './reading-methods';

export interface ReadFigures {
  method: ReadingMethodName;
  settingTurns: number | null;
  dropKpa: number | null;
  flowLs: number | null;
  heatKw: number | null;
  supplyC: number | null;
  returnC: number | null;
  pumpSpeed: number | null;
}

/** The figures that a method needs, out of all that an entry can hold. Throws a RangeError where one is missing: the entry's schema sees to it. */
export function measuredOf(read: ReadFigures): Measured {
  const need = (figure: keyof Omit<ReadFigures, 'method'>): number => {
    const value = read[figure];
    if (value === null) throw new RangeError(`${read.method} without ${figure}`);
    return value;
  };
  const { method } = read;
  switch (method) {
    case 'valve-drop':
      return { method, settingTurns: need('settingTurns'), dropKpa: need('dropKpa') };
    case 'direct-flow':
      return { method, flowLs: need('flowLs') };
    case 'coil-differential':
      return { method, dropKpa: need('dropKpa') };
    case 'pump-differential':
      return { method, dropKpa: need('dropKpa'), pumpSpeed: need('pumpSpeed') };
    case 'heat-balance':
      return { method, heatKw: need('heatKw'), supplyC: need('supplyC'), returnC: need('returnC') };
  }
}

/** The figure that the instrument itself showed, in the unit of its range. */
export function shownBy(measured: Measured): number[] {
  if (measured.method === 'direct-flow') return [measured.flowLs];
  return measured.method === 'heat-balance' ? [measured.supplyC, measured.returnC] : [measured.dropKpa];
}

/** Whether what was read lies outside the instrument's range; false where no range is recorded. */
export const isOutOfRange = (measured: Measured, { rangeLow, rangeHigh }: { rangeLow: number | null; rangeHigh: number | null }): boolean =>
  shownBy(measured).some((read) => (rangeLow !== null && read < rangeLow) || (rangeHigh !== null && read > rangeHigh));
