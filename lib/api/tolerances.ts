import type { ToleranceRule } from './projects';

const source = 'Common practice, no source: agree the band with the designer';

/** The bands that a new project starts with; every one can be changed, with its source, on the project's page. */
export const defaultTolerances: ToleranceRule[] = [
  { stationKind: 'terminal', lowerPercent: -10, upperPercent: 10, source },
  { stationKind: 'branch', lowerPercent: -10, upperPercent: 10, source },
  { stationKind: 'pump', lowerPercent: 0, upperPercent: 10, source },
];
