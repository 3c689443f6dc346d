import { beforeAll, describe, expect, it } from 'vitest';
import { GET as getInstruments, POST as postInstrument } from '@/app/api/instruments/route';
import { PATCH as patchInstrument } from '@/app/api/instruments/[instrumentId]/route';
import type { Instrument, InstrumentInput } from '@/lib/api/commissioning';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let home: MadeOrganization;
let away: MadeOrganization;

beforeAll(async () => {
  home = await makeOrganization(suite.db, { name: 'Home' });
  away = await makeOrganization(suite.db, { name: 'Away' });
});

const meter: InstrumentInput = {
  name: 'Differential pressure meter',
  kind: 'differential-pressure',
  serial: 'DP-02',
  rangeLow: 0,
  rangeHigh: 200,
  accuracyPercent: 1,
  accuracyAbsolute: 0.1,
  calibratedOn: '2026-03-14',
  calibrationDueOn: '2027-03-14',
  isRetired: false,
};
const add = (given: Partial<InstrumentInput> = {}) => call(postInstrument, { method: 'POST', body: { ...meter, ...given } });
const change = (instrumentId: string, given: Partial<InstrumentInput>) =>
  call(patchInstrument, { method: 'PATCH', params: { instrumentId }, body: { ...meter, ...given } });

describe('the meters of an organisation', () => {
  it('are added by a technician and read, to the day, as they were typed', async () => {
    signInAs(home.technician);
    const { status, body } = await add();
    expect(status).toBe(200);
    const list = (await call(getInstruments)).body as Instrument[];
    expect(list).toEqual([{ id: body.id, ...meter }]);
  });

  it('have serial numbers of their own, within the organisation', async () => {
    signInAs(home.technician);
    const twice = await add({ serial: 'DP-02' });
    expect([twice.status, twice.body.code, twice.body.fields[0].path]).toEqual([409, 'serial-taken', 'serial']);
    signInAs(away.technician);
    expect((await add({ serial: 'DP-02' })).status).toBe(200);
  });

  it('are retired and taken back, but never become another kind', async () => {
    signInAs(home.technician);
    const { id } = (await add({ serial: 'DP-03' })).body;
    expect((await change(id, { serial: 'DP-03', isRetired: true })).body.isRetired).toBe(true);
    expect((await change(id, { serial: 'DP-03', isRetired: false })).body.isRetired).toBe(false);
    const other = await change(id, { serial: 'DP-03', kind: 'flow' });
    expect([other.status, other.body.fields[0].path]).toEqual([400, 'kind']);
    const verbs = await suite
      .db('activity')
      .where({ organization_id: home.organizationId })
      .whereLike('subject', '%DP-03')
      .orderBy('at')
      .pluck('verb');
    expect(verbs).toEqual(['added', 'retired', 'took back into use']);
  });

  it('of another organisation are not there, and stay as they are', async () => {
    signInAs(home.technician);
    const { id } = (await add({ serial: 'DP-04' })).body;
    signInAs(away.technician);
    expect((await change(id, { serial: 'TAKEN' })).status).toBe(404);
    expect((await suite.db('instruments').where({ id }).first('serial')).serial).toBe('DP-04');
  });

  it('are read and not changed by designers and owners', async () => {
    for (const person of [home.designer, home.owner]) {
      signInAs(person);
      expect((await call(getInstruments)).status).toBe(200);
      expect((await add({ serial: 'DP-05' })).status).toBe(403);
    }
  });

  it('with a date that no calendar has, or a range upside down, are refused at that field', async () => {
    signInAs(home.technician);
    expect((await add({ serial: 'DP-06', calibrationDueOn: '2026-02-30' })).body.fields[0].path).toBe('calibrationDueOn');
    expect((await add({ serial: 'DP-06', rangeLow: 10, rangeHigh: 5 })).body.fields[0].path).toBe('rangeHigh');
  });
});
