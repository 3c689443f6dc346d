import { db } from '@/db/knex';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import type { ToleranceRule } from '@/lib/api/projects';
import { bandOf as bandOfStation } from '@/lib/api/tolerances';

export interface LoopStrip {
  ticks: StripTick[];
  revisionNumber: number;
}

/**
 * The flow strips of loops, in one query for all of them: the terminals of each loop's newest revision near to far, each with
 * the newest reading that no later entry puts right. A reading counts for as long as the design flow it was judged against
 * stays; where a revision asks for another flow the terminal is not measured yet. A loop without a revision is left out.
 */
export async function stripsOf(organizationId: string, loopIds: string[]): Promise<Map<string, LoopStrip>> {
  const newest = db()('revisions')
    .where({ organization_id: organizationId })
    .whereIn('loop_id', loopIds)
    .distinctOn('loop_id')
    .orderBy([{ column: 'loop_id' }, { column: 'number', order: 'desc' }])
    .select('organization_id', 'id', 'loop_id', 'number');

  const counting = db()('readings')
    .join('stations', (join) => join.on('stations.organization_id', 'readings.organization_id').on('stations.id', 'readings.station_id'))
    .join('station_designs as asked', (join) =>
      join
        .on('asked.organization_id', 'readings.organization_id')
        .on('asked.revision_id', 'readings.revision_id')
        .on('asked.station_id', 'readings.station_id'),
    )
    .leftJoin('readings as later', (join) =>
      join.on('later.organization_id', 'readings.organization_id').on('later.corrects_reading_id', 'readings.id'),
    )
    .where({ 'readings.organization_id': organizationId })
    .whereIn('stations.loop_id', loopIds)
    .whereNull('later.id')
    .distinctOn('readings.station_id')
    .orderBy([{ column: 'readings.station_id' }, { column: 'readings.taken_at', order: 'desc' }, { column: 'readings.id', order: 'desc' }])
    .select('readings.station_id', 'readings.percent_of_design', 'readings.verdict', 'asked.design_flow_ls');

  const rows: { loopId: string; number: number; tag: string | null; percentOfDesign: number | null; verdict: StripTick['verdict'] }[] =
    await db()
      .with('newest', newest)
      .with('counting', counting)
      .from('newest')
      .leftJoin('stations', (join) =>
        join
          .on('stations.organization_id', 'newest.organization_id')
          .on('stations.loop_id', 'newest.loop_id')
          .andOnVal('stations.kind', 'terminal'),
      )
      .leftJoin('station_designs as design', (join) =>
        join
          .on('design.organization_id', 'newest.organization_id')
          .on('design.revision_id', 'newest.id')
          .on('design.station_id', 'stations.id'),
      )
      .leftJoin('counting', (join) =>
        join.on('counting.station_id', 'design.station_id').on('counting.design_flow_ls', 'design.design_flow_ls'),
      )
      .orderBy(['newest.loop_id', 'design.walking_order'])
      .select({
        loopId: 'newest.loop_id',
        number: 'newest.number',
        tag: 'design.tag',
        percentOfDesign: 'counting.percent_of_design',
        verdict: 'counting.verdict',
      });

  const strips = new Map<string, LoopStrip>();
  for (const { loopId, number, tag, percentOfDesign, verdict } of rows) {
    const strip = strips.get(loopId) ?? { ticks: [], revisionNumber: number };
    strips.set(loopId, strip);
    // A station of an earlier revision, or none at all, has no design in this one.
    if (tag !== null) strip.ticks.push({ tag, percentOfDesign, verdict });
  }
  return strips;
}

/** The band behind the strip: that of the terminals, as per cent of design. */
export function bandOf(rules: ToleranceRule[]): StripBand {
  const { lowerPercent, upperPercent } = bandOfStation(rules, { kind: 'terminal' });
  return { lowerPercent: 100 + lowerPercent, upperPercent: 100 + upperPercent };
}
