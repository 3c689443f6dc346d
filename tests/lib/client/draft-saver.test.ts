import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { SavedDraft } from '@/lib/api/loops';
import { DraftSaver } from '@/lib/client/draft-saver';
import { RequestError } from '@/lib/client/http';
import { draftKeeper } from '@/lib/client/kept-drafts';
import { emptyDrawing, type Drawing } from '@/lib/network/drawing';

/** A browser's storage that holds what it is given, until it is full. */
class Shelf {
  held = new Map<string, string>();
  isFull = false;
  getItem = (key: string) => this.held.get(key) ?? null;
  removeItem = (key: string) => void this.held.delete(key);
  setItem(key: string, text: string) {
    if (this.isFull) throw new DOMException('full', 'QuotaExceededError');
    this.held.set(key, text);
  }
}

/** A server that answers when it is told to. */
class Server {
  asked: { baseVersion: number; drawing: Drawing; answer: (saved: SavedDraft) => void; fail: (error: unknown) => void }[] = [];
  save = (baseVersion: number, drawing: Drawing) =>
    new Promise<SavedDraft>((answer, fail) => this.asked.push({ baseVersion, drawing, answer, fail }));
}

const saved = emptyDrawing('chilled');
const named = (name: string): Drawing => ({ ...saved, storeys: [{ ...saved.storeys[0], name }] });
const loaded = { version: 4, drawing: saved, savedAt: '2026-03-02T09:00:00.000Z', savedBy: 'Mara' };
const offline = new RequestError('offline', 'No answer.', 0);

let shelf: Shelf;
let server: Server;
const openPage = (page = 'page-1', from = loaded) =>
  new DraftSaver({ loaded: from, keeper: draftKeeper(shelf, 'mara', 'loop-1', page), save: server.save });

beforeEach(() => {
  vi.useFakeTimers();
  shelf = new Shelf();
  server = new Server();
});
afterEach(() => vi.useRealTimers());

