import type { CommissioningBody, Instrument, RecordReading, Station } from '@/lib/api/commissioning';
import type { ChangeSetting, SettingChange } from '@/lib/api/site';
import type { SiteRecord } from '@/lib/balancing/site-history';
import { flowFromDrop } from '@/lib/commissioning/reading-flow';
import { unitLinkId } from '@/lib/network/drawing-to-document';
import type { KeptEntry } from './kept-entry';

/** The link of the network document that a station's flow is read and set at. */
export const linkOfStation = ({ kind, elementId }: Pick<Station, 'kind' | 'elementId'>): string =>
  kind === 'terminal' ? unitLinkId(elementId, 'balancing') : elementId;

/** A meter's accuracy is taken as a limit that 95 % of its readings keep: two standard deviations (JCGM 100:2008, 4.3). */
const LIMIT_DEVIATIONS = 2;
/** No reading on site is better than this, whatever the certificate says (common practice, no source): it steadies the fit. */
const LEAST_RELATIVE = 0.005;
const LEAST_DROP_KPA = 0.05;
const LEAST_FLOW_LS = 0.001;

type Body = Pick<CommissioningBody, 'stations' | 'readings' | 'rounds' | 'instruments' | 'revision' | 'densityKgM3'>;
type ReadAt = Pick<RecordReading, 'stationId' | 'method' | 'settingTurns' | 'dropKpa' | 'flowLs' | 'instrumentId' | 'takenAt'> & {
  roundId: string;
};

/**
 * Everything that was read and set under the newest revision, as the planner takes it; `kept` is what this device has not sent yet. Entries
 * that were put right do not count.
 */
export function siteRecords(body: Body, changes: readonly SettingChange[], kept: readonly KeptEntry[]): SiteRecord[] {
  const stationOf = new Map(body.stations.map((station) => [station.id, station]));
  const isCurrent = new Set(body.rounds.filter(({ revisionNumber }) => revisionNumber === body.revision?.number).map(({ id }) => id));
  const waiting = kept.filter(({ content }) => 'roundId' in content && isCurrent.has(content.roundId)).map(({ content }) => content);
  const putRight = new Set(waiting.map((content) => (content.kind === 'reading' ? content.body.correctsReadingId : null)));
  const read: ReadAt[] = [
    ...body.readings.filter(({ id, roundId, isCorrected }) => !isCorrected && isCurrent.has(roundId) && !putRight.has(id)),
    ...waiting.flatMap((content) => (content.kind === 'reading' ? [{ ...content.body, roundId: content.roundId }] : [])),
  ];
  const set: (Pick<ChangeSetting, 'stationId' | 'before' | 'after' | 'changedAt'> & { roundId: string })[] = [
    ...changes.filter(({ roundId }) => isCurrent.has(roundId)),
    ...waiting.flatMap((content) => (content.kind === 'setting' ? [{ ...content.body, roundId: content.roundId }] : [])),
  ];
  const meterOf = new Map(body.instruments.map((instrument) => [instrument.id, instrument]));
  return [
    ...read.flatMap((reading): SiteRecord[] => {
      const station = stationOf.get(reading.stationId);
      const record = station && recordOf(reading, station, meterOf.get(reading.instrumentId), body.densityKgM3);
      return record ? [record] : [];
    }),
    ...set.flatMap(({ stationId, before, after, changedAt, roundId }): SiteRecord[] => {
      const station = stationOf.get(stationId);
      return station ? [{ kind: 'set', at: Date.parse(changedAt), pass: roundId, link: linkOfStation(station), before, after }] : [];
    }),
  ];
}

function recordOf(read: ReadAt, station: Station, meter: Instrument | undefined, densityKgM3: number | null): SiteRecord | null {
  const { settingTurns, dropKpa, takenAt, instrumentId, roundId: pass } = read;
  const link = linkOfStation(station);
  const isAcross = read.method === 'valve-drop' && dropKpa !== null && settingTurns !== null && densityKgM3 !== null;
  const found = isAcross ? flowFromDrop({ kvTable: station.kvTable, settingTurns, dropKpa, densityKgM3 }) : null;
  const flowLs = found?.ok ? found.flowLs : read.flowLs;
  // Between measuring points of its own a valve does not show its own drop: the flow is what was measured.
  const isOwnDrop = isAcross && !station.kvTable?.some((point) => point.measuringKv !== undefined && point.measuringKv !== null);
  const part = (meter?.accuracyPercent ?? 0) / 100 / LIMIT_DEVIATIONS;
  const fixed = (meter?.accuracyAbsolute ?? 0) / LIMIT_DEVIATIONS;
  const common = { link, meter: instrumentId, flowRelative: Math.max(isAcross ? part / 2 : part, LEAST_RELATIVE) };
  const at = Date.parse(takenAt);
  if (isOwnDrop)
    return {
      kind: 'reading',
      at,
      pass,
      setting: settingTurns,
      reading: { ...common, quantity: 'dropKpa', value: dropKpa, absolute: Math.max(fixed, LEAST_DROP_KPA) },
    };
  if (flowLs === null) return null;
  // A fixed part in kPa weighs on the flow as q dp / (2 dp).
  const fixedFlow = isAcross ? (fixed * flowLs) / (2 * Math.max(dropKpa, LEAST_DROP_KPA)) : fixed;
  return {
    kind: 'reading',
    at,
    pass,
    setting: isAcross ? settingTurns : null,
    reading: { ...common, quantity: 'flowLs', value: flowLs, absolute: Math.max(fixedFlow, LEAST_FLOW_LS) },
  };
}
