import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { SiteEvent } from './proportional-log';
import { documentAt, type LoopReading, type LoopSettings, type ReadingRound } from './readings';

/** What was written down on site, by the time it was done, ms, and the pass of readings it belongs to. */
export type SiteRecord =
  | {
      kind: 'reading';
      at: number;
      pass: string;
      reading: LoopReading;
      /** Turns or speed that was noted with it; null where nothing was. */
      setting: number | null;
    }
  | { kind: 'set'; at: number; pass: string; link: string; before: number | null; after: number };

export interface SiteHistory {
  /** The loop with its valves and pumps as they stood before the first record, as far as the records tell. */
  document: NetworkDocument;
  events: SiteEvent[];
  /** Readings by how the loop stood, oldest first: those that were taken while nothing was changed stand together. */
  stands: ReadingRound[];
  settings: LoopSettings;
}

/**
 * Puts records in order and works out how the loop stood at each reading. A setting that was noted with a reading and is not the one last known
 * was set in between, even where nobody wrote that down: before the pass began where this is the valve's first record in it (all valves are set, then
 * a new pass is read), just before the reading otherwise. Records of links that the document does not have are left out.
 */
export function siteHistory(document: NetworkDocument, records: readonly SiteRecord[]): SiteHistory {
  const known = new Set(document.links.map((link) => link.id));
  const ordered = withUnwritten(records.filter((record) => known.has(linkOf(record))).sort((a, b) => a.at - b.at));
  const first = firstSettings(document, ordered);
  const settings = { ...first };
  const events: SiteEvent[] = [];
  const stands: ReadingRound[] = [];
  let isChanged = true;
  let setAgain: string[] = [];
  const set = (link: string, setting: number) => {
    if (settings[link] === setting) setAgain.push(link);
    settings[link] = setting;
    events.push({ kind: 'set', link, setting });
    isChanged = true;
  };
  for (const record of ordered) {
    if (record.kind === 'set') {
      if (record.before !== null && settings[record.link] !== record.before) set(record.link, record.before);
      set(record.link, record.after);
      continue;
    }
    const { reading } = record;
    if (isChanged) {
      stands.push({ settings: { ...settings }, readings: [], ...(setAgain.length ? { setAgain } : {}) });
      isChanged = false;
      setAgain = [];
    }
    stands[stands.length - 1].readings.push(reading);
    events.push({ kind: 'reading', reading });
  }
  return { document: documentAt(document, first), events, stands, settings };
}

/** The records with the changes that readings tell of, each at the time it is taken to have been made. */
function withUnwritten(ordered: SiteRecord[]): SiteRecord[] {
  const passStart = new Map<string, number>();
  for (const { pass, at } of ordered) if (!passStart.has(pass)) passStart.set(pass, at);
  const last = new Map<string, { setting: number | null; pass: string }>();
  const unwritten: SiteRecord[] = [];
  for (const record of ordered) {
    const link = linkOf(record);
    const before = last.get(link);
    const told = record.kind === 'set' ? record.after : (record.setting ?? before?.setting ?? null);
    const isNews =
      record.kind === 'reading' && record.setting !== null && before && before.setting !== null && before.setting !== record.setting;
    if (isNews) {
      const at = before.pass === record.pass ? record.at : passStart.get(record.pass)!;
      unwritten.push({ kind: 'set', at, pass: record.pass, link, before: before.setting, after: record.setting! });
    }
    last.set(link, { setting: told, pass: record.pass });
  }
  // A change at the time of a reading was made before it.
  const rank = (record: SiteRecord) => (unwritten.includes(record) ? 0 : 1);
  return [...unwritten, ...ordered].sort((a, b) => a.at - b.at || rank(a) - rank(b));
}

/** Fewer readings than this part of the most that one stand has tell too little of it for the time that its solution takes. */
const WORTH_SOLVING = 0.25;
const MOST_STANDS = 8;

/**
 * The stands that a fit is made of: those with a good part of the loop read, the newest ones, and how many readings were left out because
 * the loop was changed around them. The last entry tells how the loop stands now, even where nothing was read since.
 */
export function standsForFit({ stands, settings }: SiteHistory): { rounds: ReadingRound[]; leftOut: number } {
  const most = Math.max(0, ...stands.map(({ readings }) => readings.length));
  const chosen = stands.filter(({ readings }) => readings.length >= WORTH_SOLVING * most).slice(-MOST_STANDS);
  const used = chosen.reduce((sum, { readings }) => sum + readings.length, 0);
  const all = stands.reduce((sum, { readings }) => sum + readings.length, 0);
  const last = chosen.at(-1);
  const rounds = last && isSame(last.settings, settings) ? chosen : [...chosen, { settings, readings: [] }];
  return { rounds, leftOut: all - used };
}

const linkOf = (record: SiteRecord): string => (record.kind === 'set' ? record.link : record.reading.link);

/** How each valve and pump stood at first: what its first record says, else as in the document. */
function firstSettings(document: NetworkDocument, ordered: readonly SiteRecord[]): LoopSettings {
  const first: LoopSettings = {};
  for (const record of ordered) {
    const link = linkOf(record);
    const told = record.kind === 'set' ? record.before : record.setting;
    if (told !== null && first[link] === undefined) first[link] = told;
  }
  for (const link of document.links) {
    if (first[link.id] !== undefined) continue;
    if (link.kind === 'pump' && link.speed !== undefined) first[link.id] = link.speed;
    if (link.kind === 'balancingValve' && link.setting !== undefined) first[link.id] = link.setting;
  }
  return first;
}

function isSame(a: LoopSettings, b: LoopSettings): boolean {
  const keys = new Set([...Object.keys(a), ...Object.keys(b)]);
  return [...keys].every((key) => a[key] === b[key]);
}