describe('saving a drawing by itself', () => {
  it('sends the last of several changes once, over the version it was made from', async () => {
    const saver = openPage();
    saver.change(named('a'));
    saver.change(named('b'));
    expect(saver.state.kind).toBe('waiting');
    await vi.advanceTimersByTimeAsync(1000);
    expect(server.asked.map(({ baseVersion, drawing }) => [baseVersion, drawing.storeys[0].name])).toEqual([[4, 'b']]);
    server.asked[0].answer({ version: 5, savedAt: '2026-03-02T09:01:00.000Z' });
    await vi.advanceTimersByTimeAsync(0);
    expect(saver.state).toEqual({ kind: 'saved', at: '2026-03-02T09:01:00.000Z' });
    expect(shelf.held.size).toBe(0);
  });

  it('has one request under way at a time; what changed meanwhile follows over the new version', async () => {
    const saver = openPage();
    saver.change(named('a'));
    await vi.advanceTimersByTimeAsync(1000);
    saver.change(named('b'));
    await vi.advanceTimersByTimeAsync(5000);
    expect(server.asked).toHaveLength(1);
    server.asked[0].answer({ version: 5, savedAt: '' });
    await vi.advanceTimersByTimeAsync(1000);
    expect(server.asked[1]).toMatchObject({ baseVersion: 5, drawing: named('b') });
  });

  it('keeps the drawing in the browser without a connection, says so, and tries again', async () => {
    const saver = openPage();
    saver.change(named('a'));
    await vi.advanceTimersByTimeAsync(1000);
    server.asked[0].fail(offline);
    await vi.advanceTimersByTimeAsync(0);
    expect(saver.state).toEqual({ kind: 'offline', isKept: true });
    await vi.advanceTimersByTimeAsync(5100);
    expect(server.asked).toHaveLength(2);
    server.asked[1].answer({ version: 5, savedAt: '' });
    await vi.advanceTimersByTimeAsync(0);
    expect(saver.state.kind).toBe('saved');
  });

  it('is at rest again once a change is undone, with nothing sent and nothing kept', async () => {
    const saver = openPage();
    saver.change(named('a'));
    await vi.advanceTimersByTimeAsync(400);
    saver.change(saved);
    await vi.advanceTimersByTimeAsync(1000);
    expect(server.asked).toEqual([]);
    expect(shelf.held.size).toBe(0);
    expect(saver.state).toEqual({ kind: 'saved', at: loaded.savedAt });
  });

  it('says that nothing is kept where the browser has no room', async () => {
    shelf.isFull = true;
    const saver = openPage();
    saver.change(named('a'));
    await vi.advanceTimersByTimeAsync(1000);
    server.asked[0].fail(offline);
    await vi.advanceTimersByTimeAsync(0);
    expect(saver.state).toEqual({ kind: 'offline', isKept: false });
  });

  it('takes up what an earlier visit kept, and saves it over the version it was made from', async () => {
    const first = openPage();
    first.change(named('kept'));
    first.stop();
    const second = openPage('page-2', { ...loaded, version: 9, drawing: named('someone else') });
    expect(second.restore()).toEqual(named('kept'));
    await vi.advanceTimersByTimeAsync(1000);
    expect(server.asked).toMatchObject([{ baseVersion: 4, drawing: named('kept') }]);
  });

  it('finds nothing to take up where the server already has it', () => {
    const first = openPage();
    first.change(named('kept'));
    first.stop();
    expect(openPage('page-2', { ...loaded, drawing: named('kept') }).restore()).toBeNull();
  });

  it('leaves what another page keeps when its own is acknowledged', async () => {
    const mine = openPage('page-1');
    mine.change(named('mine'));
    await vi.advanceTimersByTimeAsync(1000);
    const other = openPage('page-2');
    other.change(named('other'));
    other.keep();
    server.asked[0].answer({ version: 5, savedAt: '' });
    await vi.advanceTimersByTimeAsync(0);
    expect(draftKeeper(shelf, 'mara', 'loop-1', 'page-3').read()?.drawing).toEqual(named('other'));
  });

  it('stops at what someone else saved, and goes on from it with the two merged', async () => {
    const saver = openPage();
    saver.change(named('mine'));
    await vi.advanceTimersByTimeAsync(1000);
    const theirs = { version: 7, drawing: named('theirs'), savedAt: '', savedBy: 'Tobin' };
    const problem = { type: '', title: '', status: 409, code: 'draft-changed', detail: theirs };
    server.asked[0].fail(new RequestError('draft-changed', 'Changed.', 409, problem));
    await vi.advanceTimersByTimeAsync(20_000);
    expect(saver.state).toEqual({ kind: 'conflict', base: saved, theirs });
    expect(server.asked).toHaveLength(1);
    saver.resolve(named('merged'), theirs);
    await vi.advanceTimersByTimeAsync(10);
    expect(server.asked[1]).toMatchObject({ baseVersion: 7, drawing: named('merged') });
  });

  it('tells a refusal in the words of the server and tries again at the next change', async () => {
    const saver = openPage();
    saver.change(named('a'));
    await vi.advanceTimersByTimeAsync(1000);
    server.asked[0].fail(new RequestError('not-allowed', 'Your role does not include this.', 403));
    await vi.advanceTimersByTimeAsync(30_000);
    expect(saver.state).toEqual({ kind: 'refused', message: 'Your role does not include this.' });
    expect(server.asked).toHaveLength(1);
    saver.change(named('b'));
    await vi.advanceTimersByTimeAsync(1000);
    expect(server.asked).toHaveLength(2);
  });

  it('reads no draft out of a text that was cut off', () => {
    const keeper = draftKeeper(shelf, 'mara', 'loop-1', 'page-1');
    keeper.keep({ baseVersion: 1, base: saved, drawing: saved });
    const [key, text] = [...shelf.held][0];
    shelf.held.set(key, text.slice(0, 40));
    expect(keeper.read()).toBeNull();
  });
});
