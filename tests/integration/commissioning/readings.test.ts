import { beforeAll, describe, expect, it } from 'vitest';
import { v7 as uuidv7 } from 'uuid';
import { GET as getCommissioning } from '@/app/api/loops/[loopId]/commissioning/route';
import { PATCH as patchRound } from '@/app/api/rounds/[roundId]/route';
import { POST as postReading } from '@/app/api/rounds/[roundId]/readings/route';
import type { CommissioningBody, Reading, RecordReading } from '@/lib/api/commissioning';
import { waterProperties } from '@/lib/hydraulics/water';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { reading } from '../../make/reading';
import { makeRound, type MadeRound } from '../../make/round';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let home: MadeOrganization & MadeRound;
let away: MadeOrganization & MadeRound;

beforeAll(async () => {
  const make = async (name: string) => {
    const organization = await makeOrganization(suite.db, { name });
    return { ...organization, ...(await makeRound(suite.db, organization)) };
  };
  home = await make('Home');
  away = await make('Away');
});

const send = (body: RecordReading, { roundId = home.roundId, as = home.technician } = {}) => {
  signInAs(as);
  return call(postReading, { method: 'POST', params: { roundId }, body });
};
const stored = async (id: string): Promise<number> => Number((await suite.db('readings').where({ id }).count())[0]!.count);

