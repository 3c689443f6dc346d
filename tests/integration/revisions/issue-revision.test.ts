import { expect, it } from 'vitest';
import { GET as readDraft, PUT as saveDraft } from '@/app/api/loops/[loopId]/draft/route';
import { GET as readRevision } from '@/app/api/loops/[loopId]/revisions/[number]/route';
import { GET as listRevisions, POST as issue } from '@/app/api/loops/[loopId]/revisions/route';
import { POST as solve } from '@/app/api/loops/[loopId]/solve/route';
import type { SolutionBody } from '@/lib/api/loops';
import { call } from '../../make/call';
import { withDatabase } from '../../make/database';
import { ladder, pump } from '../../make/drawing';
import { makeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
const drawn = ladder([0.2, 0.3, 0.25]);

const issueOf = (loopId: string, draftVersion: number, note = '') =>
  call(issue, { method: 'POST', params: { loopId }, body: { draftVersion, note } });

it('solving gives flows that balance, settings for design flow and an index circuit that passes the pump once', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const { status, body } = await call(solve, { method: 'POST', params: { loopId }, body: { drawing: drawn } });
  expect(status).toBe(200);
  const { solved, faults } = body as SolutionBody;
  expect(faults.filter(({ severity }) => severity === 'error')).toEqual([]);
  expect(solved!.solve.converged).toBe(true);
  const flowOf = new Map(solved!.solve.links.map((link) => [link.id, link.flowLs]));
  const units = ['FC-1', 'FC-2', 'FC-3'].map((id) => flowOf.get(`${id}:coil`)!);
  expect(units.reduce((a, b) => a + b, 0)).toBeCloseTo(flowOf.get('P-1')!, 6);
  expect(solved!.balance!.terminals.map(({ percentOfDesign }) => Math.round(percentOfDesign))).toEqual([100, 100, 100]);
  const index = solved!.indexCircuit.map(({ id }) => id);
  expect(index.filter((id) => id === 'P-1')).toHaveLength(1);
  expect(index).toContain(solved!.balance!.indexTerminal!.split(':')[0]);
});

it('a drawing with faults is answered with the faults and their places, not with figures', async () => {
  const { designer, loopId } = await makeOrganization(suite.db);
  signInAs(designer);
  const { body } = await call(solve, {
    method: 'POST',
    params: { loopId },
    body: { drawing: { ...drawn, equipment: [pump('P-1')], pipes: [] } },
  });
  expect(body.solved).toBeNull();
  expect(body.faults).toContainEqual(
    expect.objectContaining({ code: 'open-end', severity: 'error', place: { kind: 'equipment', id: 'P-1' } }),
  );
});

it('issuing freezes drawing and settings and makes the stations; a later change of the draft does not touch it', async () => {
  const { designer, loopId, organizationId } = await makeOrganization(suite.db, { drawing: drawn });
  signInAs(designer);
  expect(await issueOf(loopId, 1, 'For construction')).toMatchObject({ status: 200, body: { number: 1 } });

  const stations = await suite
    .db('station_designs')
    .where({ organization_id: organizationId })
    .orderBy('walking_order')
    .select('tag', 'design_flow_ls', 'setting_turns');
  expect(stations.map(({ tag }) => tag)).toEqual(['P-1', 'FC-1', 'FC-2', 'FC-3']);
  expect(stations.map(({ design_flow_ls: flow }) => Number(flow.toFixed(6)))).toEqual([0.75, 0.2, 0.3, 0.25]);
  expect(stations.filter(({ setting_turns: turns }) => turns !== null)).toHaveLength(3);

  const fewer = { ...drawn, fluid: { ...drawn.fluid, supplyC: 7 } };
  await call(saveDraft, { method: 'PUT', params: { loopId }, body: { baseVersion: 1, drawing: fewer } });
  const revision = (await call(readRevision, { params: { loopId, number: '1' } })).body;
  expect(revision.drawing.fluid.supplyC).toBe(6);
  expect(revision.note).toBe('For construction');
});

it('a second revision keeps the stations of pieces that stay and lists what changed', async () => {
  const { designer, loopId } = await makeOrganization(suite.db, { drawing: drawn });
  signInAs(designer);
  await issueOf(loopId, 1);
  const before = await suite.db('stations').where({ loop_id: loopId }).orderBy('element_id').select('id', 'element_id');
  const changed = {
    ...drawn,
    equipment: drawn.equipment.map((piece) =>
      piece.kind === 'terminalUnit' && piece.id === 'FC-2' ? { ...piece, designFlowLs: 0.28 } : piece,
    ),
  };
  await call(saveDraft, { method: 'PUT', params: { loopId }, body: { baseVersion: 1, drawing: changed } });
  expect((await issueOf(loopId, 2)).body).toEqual({ number: 2 });
  expect(await suite.db('stations').where({ loop_id: loopId }).orderBy('element_id').select('id', 'element_id')).toEqual(before);
  expect((await call(readRevision, { params: { loopId, number: '2' } })).body.changes).toEqual([
    { message: 'FC-2 changed: design flow', place: { kind: 'equipment', id: 'FC-2' } },
  ]);
  expect((await call(listRevisions, { params: { loopId } })).body.map(({ number }: { number: number }) => number)).toEqual([2, 1]);
});

it('two designers who issue at once, or one who presses twice, make one revision', async () => {
  const { designer, loopId } = await makeOrganization(suite.db, { drawing: drawn });
  signInAs(designer);
  const answers = await Promise.all([issueOf(loopId, 1), issueOf(loopId, 1), issueOf(loopId, 1)]);
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
  expect(await suite.db('revisions').where({ loop_id: loopId }).select('number')).toEqual([{ number: 1 }]);
});

it('a draft that was saved since is not issued, nor one that cannot be solved, and nothing is stored', async () => {
  const { designer, loopId } = await makeOrganization(suite.db, { drawing: { ...drawn, pipes: drawn.pipes.slice(1) } });
  signInAs(designer);
  expect((await issueOf(loopId, 7)).body).toMatchObject({ code: 'draft-changed' });
  expect((await issueOf(loopId, 1)).body).toMatchObject({ code: 'drawing-unfit' });
  expect(await suite.db('revisions').where({ loop_id: loopId }).count()).toEqual([{ count: '0' }]);
  expect(await suite.db('loops').where({ id: loopId }).first('state')).toEqual({ state: 'draft' });
  expect((await call(readDraft, { params: { loopId } })).body.version).toBe(1);
});
