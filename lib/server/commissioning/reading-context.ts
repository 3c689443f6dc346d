import type { Knex } from 'knex';
import type { InstrumentKind, RecordReading } from '@/lib/api/commissioning';
import type { StationKind, StationRank, ToleranceRule } from '@/lib/api/projects';
import { bandOf } from '@/lib/api/tolerances';
import { judgeReading, type Judgement } from '@/lib/commissioning/judge-reading';
import { measuredOf } from '@/lib/commissioning/measured-of';
import { readingMethods } from '@/lib/commissioning/reading-methods';
import type { FluidSpecification } from '@/lib/hydraulics/fluids';
import type { KvPoint } from '@/lib/network/drawing';
import { notFound, Problem } from '../problem';
import { readTolerances } from '../projects/read-tolerances';
import { loopFluid } from './loop-fluid';

export interface RoundContext {
  loopId: string;
  loopName: string;
  number: number;
  isClosed: boolean;
  revisionId: string;
  fluid: { densityKgM3: number; specificHeatKJKgK: number };
  tolerances: ToleranceRule[];
}

interface StationContext {
  tag: string;
  kind: StationKind;
  designFlowLs: number;
  kvTable: KvPoint[] | null;
  rank: StationRank;
  coilDropKpa: number | null;
  pumpCurve: { flowLs: number; headM: number }[] | null;
}

interface InstrumentContext {
  accuracyPercent: number;
  accuracyAbsolute: number;
  rangeLow: number | null;
  rangeHigh: number | null;
  calibrationDueOn: string | null;
}

/** The round and what its revision and project say; its row is held shared until the transaction ends. */
export async function readRound(trx: Knex.Transaction, organizationId: string, roundId: string): Promise<RoundContext> {
  const row:
    | {
        loopId: string;
        loopName: string;
        projectId: string;
        number: number;
        closedAt: Date | null;
        revisionId: string;
        fluid: FluidSpecification;
      }
    | undefined = await trx('rounds')
    .join('loops', (join) => join.on('loops.organization_id', 'rounds.organization_id').on('loops.id', 'rounds.loop_id'))
    .join('revisions', (join) => join.on('revisions.organization_id', 'rounds.organization_id').on('revisions.id', 'rounds.revision_id'))
    .where({ 'rounds.organization_id': organizationId, 'rounds.id': roundId })
    .forShare('rounds')
    .first({
      loopId: 'rounds.loop_id',
      loopName: 'loops.name',
      projectId: 'loops.project_id',
      number: 'rounds.number',
      closedAt: 'rounds.closed_at',
      revisionId: 'rounds.revision_id',
      fluid: trx.raw("revisions.network_document -> 'fluid'"),
    });
  if (!row) throw notFound();
  const tolerances = await readTolerances(organizationId, row.projectId, trx);
  return { ...row, isClosed: row.closedAt !== null, fluid: loopFluid(row.fluid), tolerances };
}

/** The station as the round's revision asks it; one of another loop, revision or organisation is not there. */
export async function readStation(
  trx: Knex.Transaction,
  organizationId: string,
  round: RoundContext,
  stationId: string,
): Promise<StationContext> {
  const station = await trx('station_designs as design')
    .join('stations', (join) => join.on('stations.organization_id', 'design.organization_id').on('stations.id', 'design.station_id'))
    .where({
      'design.organization_id': organizationId,
      'design.revision_id': round.revisionId,
      'design.station_id': stationId,
      'stations.loop_id': round.loopId,
    })
    .first({
      tag: 'design.tag',
      kind: 'stations.kind',
      designFlowLs: 'design.design_flow_ls',
      kvTable: 'design.kv_table',
      rank: 'design.rank',
      coilDropKpa: 'design.coil_drop_kpa',
      pumpCurve: 'design.pump_curve',
    });
  if (!station) throw notFound();
  return station;
}

const wantedMeter: Record<InstrumentKind, string> = {
  'differential-pressure': 'Choose a differential pressure meter.',
  flow: 'Choose a flow meter.',
  temperature: 'Choose a thermometer.',
};
const refusedInstrument = (message: string) => new Problem('input-invalid', message, { fields: [{ path: 'instrumentId', message }] });

/** The meter that was read, fit for what was read. */
export async function readInstrument(
  trx: Knex.Transaction,
  organizationId: string,
  { instrumentId, method }: RecordReading,
): Promise<InstrumentContext> {
  const row: (InstrumentContext & { kind: InstrumentKind; isRetired: boolean }) | undefined = await trx('instruments')
    .where({ organization_id: organizationId, id: instrumentId })
    .first({
      kind: 'kind',
      accuracyPercent: 'accuracy_percent',
      accuracyAbsolute: 'accuracy_absolute',
      rangeLow: 'range_low',
      rangeHigh: 'range_high',
      // As text: a date has no hour, and the driver would give it one of this machine's time zone.
      calibrationDueOn: trx.raw("to_char(calibration_due_on, 'YYYY-MM-DD')"),
      isRetired: 'is_retired',
    });
  if (!row) throw refusedInstrument('This meter is not known. Choose another.');
  if (row.isRetired) throw refusedInstrument('This meter is retired. Choose another.');
  const kind = readingMethods[method].instrument;
  if (row.kind !== kind) throw refusedInstrument(wantedMeter[kind]);
  return row;
}

/** What the reading says of the station, worked out by the rules that the tablet uses too. */
export function judgeAtStation(
  input: RecordReading,
  station: StationContext,
  instrument: InstrumentContext,
  round: RoundContext,
): Judgement {
  const band = bandOf(round.tolerances, station);
  const judged = judgeReading(measuredOf(input), { ...station, ...round.fluid, accuracy: instrument, band });
  if (!judged.ok) throw new Problem('input-invalid', judged.message, { fields: [{ path: judged.path, message: judged.message }] });
  return judged;
}
