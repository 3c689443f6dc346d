import { beforeAll, describe, expect, it } from 'vitest';
import { PUT as putPump, DELETE as deletePump } from '@/app/api/catalogue/pumps/[pumpId]/route';
import { POST as postPump } from '@/app/api/catalogue/pumps/route';
import { GET as getCatalogue } from '@/app/api/catalogue/route';
import { DELETE as deleteFamily, PUT as putFamily } from '@/app/api/catalogue/valve-families/[familyId]/route';
import { POST as postFamily } from '@/app/api/catalogue/valve-families/route';
import { POST as issue } from '@/app/api/loops/[loopId]/revisions/route';
import type { CatalogueBody, PumpInput, ValveFamilyInput } from '@/lib/api/catalogue';
import { copiedPump, copiedValve, offeredValves } from '@/lib/catalogue/chosen-entries';
import type { Drawing } from '@/lib/network/drawing';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { ladder } from '../../make/drawing';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let home: MadeOrganization;
let away: MadeOrganization;

beforeAll(async () => {
  home = await makeOrganization(suite.db, { name: 'Home' });
  away = await makeOrganization(suite.db, { name: 'Away' });
});

const family = (name: string, kvs = 3): ValveFamilyInput => ({
  name,
  source: 'Data sheet of the test',
  sizes: [
    { nominal: 'DN15', stepTurns: 0.1, points: [1, 2, 4].map((setting) => ({ setting, kv: (kvs * setting) / 4, measuringKv: 2 })) },
    { nominal: 'DN20', stepTurns: null, points: [1, 2, 4].map((setting) => ({ setting, kv: (2 * kvs * setting) / 4 })) },
  ],
});
const pump = (name: string, headM = 12): PumpInput => ({
  name,
  source: 'Test curve',
  points: [
    { flowLs: 0, headM, efficiency: null, suctionHeadM: null },
    { flowLs: 2, headM: headM * 0.9, efficiency: 0.6, suctionHeadM: 1.1 },
    { flowLs: 4, headM: headM * 0.6, efficiency: 0.55, suctionHeadM: 2.4 },
  ],
});
const add = (input: ValveFamilyInput) => call(postFamily, { method: 'POST', body: input });
const replace = (familyId: string, version: number, input: ValveFamilyInput) =>
  call(putFamily, { method: 'PUT', params: { familyId }, body: { ...input, version } });
const remove = (familyId: string, version: number) => call(deleteFamily, { method: 'DELETE', params: { familyId }, body: { version } });
const catalogue = async () => (await call(getCatalogue)).body as CatalogueBody;
const families = async () => (await catalogue()).valveFamilies.map(({ name }) => name);

