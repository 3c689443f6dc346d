import { v7 as uuidv7 } from 'uuid';
import type { Knex } from 'knex';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import { solve } from '@/lib/hydraulics/solve';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { Access } from '@/lib/server/auth/authorize';
import { closeRound } from '@/lib/server/commissioning/close-round';
import { recordReading } from '@/lib/server/commissioning/record-reading';
import { startRound } from '@/lib/server/commissioning/start-round';
import { unitLinkId } from '@/lib/network/drawing-to-document';

interface DemoStation {
  id: string;
  elementId: string;
  kind: 'terminal' | 'branch' | 'pump';
  settingTurns: number | null;
  kvTable: { setting: number; kv: number }[] | null;
}

export interface DemoMeters {
  pressureId: string;
  flowId: string;
}

/** Repeatable noise between -1 and 1 (mulberry32). */
function noise(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 31 - 1;
  };
}

/** The loop as it was built: pipes and coils are never quite those of the design, and one strainer is half blocked. */
function asBuilt(document: NetworkDocument): NetworkDocument {
  const error = noise(20261201);
  return {
    ...document,
    links: document.links.map((link) => {
      if (link.kind === 'terminal') return { ...link, designDropKpa: link.designDropKpa * (1 + 0.25 * error()) };
      if (link.kind === 'pipe') return { ...link, roughnessMm: link.roughnessMm * (1.6 + error()) };
      if (link.id === unitLinkId('unit-B2-3', 'strainer') && link.kind === 'resistance') return { ...link, kv: link.kv! * 0.2 };
      return link;
    }),
  };
}

const withSettings = (document: NetworkDocument, settingOf: (linkId: string) => number | undefined): NetworkDocument => ({
  ...document,
  links: document.links.map((link) => (link.kind === 'balancingValve' ? { ...link, setting: settingOf(link.id) ?? link.setting } : link)),
});

/** Two rounds at the chilled loop: as found with every valve open, then at the issued settings, two thirds done. */
export async function measureDemo(trx: Knex.Transaction, access: Access, loopId: string, meters: DemoMeters): Promise<void> {
  const { organizationId } = access.person;
  const revision = await trx('revisions').where({ organization_id: organizationId, loop_id: loopId }).first('id', 'network_document');
  const stations: DemoStation[] = await trx('stations')
    .join('station_designs', (join) =>
      join.on('station_designs.organization_id', 'stations.organization_id').on('station_designs.station_id', 'stations.id'),
    )
    .where({ 'stations.organization_id': organizationId, 'station_designs.revision_id': revision.id })
    .orderBy('walking_order')
    .select({
      id: 'stations.id',
      elementId: 'stations.element_id',
      kind: 'stations.kind',
      settingTurns: 'setting_turns',
      kvTable: 'kv_table',
    });
  const built = asBuilt(revision.network_document);
  const linkOf = ({ kind, elementId }: DemoStation) => (kind === 'terminal' ? unitLinkId(elementId, 'balancing') : elementId);
  const issued = new Map(stations.map((station) => [linkOf(station), Number(station.settingTurns?.toFixed(1) ?? 0)]));
  const widest = new Map(stations.map((station) => [linkOf(station), station.kvTable?.at(-1)?.setting ?? 0]));
  const error = noise(7);
  let minutesAgo = 26 * 60;

  const round = async (purpose: string, settings: Map<string, number>, count: number): Promise<string> => {
    const { id } = await startRound(access, loopId, { id: uuidv7(), purpose, openChecksReason: 'The checks were kept on paper' });
    const flows = new Map(solve(withSettings(built, (linkId) => settings.get(linkId))).links.map((link) => [link.id, link.flowLs]));
    for (const station of stations.slice(0, count)) {
      const flowLs = flows.get(linkOf(station))! * (1 + 0.015 * error());
      const settingTurns = settings.get(linkOf(station))!;
      const kv = station.kvTable && kvAtSetting(station.kvTable, settingTurns);
      const dropKpa = kv === null ? null : Math.max(0.1, Number((dropAcrossValveKpa(kv, flowLs) + 0.1 * error()).toFixed(1)));
      minutesAgo -= 4;
      await recordReading(access, id, {
        id: uuidv7(),
        stationId: station.id,
        method: dropKpa === null ? 'direct-flow' : 'valve-drop',
        settingTurns: dropKpa === null ? null : settingTurns,
        dropKpa,
        flowLs: dropKpa === null ? Number(flowLs.toFixed(2)) : null,
        heatKw: null,
        supplyC: null,
        returnC: null,
        pumpSpeed: null,
        entered:
          dropKpa === null
            ? [{ quantity: 'flow', text: flowLs.toFixed(2), unit: 'L/s' }]
            : [
                { quantity: 'setting', text: String(settingTurns), unit: 'turns' },
                { quantity: 'pressure', text: String(dropKpa), unit: 'kPa' },
              ],
        instrumentId: dropKpa === null ? meters.flowId : meters.pressureId,
        takenAt: new Date(Date.now() - minutesAgo * 60_000).toISOString(),
        clockOffsetMs: 0,
        note: '',
        correctsReadingId: null,
      });
    }
    return id;
  };

  await closeRound(access, await round('As found, all valves open', widest, stations.length));
  minutesAgo = 3 * 60;
  await round('At the issued settings', issued, Math.round((stations.length * 2) / 3));
}