describe('a reading', () => {
  it('is judged by the server: flow from Kv, drop and density, per cent, uncertainty, verdict', async () => {
    const { status, body } = await send(reading(home, { dropKpa: 16 }));
    expect(status).toBe(200);
    const answer = body as Reading;
    // q = Kv sqrt(dp / SG) / 36 with water of the document's 9 °C; u = sqrt(5² + ((1 % of 16 + 0.1) / 16 / 2)²).
    const flowLs = (4 * Math.sqrt(16 / (waterProperties(9).densityKgM3 / 1000))) / 36;
    expect(answer.flowLs).toBeCloseTo(flowLs, 9);
    expect(answer.percentOfDesign).toBeCloseTo((100 * flowLs) / 0.5, 9);
    expect(answer.uncertaintyPercent).toBeCloseTo(Math.hypot(5, (100 * 0.26) / 16 / 2), 9);
    expect(answer).toMatchObject({
      verdict: 'low',
      kv: 4,
      takenBy: 'technician',
      roundNumber: 1,
      isInstrumentOverdue: false,
      isCorrected: false,
    });
    expect(answer.entered[1]).toEqual({ quantity: 'pressure', text: '160', unit: 'mbar' });
  });

  it('sent twice is stored once, and answered the same', async () => {
    const sent = reading(home);
    const first = await send(sent);
    const second = await send(sent);
    expect([first.status, second.status]).toEqual([200, 200]);
    expect(second.body).toEqual(first.body);
    expect(await stored(sent.id)).toBe(1);
    expect(await suite.db('activity').where({ verb: 'recorded a reading at', loop_id: home.loopId })).toHaveLength(2);
  });

  it('sent twenty times at once is stored once', async () => {
    const sent = reading(home);
    signInAs(home.technician);
    const answers = await Promise.all(
      Array.from({ length: 20 }, () => call(postReading, { method: 'POST', params: { roundId: home.roundId }, body: sent })),
    );
    expect(answers.map(({ status }) => status)).toEqual(Array(20).fill(200));
    expect(new Set(answers.map(({ body }) => JSON.stringify(body))).size).toBe(1);
    expect(await stored(sent.id)).toBe(1);
  });

  it.each<[string, Partial<RecordReading>]>([
    ['another drop', { dropKpa: 17 }],
    ['another note', { note: 'read again' }],
    ['another moment', { takenAt: '2026-06-01T09:30:00.001Z' }],
    ['another text', { entered: [] }],
  ])('under the id of a stored one but with %s is refused', async (_, other) => {
    const sent = reading(home);
    await send(sent);
    const { status, body } = await send({ ...sent, ...other });
    expect([status, body.code]).toEqual([409, 'reading-id-taken']);
    expect(await stored(sent.id)).toBe(1);
  });

  it('corrected stays in the record, counts no more, and is corrected but once', async () => {
    const first = reading(home, { dropKpa: 30 });
    await send(first);
    const second = reading(home, { dropKpa: 20, correctsReadingId: first.id, note: 'Hoses were not bled.' });
    expect((await send(second)).status).toBe(200);
    const again = await send(reading(home, { dropKpa: 21, correctsReadingId: first.id, note: 'Once more.' }));
    expect([again.status, again.body.code]).toEqual([409, 'reading-corrected']);

    const { readings } = (await call(getCommissioning, { params: { loopId: home.loopId } })).body as CommissioningBody;
    expect(readings.find(({ id }) => id === first.id)).toMatchObject({ isCorrected: true, dropKpa: 30 });
    expect(readings.find(({ id }) => id === second.id)).toMatchObject({
      isCorrected: false,
      correctsReadingId: first.id,
      note: 'Hoses were not bled.',
    });
  });

  it('corrected by two at once is corrected by one', async () => {
    const first = reading(home);
    await send(first);
    const corrections = [20, 21].map((dropKpa) => reading(home, { dropKpa, correctsReadingId: first.id, note: 'Misread.' }));
    const answers = await Promise.all(
      corrections.map((body) => call(postReading, { method: 'POST', params: { roundId: home.roundId }, body })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it('needs a reason to put another right', async () => {
    const first = reading(home);
    await send(first);
    const { status, body } = await send(reading(home, { correctsReadingId: first.id }));
    expect([status, body.fields[0].path]).toEqual([400, 'note']);
  });

  it('at another organisation’s station, or in its round, is answered 404 and stores nothing', async () => {
    const there = reading(home, { stationId: away.stationId });
    expect((await send(there)).status).toBe(404);
    expect(await stored(there.id)).toBe(0);
    const inTheirs = reading(away);
    expect((await send(inTheirs, { roundId: away.roundId })).status).toBe(404);
    expect(await stored(inTheirs.id)).toBe(0);
  });

  it('at a station of another loop or an unknown one is answered 404 and stores nothing', async () => {
    const nowhere = reading(home, { stationId: uuidv7() });
    expect((await send(nowhere)).status).toBe(404);
    expect(await stored(nowhere.id)).toBe(0);
  });

  it('with another organisation’s meter is refused at that field', async () => {
    const sent = reading(home, { instrumentId: away.instrumentId });
    const { status, body } = await send(sent);
    expect([status, body.fields[0].path]).toEqual([400, 'instrumentId']);
    expect(await stored(sent.id)).toBe(0);
  });

  it('taken more than a day ahead is refused at that field; one of the past is kept as it was taken', async () => {
    const ahead = await send(reading(home, { takenAt: new Date(Date.now() + 25 * 3600_000).toISOString() }));
    expect([ahead.status, ahead.body.fields[0].path]).toEqual([400, 'takenAt']);
    expect((await send(reading(home, { takenAt: '2026-01-01T08:00:00+02:00' }))).body.takenAt).toBe('2026-01-01T06:00:00.000Z');
  });

  it('beyond the valve’s table is refused at the setting', async () => {
    const { status, body } = await send(reading(home, { settingTurns: 4.5 }));
    expect([status, body.fields[0].path]).toEqual([400, 'settingTurns']);
  });

  it('with an overdue meter is kept, and says so', async () => {
    await suite.db('instruments').where({ id: home.instrumentId }).update({ calibration_due_on: '2026-05-31' });
    expect((await send(reading(home))).body.isInstrumentOverdue).toBe(true);
    await suite.db('instruments').where({ id: home.instrumentId }).update({ calibration_due_on: '2027-03-14' });
  });

  it('is neither changed nor deleted by anyone: the database refuses', async () => {
    const sent = reading(home);
    await send(sent);
    await expect(suite.db('readings').where({ id: sent.id }).update({ flow_ls: 0.5 })).rejects.toThrow('append-only');
    await expect(suite.db('readings').where({ id: sent.id }).delete()).rejects.toThrow('append-only');
    await expect(suite.db.raw('truncate readings')).rejects.toThrow('append-only');
    expect(await stored(sent.id)).toBe(1);
  });

  it('is refused once its round is closed, unless it is stored already', async () => {
    const place = { ...away };
    const as = away.technician;
    const sent = reading(place);
    await send(sent, { roundId: place.roundId, as });
    expect((await call(patchRound, { method: 'PATCH', params: { roundId: place.roundId }, body: { isClosed: true } })).status).toBe(200);
    expect((await send(sent, { roundId: place.roundId, as })).status).toBe(200);
    const late = await send(reading(place), { roundId: place.roundId, as });
    expect([late.status, late.body.code]).toEqual([409, 'round-closed']);
  });
});
