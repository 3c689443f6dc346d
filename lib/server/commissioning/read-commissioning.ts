import { db } from '@/db/knex';
import type { CommissioningBody, Reading } from '@/lib/api/commissioning';
import { defaultTolerances } from '@/lib/api/tolerances';
import { shutOffDropKpa } from '@/lib/commissioning/shut-off';
import { inHandOrder } from '@/lib/commissioning/walking-order';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { Access } from '../auth/authorize';
import { listInstruments } from '../instruments/list-instruments';
import { bandOf, stripsOf } from '../loops/loop-strips';
import { notFound } from '../problem';
import { readTolerances } from '../projects/read-tolerances';
import { entriesOf, stationsOf, type Entry } from '../reports/measured-rows';
import { loopFluid } from './loop-fluid';
import { readRounds } from './read-rounds';

/** All that the tablet needs for one loop: the newest revision's stations, every round and entry, the meters at hand. */
export async function readCommissioning({ person }: Access, loopId: string): Promise<CommissioningBody> {
  const { organizationId } = person;
  const loop = await db()('loops').where({ organization_id: organizationId, id: loopId }).first('project_id');
  if (!loop) throw notFound();
  const revision: { id: string; number: number; document: Pick<NetworkDocument, 'fluid' | 'links'> } | undefined = await db()('revisions')
    .where({ organization_id: organizationId, loop_id: loopId })
    .orderBy('number', 'desc')
    .first({ id: 'id', number: 'number', document: 'network_document' });
  const [tolerances, stations, rounds, entries, instruments, strips, order] = await Promise.all([
    readTolerances(organizationId, loop.project_id),
    revision ? stationsOf(db(), organizationId, revision.id) : [],
    readRounds(db(), organizationId, { 'rounds.loop_id': loopId }),
    entriesOf(db(), organizationId, { 'stations.loop_id': loopId }),
    listInstruments(organizationId),
    stripsOf(organizationId, [loopId]),
    db()('station_orders').where({ organization_id: organizationId, loop_id: loopId }).select('station_id', 'position'),
  ]);
  const fluid = revision ? loopFluid(revision.document.fluid) : null;
  return {
    revision: revision ? { id: revision.id, number: revision.number } : null,
    densityKgM3: fluid?.densityKgM3 ?? null,
    specificHeatKJKgK: fluid?.specificHeatKJKgK ?? null,
    pumpShutOffKpa: revision && fluid ? shutOffDropKpa(revision.document.links, fluid.densityKgM3) : null,
    tolerances: tolerances.length ? tolerances : defaultTolerances,
    stations: inHandOrder(stations, new Map(order.map((row) => [row.station_id, row.position]))),
    rounds,
    readings: entries.map(readingOf),
    instruments,
    strip: strips.get(loopId)?.ticks ?? [],
    band: bandOf(tolerances),
  };
}

/** An entry without what only the report shows of it. */
export const readingOf = ({ designFlowLs: _, tag: __, ...reading }: Entry): Reading => reading;
