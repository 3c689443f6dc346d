import ExcelJS from 'exceljs';
import { expect, it } from 'vitest';
import { POST as accept } from '@/app/api/loops/[loopId]/acceptance/route';
import { GET as readReport } from '@/app/api/loops/[loopId]/report/route';
import { GET as download } from '@/app/api/loops/[loopId]/report/workbook/route';
import { POST as review } from '@/app/api/loops/[loopId]/review/route';
import { POST as submit } from '@/app/api/loops/[loopId]/submission/route';
import type { ReportBody } from '@/lib/api/reports';
import { sha256 } from '@/lib/server/reports/report-sha256';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { makeMeasuredLoop, measure, type MeasuredLoop } from '../../make/measured-loop';
import { signInAs } from '../../make/session';

const suite = withDatabase();
type Who = 'administrator' | 'designer' | 'technician' | 'owner';

async function reportFor(loop: MeasuredLoop, who: Who): Promise<ReportBody> {
  signInAs(loop[who]);
  return (await call(readReport, { params: { loopId: loop.loopId } })).body;
}

/** Looks at the report as this person and signs what was seen. */
async function sign(loop: MeasuredLoop, who: Who, handler: typeof submit, body: Record<string, unknown> = {}) {
  const { contentSha256 } = await reportFor(loop, who);
  return call(handler, { method: 'POST', params: { loopId: loop.loopId }, body: { note: '', contentSha256, ...body } });
}

const submitted = (loop: MeasuredLoop, body?: Record<string, unknown>) => sign(loop, 'technician', submit, body);
const reviewed = (loop: MeasuredLoop) => sign(loop, 'designer', review, { meaning: 'reviewed' });
const returned = (loop: MeasuredLoop, note = 'FC-2 is low: open it') => sign(loop, 'designer', review, { meaning: 'returned', note });
const accepted = (loop: MeasuredLoop) => sign(loop, 'owner', accept);

const stateOf = async (loop: MeasuredLoop) => (await suite.db('loops').where({ id: loop.loopId }).first('state')).state;
const signaturesOf = (loop: MeasuredLoop) =>
  suite.db('signatures').where({ loop_id: loop.loopId }).orderBy('signed_at').select('meaning', 'submission', 'person_role');

async function fullyMeasured(): Promise<MeasuredLoop> {
  const loop = await makeMeasuredLoop(suite.db);
  for (const tag of ['FC-1', 'FC-2', 'FC-3']) await measure(suite.db, loop, tag, 98);
  return loop;
}

const bytesOf = async (response: Response) => new Uint8Array(await response.arrayBuffer());

it('goes from submitted over reviewed to accepted, each signed by its own role, and each sees only what is theirs to sign', async () => {
  const loop = await fullyMeasured();
  expect((await reportFor(loop, 'designer')).maySign).toEqual([]);
  expect((await reportFor(loop, 'technician')).maySign).toEqual(['submitted']);
  expect(await submitted(loop)).toMatchObject({ status: 200, body: { submission: 1 } });
  expect((await reportFor(loop, 'technician')).maySign).toEqual([]);
  expect((await reportFor(loop, 'owner')).maySign).toEqual([]);
  expect((await reportFor(loop, 'designer')).maySign).toEqual(['reviewed', 'returned']);
  expect((await reviewed(loop)).status).toBe(200);
  expect((await reportFor(loop, 'owner')).maySign).toEqual(['accepted']);
  expect((await accepted(loop)).status).toBe(200);
  expect(await stateOf(loop)).toBe('accepted');
  expect(await signaturesOf(loop)).toEqual([
    { meaning: 'submitted', submission: 1, person_role: 'technician' },
    { meaning: 'reviewed', submission: 1, person_role: 'designer' },
    { meaning: 'accepted', submission: 1, person_role: 'owner' },
  ]);
  const done = await suite
    .db('activity')
    .where({ loop_id: loop.loopId })
    .whereIn('verb', ['submitted', 'reviewed', 'accepted'])
    .orderBy('at')
    .pluck('verb');
  expect(done).toEqual(['submitted', 'reviewed', 'accepted']);
});

it('submitting closes the open round and leaves the report that was signed as it was', async () => {
  const loop = await fullyMeasured();
  const { contentSha256 } = await reportFor(loop, 'technician');
  await submitted(loop);
  expect((await suite.db('rounds').where({ id: loop.roundId }).first('closed_at')).closed_at).toBeInstanceOf(Date);
  expect((await reportFor(loop, 'technician')).contentSha256).toBe(contentSha256);
});

