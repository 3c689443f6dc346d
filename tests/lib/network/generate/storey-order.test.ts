import { describe, expect, it } from 'vitest';
import { storeysLowestFirst } from '@/lib/network/generate/storey-order';

describe('the storeys of a schedule, the lowest first', () => {
  it.each([
    [
      ['Level 10', 'Level 2', 'Level 1'],
      ['Level 1', 'Level 2', 'Level 10'],
    ],
    [
      ['Roof', '1st floor', 'Ground floor', 'Basement'],
      ['Basement', 'Ground floor', '1st floor', 'Roof'],
    ],
    [
      ['B1', 'B2', 'G', '1'],
      ['B2', 'B1', 'G', '1'],
    ],
    [
      ['L-1', 'L0', 'L-2'],
      ['L-2', 'L-1', 'L0'],
    ],
  ])('%j are %j', (names, ordered) => expect(storeysLowestFirst(names)).toEqual(ordered));

  it('are those that the schedule names first where a name says no height or two say the same', () => {
    expect(storeysLowestFirst(['Nave', 'Gallery', 'Level 1', 'Nave'])).toEqual(['Nave', 'Gallery', 'Level 1']);
    expect(storeysLowestFirst(['2 east', '1 east', '2 west'])).toEqual(['2 east', '1 east', '2 west']);
  });
});
