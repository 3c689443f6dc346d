import { afterAll, expect, it, vi } from 'vitest';
import { POST } from '@/app/api/loops/[loopId]/draft/generate/route';
import { POST as ADD_FAMILY } from '@/app/api/catalogue/valve-families/route';
import { GET } from '@/app/api/loops/[loopId]/draft/route';
import type { GenerateLoop } from '@/lib/api/generate';
import type { Drawing } from '@/lib/network/drawing';
import { usualGenerateOptions } from '@/lib/network/generate/scheduled-terminal';
import { closeSolvePool } from '@/lib/server/solving/solve-pool';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeOrganization } from '../../make/organization';
import { schedule } from '../../make/schedule';
import { signInAs } from '../../make/session';

vi.setConfig({ testTimeout: 120_000 });
const suite = withDatabase();
afterAll(closeSolvePool);

const input = (some: Partial<GenerateLoop> = {}): GenerateLoop => ({
  baseVersion: 1,
  terminals: schedule(12, { storeys: 2, risers: 1 }),
  options: usualGenerateOptions,
  valveFamilyId: null,
  replacesDrawing: false,
  ...some,
});
const generate = (loopId: string, body: GenerateLoop) => call(POST, { method: 'POST', params: { loopId }, body });
const draftOf = async (loopId: string): Promise<{ version: number; drawing: Drawing }> => (await call(GET, { params: { loopId } })).body;
const idsByTag = ({ equipment }: Drawing) =>
  new Map(equipment.filter(({ kind }) => kind !== 'tee').map(({ tag, id }) => [tag, id] as const));

it('a schedule becomes the next version of the draft, and the activity tells who made it', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const { status, body } = await generate(loopId, input());
  expect(status).toBe(200);
  expect(body).toMatchObject({ version: 2, summary: { terminals: 12, storeys: 2, risers: 1, branches: 2, balancingValves: 15 } });
  expect(body.summary.lowestReadingKpa).toBeGreaterThan(2.95);
  const { version, drawing } = await draftOf(loopId);
  expect(version).toBe(2);
  expect(drawing.equipment.filter(({ kind }) => kind === 'terminalUnit').map(({ tag }) => tag)).toEqual(
    input().terminals.map(({ tag }) => tag),
  );
  const deed = await suite.db('activity').where({ loop_id: loopId, verb: 'generated the drawing of' }).first('person_id', 'detail');
  expect(deed).toMatchObject({ person_id: designer.id, detail: { terminals: 12, version: 2 } });
});

it('what is drawn is replaced only where that is said, and terminals of the same tag stay the same', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  await generate(loopId, input());
  const first = await draftOf(loopId);
  const refused = await generate(loopId, input({ baseVersion: 2 }));
  expect([refused.status, refused.body.code]).toEqual([409, 'drawing-not-empty']);
  expect((await draftOf(loopId)).version).toBe(2);

  const terminals = schedule(13, { storeys: 2, risers: 1 });
  const again = await generate(loopId, input({ baseVersion: 2, terminals, replacesDrawing: true }));
  expect(again.status).toBe(200);
  const second = await draftOf(loopId);
  expect(second.version).toBe(3);
  const [was, is] = [idsByTag(first.drawing), idsByTag(second.drawing)];
  const kept = [...is].filter(([tag]) => was.has(tag));
  expect(kept.length).toBeGreaterThan(10);
  for (const [tag, id] of kept) expect(id).toBe(was.get(tag));
});

it('of two who generate from the same version one is told, with the drawing of the other', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const answers = await Promise.all([generate(loopId, input()), generate(loopId, input())]);
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  const told = answers.find(({ status }) => status === 409)!.body;
  expect(told).toMatchObject({ code: 'draft-changed', detail: { version: 2, drawing: (await draftOf(loopId)).drawing } });
});

it('a schedule with a tag that stands twice is refused at its row, and the draft stays', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const [first, ...others] = schedule(3);
  const refused = await generate(loopId, input({ terminals: [first, ...others, { ...others[0], tag: first.tag }] }));
  expect([refused.status, refused.body.code]).toEqual([422, 'schedule-unfit']);
  expect(refused.body.fields).toEqual([{ path: 'terminals.3.tag', message: `${first.tag} stands in row 1 already.` }]);
  expect((await draftOf(loopId)).version).toBe(1);
});

it('balancing valves come from the family of the catalogue that is named, and from no other organisation’s', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const points = (kvs: number) => [0.5, 1, 2, 3, 4].map((setting) => ({ setting, kv: (kvs * setting) / 4, measuringKv: kvs }));
  const sizes = [0.6, 1.2, 2.5, 5, 10, 20].map((kvs, k) => ({ nominal: `S${k}`, stepTurns: 0.1, points: points(kvs) }));
  const family = await call(ADD_FAMILY, { method: 'POST', body: { name: 'House valve', source: 'Measured here', sizes } });
  const made = await generate(loopId, input({ valveFamilyId: family.body.id }));
  expect(made.status).toBe(200);
  const { drawing } = await draftOf(loopId);
  for (const piece of drawing.equipment) if (piece.kind === 'terminalUnit') expect(piece.balancingValve!.name).toMatch(/^House valve S\d$/);

  const stranger = await makeOrganization(suite.db, { name: 'Another' });
  signInAs(stranger.designer);
  expect((await generate(stranger.loopId, input({ valveFamilyId: family.body.id }))).status).toBe(404);
});
