import { describe, expect, it } from 'vitest';
import { byStorey, firstOf, inHandOrder, moved, neighbours } from '@/lib/commissioning/walking-order';

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

describe('an order set by hand', () => {
  it('moves one station and leaves the others as they were', () => {
    expect(moved(['a', 'b', 'c'], 0, 1)).toEqual(['b', 'a', 'c']);
    expect(moved(['a', 'b', 'c'], 2, 0)).toEqual(['c', 'a', 'b']);
  });

  it('comes first, and stations that it does not know follow as they were', () => {
    const stations = ['a', 'b', 'c'].map((id, at) => ({ id, walkingOrder: at + 1 }));
    const order = new Map([['c', 0]]);
    expect(inHandOrder(stations, order).map(({ id, walkingOrder }) => [id, walkingOrder])).toEqual([
      ['c', 1],
      ['a', 2],
      ['b', 3],
    ]);
  });
});
