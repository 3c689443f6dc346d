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
  let setAgain: string[] = [];
  let toRead = stations;
  let fitted: FittedLoop | undefined;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    rounds.push({ settings, setAgain, readings: toRead.map((station) => site.read(station)) });
    fitted = fitLoop(document, rounds, usualPriors, fitted);
    for (const fault of fitted.faults) named.add(fault.link.startsWith('T') ? valveOf(fault.link) : fault.link);
    const prediction = predictSettings(fitted);
    const changed = prediction.settings.filter((each) => each.isChanged);
    if (!changed.length) break;
    settings = { ...settings };
    setAgain = changed.filter((each) => each.setting === each.from).map((each) => each.link);
    for (const { link, setting } of changed) settings[link] = site.set(link, setting);
    // The second round proves every station; later ones only what was touched.
    toRead = round === 0 ? stations : changed.map((each) => each.link);
  }
  return named;
}
