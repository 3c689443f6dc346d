import { nextProportionalStep } from '@/lib/balancing/proportional';
import type { SiteEvent } from '@/lib/balancing/proportional-log';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { CountedSite } from './visit-count';

const MOST_STEPS_PER_STATION = 40;

/** Does one step after another as the procedure leads. Answers the places it named as faulty. */
export function visitProportionally(document: NetworkDocument, site: CountedSite): Set<string> {
  const events: SiteEvent[] = [];
  const named = new Set<string>();
  const most = MOST_STEPS_PER_STATION * document.links.length;
  for (let k = 0; k < most; k++) {
    const { step, lookInto } = nextProportionalStep({ document, events });
    for (const valve of lookInto) named.add(valve);
    if (step.kind === 'done') return named;
    if (step.kind === 'read') events.push({ kind: 'reading', reading: site.read(step.link) });
    else events.push({ kind: 'set', link: step.link, setting: site.set(step.link, step.kind === 'set-pump' ? step.speed : step.setting) });
  }
  throw new Error(`the proportional procedure has not ended after ${most} steps`);
}
