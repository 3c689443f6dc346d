import { describe, expect, it } from 'vitest';
import { byStorey, firstOf, neighbours } from '@/lib/commissioning/walking-order';

const station = (walkingOrder: number, storey = 'Level 1') => ({ walkingOrder, storey });
const walked = [station(3, 'Level 2'), station(1), station(2)];

describe('the walk along the stations', () => {
  it('knows the one before and after, and its ends', () => {
    expect(neighbours(walked, station(2))).toEqual({ before: station(1), next: station(3, 'Level 2') });
    expect(neighbours(walked, station(1)).before).toBeNull();
    expect(neighbours(walked, station(3)).next).toBeNull();
  });

  it('begins at the first, whatever order they come in', () => {
    expect(firstOf(walked)).toEqual(station(1));
    expect(firstOf([])).toBeUndefined();
  });

  it('goes storey by storey', () => {
    expect(byStorey(walked)).toEqual([
      { storey: 'Level 1', stations: [station(1), station(2)] },
      { storey: 'Level 2', stations: [station(3, 'Level 2')] },
    ]);
  });
});
