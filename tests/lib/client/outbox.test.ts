import 'fake-indexeddb/auto';
import { describe, expect, it } from 'vitest';
import { v7 as uuidv7 } from 'uuid';
import fc from 'fast-check';
import type { Reading, RecordReading } from '@/lib/api/commissioning';
import { withReading } from '@/lib/client/commissioning';
import { deviceShelf } from '@/lib/client/device-database';
import { RequestError } from '@/lib/client/http';
import type { KeptEntry } from '@/lib/client/kept-entry';
import { Outbox, type OutboxShelf } from '@/lib/client/outbox';
import { reading } from '../../make/reading';

const roundId = uuidv7();
const loopId = uuidv7();
const made = { revisionId: uuidv7(), roundId, stationId: uuidv7(), instrumentId: uuidv7() };
const noAnswer = () => new RequestError('offline', 'No answer.', 0);

/** A tablet of one person, on a real IndexedDB; the same person's tablet again is the page opened again. */
function tablet({
  personId = uuidv7(),
  answer = async (sent: KeptEntry): Promise<unknown> => ({ id: sent.id }),
  shelf = deviceShelf as OutboxShelf,
} = {}) {
  const sent: KeptEntry[] = [];
  const acknowledged: string[] = [];
  const outbox = new Outbox({
    shelf,
    personId,
    send: async (entry) => {
      sent.push(entry);
      return answer(entry);
    },
    onAcknowledged: ({ id }) => acknowledged.push(id),
  });
  const keep = async (body: RecordReading = reading(made)) => {
    await outbox.keep(loopId, 'FC-1', { kind: 'reading', roundId, body });
    return body;
  };
  return { personId, outbox, sent, acknowledged, keep };
}
const ids = ({ state }: Outbox) => state.entries.map(({ id }) => id);