it('what is returned needs a reason, goes back to commissioning, and counts as a new submission the next time', async () => {
  const loop = await fullyMeasured();
  await submitted(loop);
  expect((await returned(loop, ' ')).body).toMatchObject({
    code: 'input-invalid',
    fields: [{ path: 'note', message: 'Say what has to be put right.' }],
  });
  expect((await returned(loop)).status).toBe(200);
  expect(await stateOf(loop)).toBe('in-commissioning');
  expect((await submitted(loop)).body).toEqual({ submission: 2 });
  expect((await reviewed(loop)).status).toBe(200);
});

it('no step can be taken before its turn or twice', async () => {
  const loop = await fullyMeasured();
  expect((await reviewed(loop)).body.code).toBe('loop-state');
  expect((await accepted(loop)).body.code).toBe('loop-state');
  await submitted(loop);
  expect((await submitted(loop)).body.code).toBe('loop-state');
  expect((await accepted(loop)).body.code).toBe('loop-state');
  await reviewed(loop);
  await accepted(loop);
  expect((await submitted(loop)).body.code).toBe('loop-state');
  expect((await signaturesOf(loop)).map(({ meaning }) => meaning)).toEqual(['submitted', 'reviewed', 'accepted']);
});

it('nobody signs one submission under two roles', async () => {
  const loop = await fullyMeasured();
  const { organizationId, projectId, technician } = loop;
  for (const role of ['designer', 'owner'])
    await suite.db('project_members').insert({ organization_id: organizationId, project_id: projectId, person_id: technician.id, role });
  await submitted(loop);
  expect((await reportFor(loop, 'technician')).maySign).toEqual([]);
  expect(await sign(loop, 'technician', review, { meaning: 'reviewed' })).toMatchObject({ status: 409, body: { code: 'already-signed' } });
  await reviewed(loop);
  expect((await sign(loop, 'technician', accept)).body.code).toBe('already-signed');
  expect(await stateOf(loop)).toBe('reviewed');
});

it('nothing is submitted when nothing is measured, and what is missing has to be explained', async () => {
  const loop = await makeMeasuredLoop(suite.db);
  expect((await submitted(loop, { note: 'No access' })).body.code).toBe('nothing-measured');
  await measure(suite.db, loop, 'P-1', 100);
  expect((await submitted(loop)).body.code).toBe('nothing-measured');
  await measure(suite.db, loop, 'FC-1', 98);
  const message = 'Not measured: FC-2, FC-3. Say in the note why, then sign.';
  expect((await submitted(loop)).body).toMatchObject({ code: 'input-invalid', fields: [{ path: 'note', message }] });
  expect(await stateOf(loop)).toBe('in-commissioning');
  expect((await submitted(loop, { note: 'Behind a locked ceiling' })).status).toBe(200);
});

it('nobody signs what they have not seen: a reading that came in between is to be looked at first', async () => {
  const loop = await fullyMeasured();
  const { contentSha256 } = await reportFor(loop, 'technician');
  await measure(suite.db, loop, 'FC-1', 104);
  expect((await submitted(loop, { contentSha256 })).body.code).toBe('revision-superseded');
  expect(await signaturesOf(loop)).toEqual([]);
});

it('a reading that arrives after the submission keeps the others from signing until it is submitted again', async () => {
  const loop = await fullyMeasured();
  await submitted(loop);
  await reviewed(loop);
  await measure(suite.db, loop, 'FC-1', 60);
  expect((await reportFor(loop, 'owner')).maySign).toEqual([]);
  expect((await accepted(loop)).body.code).toBe('revision-superseded');
  expect((await submitted(loop)).body).toEqual({ submission: 2 });
  expect(await stateOf(loop)).toBe('submitted');
  await reviewed(loop);
  expect((await accepted(loop)).status).toBe(200);
});

it('an entry that was put right counts no more but stays in the report', async () => {
  const loop = await fullyMeasured();
  const wrong = await measure(suite.db, loop, 'FC-2', 190);
  const right = await measure(suite.db, loop, 'FC-2', 95, { id: wrong, why: 'Hoses were crossed' });
  const { content, strip } = await reportFor(loop, 'owner');
  const station = content!.stations.find(({ tag }) => tag === 'FC-2')!;
  expect(station.reading!.id).toBe(right);
  expect(content!.readings.find(({ id }) => id === wrong)).toMatchObject({ isCorrected: true, percentOfDesign: 190 });
  expect(strip.map(({ percentOfDesign }) => percentOfDesign)).toEqual([98, 95, 98]);
  expect(content!.instruments).toMatchObject([{ serial: 'DP-02', calibratedOn: '2026-03-14', calibrationDueOn: '2027-03-14' }]);
});

