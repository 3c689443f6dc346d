import { describe, expect, it } from 'vitest';
import { pumpColumns, valveColumns } from '@/lib/catalogue/figure-columns';
import { placeTable } from '@/lib/catalogue/place-table';

describe('a table from a file or the clipboard', () => {
  it('is placed by its headings, below whatever stands above them, with the units they name', () => {
    const placed = placeTable(
      [['Pump P80'], [], ['No.', 'Head, ft', 'Flow (m3/h)', 'Eff. [%]', 'NPSHr (m)'], ['1', '20', '0', '0', '1'], ['', '', '', '', '']],
      pumpColumns,
    );
    expect(placed).toEqual({
      ok: true,
      rows: [['0', '20', '0', '1']],
      units: { flowLs: 'm³/h', headM: 'ft', efficiency: '%', suctionHeadM: 'm' },
      leftAside: ['No.'],
    });
  });

  it('without headings is taken in order', () => {
    expect(
      placeTable(
        [
          ['0', '10'],
          ['2', '8'],
        ],
        pumpColumns,
      ),
    ).toMatchObject({
      rows: [
        ['0', '10', '', ''],
        ['2', '8', '', ''],
      ],
    });
    expect(
      placeTable(
        [
          ['0.5', '1.1'],
          ['4', '8'],
        ],
        valveColumns,
      ),
    ).toMatchObject({
      rows: [
        ['', '0.5', '1.1', '', ''],
        ['', '4', '8', '', ''],
      ],
    });
  });

  it('that is a chart of settings by size becomes a row for each of its figures', () => {
    const placed = placeTable([['Kv'], ['Setting', 'DN15', 'DN20'], ['0.5', '0.2', ''], ['1', '0.4', '0.7']], valveColumns);
    expect(placed).toMatchObject({
      ok: true,
      rows: [
        ['DN15', '0.5', '0.2', '', ''],
        ['DN15', '1', '0.4', '', ''],
        ['DN20', '1', '0.7', '', ''],
      ],
    });
  });

  it('tells a setting from its step and a Kv from the measuring one', () => {
    const placed = placeTable(
      [
        ['Setting step', 'Kv signal', 'Valve size', 'Valve setting', 'Cvs'],
        ['0.1', '5', 'DN15', '1', '2'],
      ],
      valveColumns,
    );
    expect(placed).toMatchObject({ rows: [['DN15', '1', '2', '5', '0.1']], units: { kv: 'Cv', measuringKv: 'Kv' } });
  });

  it('that lacks a needed column, is empty or too long, is refused with the reason', () => {
    expect(
      placeTable(
        [
          ['Flow', 'Efficiency'],
          ['1', '60'],
        ],
        pumpColumns,
      ),
    ).toMatchObject({ ok: false, message: /“Head”/ });
    expect(placeTable([[''], []], pumpColumns)).toMatchObject({ ok: false, message: /nothing/ });
    const long = Array.from({ length: 1001 }, (_, i) => [String(i), '1']);
    expect(placeTable(long, pumpColumns)).toMatchObject({ ok: false, message: /1001 rows/ });
  });
});
