import { describe, expect, it } from 'vitest';
import { siteHistory, standsForFit, type SiteRecord } from '@/lib/balancing/site-history';
import type { NetworkDocument } from '@/lib/hydraulics/types';

const kvTable = [
  { setting: 1, kv: 1 },
  { setting: 4, kv: 4 },
];
const document: NetworkDocument = {
  format: 'network/1',
  name: 'Two valves',
  fluid: { medium: 'water', temperatureC: 20 },
  nodes: [{ id: 'A' }, { id: 'B' }],
  links: [
    { id: 'V1', kind: 'balancingValve', from: 'A', to: 'B', kvTable },
    { id: 'V2', kind: 'balancingValve', from: 'A', to: 'B', kvTable, setting: 3 },
  ],
};
const read = (at: number, link: string, setting: number | null, pass = 'first'): SiteRecord => ({
  kind: 'reading',
  at,
  pass,
  setting,
  reading: { link, quantity: 'dropKpa', value: 5, meter: 'M' },
});
const set = (at: number, link: string, before: number | null, after: number): SiteRecord => ({
  kind: 'set',
  at,
  pass: 'first',
  link,
  before,
  after,
});
const kinds = (records: SiteRecord[]) =>
  siteHistory(document, records).events.map((event) =>
    event.kind === 'set' ? `${event.link}=${event.setting}` : `read ${event.reading.link}`,
  );

describe('the history of a loop on site', () => {
  it('begins with how the valves stood by their first records, else as in the document', () => {
    const { document: before } = siteHistory(document, [read(1, 'V1', 4), set(2, 'V2', 2.5, 2)]);
    expect(before.links.map((link) => link.kind === 'balancingValve' && link.setting)).toEqual([4, 2.5]);
  });

  it('is in the order of time, whatever the order of arrival', () => {
    expect(kinds([read(3, 'V2', 3), set(2, 'V1', 4, 2), read(1, 'V1', 4)])).toEqual(['read V1', 'V1=2', 'read V2']);
  });

  it('sees a setting that nobody wrote down in the next reading', () => {
    expect(kinds([read(1, 'V1', 4), read(2, 'V1', 2.5)])).toEqual(['read V1', 'V1=2.5', 'read V1']);
  });

  it('takes valves that stand otherwise in a new pass to have been set before it began', () => {
    const records = [read(1, 'V1', 4), read(2, 'V2', 3), read(11, 'V1', 2.5, 'second'), read(12, 'V2', 2, 'second')];
    const { stands } = siteHistory(document, records);
    expect(stands.map(({ settings, readings }) => [settings.V1, settings.V2, readings.length])).toEqual([
      [4, 3, 2],
      [2.5, 2, 2],
    ]);
    expect(kinds(records)).toEqual(['read V1', 'read V2', 'V1=2.5', 'V2=2', 'read V1', 'read V2']);
  });

  it('keeps readings together that were taken while nothing was changed', () => {
    const { stands } = siteHistory(document, [read(1, 'V1', 4), read(2, 'V2', 3), set(3, 'V1', 4, 2), read(4, 'V1', 2), read(5, 'V2', 3)]);
    expect(stands.map(({ readings, settings }) => [readings.length, settings.V1])).toEqual([
      [2, 4],
      [2, 2],
    ]);
  });

  it('knows a valve that was set anew to where it was noted', () => {
    const { stands } = siteHistory(document, [read(1, 'V1', 4), set(2, 'V1', 4, 4), read(3, 'V1', 4)]);
    expect(stands[1]).toMatchObject({ setAgain: ['V1'] });
  });

  it('leaves out what the loop does not have any more', () => {
    expect(kinds([read(1, 'gone', 4)])).toEqual([]);
  });
});

describe('the stands that a fit is made of', () => {
  it('are those with a good part of the loop read, and how it stands now', () => {
    const many = Array.from({ length: 10 }, (_, at) => read(at, 'V1', 4));
    const history = siteHistory(document, [...many, set(20, 'V1', 4, 2), read(21, 'V1', 2), set(22, 'V1', 2, 3)]);
    const { rounds, leftOut } = standsForFit(history);
    expect(rounds.map(({ readings, settings }) => [readings.length, settings.V1])).toEqual([
      [10, 4],
      [0, 3],
    ]);
    expect(leftOut).toBe(1);
  });
});
