import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { correctedIds, standingReadings } from '@/lib/commissioning/standing-readings';
import { isOverdue } from '@/lib/commissioning/calibration';

const entry = (id: string, { stationId = 'FC-1', roundId = 'one', correctsReadingId = null as string | null, minute = 0 } = {}) => ({
  id,
  stationId,
  roundId,
  correctsReadingId,
  takenAt: `2026-03-02T09:${String(minute).padStart(2, '0')}:00.000Z`,
});

describe('the entry that counts', () => {
  it('is the newest of a station in the round, in whatever order they came in', () => {
    const entries = [entry('b', { minute: 9 }), entry('a', { minute: 4 }), entry('c', { minute: 7, roundId: 'two' })];
    expect(standingReadings(entries, 'one').get('FC-1')?.id).toBe('b');
    expect(standingReadings(entries.toReversed(), 'one').get('FC-1')?.id).toBe('b');
    expect(standingReadings(entries, 'two').get('FC-1')?.id).toBe('c');
    expect(standingReadings(entries, 'three').size).toBe(0);
  });

  it('is not one that a later entry puts right, even where the later one was read earlier', () => {
    const entries = [entry('a', { minute: 9 }), entry('b', { minute: 4, correctsReadingId: 'a' })];
    expect(standingReadings(entries, 'one').get('FC-1')?.id).toBe('b');
  });

  it('is the later id of two that were taken at one moment', () => {
    expect(standingReadings([entry('b'), entry('a')], 'one').get('FC-1')?.id).toBe('b');
  });

  it('compares moments, not their spelling, across time zones', () => {
    const earlier = { ...entry('a'), takenAt: '2026-03-02T10:30:00+02:00' };
    const later = { ...entry('b'), takenAt: '2026-03-02T09:00:00Z' };
    expect(standingReadings([later, earlier], 'one').get('FC-1')?.id).toBe('b');
  });

  it('is never a corrected one, and is there wherever an uncorrected one is', () => {
    const entries = fc
      .array(fc.record({ minute: fc.integer({ min: 0, max: 59 }), corrects: fc.option(fc.nat(20)) }), { maxLength: 20 })
      .map((made) =>
        made.map(({ minute, corrects }, i) =>
          entry(`${i}`.padStart(2, '0'), {
            minute,
            correctsReadingId: corrects !== null && corrects < i ? `${corrects}`.padStart(2, '0') : null,
          }),
        ),
      );
    fc.assert(
      fc.property(entries, (all) => {
        const standing = standingReadings(all, 'one').get('FC-1');
        const corrected = correctedIds(all);
        expect(standing !== undefined).toBe(all.some(({ id }) => !corrected.has(id)));
        if (standing) expect(corrected.has(standing.id)).toBe(false);
      }),
    );
  });
});

describe('a calibration', () => {
  it('holds on the day it is due and is overdue on the next', () => {
    expect(isOverdue({ calibrationDueOn: '2026-03-14' }, new Date('2026-03-14T23:59:00Z'))).toBe(false);
    expect(isOverdue({ calibrationDueOn: '2026-03-14' }, new Date('2026-03-15T00:00:00Z'))).toBe(true);
    expect(isOverdue({ calibrationDueOn: null }, new Date('2026-03-15T00:00:00Z'))).toBe(false);
  });
});