it('of owners who accept at once, or one who presses twice, one accepts and one report is stored', async () => {
  const loop = await fullyMeasured();
  await submitted(loop);
  await reviewed(loop);
  const { contentSha256 } = await reportFor(loop, 'owner');
  const press = () => call(accept, { method: 'POST', params: { loopId: loop.loopId }, body: { note: '', contentSha256 } });
  const answers = await Promise.all([press(), press(), press()]);
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
  expect(await suite.db('reports').where({ loop_id: loop.loopId }).select('number')).toEqual([{ number: 1 }]);
});

it('an accepted workbook is the stored bytes, whatever is measured later, and its SHA-256 is the one that is shown', async () => {
  const loop = await fullyMeasured();
  await submitted(loop);
  await reviewed(loop);
  await accepted(loop);
  const fetchIt = async () => bytesOf((await call(download, { params: { loopId: loop.loopId }, query: '?number=1' })).response);
  const before = await fetchIt();
  await measure(suite.db, loop, 'FC-1', 55);
  await suite.db('projects').where({ id: loop.projectId }).update({ name: 'Another name' });
  const after = await fetchIt();
  expect(Buffer.compare(before, after)).toBe(0);
  expect((await reportFor(loop, 'owner')).accepted).toMatchObject([{ number: 1, sha256: sha256(after) }]);

  const workbook = new ExcelJS.Workbook();
  await workbook.xlsx.load(after.buffer as ArrayBuffer);
  const cover = workbook.getWorksheet('Cover')!;
  const texts = cover.getColumn(1).values.map(String);
  expect(texts.filter((text) => text.endsWith(', submission 1'))).toEqual([
    'Submitted, submission 1',
    'Reviewed, submission 1',
    'Accepted, submission 1',
  ]);
});

it('the workbook of the report as it stands comes as a file with a harmless name and its digest', async () => {
  const loop = await fullyMeasured();
  await suite.db('loops').where({ id: loop.loopId }).update({ name: 'Öl "x"; ../CHW\r\n1' });
  signInAs(loop.owner);
  const { status, response } = await call(download, { params: { loopId: loop.loopId } });
  expect(status).toBe(200);
  expect(response.headers.get('content-disposition')).toBe('attachment; filename="report-Ol-x-CHW-1-revision-1-as-it-stands.xlsx"');
  const bytes = await bytesOf(response);
  expect(response.headers.get('repr-digest')).toBe(`sha-256=:${Buffer.from(sha256(bytes), 'hex').toString('base64')}:`);
  expect((await call(download, { params: { loopId: loop.loopId }, query: '?number=1' })).status).toBe(404);
});

it('the database itself lets nobody rewrite a signature or an accepted report', async () => {
  const loop = await fullyMeasured();
  await submitted(loop);
  await reviewed(loop);
  await accepted(loop);
  await expect(suite.db('reports').where({ loop_id: loop.loopId }).update({ sha256: 'x' })).rejects.toThrow('append-only');
  await expect(suite.db('reports').where({ loop_id: loop.loopId }).del()).rejects.toThrow('append-only');
  await expect(suite.db('signatures').where({ loop_id: loop.loopId }).update({ person_name: 'Someone' })).rejects.toThrow('append-only');
});

it('another organisation finds no report and can sign nothing', async () => {
  const loop = await fullyMeasured();
  const { contentSha256 } = await reportFor(loop, 'technician');
  const away = await makeMeasuredLoop(suite.db, 'Away');
  signInAs(away.technician);
  const body = { note: '', contentSha256 };
  expect((await call(readReport, { params: { loopId: loop.loopId } })).status).toBe(404);
  expect((await call(submit, { method: 'POST', params: { loopId: loop.loopId }, body })).status).toBe(404);
  expect(await stateOf(loop)).toBe('in-commissioning');
});

it('a role that may not sign is refused and nothing changes', async () => {
  const loop = await fullyMeasured();
  expect((await sign(loop, 'designer', submit)).status).toBe(403);
  expect((await sign(loop, 'owner', submit)).status).toBe(403);
  expect((await sign(loop, 'administrator', submit)).status).toBe(403);
  expect(await signaturesOf(loop)).toEqual([]);
});
