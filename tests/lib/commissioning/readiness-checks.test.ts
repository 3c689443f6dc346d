import { describe, expect, it } from 'vitest';
import { newestAnswers, openChecks, readinessChecks } from '@/lib/commissioning/readiness-checks';

const answer = (checkKey: string, given: string, answeredAt: string) => ({ checkKey, answer: given, answeredAt });

describe('readiness', () => {
  it('is open in every check before anything is answered', () => {
    expect(openChecks([])).toHaveLength(readinessChecks.length);
  });

  it('goes by the answer given last, in whatever order the answers arrive', () => {
    const answers = [answer('flushed', 'open', '2026-06-02T08:00:00Z'), answer('flushed', 'done', '2026-06-01T08:00:00Z')];
    expect(newestAnswers(answers).get('flushed')?.answer).toBe('open');
    expect(openChecks(answers).map(({ key }) => key)).toContain('flushed');
    expect(openChecks([...answers, answer('flushed', 'not-applicable', '2026-06-03T08:00:00Z')]).map(({ key }) => key)).not.toContain(
      'flushed',
    );
  });

  it('names each check once', () => {
    expect(new Set(readinessChecks.map(({ key }) => key)).size).toBe(readinessChecks.length);
  });
});
