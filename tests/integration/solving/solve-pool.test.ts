import { afterAll, expect, it } from 'vitest';
import { POST as solve } from '@/app/api/loops/[loopId]/solve/route';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { solveDocument } from '@/lib/server/solving/solve-document';
import { closeSolvePool, solveOffThread } from '@/lib/server/solving/solve-pool';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { ladder } from '../../make/drawing';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
afterAll(closeSolvePool);

const documentOf = (terminals: number) =>
  drawingToDocument(ladder(Array.from({ length: terminals }, (_, i) => 0.01 + 0.001 * (i % 5))), 'ladder').document!;

it('a thread of the pool answers what the engine answers', async () => {
  const document = documentOf(40);
  const { solveMs: _, ...here } = solveDocument(document);
  const { solveMs: __, ...there } = await solveOffThread(document, 'someone');
  expect(there).toEqual(here);
});

it('a solve that nobody waits for any more is ended, and the next one is answered', async () => {
  const stop = new AbortController();
  const first = solveOffThread(documentOf(900), 'someone', stop.signal);
  const second = solveOffThread(documentOf(5), 'someone');
  stop.abort();
  await expect(first).rejects.toThrow(/abort/i);
  expect((await second).solve.converged).toBe(true);
});

it('of one person’s solves only a few wait: the next is refused with a sentence', async () => {
  const waiting = Array.from({ length: 4 }, () => solveOffThread(documentOf(6), 'eager'));
  await expect(solveOffThread(documentOf(6), 'eager')).rejects.toMatchObject({ code: 'solver-busy' });
  expect((await solveOffThread(documentOf(6), 'patient')).solve.converged).toBe(true);
  expect((await Promise.all(waiting)).every(({ solve: { converged } }) => converged)).toBe(true);
});

it('a drawing of more than 2,000 links is solved while a small one of somebody else is answered', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const send = (terminals: number) =>
    call(solve, { method: 'POST', params: { loopId }, body: { drawing: ladder(Array.from({ length: terminals }, () => 0.01)) } });
  const [large, small] = await Promise.all([send(320), send(3)]);
  expect([large.status, small.status]).toEqual([200, 200]);
  expect(large.body.solved.solve.links.length).toBeGreaterThan(2000);
  expect(large.body.solved.solve.converged).toBe(true);
});
