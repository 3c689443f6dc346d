import { describe, expect, it } from 'vitest';
import type { Reading, RecordReading } from '@/lib/api/commissioning';
import { withReading } from '@/lib/client/commissioning';
import { RequestError } from '@/lib/client/http';
import { KeptReadings } from '@/lib/client/kept-readings';
import { reading } from '../../make/reading';
import { v7 as uuidv7 } from 'uuid';

const roundId = uuidv7();
const made = { revisionId: uuidv7(), roundId, stationId: uuidv7(), instrumentId: uuidv7() };
const noAnswer = () => new RequestError('offline', 'No answer.', 0);

class Shelf {
  texts = new Map<string, string>();
  isFull = false;
  getItem = (key: string) => this.texts.get(key) ?? null;
  setItem(key: string, text: string) {
    if (this.isFull) throw new DOMException('full', 'QuotaExceededError');
    this.texts.set(key, text);
  }
}

function tablet({ shelf = new Shelf(), answer = async (sent: RecordReading) => ({ id: sent.id }) as Reading } = {}) {
  const sent: RecordReading[] = [];
  const acknowledged: string[] = [];
  const kept = new KeptReadings({
    shelf,
    key: 'readings',
    send: async (_, body) => {
      sent.push(body);
      return answer(body);
    },
    onAcknowledged: ({ id }) => acknowledged.push(id),
  });
  return { shelf, kept, sent, acknowledged, keep: (body = reading(made)) => (kept.keep({ roundId, reading: body, tag: 'FC-1' }), body) };
}
const ids = ({ state }: KeptReadings) => state.entries.map(({ reading: { id } }) => id);

describe('a reading kept on the tablet', () => {
  it('is let go only once the server has acknowledged it', async () => {
    const { kept, keep, acknowledged } = tablet();
    const body = keep();
    expect(ids(kept)).toEqual([body.id]);
    await kept.send();
    expect(ids(kept)).toEqual([]);
    expect(acknowledged).toEqual([body.id]);
    expect(kept.state.lastSentAt).not.toBeNull();
  });

  it('that was refused because its round is closed can be kept in the round that is open, once', async () => {
    const closed = new RequestError('round-closed', 'Round 1 is closed.', 409);
    const other = uuidv7();
    const rounds: string[] = [];
    const kept = new KeptReadings({
      shelf: new Shelf(),
      key: 'readings',
      send: async (to, body) => {
        rounds.push(to);
        if (to === roundId) throw closed;
        return { id: body.id } as Reading;
      },
      onAcknowledged: () => undefined,
    });
    const body = { ...reading(made), correctsReadingId: uuidv7(), note: 'misread' };
    kept.keep({ roundId, reading: body, tag: 'FC-1' });
    await kept.send();
    expect(kept.state.entries).toMatchObject([{ refusal: 'Round 1 is closed.' }]);
    await kept.moveTo(body.id, other);
    expect(rounds).toEqual([roundId, other]);
    expect(kept.state.entries).toEqual([]);
  });

  it('without signal stays, and is there after the page was closed, under the same id', async () => {
    const first = tablet({ answer: () => Promise.reject(noAnswer()) });
    const body = first.keep();
    await first.kept.send();
    expect(first.kept.state).toMatchObject({ isOffline: true, isSending: false });
    const second = tablet({ shelf: first.shelf });
    await second.kept.send();
    expect(second.sent).toEqual([body]);
    expect(ids(second.kept)).toEqual([]);
  });

  it('is sent in order, and those behind wait while there is no signal', async () => {
    const { kept, keep, sent } = tablet({ answer: () => Promise.reject(noAnswer()) });
    const bodies = [keep(), keep(), keep()];
    await kept.send();
    expect(sent).toEqual([bodies[0]]);
    expect(ids(kept)).toEqual(bodies.map(({ id }) => id));
  });

  it('that the server refuses stays with the reason and does not hold up the next', async () => {
    const wrong = reading(made);
    const answer = async (sent: RecordReading) => {
      if (sent.id === wrong.id) throw new RequestError('round-closed', 'Round 1 is closed.', 409);
      return { id: sent.id } as Reading;
    };
    const { kept, keep } = tablet({ answer });
    keep(wrong);
    keep();
    await kept.send();
    expect(kept.state.entries).toMatchObject([{ reading: { id: wrong.id }, refusal: 'Round 1 is closed.' }]);
    kept.release(wrong.id);
    expect(ids(kept)).toEqual([]);
  });

  it('waits where the session has ended', async () => {
    const { kept, keep } = tablet({ answer: () => Promise.reject(new RequestError('signed-out', 'Sign in again.', 401)) });
    const body = keep();
    await kept.send();
    expect(kept.state.entries).toMatchObject([{ reading: { id: body.id }, refusal: null }]);
    expect(kept.state).toMatchObject({ isSignedOut: true, isOffline: false });
  });

  it('entered while others are on their way goes with them', async () => {
    const late = reading(made);
    const { kept, keep, sent } = tablet({
      answer: async (body) => {
        if (body.id !== late.id) keep(late);
        return { id: body.id } as Reading;
      },
    });
    keep();
    await Promise.all([kept.send(), kept.send()]);
    expect(sent.map(({ id }) => id)).toEqual([expect.any(String), late.id]);
    expect(ids(kept)).toEqual([]);
  });

  it('by another page of the same browser is neither lost nor overwritten', () => {
    const one = tablet();
    const other = tablet({ shelf: one.shelf });
    const [a, b] = [one.keep(), other.keep()];
    expect(ids(tablet({ shelf: one.shelf }).kept)).toEqual([a.id, b.id]);
  });

  it('where the browser has no room lives as long as the page, which says so', () => {
    const { kept, keep, shelf } = tablet();
    shelf.isFull = true;
    const body = keep();
    expect(kept.state.isStored).toBe(false);
    expect(ids(kept)).toEqual([body.id]);
  });
});

it('an acknowledged correction strikes the entry it puts right', () => {
  const body = { readings: [{ id: 'a', isCorrected: false }] } as Parameters<typeof withReading>[0];
  const after = withReading(body, { id: 'b', correctsReadingId: 'a' } as Reading);
  expect(after.readings).toMatchObject([{ id: 'a', isCorrected: true }, { id: 'b' }]);
  expect(withReading(after, { id: 'b', correctsReadingId: 'a' } as Reading).readings).toHaveLength(2);
});
