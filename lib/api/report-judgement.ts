import type { BalancedPump, BalancedValve } from '@/lib/hydraulics/types';
import { verdictOf as verdictInBand, type Verdict } from '@/lib/commissioning/verdict';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import type { ReportContent, ReportStation } from './reports';
import type { StationRank, ToleranceRule } from './projects';

/** The band of a station as the report itself states it: of its rank, else of its kind. */
export function bandFor(
  content: ReportContent,
  { kind, rank }: Pick<ReportStation, 'kind'> & { rank?: StationRank },
): ToleranceRule | undefined {
  const ofKind = content.tolerances.filter(({ stationKind }) => stationKind === kind);
  // Reports that were accepted before there were ranks name none.
  return ofKind.find((rule) => rule.rank === rank) ?? ofKind.find((rule) => (rule.rank ?? 'all') === 'all');
}

/**
 * The verdict on a station's counting entry by the bands that the report states, so that page, workbook and signature speak of the
 * same bands even where a band was changed after the reading. Without a band: the verdict given when it was taken.
 */
export function verdictOf(content: ReportContent, station: ReportStation): Verdict | null {
  const { reading } = station;
  if (!reading) return null;
  const band = bandFor(content, station);
  if (!band) return reading.verdict;
  return verdictInBand(reading.percentOfDesign, band);
}

export const terminalsOf = (content: ReportContent): ReportStation[] => content.stations.filter(({ kind }) => kind === 'terminal');

/** The flow strip of what is handed over, and its band as per cent of design. */
export function stripOfReport(content: ReportContent): { strip: StripTick[]; band: StripBand } {
  const band = bandFor(content, { kind: 'terminal' });
  return {
    strip: terminalsOf(content).map((station) => ({
      tag: station.tag,
      percentOfDesign: station.reading?.percentOfDesign ?? null,
      verdict: verdictOf(content, station),
    })),
    band: { lowerPercent: 100 + (band?.lowerPercent ?? 0), upperPercent: 100 + (band?.upperPercent ?? 0) },
  };
}

export interface ReportSummary {
  terminals: number;
  within: number;
  low: number;
  high: number;
  notMeasured: ReportStation[];
  /** The terminal furthest from design, either way. */
  worst: ReportStation | null;
}

/** How many terminals stand where, and which is furthest from design. */
export function summaryOf(content: ReportContent): ReportSummary {
  const terminals = terminalsOf(content);
  const counted = (verdict: Verdict) => terminals.filter((station) => verdictOf(content, station) === verdict).length;
  const distance = ({ reading }: ReportStation) => (reading ? Math.abs(reading.percentOfDesign - 100) : -1);
  const worst = terminals.reduce<ReportStation | null>((far, it) => (distance(it) > (far ? distance(far) : -1) ? it : far), null);
  return {
    terminals: terminals.length,
    within: counted('within'),
    low: counted('low'),
    high: counted('high'),
    notMeasured: terminals.filter(({ reading }) => !reading),
    worst,
  };
}

export interface ReportValve {
  station: ReportStation;
  valve: BalancedValve;
}

/** Each balancing valve with the station at it; a terminal's valve has the id of its piece with the part behind a colon. */
export function valvesOf({ stations, balance }: ReportContent): ReportValve[] {
  const valveOf = new Map(balance.valves.map((valve) => [valve.id.split(':')[0], valve]));
  return stations.flatMap((station) => {
    const valve = valveOf.get(station.elementId);
    return valve ? [{ station, valve }] : [];
  });
}

export interface ReportPump {
  station: ReportStation;
  duty: BalancedPump;
}

/** Each pump with its duty at design flow. */
export function pumpsOf({ stations, balance }: ReportContent): ReportPump[] {
  const dutyOf = new Map(balance.pumps.map((pump) => [pump.id, pump]));
  return stations.flatMap((station) => {
    const duty = dutyOf.get(station.elementId);
    return duty ? [{ station, duty }] : [];
  });
}
