import { beforeEach, describe, expect, it } from 'vitest';
import { v7 as uuidv7 } from 'uuid';
import { POST as postCheck } from '@/app/api/loops/[loopId]/checks/route';
import { GET as getSite } from '@/app/api/loops/[loopId]/site/route';
import { POST as postResolution } from '@/app/api/loops/[loopId]/snags/[snagId]/resolution/route';
import { POST as postSnag } from '@/app/api/loops/[loopId]/snags/route';
import { POST as postReading } from '@/app/api/rounds/[roundId]/readings/route';
import { POST as postSetting } from '@/app/api/rounds/[roundId]/settings/route';
import type { SiteBody } from '@/lib/api/site';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { reading } from '../../make/reading';
import { makeRound, type MadeRound } from '../../make/round';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let home: MadeOrganization & MadeRound;

beforeEach(async () => {
  const organization = await makeOrganization(suite.db);
  home = { ...organization, ...(await makeRound(suite.db, organization)) };
  signInAs(home.technician);
});

const at = '2026-06-01T09:30:00.000Z';
const entered = { clockOffsetMs: -2000 };
const setting = (given = {}) => ({
  id: uuidv7(),
  stationId: home.stationId,
  before: 4,
  after: 2.3,
  changedAt: at,
  note: '',
  ...entered,
  ...given,
});
const check = (given = {}) => ({ id: uuidv7(), checkKey: 'flushed', answer: 'done', remark: '', answeredAt: at, ...entered, ...given });
const snag = (given = {}) => ({ id: uuidv7(), stationId: home.stationId, text: 'Strainer blocked', raisedAt: at, ...entered, ...given });
const sendSetting = (body: unknown) => call(postSetting, { method: 'POST', params: { roundId: home.roundId }, body });
const sendCheck = (body: unknown) => call(postCheck, { method: 'POST', params: { loopId: home.loopId }, body });
const sendSnag = (body: unknown) => call(postSnag, { method: 'POST', params: { loopId: home.loopId }, body });
const resolve = (snagId: string, given = {}) =>
  call(postResolution, {
    method: 'POST',
    params: { loopId: home.loopId, snagId },
    body: { id: uuidv7(), snagId, note: 'Cleaned, reads 0.5 L/s', resolvedAt: at, ...entered, ...given },
  });
const site = async () => (await call(getSite, { params: { loopId: home.loopId } })).body as SiteBody;

describe('a setting that was changed', () => {
  it('is kept with what it was before, who changed it and when, once however often it is sent', async () => {
    const body = setting();
    expect((await sendSetting(body)).status).toBe(200);
    expect((await sendSetting(body)).status).toBe(200);
    expect((await site()).settingChanges).toMatchObject([{ before: 4, after: 2.3, changedBy: 'technician', changedAt: at }]);
    expect(await suite.db('setting_changes').where({ id: body.id }).first('clock_offset_ms')).toEqual({ clock_offset_ms: '-2000' });
  });

  it('sent under the id of another is refused and changes nothing', async () => {
    const body = setting();
    await sendSetting(body);
    const { status, body: answer } = await sendSetting({ ...body, after: 3 });
    expect([status, answer.code]).toEqual([409, 'reading-id-taken']);
    expect((await site()).settingChanges).toHaveLength(1);
  });

  it('of a closed round is refused, and one that arrived before is still acknowledged', async () => {
    const before = setting();
    await sendSetting(before);
    await suite.db('rounds').where({ id: home.roundId }).update({ closed_at: new Date() });
    expect((await sendSetting(setting())).body.code).toBe('round-closed');
    expect((await sendSetting(before)).status).toBe(200);
    expect((await site()).settingChanges).toHaveLength(1);
  });
});

describe('a readiness check', () => {
  it('keeps every answer, and the newest counts', async () => {
    await sendCheck(check());
    await sendCheck(check({ answer: 'open', answeredAt: '2026-06-01T10:00:00.000Z' }));
    expect((await site()).checks.map(({ answer }) => answer)).toEqual(['done', 'open']);
  });

  it('does not apply only for a reason', async () => {
    const { status, body } = await sendCheck(check({ answer: 'not-applicable' }));
    expect([status, body.fields[0].path]).toEqual([400, 'remark']);
    expect((await sendCheck(check({ answer: 'not-applicable', remark: 'No glycol' }))).status).toBe(200);
  });

  it('that nobody knows is refused', async () => {
    expect((await sendCheck(check({ checkKey: 'paint-dry' }))).status).toBe(400);
  });
});

describe('a snag', () => {
  it('takes the next number of its loop, also when several arrive at once', async () => {
    const answers = await Promise.all(Array.from({ length: 5 }, () => sendSnag(snag())));
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200, 200, 200]);
    expect((await site()).snags.map(({ number }) => number).sort()).toEqual([1, 2, 3, 4, 5]);
  });

  it('may be raised by the owner, who may not resolve it', async () => {
    signInAs(home.owner);
    const body = snag({ stationId: null });
    expect((await sendSnag(body)).status).toBe(200);
    expect((await resolve(body.id)).status).toBe(403);
  });

  it('is resolved once', async () => {
    const body = snag();
    await sendSnag(body);
    expect((await resolve(body.id)).status).toBe(200);
    expect((await resolve(body.id)).body.code).toBe('snag-resolved');
    expect((await site()).snags).toMatchObject([
      { text: 'Strainer blocked', resolution: { note: 'Cleaned, reads 0.5 L/s', resolvedBy: 'technician' } },
    ]);
  });

  it('of another loop or organisation is not there', async () => {
    const away = await makeOrganization(suite.db, { name: 'Away' });
    expect((await sendSnag(snag({ stationId: uuidv7() }))).status).toBe(404);
    expect((await call(postSnag, { method: 'POST', params: { loopId: away.loopId }, body: snag() })).status).toBe(404);
    expect((await resolve(uuidv7())).status).toBe(404);
  });
});

describe('an entry from a device', () => {
  it('on which somebody else has signed in since waits for its own person', async () => {
    const { status, body } = await call(postReading, {
      method: 'POST',
      params: { roundId: home.roundId },
      body: reading(home),
      headers: { 'x-entered-by': uuidv7() },
    });
    expect([status, body.code]).toEqual([401, 'signed-out']);
    expect(await suite.db('readings')).toEqual([]);
  });

  it('whose clock is years ahead is taken where it knows by how much, and refused where it does not', async () => {
    const ahead = Date.now() + 3 * 365 * 24 * 3600 * 1000;
    const body = (clockOffsetMs: number | null) => reading(home, { takenAt: new Date(ahead).toISOString(), clockOffsetMs });
    const send = (sent: unknown) => call(postReading, { method: 'POST', params: { roundId: home.roundId }, body: sent });
    expect((await send(body(null))).status).toBe(400);
    expect((await send(body(Date.now() - ahead))).status).toBe(200);
  });
});
