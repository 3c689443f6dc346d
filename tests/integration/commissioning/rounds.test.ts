import { beforeEach, describe, expect, it } from 'vitest';
import { v7 as uuidv7 } from 'uuid';
import { GET as getCommissioning } from '@/app/api/loops/[loopId]/commissioning/route';
import { POST as postRound } from '@/app/api/loops/[loopId]/rounds/route';
import { PATCH as patchRound } from '@/app/api/rounds/[roundId]/route';
import type { CommissioningBody } from '@/lib/api/commissioning';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { makeRound, type MadeRound } from '../../make/round';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let home: MadeOrganization & MadeRound;

beforeEach(async () => {
  const organization = await makeOrganization(suite.db);
  home = { ...organization, ...(await makeRound(suite.db, organization)) };
  signInAs(home.technician);
});

const start = (id = uuidv7(), purpose = 'As left', openChecksReason = 'The flushing record comes tomorrow') =>
  call(postRound, { method: 'POST', params: { loopId: home.loopId }, body: { id, purpose, openChecksReason } });
const close = (roundId = home.roundId) => call(patchRound, { method: 'PATCH', params: { roundId }, body: { isClosed: true } });
const state = async () => (await suite.db('loops').where({ id: home.loopId }).first('state')).state;
const setState = (to: string) => suite.db('loops').where({ id: home.loopId }).update({ state: to });

describe('a round', () => {
  it('is not started while another of the loop is open', async () => {
    const { status, body } = await start();
    expect([status, body.code]).toEqual([409, 'round-open']);
  });

  it('started on an issued loop puts it in commissioning, with the next number and the newest revision', async () => {
    await close();
    await setState('issued');
    const { status, body } = await start();
    expect(status).toBe(200);
    expect(body).toMatchObject({ number: 2, revisionNumber: 1, purpose: 'As left', startedBy: 'technician', closedAt: null });
    expect(await state()).toBe('in-commissioning');
  });

  it('started again under its id is answered with itself', async () => {
    await close();
    const id = uuidv7();
    const first = await start(id);
    const second = await start(id);
    expect(second).toMatchObject({ status: 200, body: first.body });
    expect(await suite.db('rounds').where({ loop_id: home.loopId })).toHaveLength(2);
  });

  it('started by two at once is started by one', async () => {
    await close();
    const answers = await Promise.all([start(), start()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it.each(['draft', 'submitted', 'reviewed', 'accepted'])('is not started on a loop that is %s', async (to) => {
    await close();
    await setState(to);
    const { status, body } = await start();
    expect([status, body.code]).toEqual([409, 'loop-state']);
    expect(await state()).toBe(to);
  });

  it('is closed once, and closing it again changes nothing', async () => {
    const first = await close();
    const second = await close();
    expect(first.body.closedAt).not.toBeNull();
    expect(second).toMatchObject({ status: 200, body: first.body });
    expect(await suite.db('activity').where({ loop_id: home.loopId, verb: 'closed' })).toHaveLength(1);
  });

  it('is seen by the owner and not started by them', async () => {
    signInAs(home.owner);
    const { status, body } = await call(getCommissioning, { params: { loopId: home.loopId } });
    expect(status).toBe(200);
    expect((body as CommissioningBody).rounds).toHaveLength(1);
    expect((await start()).status).toBe(403);
    expect((await close()).status).toBe(403);
  });
});

describe('a loop without a revision', () => {
  it('has no stations and nothing to measure against', async () => {
    const bare = await makeOrganization(suite.db);
    signInAs(bare.technician);
    const { body } = await call(getCommissioning, { params: { loopId: bare.loopId } });
    expect(body).toMatchObject({ revision: null, stations: [], rounds: [], readings: [], densityKgM3: null });
  });
});