describe('the catalogue of an organisation', () => {
  it('gives back a valve family and a pump with every figure as it was sent', async () => {
    signInAs(home.designer);
    const [valve, made] = [family('Round trip'), pump('Round trip')];
    expect((await add(valve)).status).toBe(200);
    expect((await call(postPump, { method: 'POST', body: made })).status).toBe(200);
    const { valveFamilies, pumps } = await catalogue();
    expect(valveFamilies.find(({ name }) => name === 'Round trip')).toMatchObject({ ...valve, version: 1, changedBy: 'designer' });
    expect(pumps.find(({ name }) => name === 'Round trip')).toMatchObject({ ...made, version: 1 });
  });

  it('has each name once, in whatever letters, and says at the name what is wrong', async () => {
    signInAs(home.designer);
    await add(family('Once'));
    const twice = await add(family('ONCE'));
    expect([twice.status, twice.body.code, twice.body.fields[0].path]).toEqual([409, 'name-taken', 'name']);
    signInAs(away.designer);
    expect((await add(family('Once'))).status).toBe(200);
  });

  it('makes a version of every change and keeps what stood there in the record of activity', async () => {
    signInAs(home.designer);
    const { id } = (await add(family('Versions'))).body;
    expect((await replace(id, 1, family('Versions', 5))).body).toEqual({ id, version: 2 });
    expect((await remove(id, 2)).status).toBe(200);
    expect(await families()).not.toContain('Versions');
    const rows = await suite
      .db('activity')
      .where({ organization_id: home.organizationId })
      .whereLike('subject', '%Versions%')
      .orderBy('at')
      .select('verb', 'detail');
    expect(rows.map(({ verb }) => verb)).toEqual(['added', 'replaced', 'removed']);
    expect(rows[1]!.detail.before.sizes[0].points[2].kv).toBe(3);
    expect(rows[2]!.detail.before).toMatchObject({ version: 2, sizes: family('Versions', 5).sizes });
  });

  it('does not let two people overwrite each other', async () => {
    signInAs(home.designer);
    const { id } = (await add(family('Contested'))).body;
    const both = await Promise.all([replace(id, 1, family('Contested', 4)), replace(id, 1, family('Contested', 6))]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(both.find(({ status }) => status === 409)!.body.code).toBe('catalogue-changed');
    expect((await remove(id, 1)).status).toBe(409);
    expect((await catalogue()).valveFamilies.find((it) => it.id === id)).toMatchObject({ version: 2 });
  });

  it('of another organisation is not there, cannot be changed and stays as it is', async () => {
    signInAs(home.designer);
    const { id } = (await add(family('Private'))).body;
    const pumpId = (await call(postPump, { method: 'POST', body: pump('Private') })).body.id;
    signInAs(away.designer);
    expect(await families()).not.toContain('Private');
    expect((await replace(id, 1, family('Taken over'))).status).toBe(404);
    expect((await remove(id, 1)).status).toBe(404);
    expect((await call(putPump, { method: 'PUT', params: { pumpId }, body: { ...pump('Taken over'), version: 1 } })).status).toBe(404);
    expect((await call(deletePump, { method: 'DELETE', params: { pumpId }, body: { version: 1 } })).status).toBe(404);
    expect(await suite.db('valve_families').where({ id }).first('name', 'version')).toEqual({ name: 'Private', version: 1 });
    expect(await suite.db('catalogue_pumps').where({ id: pumpId }).first('name', 'version')).toEqual({ name: 'Private', version: 1 });
  });

  it('is read by everyone who sees loops, and changed by designers and administrators alone', async () => {
    for (const person of [home.technician, home.owner]) {
      signInAs(person);
      expect((await call(getCatalogue)).status).toBe(200);
      expect((await add(family('Not allowed'))).status).toBe(403);
    }
    signInAs(home.administrator);
    expect((await add(family('By the administrator'))).status).toBe(200);
  });
});

describe('what cannot be a valve or a pump', () => {
  const point = (setting: number, kv: number) => ({ setting, kv });
  const withPoints = (points: object[]) => ({ ...family('Faulty'), sizes: [{ nominal: 'DN15', stepTurns: null, points }] });

  it.each([
    ['a Kv of 1e9', withPoints([point(1, 1), point(2, 1e9)]), 'sizes.0.points.1.kv'],
    ['a Kv that falls', withPoints([point(1, 2), point(2, 1)]), 'sizes.0.points.1.kv'],
    ['a Kv in words', withPoints([point(1, 2), { setting: 2, kv: 'open' }]), 'sizes.0.points.1.kv'],
    ['one setting', withPoints([point(1, 2)]), 'sizes.0.points.0.setting'],
    ['a size twice', { ...family('Faulty'), sizes: [family('').sizes[0], family('').sizes[0]] }, 'sizes.1.nominal'],
    ['no size', { ...family('Faulty'), sizes: [] }, 'sizes'],
    ['no source', { ...family('Faulty'), source: '  ' }, 'source'],
    ['the name of our own data', family('Generic DN15'), 'name'],
  ])('%s is refused at its place, and nothing is stored', async (_, input, path) => {
    signInAs(home.designer);
    const { status, body } = await call(postFamily, { method: 'POST', body: input });
    expect(status).toBe(400);
    expect(body.fields.map((field: { path: string }) => field.path)).toContain(path);
    expect(await families()).not.toContain('Faulty');
  });

  it('a head that rises with flow is refused with the reason', async () => {
    signInAs(home.designer);
    const rising = pump('Rising');
    rising.points[1]!.headM = 20;
    const { status, body } = await call(postPump, { method: 'POST', body: rising });
    expect(status).toBe(400);
    expect(body.fields).toEqual([{ path: 'points.1.headM', message: expect.stringMatching(/rises with flow/) }]);
  });
});

it('a loop keeps the data it was issued with when the catalogue changes', async () => {
  const { designer, loopId, organizationId } = await makeOrganization(suite.db, { name: 'Keeper' });
  signInAs(designer);
  const familyId = (await add(family('House valve', 2.5))).body.id;
  const pumpId = (await call(postPump, { method: 'POST', body: pump('House pump') })).body.id;
  const { valveFamilies, pumps } = await catalogue();
  const chosen = copiedValve(offeredValves(valveFamilies)[0]!);
  const drawn = ladder([0.2, 0.3, 0.25]);
  const drawing: Drawing = {
    ...drawn,
    equipment: drawn.equipment.map((piece) => {
      if (piece.kind === 'terminalUnit') return { ...piece, balancingValve: { ...chosen, isLocked: false } };
      return piece.kind === 'pump' ? { ...piece, ...copiedPump(pumps[0]!.points) } : piece;
    }),
  };
  await suite
    .db('drafts')
    .where({ organization_id: organizationId, loop_id: loopId })
    .update({ drawing: JSON.stringify(drawing) });
  expect((await call(issue, { method: 'POST', params: { loopId }, body: { draftVersion: 1, note: '' } })).status).toBe(200);

  const issued = async () => ({
    revision: await suite.db('revisions').where({ organization_id: organizationId, loop_id: loopId }).first(),
    stations: await suite.db('station_designs').where({ organization_id: organizationId }).orderBy('walking_order').select(),
    draft: await suite.db('drafts').where({ organization_id: organizationId, loop_id: loopId }).first('drawing'),
  });
  const before = await issued();
  expect((await replace(familyId, 1, family('House valve', 9))).status).toBe(200);
  expect((await call(deletePump, { method: 'DELETE', params: { pumpId }, body: { version: 1 } })).status).toBe(200);
  expect(await issued()).toEqual(before);

  // And what was issued is what was chosen: the measuring Kv goes as far as the station, the step as far as the settings.
  const unit = before.stations.find(({ tag }) => tag === 'FC-2')!;
  expect(unit.valve_name).toBe('House valve DN15');
  expect(unit.kv_table).toEqual(chosen.kvTable);
  expect(Math.abs(unit.setting_turns * 10 - Math.round(unit.setting_turns * 10))).toBeLessThan(1e-9);
  // The meter reads over the orifice, Kv 2 at any setting: q = Kv sqrt(dp) / 36 at design flow, water at about 1000 kg/m³.
  expect((2 * Math.sqrt(unit.expected_drop_kpa)) / 36).toBeCloseTo(0.3, 2);
  const piece = (before.revision.drawing as Drawing).equipment.find(({ kind }) => kind === 'pump');
  expect(piece).toMatchObject({
    suctionHeadRequired: [
      { flowLs: 2, headM: 1.1 },
      { flowLs: 4, headM: 2.4 },
    ],
  });
});
