import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { POST as issue } from '@/app/api/loops/[loopId]/revisions/route';
import { call } from './call';
import { ladder } from './drawing';
import { makeOrganization, type MadeOrganization } from './organization';
import { openRound } from './round';
import { signInAs } from './session';

export interface MeasuredLoop extends MadeOrganization {
  revisionId: string;
  roundId: string;
  instrumentId: string;
  /** Station ids by tag. */
  stations: Record<string, string>;
}

/** A loop of three terminals, issued through the application, with a meter and an open round, nothing read yet. */
export async function makeMeasuredLoop(db: Knex, name?: string): Promise<MeasuredLoop> {
  const organization = await makeOrganization(db, { name, drawing: ladder([0.2, 0.3, 0.25]) });
  const { organizationId, loopId, designer } = organization;
  signInAs(designer);
  const issued = await call(issue, { method: 'POST', params: { loopId }, body: { draftVersion: 1, note: 'For construction' } });
  if (issued.status !== 200) throw new Error(`not issued: ${JSON.stringify(issued.body)}`);
  const { id: revisionId } = await db('revisions').where({ organization_id: organizationId, loop_id: loopId }).first('id');
  const rows = await db('station_designs').where({ organization_id: organizationId, revision_id: revisionId }).select('tag', 'station_id');
  return {
    ...organization,
    revisionId,
    ...(await openRound(db, organization, revisionId)),
    stations: Object.fromEntries(rows.map(({ tag, station_id: id }) => [tag, id])),
  };
}

/** One entry at a station, at its per cent of design. */
export async function measure(
  db: Knex,
  loop: MeasuredLoop,
  tag: string,
  percentOfDesign: number,
  corrects?: { id: string; why: string },
): Promise<string> {
  const id = uuidv7();
  const where = { organization_id: loop.organizationId, revision_id: loop.revisionId, station_id: loop.stations[tag] };
  const { design_flow_ls: designFlowLs } = await db('station_designs').where(where).first('design_flow_ls');
  await db('readings').insert({
    ...where,
    id,
    round_id: loop.roundId,
    method: 'direct-flow',
    flow_ls: (designFlowLs * percentOfDesign) / 100,
    percent_of_design: percentOfDesign,
    uncertainty_percent: 2,
    verdict: percentOfDesign < 90 ? 'low' : percentOfDesign > 110 ? 'high' : 'within',
    entered: JSON.stringify([{ quantity: 'flow', text: '0.2', unit: 'L/s' }]),
    instrument_id: loop.instrumentId,
    instrument_overdue: false,
    corrects_reading_id: corrects?.id ?? null,
    note: corrects?.why ?? '',
    taken_by: loop.technician.id,
    taken_at: new Date(),
  });
  return id;
}
