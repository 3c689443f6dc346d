import { expect, it } from 'vitest';
import { v7 as uuidv7 } from 'uuid';
import { stripsOf } from '@/lib/server/loops/loop-strips';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { makeRound, type MadeRound } from '../../make/round';

const suite = withDatabase();
type Place = MadeOrganization & MadeRound;

async function makePlace(): Promise<Place> {
  const organization = await makeOrganization(suite.db);
  return { ...organization, ...(await makeRound(suite.db, organization)) };
}

async function read(place: Place, takenAt: string, percent: number, correctsReadingId: string | null = null): Promise<string> {
  const id = uuidv7();
  await suite.db('readings').insert({
    organization_id: place.organizationId,
    id,
    round_id: place.roundId,
    revision_id: place.revisionId,
    station_id: place.stationId,
    method: 'direct-flow',
    flow_ls: (0.5 * percent) / 100,
    percent_of_design: percent,
    uncertainty_percent: 3,
    verdict: percent < 90 ? 'low' : percent > 110 ? 'high' : 'within',
    entered: '[]',
    instrument_id: place.instrumentId,
    instrument_overdue: false,
    corrects_reading_id: correctsReadingId,
    taken_by: place.technician.id,
    taken_at: takenAt,
  });
  return id;
}

async function issueAgain({ organizationId, loopId, designer, stationId }: Place, designFlowLs: number): Promise<void> {
  const revisionId = uuidv7();
  await suite.db('revisions').insert({
    organization_id: organizationId,
    id: revisionId,
    loop_id: loopId,
    number: 2,
    drawing: '{}',
    network_document: '{}',
    balance: '{}',
    issued_by: designer.id,
  });
  const nearer = uuidv7();
  await suite
    .db('stations')
    .insert({ organization_id: organizationId, id: nearer, loop_id: loopId, element_id: 'unit-0', kind: 'terminal' });
  await suite.db('station_designs').insert([
    {
      organization_id: organizationId,
      revision_id: revisionId,
      station_id: stationId,
      walking_order: 2,
      tag: 'FC-1',
      design_flow_ls: designFlowLs,
    },
    { organization_id: organizationId, revision_id: revisionId, station_id: nearer, walking_order: 1, tag: 'FC-0', design_flow_ls: 0.3 },
  ]);
}

const stripOf = async ({ organizationId, loopId }: Place) => (await stripsOf(organizationId, [loopId])).get(loopId);

it('a loop without a revision has no strip, and one that is not measured has empty ticks', async () => {
  const { organizationId, loopId } = await makeOrganization(suite.db);
  expect((await stripsOf(organizationId, [loopId])).size).toBe(0);
  expect((await stripsOf(organizationId, [])).size).toBe(0);
  expect(await stripOf(await makePlace())).toEqual({ revisionNumber: 1, ticks: [{ tag: 'FC-1', percentOfDesign: null, verdict: null }] });
});

it('the newest reading counts by when it was taken, not by when it arrived', async () => {
  const place = await makePlace();
  await read(place, '2026-05-02T10:00:00Z', 104);
  await read(place, '2026-05-02T09:00:00Z', 80);
  expect((await stripOf(place))?.ticks).toEqual([{ tag: 'FC-1', percentOfDesign: 104, verdict: 'within' }]);
});

it('a reading that was put right counts no more, its correction does', async () => {
  const place = await makePlace();
  const wrong = await read(place, '2026-05-02T10:00:00Z', 360);
  await read(place, '2026-05-02T09:59:00Z', 100, wrong);
  expect((await stripOf(place))?.ticks).toEqual([{ tag: 'FC-1', percentOfDesign: 100, verdict: 'within' }]);
});

it('a new revision keeps the readings of terminals whose design flow stays, in its own walking order', async () => {
  const place = await makePlace();
  await read(place, '2026-05-02T10:00:00Z', 85);
  await issueAgain(place, 0.5);
  expect(await stripOf(place)).toEqual({
    revisionNumber: 2,
    ticks: [
      { tag: 'FC-0', percentOfDesign: null, verdict: null },
      { tag: 'FC-1', percentOfDesign: 85, verdict: 'low' },
    ],
  });
});

it('a terminal that is asked for another flow is not measured yet', async () => {
  const place = await makePlace();
  await read(place, '2026-05-02T10:00:00Z', 100);
  await issueAgain(place, 0.8);
  expect((await stripOf(place))?.ticks[1]).toEqual({ tag: 'FC-1', percentOfDesign: null, verdict: null });
});

it('nothing of another organisation is in it', async () => {
  const place = await makePlace();
  const stranger = await makeOrganization(suite.db, { name: 'Another' });
  expect((await stripsOf(stranger.organizationId, [place.loopId])).size).toBe(0);
});
