import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import { flowThroughValveLs } from '@/lib/hydraulics/valve-coefficient';
import { loopHierarchy } from './hierarchy';
import { documentAt, type LoopReading, type ReadingRound, settingIn } from './readings';

/** A round of readings against what the design would show at the same settings: ratios, as the signatures of faults are told by ratios. */
export interface LoopSignature {
  /** Measured flow over the design model's, of each terminal read at its valve or directly, by the reading's link. */
  terminals: Map<string, number>;
  /** Of the total flow and of what the pump raises, where read. */
  total: number | null;
  pumpHead: number | null;
  /** Measured total over the sum of the terminals', where all were read. */
  totalOverSum: number | null;
  /** Middle of the terminals' ratios, and the largest distance of those within the bulk from it. */
  middle: number | null;
  hasOneRatio: boolean;
  pump: string | null;
}

/** Ratios within this part of their middle are one ratio. */
const ONE_RATIO = 0.06;
const BULK = 0.7;

export function loopSignature(document: NetworkDocument, round: ReadingRound): LoopSignature {
  const at = documentAt(document, round.settings);
  const solved = solve(at);
  const flowOf = new Map(solved.links.map((link) => [link.id, Math.abs(link.flowLs)]));
  const dropOf = new Map(solved.links.map((link) => [link.id, Math.abs(link.dropKpa)]));
  const links = new Map(document.links.map((link) => [link.id, link]));
  const { stations, top, valveOf } = loopHierarchy(document);
  const own = new Set([...valveOf.keys(), ...valveOf.values()]);
  const pump = document.links.find((link) => link.kind === 'pump')?.id ?? null;

  const measured = (reading: LoopReading) => {
    const link = links.get(reading.link);
    if (reading.quantity === 'flowLs') return reading.value;
    return link?.kind === 'balancingValve'
      ? flowThroughValveLs(kvAtSetting(link.kvTable, settingIn(round.settings, link)), reading.value, solved.fluid.densityKgM3)
      : null;
  };
  const terminals = new Map<string, number>();
  let sum = 0;
  let total: number | null = null;
  let totalLs = 0;
  let pumpHead: number | null = null;
  for (const reading of round.readings) {
    const flow = measured(reading);
    const expected = flowOf.get(reading.link) ?? 0;
    if (reading.link === pump && reading.quantity === 'dropKpa') pumpHead = reading.value / (dropOf.get(reading.link) || 1);
    if (flow === null || expected <= 0) continue;
    if (own.has(reading.link)) {
      terminals.set(reading.link, flow / expected);
      sum += flow;
    } else if (reading.link === pump || stations.get(reading.link)?.terminals.length === top?.terminals.length) {
      total = flow / expected;
      totalLs = flow;
    }
  }
  const sorted = [...terminals.values()].sort((a, b) => a - b);
  const middle = sorted.length ? sorted[sorted.length >> 1] : null;
  const alike = middle === null ? 0 : sorted.filter((ratio) => Math.abs(ratio / middle - 1) <= ONE_RATIO).length;
  const isWhole = terminals.size > 0 && terminals.size === (top?.terminals.length ?? -1);
  return {
    terminals,
    total,
    pumpHead,
    totalOverSum: total !== null && isWhole && sum > 0 ? totalLs / sum : null,
    middle,
    hasOneRatio: sorted.length > 1 && alike >= BULK * sorted.length,
    pump,
  };
}
