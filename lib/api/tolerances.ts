import type { StationKind, StationRank, ToleranceRule } from './projects';

const source = 'Common practice, no source: agree the band with the designer';

/** The bands that a new project starts with; every one can be changed, with its source, on the project's page. */
export const defaultTolerances: ToleranceRule[] = [
  { stationKind: 'terminal', rank: 'all', lowerPercent: -10, upperPercent: 10, source },
  { stationKind: 'branch', rank: 'all', lowerPercent: -10, upperPercent: 10, source },
  { stationKind: 'pump', rank: 'all', lowerPercent: 0, upperPercent: 10, source },
];

/** The ranks that a kind of station can have besides "all". */
export const ranksOf: Record<StationKind, StationRank[]> = { terminal: ['index', 'small'], branch: ['main'], pump: [] };

/** The band that holds for a station: that of its rank, else that of its kind, else the usual one. */
export function bandOf(rules: readonly ToleranceRule[], { kind, rank = 'all' }: { kind: StationKind; rank?: StationRank }): ToleranceRule {
  const ofKind = [...rules, ...defaultTolerances].filter(({ stationKind }) => stationKind === kind);
  // Rules of a report that was accepted before there were ranks name none.
  return ofKind.find((rule) => rule.rank === rank) ?? ofKind.find((rule) => (rule.rank ?? 'all') === 'all')!;
}

interface ToleranceTemplate {
  name: string;
  rules: ToleranceRule[];
}

const rule = (stationKind: StationKind, rank: StationRank, lowerPercent: number, upperPercent: number, from: string): ToleranceRule => ({
  stationKind,
  rank,
  lowerPercent,
  upperPercent,
  source: from,
});

const fromMemory = (what: string) => `${what}, from memory and not verified: the project's specification decides`;
const effect = (grade: string, terminal: number, branch: number, pump: number): ToleranceTemplate => {
  const from = fromMemory(`UK practice, ${grade} effect on performance`);
  return {
    name: `UK, ${grade} effect on performance`,
    rules: [
      rule('terminal', 'all', -terminal, terminal, from),
      rule('terminal', 'index', -terminal / 2, terminal, `${from}; index unit not below half the band`),
      rule('branch', 'all', -branch, branch, from),
      rule('pump', 'all', 0, pump, from),
    ],
  };
};

/** Bands to start from. Each names its source and is as editable as any other. */
export const toleranceTemplates: ToleranceTemplate[] = [
  { name: 'Usual', rules: defaultTolerances },
  {
    name: 'US, general',
    rules: (['terminal', 'branch', 'pump'] as const).map((kind) =>
      rule(kind, 'all', -10, 10, fromMemory('US practice, most guide specifications')),
    ),
  },
  {
    name: 'US, sample specification',
    rules: (['terminal', 'branch', 'pump'] as const).map((kind) =>
      rule(kind, 'all', -5, 5, 'A sample specification section: hydronic ±5 %, pump total ±5 %, report as measured'),
    ),
  },
  effect('low', 15, 10, 10),
  effect('medium', 10, 7.5, 10),
  effect('high', 5, 5, 5),
];
