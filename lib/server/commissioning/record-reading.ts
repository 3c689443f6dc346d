import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { Reading, RecordReading } from '@/lib/api/commissioning';
import { isOverdue } from '@/lib/commissioning/calibration';
import { isOutOfRange, measuredOf } from '@/lib/commissioning/measured-of';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { entriesOf } from '../reports/measured-rows';
import { judgeAtStation, readInstrument, readRound, readStation } from './reading-context';
import { readingOf } from './read-commissioning';
import { refuseFuture } from './refuse-future';
import { refuseOtherContent } from './same-reading';

/**
 * Stores a reading once, however often it is sent. Flow, per cent, uncertainty and verdict are worked out here from what was read, against
 * the round's own revision. The round's row is held shared, so it cannot be closed between the look at it and the entry.
 */
export async function recordReading(access: Access, roundId: string, input: RecordReading): Promise<Reading> {
  const { organizationId } = access.person;
  return db().transaction(async (trx) => {
    const round = await readRound(trx, organizationId, roundId);
    if (!(await isStored(trx, access, roundId, input))) {
      if (round.isClosed)
        throw new Problem('round-closed', `Round ${round.number} is closed. Keep this reading in the round that is open now.`);
      refuseFuture(input.takenAt, input.clockOffsetMs);
      const station = await readStation(trx, organizationId, round, input.stationId);
      const instrument = await readInstrument(trx, organizationId, input);
      if (input.correctsReadingId !== null)
        await refuseUncorrectable(trx, organizationId, roundId, input.stationId, input.correctsReadingId);
      const judged = judgeAtStation(input, station, instrument, round);
      const isNew = await insert(trx, {
        organization_id: organizationId,
        id: input.id,
        round_id: roundId,
        revision_id: round.revisionId,
        station_id: input.stationId,
        method: input.method,
        setting_turns: input.settingTurns,
        drop_kpa: input.dropKpa,
        kv: judged.kv,
        flow_ls: judged.flowLs,
        percent_of_design: judged.percentOfDesign,
        uncertainty_percent: judged.uncertaintyPercent,
        verdict: judged.verdict,
        entered: JSON.stringify(input.entered),
        instrument_id: input.instrumentId,
        heat_kw: input.heatKw,
        supply_c: input.supplyC,
        return_c: input.returnC,
        pump_speed: input.pumpSpeed,
        instrument_overdue: isOverdue(instrument, new Date(Date.parse(input.takenAt) + (input.clockOffsetMs ?? 0))),
        instrument_out_of_range: isOutOfRange(measuredOf(input), instrument),
        corrects_reading_id: input.correctsReadingId,
        note: input.note,
        taken_by: access.person.id,
        taken_at: new Date(input.takenAt),
        clock_offset_ms: input.clockOffsetMs,
      });
      if (isNew) {
        const verb = input.correctsReadingId === null ? 'recorded a reading at' : 'corrected a reading at';
        await recordActivity(trx, access, {
          verb,
          subject: `${station.tag}, round ${round.number} of ${round.loopName}`,
          loopId: round.loopId,
        });
      } else {
        // Another request with the same id was faster; what it stored must be this.
        await isStored(trx, access, roundId, input);
      }
    }
    const [stored] = await entriesOf(trx, organizationId, { 'readings.id': input.id });
    return readingOf(stored!);
  });
}

/** Whether this very reading is in the record already; another one under its id is refused. */
async function isStored(trx: Knex.Transaction, { person }: Access, roundId: string, input: RecordReading): Promise<boolean> {
  const row = await trx('readings').where({ organization_id: person.organizationId, id: input.id }).first({
    roundId: 'round_id',
    stationId: 'station_id',
    method: 'method',
    settingTurns: 'setting_turns',
    dropKpa: 'drop_kpa',
    flowLs: 'flow_ls',
    heatKw: 'heat_kw',
    supplyC: 'supply_c',
    returnC: 'return_c',
    pumpSpeed: 'pump_speed',
    entered: 'entered',
    instrumentId: 'instrument_id',
    takenAt: 'taken_at',
    takenBy: 'taken_by',
    note: 'note',
    correctsReadingId: 'corrects_reading_id',
  });
  if (row) refuseOtherContent(row, { ...input, roundId, takenBy: person.id });
  return Boolean(row);
}

/** False where a row of this id is there already. */
async function insert(trx: Knex.Transaction, row: Record<string, unknown>): Promise<boolean> {
  try {
    const inserted = await trx('readings').insert(row).onConflict(['organization_id', 'id']).ignore().returning('id');
    return inserted.length === 1;
  } catch (error) {
    if (error instanceof Error && 'constraint' in error && error.constraint === 'readings_one_correction') throw corrected();
    throw error;
  }
}

/** Anyone on the project may put right what stands at this station in this round, once. */
async function refuseUncorrectable(
  trx: Knex.Transaction,
  organizationId: string,
  roundId: string,
  stationId: string,
  readingId: string,
): Promise<void> {
  const reading = await trx('readings')
    .where({ organization_id: organizationId, id: readingId, round_id: roundId, station_id: stationId })
    .first('id');
  if (!reading) throw notFound();
  const later = await trx('readings').where({ organization_id: organizationId, corrects_reading_id: readingId }).first('id');
  if (later) throw corrected();
}

const corrected = () => new Problem('reading-corrected', 'This entry has been put right already. Look at the newer one, and correct that.');
