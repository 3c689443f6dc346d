import { describe, expect, it } from 'vitest';
import { readDelimitedText } from '@/lib/network/schedule-import/delimited-text';
import { exampleSchedule } from '@/lib/network/schedule-import/example-schedule';
import { guessReading, headSignature, readHead } from '@/lib/network/schedule-import/guess-columns';
import { meanings, type Meaning } from '@/lib/network/schedule-import/meanings';
import type { ScheduleTable } from '@/lib/network/schedule-import/table';

function tableOf(text: string): ScheduleTable {
  const read = readDelimitedText(text);
  if (!read.ok) throw new Error(read.message);
  return read.table;
}

/** Each meaning that was found, as the head of its column and its unit. */
function guessed(text: string): Partial<Record<Meaning, string>> {
  const table = tableOf(text);
  const { headRow, columns } = guessReading(table, {});
  return Object.fromEntries(
    meanings
      .filter((meaning) => columns[meaning].column !== null)
      .map((meaning) => {
        const { column, unit } = columns[meaning];
        return [meaning, [headRow === null ? '' : table.rows[headRow]![column!], unit].filter(Boolean).join(' | ')];
      }),
  );
}

describe('the heads of a schedule', () => {
  it.each([
    ['Flow (L/s)', 'flow', 'L/s'],
    ['Water flow [m³/h]', 'flow', 'm³/h'],
    ['Design flow, gpm', 'flow', 'US gpm'],
    ['Flow rate US gpm', 'flow', 'US gpm'],
    ['Flow l/min', 'flow', 'L/min'],
    ['gpm', 'flow', 'US gpm'],
    ['Total capacity / kW', 'power', 'kW'],
    ['Load (MBH)', 'power', 'MBH'],
    ['Duty (W)', 'power', 'W'],
    ['WPD (ft)', null, null],
    ['WPD (ft wg)', 'pressure', 'ft water'],
    ['Coil ΔP kPa', 'pressure', 'kPa'],
    ['EWT (°F)', 'temperature', '°F'],
    ['Room', null, null],
  ])('“%s” names the unit %s %s', (head, quantity, unit) => {
    expect(readHead(head).unit).toEqual(quantity === null ? null : { quantity, unit });
  });

  it('of the example are all understood', () => {
    expect(Object.keys(guessed(exampleSchedule))).toEqual([...meanings]);
  });

  it('may stand below a title, with the units in a row of their own', () => {
    const text = 'Library,,,,\nFan coils,rev 2,,,\nUnit no.,Floor,Cooling load,Water flow,Pressure drop\n,,kW,m3/h,mbar\nF1,1,2,0.3,90\n';
    expect(guessed(text)).toEqual({
      tag: 'Unit no.',
      storey: 'Floor',
      load: 'Cooling load | kW',
      flow: 'Water flow | m³/h',
      coilDrop: 'Pressure drop | mbar',
    });
    expect(guessReading(tableOf(text), {}).firstRow).toBe(4);
  });

  it('of the air side are not taken for the water’s', () => {
    const found = guessed(
      'Tag\tLevel\tAirflow (L/s)\tAir pressure drop (Pa)\tEAT (°C)\tTotal cooling (kW)\tSensible cooling (kW)\tCHW flow (L/s)\tWPD (kPa)\n',
    );
    expect(found).toEqual({
      tag: 'Tag',
      storey: 'Level',
      load: 'Total cooling (kW) | kW',
      flow: 'CHW flow (L/s) | L/s',
      coilDrop: 'WPD (kPa) | kPa',
    });
  });

  it('that say flow and return mean temperatures where they are in degrees', () => {
    const found = guessed('Ref;Storey;Flow (l/s);Flow temp (°C);Return temp (°C)\n');
    expect(found).toMatchObject({ flow: 'Flow (l/s) | L/s', supply: 'Flow temp (°C) | °C', return: 'Return temp (°C) | °C' });
  });

  it('without a unit are taken in the unit that the person reads in', () => {
    const { columns } = guessReading(tableOf('Tag,Level,Flow\nA,1,4\n'), { flow: 'US gpm' });
    expect(columns.flow).toMatchObject({ column: 2, unit: 'US gpm' });
  });

  it('may be missing altogether', () => {
    expect(guessReading(tableOf('FC-1,Level 1,0.2,14\nFC-2,Level 1,0.3,12\n'), {})).toMatchObject({ headRow: null, firstRow: 0 });
  });

  it('tell two schedules of the same columns to be alike, whatever stands below', () => {
    const [first, second] = ['Tag,Flow\na,1\n', 'TAG,flow\nb,2\n'].map(tableOf);
    expect(headSignature(first!, 0)).toBe(headSignature(second!, 0));
  });
});

describe('text with columns', () => {
  it.each(['a;b\n1,5;2', 'a\tb\n1,5\t2', 'a,b\n"1,5",2', 'a|b\n1,5|2'])('%j is read by whatever divides it', (text) => {
    expect(tableOf(text).rows).toEqual([
      ['a', 'b'],
      ['1,5', '2'],
    ]);
  });

  it('with decimal commas is divided by its semicolons, headings and empty lines notwithstanding', () => {
    const { rows } = tableOf('Tag;Load;Flow;Drop\nLevel 1\nA;4,2;0,167;14,5\n\nB;3,1;0,123;12,5\nC;3,1;0,123;"hall, east; 2"\n');
    expect(rows[2]).toEqual(['A', '4,2', '0,167', '14,5']);
    expect(rows[5]![3]).toBe('hall, east; 2');
  });

  it.each([
    ['', 'nothing'],
    [' \n \n', 'nothing'],
    ['a\0b', 'not text'],
    ['a,"b\n1,2\n', 'not closed'],
    [`${'a,b\n'.repeat(5300)}`, 'at most 5200 are read'],
    [`${'x,'.repeat(500)}`, '60 columns'],
  ])('that is no schedule is refused with a reason', (text, reason) => {
    expect(readDelimitedText(text)).toEqual({ ok: false, message: expect.stringContaining(reason) });
  });
});
