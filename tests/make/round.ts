import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { emptyDrawing } from '@/lib/network/drawing';
import type { MadeOrganization } from './organization';

export interface MadeRound {
  revisionId: string;
  roundId: string;
  stationId: string;
  instrumentId: string;
}

/** One issued revision with one terminal station (0.5 L/s, Kv 1 to 4 at 1 to 4 turns), a meter, and an open round. */
export async function makeRound(db: Knex, organization: MadeOrganization): Promise<MadeRound> {
  const [revisionId, stationId] = [uuidv7(), uuidv7()];
  const { organizationId, loopId, designer } = organization;
  await db('revisions').insert({
    organization_id: organizationId,
    id: revisionId,
    loop_id: loopId,
    number: 1,
    drawing: JSON.stringify(emptyDrawing('chilled')),
    network_document: JSON.stringify({
      format: 'network/1',
      name: 'Loop',
      fluid: { medium: 'water', temperatureC: 9 },
      nodes: [{ id: 'A' }],
      links: [],
    }),
    balance: JSON.stringify({ converged: true, indexTerminal: null, pumps: [], valves: [], terminals: [], solution: null, warnings: [] }),
    issued_by: designer.id,
  });
  await db('stations').insert({ organization_id: organizationId, id: stationId, loop_id: loopId, element_id: 'unit-1', kind: 'terminal' });
  await db('station_designs').insert({
    organization_id: organizationId,
    revision_id: revisionId,
    station_id: stationId,
    walking_order: 1,
    tag: 'FC-1',
    design_flow_ls: 0.5,
    valve_name: 'Test valve',
    kv_table: JSON.stringify([1, 2, 3, 4].map((turns) => ({ setting: turns, kv: turns }))),
    setting_turns: 4,
    expected_drop_kpa: 20.25,
  });
  return { revisionId, stationId, ...(await openRound(db, organization, revisionId)) };
}

/** A meter of the organisation, and round 1 of the loop on a revision, open; the loop is in commissioning from then on. */
export async function openRound(
  db: Knex,
  { organizationId, loopId, technician }: MadeOrganization,
  revisionId: string,
): Promise<Pick<MadeRound, 'roundId' | 'instrumentId'>> {
  const [instrumentId, roundId] = [uuidv7(), uuidv7()];
  await db('instruments').insert({
    organization_id: organizationId,
    id: instrumentId,
    name: 'Differential pressure meter',
    kind: 'differential-pressure',
    serial: 'DP-02',
    range_low: 0,
    range_high: 200,
    accuracy_percent: 1,
    accuracy_absolute: 0.1,
    calibrated_on: '2026-03-14',
    calibration_due_on: '2027-03-14',
  });
  await db('rounds').insert({
    organization_id: organizationId,
    id: roundId,
    loop_id: loopId,
    revision_id: revisionId,
    number: 1,
    purpose: 'As found',
    started_by: technician.id,
  });
  await db('loops').where({ organization_id: organizationId, id: loopId }).update({ state: 'in-commissioning' });
  return { roundId, instrumentId };
}
