import fc from 'fast-check';
import { expect, it } from 'vitest';
import { GrowingList } from '@/lib/hydraulics/growing-list';

it('a growing list holds what was appended, in order, from whatever room it began with', () => {
  fc.assert(
    fc.property(fc.nat(5), fc.array(fc.integer({ min: -1e9, max: 1e9 }), { maxLength: 300 }), (room, numbers) => {
      const list = new GrowingList(room);
      numbers.forEach((number, k) => {
        list.push(number);
        expect(list.length).toBe(k + 1);
      });
      expect(numbers.map((_, k) => list.at(k))).toEqual(numbers);
      expect([...list.toArray()]).toEqual(numbers);
    }),
  );
});

it('the array taken from a list does not change with it', () => {
  const list = new GrowingList();
  list.push(7);
  const array = list.toArray();
  array[0] = 9;
  list.push(8);
  expect(list.at(0)).toBe(7);
  expect([...array]).toEqual([9]);
});
