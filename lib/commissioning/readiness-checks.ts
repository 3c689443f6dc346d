export interface ReadinessCheck {
  key: string;
  group: 'Water side' | 'Pumps and power' | 'Controls' | 'Paper';
  text: string;
  source: string;
}

const owner = 'after an owner’s standard for hydronic balancing, pre-balance checks';
const listed = 'after the pre-balance list of a balancing association';
const method = 'after a published method statement for water commissioning';

/**
 * What must be so before a reading means anything, in the order in which one walks. A check that does not apply says why; a round that is
 * started with checks open says why in the report.
 */
export const readinessChecks: readonly ReadinessCheck[] = [
  { key: 'pressure-tested', group: 'Water side', text: 'Pressure-tested, with the record at hand', source: method },
  { key: 'flushed', group: 'Water side', text: 'Flushed and cleaned; strainers clean, permanent baskets in', source: owner },
  { key: 'water-treated', group: 'Water side', text: 'Water treated; glycol, where there is any, at the design strength', source: listed },
  { key: 'filled', group: 'Water side', text: 'Filled, and the fill pressure set', source: owner },
  { key: 'vented', group: 'Water side', text: 'All air purged; high-point vents in place and working', source: owner },
  {
    key: 'vessel',
    group: 'Water side',
    text: 'Expansion vessel not waterlogged, its pre-charge checked with the water side drained',
    source: owner,
  },
  { key: 'coils-piped', group: 'Water side', text: 'Coils piped the right way round and within reach', source: owner },
  {
    key: 'valves-open',
    group: 'Water side',
    text: 'Isolating, balancing and service valves fully open; bypasses as designed',
    source: listed,
  },
  { key: 'test-points', group: 'Water side', text: 'Measuring points fitted, within reach and working', source: owner },
  { key: 'pump-rotation', group: 'Pumps and power', text: 'Pumps turn the right way; aligned and fixed', source: owner },
  { key: 'motors', group: 'Pumps and power', text: 'Motors wired; overloads and fuses as the nameplate asks', source: owner },
  { key: 'controls', group: 'Controls', text: 'Controls complete; sensors calibrated, program right', source: owner },
  { key: 'full-flow', group: 'Controls', text: 'Control valves held at full flow through the coils', source: listed },
  { key: 'temperatures', group: 'Controls', text: 'Chiller or boiler at design temperatures', source: listed },
  { key: 'air-first', group: 'Controls', text: 'Air side balanced first, where there is one', source: listed },
  { key: 'schedule-at-hand', group: 'Paper', text: 'The issued schedule at hand: valve, size, design flow, drop to read', source: method },
  {
    key: 'calibration',
    group: 'Paper',
    text: 'Meters calibrated and in date, hoses bled and zeroed',
    source: 'common practice, no source',
  },
];

export const readinessSources =
  'Lists of this kind differ from place to place. The project’s specification and local codes say which checks are asked for.';

/** How the answers read, with their sign. */
export const checkWords = { done: '● done', open: '▾ open', 'not-applicable': '– does not apply' } as const;

/** How a check stands: its newest answer, or open where it has none. */
export function openChecks(answers: readonly { checkKey: string; answer: string; answeredAt: string }[]): ReadinessCheck[] {
  const newest = newestAnswers(answers);
  return readinessChecks.filter(({ key }) => (newest.get(key)?.answer ?? 'open') === 'open');
}

/** The answer that counts for each check: the one given last, by the time it was given. */
export function newestAnswers<Answer extends { checkKey: string; answeredAt: string }>(answers: readonly Answer[]): Map<string, Answer> {
  const newest = new Map<string, Answer>();
  for (const answer of answers) {
    const known = newest.get(answer.checkKey);
    if (!known || Date.parse(answer.answeredAt) >= Date.parse(known.answeredAt)) newest.set(answer.checkKey, answer);
  }
  return newest;
}
