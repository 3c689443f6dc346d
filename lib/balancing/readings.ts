import { largestSetting } from '@/lib/hydraulics/links/balancing-valve';
import type { BalancingValveLink, NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';

/**
 * One reading: the differential pressure across a link (kPa; across a pump what it raises) or the flow through it (L/s).
 * `link` is the station's balancing valve, pump or other link; `meter` names the instrument, whose bias its readings share.
 */
export interface LoopReading {
  link: string;
  quantity: 'dropKpa' | 'flowLs';
  value: number;
  meter: string;
  /** One standard deviation of the reading: a part of the flow, and a fixed part in the reading's own unit. */
  flowRelative?: number;
  absolute?: number;
}

/** Turns of balancing valves, speed ratios of pumps and openings of control valves by link id; what is not named stands as in the document. */
export type LoopSettings = Record<string, number>;

/** Readings taken while nothing was changed, with how the loop stood then. */
export interface ReadingRound {
  settings: LoopSettings;
  readings: LoopReading[];
  /** Valves that were set anew to the setting they were already noted at: what was wrong with them before need not be now. */
  setAgain?: string[];
}

/** The document with its valves and pumps as they stand. */
export function documentAt(document: NetworkDocument, settings: LoopSettings): NetworkDocument {
  return { ...document, links: document.links.map((link) => (settings[link.id] === undefined ? link : linkAt(link, settings[link.id]))) };
}

function linkAt(link: NetworkLink, setting: number): NetworkLink {
  if (link.kind === 'balancingValve') return { ...link, setting };
  if (link.kind === 'pump') return { ...link, speed: setting };
  if (link.kind === 'controlValve') return { ...link, opening: setting };
  throw new RangeError(`${link.id} has no setting`);
}

/** Setting at which a balancing valve stands, turns; fully open where nothing names it. */
export const settingIn = (settings: LoopSettings, link: BalancingValveLink) =>
  settings[link.id] ?? link.setting ?? largestSetting(link.kvTable);
