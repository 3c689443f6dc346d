import { prepareNetwork } from '@/lib/hydraulics/prepare';
import type { LinkKind, NetworkDocument } from '@/lib/hydraulics/types';
import type { ReadingRound } from '../readings';

/**
 * What is believed before anything is measured: standard deviations of natural logarithms, that is, parts of one. Resistances as built
 * spread log-normally about the design's.
 */
export interface Priors {
  /** Resistance of the pipes and coil in series with a terminal, and of all other runs. */
  terminalRun: number;
  mainRun: number;
  /** Kv of a balancing valve against its chart. */
  chart: number;
  /** Head of a pump against its curve. */
  pump: number;
  /** Flow that a meter shows against the true one. */
  meter: number;
}

export const usualPriors: Priors = { terminalRun: 0.3, mainRun: 0.15, chart: 0.01, pump: 0.03, meter: 0.01 };

/**
 * One unknown of the fit, a natural logarithm of a factor, 0 by design:
 * - `run`: resistance of all pipes, coils, control valves and strainers in one series run (they share one flow, so only their sum can be told);
 * - `chart`: Kv of a balancing valve over that of its chart, at every setting;
 * - `setting`: the same while the valve stood at one recorded setting, for a valve that does not stand where it was noted;
 * - `pump`: head of a pump over its curve's;
 * - `meter`: flow shown over true flow.
 */
export interface Unknown {
  kind: 'run' | 'chart' | 'setting' | 'pump' | 'meter';
  /** Link that names it (the run's terminal if it has one), or the meter. */
  id: string;
  /** Document positions of its links. */
  links: number[];
  /** Rounds in which it acts. */
  rounds: boolean[];
  /** Prior standard deviation; 0 holds it at 0. */
  deviation: number;
}

const passive: ReadonlySet<LinkKind> = new Set(['pipe', 'terminal', 'resistance', 'controlValve', 'checkValve']);

export function unknownsOf(document: NetworkDocument, rounds: ReadingRound[], priors: Priors): Unknown[] {
  const always = rounds.map(() => true);
  const unknowns: Unknown[] = [];
  for (const links of seriesRuns(document)) {
    const terminal = links.find((at) => document.links[at].kind === 'terminal');
    const deviation = terminal === undefined ? priors.mainRun : priors.terminalRun;
    unknowns.push({ kind: 'run', id: document.links[terminal ?? links[0]].id, links, rounds: always, deviation });
  }
  document.links.forEach((link, at) => {
    if (link.kind === 'pump') unknowns.push({ kind: 'pump', id: link.id, links: [at], rounds: always, deviation: priors.pump });
    if (link.kind !== 'balancingValve') return;
    unknowns.push({ kind: 'chart', id: link.id, links: [at], rounds: always, deviation: priors.chart });
    for (const stretch of unchangedStretches(rounds, link.id, link.setting)) {
      unknowns.push({ kind: 'setting', id: link.id, links: [at], rounds: stretch, deviation: 0 });
    }
  });
  for (const meter of new Set(rounds.flatMap((round) => round.readings.map((reading) => reading.meter)))) {
    unknowns.push({ kind: 'meter', id: meter, links: [], rounds: always, deviation: priors.meter });
  }
  return unknowns;
}

/** Passive links of each chain of the network. */
function seriesRuns(document: NetworkDocument): number[][] {
  const { chains, position } = prepareNetwork(document);
  const runs: number[][] = [];
  for (let c = 0; c < chains.count; c++) {
    const links = Array.from(chains.member.subarray(chains.start[c], chains.start[c + 1]), (i) => position[i]).filter((at) =>
      passive.has(document.links[at].kind),
    );
    if (links.length) runs.push(links);
  }
  return runs;
}

/** Rounds between which a valve was not set. */
function unchangedStretches(rounds: ReadingRound[], id: string, designSetting?: number): boolean[][] {
  const stretches: boolean[][] = [];
  let before: number | undefined | null = null;
  rounds.forEach(({ settings, setAgain }, r) => {
    const setting = settings[id] ?? designSetting;
    if (before === null || setting !== before || setAgain?.includes(id)) stretches.push(rounds.map(() => false));
    stretches[stretches.length - 1][r] = true;
    before = setting;
  });
  return stretches;
}
