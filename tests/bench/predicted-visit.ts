import { type FittedLoop, fitLoop } from '@/lib/balancing/fit-loop';
import { usualPriors } from '@/lib/balancing/fit/unknowns';
import { predictSettings } from '@/lib/balancing/predict-settings';
import type { LoopSettings, ReadingRound } from '@/lib/balancing/readings';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { valveOf } from '../site/virtual-site';
import type { CountedSite } from './visit-count';

const MOST_ROUNDS = 5;

/** Read everything, set everything, read everything, then only what is still to be changed. Answers the places it named as faulty. */
export function visitAsPredicted(document: NetworkDocument, site: CountedSite): Set<string> {
  const stations = document.links.flatMap((link) => (link.kind === 'balancingValve' || link.kind === 'pump' ? [link.id] : []));
  const named = new Set<string>();
  const rounds: ReadingRound[] = [];
  let settings: LoopSettings = {};
  let toRead = stations;
  let fitted: FittedLoop | undefined;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    rounds.push({ settings, readings: toRead.map((station) => site.read(station)) });
    fitted = fitLoop(document, rounds, usualPriors, fitted);
    for (const fault of fitted.faults) named.add(fault.link.startsWith('T') ? valveOf(fault.link) : fault.link);
    if (process.env.SHOW) console.log(round, fitted.faults.map((f) => `${f.cause} ${f.link} r${f.round} ${f.logOdds.toFixed(1)} ×${f.factor.toFixed(2)}`).join('; '));
    const prediction = predictSettings(fitted);
    const changed = prediction.settings.filter((each) => each.isChanged);
    if (process.env.SHOW) console.log('changes', changed.length, 'outside', prediction.expectedOutside.toFixed(2), prediction.heldBack, changed.slice(0, 20).map((c) => `${c.link} ${c.from}>${c.setting}`).join(' '));
    if (!changed.length) break;
    settings = { ...settings };
    for (const { link, setting } of changed) settings[link] = site.set(link, setting);
    // The second round proves every station; later ones only what was touched.
    toRead = round === 0 ? stations : changed.map((each) => each.link);
  }
  return named;
}
