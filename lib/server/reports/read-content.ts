import type { Knex } from 'knex';
import type { ReportContent } from '@/lib/api/reports';
import { fluidProperties } from '@/lib/hydraulics/fluids';
import type { Fluid } from '@/lib/hydraulics/types';
import type { Drawing } from '@/lib/network/drawing';
import { readRounds } from '../commissioning/read-rounds';
import { listInstruments } from '../instruments/list-instruments';
import { readTolerances } from '../projects/read-tolerances';
import { readSite } from '../site/read-site';
import { entriesOf, stationsOf, type Entry } from './measured-rows';
import { siteContent } from './site-content';

export interface RevisionContent {
  revisionId: string;
  content: ReportContent;
}

/** What would be handed over now: the newest revision, its stations with the entry that counts, and all that was measured. Null before a revision. */
export async function readContent(connection: Knex, organizationId: string, loopId: string): Promise<RevisionContent | null> {
  const head = await headOf(connection, organizationId, loopId);
  if (!head) return null;
  const entries = await entriesOf(connection, organizationId, { 'stations.loop_id': loopId });
  const counting = countingEntries(entries);
  const stations = await stationsOf(connection, organizationId, head.revisionId);
  const rounds = await readRounds(connection, organizationId, { 'rounds.loop_id': loopId });
  const instruments = await listInstruments(organizationId, connection);
  const site = await readSite(organizationId, loopId, connection);
  return {
    revisionId: head.revisionId,
    content: {
      organization: head.organization,
      project: { name: head.project, client: head.client, building: head.building },
      loop: { name: head.loop, service: head.service },
      revision: {
        number: head.number,
        note: head.note,
        issuedBy: head.issuedBy,
        issuedAt: head.issuedAt.toISOString(),
        changes: (head.changes as { message: string }[]).map(({ message }) => message),
      },
      fluid: fluidOf(head.drawing, head.fluid),
      tolerances: await readTolerances(organizationId, head.projectId, connection),
      stations: stations.map((station) => {
        const entry = counting.get(station.id);
        return { ...station, reading: entry && entry.designFlowLs === station.designFlowLs ? withoutDesign(entry) : null };
      }),
      rounds: rounds.filter(({ id }) => entries.some(({ roundId }) => roundId === id)).map(({ closedAt: _, ...round }) => round),
      instruments: instruments
        .filter(({ id }) => entries.some(({ instrumentId }) => instrumentId === id))
        .map(({ isRetired: _, ...instrument }) => instrument),
      readings: entries.map(withoutDesign),
      balance: head.balance,
      site: siteContent(site, (stationId) => stations.find(({ id }) => id === stationId)?.tag ?? null),
    },
  };
}

const withoutDesign = ({ designFlowLs: _, ...entry }: Entry) => entry;

/** Entries come oldest first, so the last one of a station that nothing puts right is the one that counts. */
const countingEntries = (entries: Entry[]): Map<string, Entry> =>
  new Map(entries.filter(({ isCorrected }) => !isCorrected).map((entry) => [entry.stationId, entry]));

function headOf(connection: Knex, organizationId: string, loopId: string) {
  return connection('revisions')
    .join('loops', (join) => join.on('loops.organization_id', 'revisions.organization_id').on('loops.id', 'revisions.loop_id'))
    .join('projects', (join) => join.on('projects.organization_id', 'loops.organization_id').on('projects.id', 'loops.project_id'))
    .join('organizations', 'organizations.organization_id', 'revisions.organization_id')
    .join('people', (join) => join.on('people.organization_id', 'revisions.organization_id').on('people.id', 'revisions.issued_by'))
    .where({ 'revisions.organization_id': organizationId, 'revisions.loop_id': loopId })
    .orderBy('revisions.number', 'desc')
    .first({
      revisionId: 'revisions.id',
      number: 'revisions.number',
      note: 'revisions.note',
      issuedBy: 'people.name',
      issuedAt: 'revisions.issued_at',
      changes: 'revisions.changes',
      drawing: 'revisions.drawing',
      fluid: connection.raw("revisions.network_document -> 'fluid'"),
      balance: 'revisions.balance',
      organization: 'organizations.name',
      projectId: 'projects.id',
      project: 'projects.name',
      client: 'projects.client',
      building: 'projects.building',
      loop: 'loops.name',
      service: 'loops.service',
    });
}

function fluidOf({ fluid }: Drawing, solved: Fluid): ReportContent['fluid'] {
  const found = fluidProperties(solved);
  // The revision was solved with this fluid, so its properties are known.
  if (!found.ok) throw new Error(`The fluid of an issued revision is out of range: ${found.error.message}`);
  const { densityKgM3, viscosityMPaS } = found.properties;
  return {
    medium: fluid.medium,
    massFraction: fluid.massFraction,
    supplyC: fluid.supplyC,
    returnC: fluid.returnC,
    densityKgM3,
    viscosityMPaS,
  };
}
