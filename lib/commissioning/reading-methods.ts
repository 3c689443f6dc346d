/** What is typed at a station, by method. */
export type ReadingField = 'setting' | 'drop' | 'flow' | 'heat' | 'supply' | 'return' | 'speed';

interface ReadingMethodFacts {
  name: string;
  fields: readonly ReadingField[];
  /** The kind of instrument that is read. */
  instrument: 'differential-pressure' | 'flow' | 'temperature';
}

/** How a flow can be read at a station, the usual way first. */
export const readingMethods = {
  'valve-drop': { name: 'Across the valve', fields: ['setting', 'drop'], instrument: 'differential-pressure' },
  'direct-flow': { name: 'Flow direct', fields: ['flow'], instrument: 'flow' },
  'coil-differential': { name: 'Across the coil', fields: ['drop'], instrument: 'differential-pressure' },
  'pump-differential': { name: 'Across the pump', fields: ['drop', 'speed'], instrument: 'differential-pressure' },
  'heat-balance': { name: 'Heat balance', fields: ['heat', 'supply', 'return'], instrument: 'temperature' },
} as const satisfies Record<string, ReadingMethodFacts>;

export type ReadingMethodName = keyof typeof readingMethods;

interface ReadAt {
  kvTable: readonly unknown[] | null;
  coilDropKpa: number | null;
  pumpCurve: readonly unknown[] | null;
}

/** The methods that a station's design gives what they need for. */
export function methodsAt({ kvTable, coilDropKpa, pumpCurve }: ReadAt): ReadingMethodName[] {
  const names = Object.keys(readingMethods) as ReadingMethodName[];
  return names.filter((name) => {
    if (name === 'valve-drop') return kvTable !== null;
    if (name === 'coil-differential') return coilDropKpa !== null;
    if (name === 'pump-differential') return pumpCurve !== null;
    return true;
  });
}
