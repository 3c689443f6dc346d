import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { IssueRevision, LoopState } from '@/lib/api/loops';
import type { Drawing } from '@/lib/network/drawing';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { changesBetween, same } from '@/lib/network/merge-drawings';
import { stationsOfDrawing, type DrawnStation } from '@/lib/network/stations-of-drawing';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { solveDrawing } from '../solving/solve-drawing';

/** States in which a change of design may be issued; what has been submitted is first returned or accepted. */
const issuableStates: LoopState[] = ['draft', 'issued', 'in-commissioning', 'accepted'];

/**
 * Freezes the saved draft as the next numbered revision: drawing, network document, settings and pump duty, and the
 * stations that come out of it. The loop is locked, so two designers cannot issue the same number.
 */
export async function issueRevision(access: Access, loopId: string, input: IssueRevision): Promise<{ number: number }> {
  const { organizationId } = access.person;
  return db().transaction(async (trx) => {
    const loop = await trx('loops').where({ organization_id: organizationId, id: loopId }).forUpdate().first('name', 'state');
    if (!loop) throw notFound();
    if (!issuableStates.includes(loop.state)) {
      throw new Problem('loop-state', `The loop is ${loop.state}: it must be returned or accepted before its design can change.`);
    }
    const draft = await trx('drafts').where({ organization_id: organizationId, loop_id: loopId }).forUpdate().first('version', 'drawing');
    if (draft.version !== input.draftVersion) {
      throw new Problem('draft-changed', 'The drawing was saved by someone else since you looked at it. Look again, then issue.');
    }
    const drawing: Drawing = draft.drawing;
    const before = await trx('revisions')
      .where({ organization_id: organizationId, loop_id: loopId })
      .orderBy('number', 'desc')
      .first('number', 'drawing');
    if (before && same(before.drawing, drawing)) {
      throw new Problem('revision-unchanged', `The drawing is that of revision ${before.number}: there is nothing new to issue.`);
    }
    const { document } = drawingToDocument(drawing, loop.name);
    const { faults, solved } = await solveDrawing(drawing, loop.name, { personId: access.person.id });
    if (!document || !solved?.balance) {
      throw new Problem('drawing-unfit', 'The drawing cannot be issued while it cannot be solved and balanced.', { detail: faults });
    }
    if (!solved.balance.converged)
      throw new Problem('drawing-unfit', 'The balance has no converged solution, so there are no settings to issue.');

    const number = (before?.number ?? 0) + 1;
    const revisionId = uuidv7();
    await trx('revisions').insert({
      organization_id: organizationId,
      id: revisionId,
      loop_id: loopId,
      number,
      note: input.note,
      drawing: JSON.stringify(drawing),
      network_document: JSON.stringify(document),
      balance: JSON.stringify(solved.balance),
      changes: JSON.stringify(before ? changesBetween(before.drawing, drawing) : []),
      issued_by: access.person.id,
    });
    await storeStations(trx, { organizationId, loopId, revisionId }, stationsOfDrawing(drawing, solved.balance));
    // A round belongs to one revision: what was open under the old design ends with it.
    await trx('rounds')
      .where({ organization_id: organizationId, loop_id: loopId })
      .whereNull('closed_at')
      .update({ closed_at: trx.fn.now() });
    await trx('loops').where({ organization_id: organizationId, id: loopId }).update({ state: 'issued' });
    await recordActivity(trx, access, { verb: 'issued', subject: `revision ${number} of ${loop.name}`, loopId });
    return { number };
  });
}

async function storeStations(
  trx: Knex.Transaction,
  ids: { organizationId: string; loopId: string; revisionId: string },
  stations: DrawnStation[],
): Promise<void> {
  const { organizationId, loopId, revisionId } = ids;
  const known = await trx('stations').where({ organization_id: organizationId, loop_id: loopId }).select('id', 'element_id');
  const idOf = new Map(known.map((row) => [row.element_id as string, row.id as string]));
  const added = stations.filter((station) => !idOf.has(station.elementId)).map((station) => ({ station, id: uuidv7() }));
  for (const { station, id } of added) idOf.set(station.elementId, id);
  if (added.length) {
    await trx.batchInsert(
      'stations',
      added.map(({ station, id }) => ({
        organization_id: organizationId,
        id,
        loop_id: loopId,
        element_id: station.elementId,
        kind: station.kind,
      })),
      500,
    );
  }
  await trx.batchInsert(
    'station_designs',
    stations.map((station) => ({
      organization_id: organizationId,
      revision_id: revisionId,
      station_id: idOf.get(station.elementId)!,
      walking_order: station.walkingOrder,
      tag: station.tag,
      storey: station.storey,
      room: station.room,
      design_flow_ls: station.designFlowLs,
      valve_name: station.valveName,
      kv_table: station.kvTable && JSON.stringify(station.kvTable),
      setting_turns: station.settingTurns,
      expected_drop_kpa: station.expectedDropKpa,
      rank: station.rank,
      coil_drop_kpa: station.coilDropKpa,
      pump_curve: station.pumpCurve && JSON.stringify(station.pumpCurve),
      pump_speed: station.pumpSpeed,
    })),
    500,
  );
}
