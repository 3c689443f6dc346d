import { describe, expect, it } from 'vitest';
import { readScheduleFile, rememberColumns, rememberedColumns } from '@/lib/client/schedule-import';
import { guessReading } from '@/lib/network/schedule-import/guess-columns';
import { trimmedTable } from '@/lib/network/schedule-import/table';

const table = trimmedTable([
  ['Tag', 'Level', 'Flow'],
  ['A', '1', 12],
]);
const reading = guessReading(table, {});
const chosen = {
  ...reading,
  columns: { ...reading.columns, flow: { column: 2, unit: 'US gpm', whenEmpty: '' }, riser: { column: null, unit: null, whenEmpty: 'A' } },
};

function shelf(kept: Record<string, string> = {}) {
  return { getItem: (key: string) => kept[key] ?? null, setItem: (key: string, text: string) => void (kept[key] = text) };
}

describe('the columns that a person chose', () => {
  it('come back for a schedule with the same heads, for that person alone', () => {
    const browser = shelf();
    rememberColumns(browser, 'mara', table, chosen);
    const another = trimmedTable([
      ['TAG', 'level', 'flow'],
      ['B', '2', 9],
      ['C', '2', 9],
    ]);
    expect(rememberedColumns(browser, 'mara', another, 0)).toEqual(chosen.columns);
    expect(rememberedColumns(browser, 'tobin', another, 0)).toBeNull();
    expect(rememberedColumns(browser, 'mara', trimmedTable([['Tag', 'Flow']]), 0)).toBeNull();
  });

  it('are kept for the last twenty kinds of schedule', () => {
    const browser = shelf();
    const kind = (number: number) => trimmedTable([['Tag', 'Level', `Flow ${number}`]]);
    for (let number = 0; number < 25; number++) rememberColumns(browser, 'mara', kind(number), chosen);
    expect(rememberedColumns(browser, 'mara', kind(24), 0)).toEqual(chosen.columns);
    expect(rememberedColumns(browser, 'mara', kind(4), 0)).toBeNull();
  });

  it.each([
    '',
    'nonsense',
    '[{"heads":"tag|level|flow","columns":{}}]',
    JSON.stringify([{ heads: 'tag|level|flow', columns: { ...chosen.columns, flow: { column: 2, unit: 'furlongs', whenEmpty: '' } } }]),
  ])('are forgotten where the browser keeps %j', (kept) => {
    expect(rememberedColumns(shelf({ 'evenhead.schedule-columns.mara': kept }), 'mara', table, 0)).toBeNull();
  });

  it('cost nothing but the convenience where the browser keeps nothing', () => {
    const full = {
      getItem: () => null,
      setItem: () => {
        throw new DOMException('full', 'QuotaExceededError');
      },
    };
    expect(() => rememberColumns(full, 'mara', table, chosen)).not.toThrow();
  });
});

it('a file of a hundred megabytes is refused before a byte of it is sent', async () => {
  const file = Object.defineProperty(new File(['x'], 'all.xlsx'), 'size', { value: 100 << 20 });
  await expect(readScheduleFile('loop', file)).rejects.toThrow('“all.xlsx” has 100 MiB; a schedule may have 10 MiB.');
});
