import type { Knex } from 'knex';
import type { ReportReading, ReportStation } from '@/lib/api/reports';

export interface Entry extends ReportReading {
  /** What the revision it was taken under asked of the station. */
  designFlowLs: number;
}

/** Entries, all of a loop or the one of an id, oldest first, with what each was judged against. */
export async function entriesOf(
  connection: Knex,
  organizationId: string,
  which: { 'stations.loop_id': string } | { 'readings.id': string },
): Promise<Entry[]> {
  const rows = await connection('readings')
    .join('stations', (join) => join.on('stations.organization_id', 'readings.organization_id').on('stations.id', 'readings.station_id'))
    .join('station_designs as asked', (join) =>
      join
        .on('asked.organization_id', 'readings.organization_id')
        .on('asked.revision_id', 'readings.revision_id')
        .on('asked.station_id', 'readings.station_id'),
    )
    .join('rounds', (join) => join.on('rounds.organization_id', 'readings.organization_id').on('rounds.id', 'readings.round_id'))
    .join('revisions', (join) =>
      join.on('revisions.organization_id', 'readings.organization_id').on('revisions.id', 'readings.revision_id'),
    )
    .join('instruments', (join) =>
      join.on('instruments.organization_id', 'readings.organization_id').on('instruments.id', 'readings.instrument_id'),
    )
    .join('people', (join) => join.on('people.organization_id', 'readings.organization_id').on('people.id', 'readings.taken_by'))
    .leftJoin('readings as later', (join) =>
      join.on('later.organization_id', 'readings.organization_id').on('later.corrects_reading_id', 'readings.id'),
    )
    .where({ 'readings.organization_id': organizationId, ...which })
    .orderBy(['readings.taken_at', 'readings.id'])
    .select({
      id: 'readings.id',
      stationId: 'readings.station_id',
      tag: 'asked.tag',
      designFlowLs: 'asked.design_flow_ls',
      roundId: 'readings.round_id',
      roundNumber: 'rounds.number',
      revisionNumber: 'revisions.number',
      method: 'readings.method',
      settingTurns: 'readings.setting_turns',
      dropKpa: 'readings.drop_kpa',
      heatKw: 'readings.heat_kw',
      supplyC: 'readings.supply_c',
      returnC: 'readings.return_c',
      pumpSpeed: 'readings.pump_speed',
      kv: 'readings.kv',
      flowLs: 'readings.flow_ls',
      percentOfDesign: 'readings.percent_of_design',
      uncertaintyPercent: 'readings.uncertainty_percent',
      verdict: 'readings.verdict',
      entered: 'readings.entered',
      instrumentId: 'readings.instrument_id',
      instrumentName: 'instruments.name',
      isInstrumentOverdue: 'readings.instrument_overdue',
      isInstrumentOutOfRange: 'readings.instrument_out_of_range',
      takenBy: 'people.name',
      takenAt: 'readings.taken_at',
      recordedAt: 'readings.recorded_at',
      note: 'readings.note',
      correctsReadingId: 'readings.corrects_reading_id',
      laterId: 'later.id',
    });
  return rows.map(({ laterId, takenAt, recordedAt, ...row }) => ({
    ...row,
    takenAt: takenAt.toISOString(),
    recordedAt: recordedAt.toISOString(),
    isCorrected: laterId !== null,
  }));
}

/** The stations of one revision in walking order. */
export async function stationsOf(connection: Knex, organizationId: string, revisionId: string): Promise<Omit<ReportStation, 'reading'>[]> {
  return connection('station_designs as design')
    .join('stations', (join) => join.on('stations.organization_id', 'design.organization_id').on('stations.id', 'design.station_id'))
    .where({ 'design.organization_id': organizationId, 'design.revision_id': revisionId })
    .orderBy('design.walking_order')
    .select({
      id: 'stations.id',
      elementId: 'stations.element_id',
      kind: 'stations.kind',
      tag: 'design.tag',
      storey: 'design.storey',
      room: 'design.room',
      walkingOrder: 'design.walking_order',
      designFlowLs: 'design.design_flow_ls',
      valveName: 'design.valve_name',
      kvTable: 'design.kv_table',
      settingTurns: 'design.setting_turns',
      expectedDropKpa: 'design.expected_drop_kpa',
      rank: 'design.rank',
      coilDropKpa: 'design.coil_drop_kpa',
      pumpCurve: 'design.pump_curve',
      pumpSpeed: 'design.pump_speed',
    });
}