describe('an entry kept on the tablet', () => {
  it('is let go only once the server has acknowledged it', async () => {
    const { outbox, keep, acknowledged } = tablet();
    const body = await keep();
    expect(ids(outbox)).toEqual([body.id]);
    await outbox.send();
    expect(ids(outbox)).toEqual([]);
    expect(acknowledged).toEqual([body.id]);
    expect(outbox.state.lastSentAt).not.toBeNull();
  });

  it('that was refused because its round is closed can be kept in the round that is open, once', async () => {
    const other = uuidv7();
    const rounds: string[] = [];
    const { outbox, keep } = tablet({
      answer: async ({ content }) => {
        if (content.kind !== 'reading') throw new Error('a reading was kept');
        rounds.push(content.roundId);
        if (content.roundId === roundId) throw new RequestError('round-closed', 'Round 1 is closed.', 409);
      },
    });
    const body = await keep({ ...reading(made), correctsReadingId: uuidv7(), note: 'misread' });
    await outbox.send();
    expect(outbox.state.entries).toMatchObject([{ refusal: 'Round 1 is closed.' }]);
    await outbox.moveTo(body.id, other);
    expect(rounds).toEqual([roundId, other]);
    expect(outbox.state.entries).toEqual([]);
  });

  it('without signal stays, and is there after the page was closed, under the same id', async () => {
    const first = tablet({ answer: () => Promise.reject(noAnswer()) });
    const body = await first.keep();
    await first.outbox.send();
    expect(first.outbox.state).toMatchObject({ isOffline: true, isSending: false });
    const second = tablet({ personId: first.personId });
    await second.outbox.send();
    expect(second.sent.map(({ content }) => content.body)).toEqual([body]);
    expect(ids(second.outbox)).toEqual([]);
  });

  it('is sent in order, and those behind wait while there is no signal', async () => {
    const { outbox, keep, sent } = tablet({ answer: () => Promise.reject(noAnswer()) });
    const bodies = [await keep(), await keep(), await keep()];
    await outbox.send();
    expect(sent.map(({ id }) => id)).toEqual([bodies[0]!.id]);
    expect(ids(outbox)).toEqual(bodies.map(({ id }) => id));
  });

  it('that the server refuses stays with the reason, holds up none behind it, and can be tried again', async () => {
    const wrong = reading(made);
    let isRefused = true;
    const { outbox, keep } = tablet({
      answer: async ({ id }) => {
        if (id === wrong.id && isRefused) throw new RequestError('not-allowed', 'Your role does not include this.', 403);
      },
    });
    await keep(wrong);
    await keep();
    await outbox.send();
    expect(outbox.state.entries).toMatchObject([{ id: wrong.id, refusal: 'Your role does not include this.' }]);
    isRefused = false;
    await outbox.tryAgain(wrong.id);
    expect(ids(outbox)).toEqual([]);
  });

  it.each([
    ['the session has ended', new RequestError('signed-out', 'Sign in again.', 401), { isSignedOut: true, isOffline: false }],
    ['the server fails', new RequestError('unexpected', 'Went wrong.', 500), { isOffline: true }],
    ['the server is asked too often', new RequestError('too-many', 'Wait.', 429), { isOffline: true }],
  ])('waits unrefused where %s', async (_, error, state) => {
    const { outbox, keep } = tablet({ answer: () => Promise.reject(error) });
    const body = await keep();
    await outbox.send();
    expect(outbox.state.entries).toMatchObject([{ id: body.id, refusal: null }]);
    expect(outbox.state).toMatchObject(state);
  });

  it('entered while others are on their way goes with them', async () => {
    const late = reading(made);
    const { outbox, keep, sent } = tablet({
      answer: async ({ id }) => {
        if (id !== late.id) await keep(late);
      },
    });
    await keep();
    await Promise.all([outbox.send(), outbox.send()]);
    expect(sent.map(({ id }) => id)).toEqual([expect.any(String), late.id]);
    expect(ids(outbox)).toEqual([]);
  });

  it('by another page of the same browser is neither lost nor overwritten', async () => {
    const one = tablet();
    const other = tablet({ personId: one.personId });
    const kept = [(await one.keep()).id, (await other.keep()).id];
    await one.outbox.load();
    expect(ids(one.outbox).sort()).toEqual(kept.sort());
  });

  it('is not seen and not sent by another person on the same device', async () => {
    const one = tablet();
    await one.keep();
    const other = tablet();
    await other.outbox.send();
    expect(other.sent).toEqual([]);
    await one.outbox.load();
    expect(ids(one.outbox)).toHaveLength(1);
  });

  it('where the browser has no room lives as long as the page, which says so, and is sent all the same', async () => {
    const full: OutboxShelf = { ...deviceShelf, put: () => Promise.reject(new DOMException('full', 'QuotaExceededError')) };
    const { outbox, keep } = tablet({ shelf: full });
    const body = await keep();
    expect(outbox.state.isStored).toBe(false);
    await outbox.send();
    expect(ids(outbox)).toEqual([]);
    expect(outbox.state.isStored).toBe(true);
    expect(body.id).toBeDefined();
  });

  it('reaches the server exactly once under its id, whatever fails on the way', async () => {
    // What happens to one request: lost on the way there, lost on the way back after it was stored, failed, or answered.
    const fate = fc.constantFrom('no signal', 'answer lost', 'server error', 'answered');
    await fc.assert(
      fc.asyncProperty(fc.array(fate, { maxLength: 20 }), fc.integer({ min: 1, max: 6 }), async (fates, count) => {
        const stored = new Map<string, number>();
        const left = [...fates];
        const answer = async ({ id }: KeptEntry) => {
          const what = left.shift() ?? 'answered';
          if (what === 'no signal') throw noAnswer();
          if (what === 'server error') throw new RequestError('unexpected', 'Went wrong.', 500);
          stored.set(id, 1);
          if (what === 'answer lost') throw noAnswer();
        };
        let page = tablet({ answer });
        const entered = [];
        for (let at = 0; at < count; at++) {
          entered.push((await page.keep()).id);
          await page.outbox.send();
          // The tab is closed and opened again.
          page = tablet({ personId: page.personId, answer });
        }
        for (let tries = 0; tries <= fates.length; tries++) await page.outbox.send();
        expect(ids(page.outbox)).toEqual([]);
        expect([...stored.keys()].sort()).toEqual(entered.sort());
      }),
      { numRuns: 50 },
    );
  });
});

it('an acknowledged correction strikes the entry it puts right', () => {
  const body = { readings: [{ id: 'a', isCorrected: false }] } as Parameters<typeof withReading>[0];
  const after = withReading(body, { id: 'b', correctsReadingId: 'a' } as Reading);
  expect(after.readings).toMatchObject([{ id: 'a', isCorrected: true }, { id: 'b' }]);
  expect(withReading(after, { id: 'b', correctsReadingId: 'a' } as Reading).readings).toHaveLength(2);
});
